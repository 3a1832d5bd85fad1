import { expect, test } from 'vitest';
import { matrix, matrixFromColumns } from '../../../src/numerics/matrix.ts';
import { rng } from '../../../src/numerics/rng.ts';
import { concentrate, distancesFrom, fitRows, smallestDeterminant } from '../../../src/numerics/rules/mcd-search.ts';

const below = (seed: number) => {
  const stream = rng(seed);
  return (bound: number) => stream.below(bound);
};

test('by hand: rows (0,0), (2,0), (0,2), (2,2) have covariance 4/3 on the diagonal', () => {
  const fit = fitRows(matrix(4, 2, [0, 0, 2, 0, 0, 2, 2, 2]), Int32Array.of(0, 1, 2, 3));
  expect([...(fit?.covariance.data ?? [])]).toEqual([4 / 3, 0, 0, 4 / 3]);
  expect(fit?.logDeterminant).toBeCloseTo(2 * Math.log(4 / 3), 14);
});

test('by hand: one variable, the shortest half of 0, 1, 2, 10, 20 is 0, 1, 2', () => {
  const fit = smallestDeterminant(matrix(5, 1, [20, 1, 10, 0, 2]), 3, below(1));
  expect([...(fit?.indices ?? [])]).toEqual([1, 3, 4]);
});

test('agrees with all subsets tried: drawn starts and exchanges find the smallest determinant of 6 of 16 rows', () => {
  const stream = rng(11);
  const data = matrixFromColumns([0, 1].map(() => Float64Array.from({ length: 16 }, () => stream.uniform() ** 2)));
  let smallest = Number.POSITIVE_INFINITY;
  for (let mask = 0; mask < 2 ** 16; mask++) {
    const rows = Int32Array.from(Array.from({ length: 16 }, (_, i) => i).filter((i) => (mask >> i) & 1));
    if (rows.length === 9) smallest = Math.min(smallest, fitRows(data, rows)?.logDeterminant ?? smallest);
  }
  expect(smallestDeterminant(data, 9, below(2))?.logDeterminant).toBeCloseTo(smallest, 10);
});

test('theory: the squared distances of a fit to its own rows add up to (rows - 1) p', () => {
  const data = matrix(5, 2, [1, 2, 2, 1, 3, 4, 4, 3, 5, 5]);
  const fit = fitRows(data, Int32Array.of(0, 1, 2, 3, 4));
  if (fit === null) throw new Error('the rows spread');
  expect(distancesFrom(data, fit).reduce((a, b) => a + b, 0)).toBeCloseTo(8, 12);
});

test('invariance: the seed of the starts does not change the subset found', () => {
  const stream = rng(3);
  const data = matrixFromColumns([0, 1, 2].map(() => Float64Array.from({ length: 24 }, () => stream.uniform())));
  const found = [1, 2].map((seed) => smallestDeterminant(data, 14, below(seed))?.logDeterminant as number);
  expect(found[0]).toBeCloseTo(found[1] as number, 10);
});

test('degenerate: h rows on one line have no determinant', () => {
  const line = Array.from({ length: 20 }, (_, i) => (i < 14 ? [i, i] : [i * i, 100 - i])).flat();
  expect(smallestDeterminant(matrix(20, 2, line), 11, below(1))).toBe(null);
});

test('refuses a bound that the draw refuses', () => {
  const data = matrixFromColumns(
    [0, 1].map((k) => Float64Array.from({ length: 60 }, (_, i) => ((i * 37 + k * 11) % 61) ** 2)),
  );
  const broken = () => {
    throw new RangeError('*n* must be an integer');
  };
  expect(() => smallestDeterminant(data, 32, broken)).toThrow(/\*n\* must be an integer/);
});

test('by hand: from the middle of 0, 1, 2 the three nearest of 0, 1, 2, 10, 20 are themselves', () => {
  const data = matrix(5, 1, [0, 1, 2, 10, 20]);
  const start = fitRows(data, Int32Array.of(0, 1, 2));
  if (start === null) throw new Error('the rows spread');
  expect([...(concentrate(data, 3, start, 10)?.indices ?? [])]).toEqual([0, 1, 2]);
  const elsewhere = fitRows(data, Int32Array.of(1, 3));
  if (elsewhere === null) throw new Error('the rows spread');
  expect([...(concentrate(data, 3, elsewhere, 10)?.indices ?? [])]).toEqual([0, 1, 2]);
});
