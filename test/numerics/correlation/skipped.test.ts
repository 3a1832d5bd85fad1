import { expect, test } from 'vitest';
import { pearsonCorrelation } from '../../../src/numerics/correlation/pearson.ts';
import { skippedCorrelation, skippedOfResample } from '../../../src/numerics/correlation/skipped.ts';
import { columnIn, referenceColumns } from '../../support/reference-columns.ts';

const stars = referenceColumns('stars_cyg');
const te = columnIn(stars, 'log_te');
const light = columnIn(stars, 'log_light');
const marked = (flags: Uint8Array) => [...flags].flatMap((mark, i) => (mark === 1 ? [i + 1] : []));

test('by hand: a line of nine pairs and one far off it: r of the nine is 1', () => {
  const x = Float64Array.of(1, 2, 3, 4, 5, 6, 7, 8, 9, 5);
  const y = Float64Array.of(1.1, 1.9, 3.1, 3.9, 5.1, 5.9, 7.1, 7.9, 9.1, -60);
  const found = skippedCorrelation(x, y, { by: 'projection' });
  expect(marked(found.flags)).toEqual([10]);
  expect(found.kept).toBe(9);
  expect(found.r).toBeCloseTo(pearsonCorrelation(x.subarray(0, 9), y.subarray(0, 9)).r as number, 14);
});

test('agrees with NumPy corrcoef of the stars left: projection .682195 without 7, 11, 20, 30, 34', () => {
  const found = skippedCorrelation(te, light, { by: 'projection' });
  expect(marked(found.flags)).toEqual([7, 11, 20, 30, 34]);
  expect(found.r).toBeCloseTo(0.6821947163723936, 13);
});

test('agrees with NumPy corrcoef of the stars left: MCD .731301 without 7, 9, 11, 14, 20, 30, 34', () => {
  const found = skippedCorrelation(te, light, { by: 'mcd' });
  expect(marked(found.flags)).toEqual([7, 9, 11, 14, 20, 30, 34]);
  expect(found.r).toBeCloseTo(0.731301472951175, 13);
});

test.each(['projection', 'mcd'] as const)(
  'theory: the resample that is the pairs themselves gives the same r, %s',
  (by) => {
    expect(skippedOfResample(te, light, { by })(te, light)).toBeCloseTo(
      skippedCorrelation(te, light, { by }).r as number,
      13,
    );
  },
);

test('invariance: how far out the four giants lie does not matter', () => {
  const giants = new Set([10, 19, 29, 33]);
  const further = light.map((value, i) => (giants.has(i) ? value + 50 : value));
  for (const by of ['projection', 'mcd'] as const) {
    const [near, far] = [skippedCorrelation(te, light, { by }), skippedCorrelation(te, further, { by })];
    expect(marked(far.flags)).toEqual(marked(near.flags));
    expect(far.r).toBeCloseTo(near.r as number, 13);
  }
});

test('degenerate: few pairs, a vector that does not vary, pairs on a line, a resample without spread', () => {
  const one = Float64Array.of(1, 2, 3, 4, 5, 6);
  expect(skippedCorrelation(one.subarray(0, 4), one.subarray(0, 4), { by: 'mcd' }).reason).toBe('fewer than 5 pairs');
  expect(skippedCorrelation(one, new Float64Array(6), { by: 'projection' }).reason).toBe('y does not vary');
  expect(skippedCorrelation(one, one, { by: 'mcd' }).reason).toBe('the pairs lie on a line');
  const flat = new Float64Array(47).fill(4);
  for (const by of ['projection', 'mcd'] as const) {
    expect(skippedOfResample(te, light, { by })(flat, flat)).toBe(null);
    expect(skippedOfResample(one, one, { by: 'mcd' })(one, one)).toBe(null);
  }
});

test('refuses unequal lengths', () => {
  expect(() => skippedCorrelation(te, light.subarray(2), { by: 'mcd' })).toThrow(/must be as long as/);
});
