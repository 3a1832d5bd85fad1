import { expect, test } from 'vitest';
import { matrixFromColumns } from '../../../src/numerics/matrix.ts';
import { rng } from '../../../src/numerics/rng.ts';
import { mcdDistances, mcdOfResample, mcdSubsetSize } from '../../../src/numerics/rules/mcd.ts';
import { fitRows } from '../../../src/numerics/rules/mcd-search.ts';

const stream = rng(5);
const cloud = [0, 1].map(() => Float64Array.from({ length: 24 }, () => stream.uniform() + stream.uniform()));
const x = Float64Array.of(...(cloud[0] as Float64Array), 9, 9.1, 9.2, 9.3);
const y = Float64Array.of(...(cloud[1] as Float64Array), 9, 8.9, 9.1, 9.2);

test('by hand: subset sizes floor(2 n2 - n + 2 (n - n2) alpha)', () => {
  expect(mcdSubsetSize(75, 3, 0.5)).toBe(39);
  expect(mcdSubsetSize(75, 3, 0.75)).toBe(57);
  expect(mcdSubsetSize(20, 2, 1)).toBe(20);
});

test('agrees with the R case hbk (robustbase 0.95): h = 39 of 75 rows in three columns, 18 of 32', () => {
  expect(mcdSubsetSize(32, 3, 0.5)).toBe(18);
  expect(mcdSubsetSize(111, 4, 0.75)).toBe(84);
});

test('theory: a cluster that draws the classical middle to itself is flagged', () => {
  const found = mcdDistances([x, y], { alpha: 0.5 });
  expect([...found.flags.slice(24)]).toEqual([1, 1, 1, 1]);
  expect(found.center?.[0]).toBeLessThan(2);
});

test('theory: all rows in the subset give mean and covariance of all rows before reweighting', () => {
  const found = mcdDistances(cloud, { alpha: 1 });
  expect(found.subset?.length).toBe(24);
  const mean = (cloud[0] as Float64Array).reduce((a, b) => a + b, 0) / 24;
  expect(found.rawCenter?.[0]).toBeCloseTo(mean, 13);
});

test('invariance: another unit of a column leaves distances and marks', () => {
  const plain = mcdDistances([x, y], { alpha: 0.5 });
  const scaled = mcdDistances([x.map((v) => 1000 * v - 4), y], { alpha: 0.5 });
  expect([...scaled.flags]).toEqual([...plain.flags]);
  plain.distance2?.forEach((d, i) => {
    expect((scaled.distance2?.[i] as number) / d).toBeCloseTo(1, 8);
  });
});

test('degenerate: few rows, dependent columns and rows on a line give a reason', () => {
  expect(mcdDistances([Float64Array.of(1, 2, 3), Float64Array.of(1, 5, 2)]).reason).toBe('fewer than 4 rows');
  expect(mcdDistances([x, x]).reason).toBe('a column does not vary or is a combination of the others');
  const line = Float64Array.from(x, (v, i) => (i < 20 ? v : v + i * i));
  expect(mcdDistances([x, line], { alpha: 0.5 }).reason).toBe('15 rows have no spread in some direction');
});

test('refuses an alpha below .5 and a quantile of 0', () => {
  expect(() => mcdDistances([x, y], { alpha: 0.4 })).toThrow(/\*alpha\* must be between .5 and 1/);
  expect(() => mcdDistances([x, y], { quantile: 0 })).toThrow(/\*quantile\* must be/);
});

test('agrees with the full search: the marks of 6 resamples of a cloud with a far cluster', () => {
  const whole = fitRows(matrixFromColumns([x, y]), mcdDistances([x, y]).subset as Int32Array);
  if (whole === null) throw new Error('the subset spreads');
  let same = 0;
  for (let seed = 1; seed <= 6; seed++) {
    const draw = rng(seed);
    const rows = Array.from({ length: 28 }, () => draw.below(28));
    const columns = [x, y].map((column) => Float64Array.from(rows, (i) => column[i] as number));
    const [quick, full] = [mcdOfResample(columns, whole), mcdDistances(columns)];
    if (quick.flags.join() === full.flags.join()) same++;
  }
  expect(same).toBe(6);
});

test('degenerate: a resample without spread gives a reason', () => {
  const whole = fitRows(matrixFromColumns([x, y]), mcdDistances([x, y]).subset as Int32Array);
  if (whole === null) throw new Error('the subset spreads');
  const flat = new Float64Array(28).fill(1);
  expect(mcdOfResample([flat, flat], whole).reason).toBe('a column does not vary or is a combination of the others');
});
