import { expect, test } from 'vitest';
import { bootstrapPairs } from '../../src/analysis/association-bootstrap.ts';
import { pearsonCorrelation } from '../../src/numerics/correlation/pearson.ts';
import { fillNormal } from '../../src/numerics/draws.ts';
import { rng } from '../../src/numerics/rng.ts';
import { columnIn, referenceColumns } from '../support/reference-columns.ts';

const options = { resamples: 999, seed: 3, alpha: 0.05, alternative: 'two-sided' } as const;
const cars = referenceColumns('mtcars');
const [wt, mpg] = [columnIn(cars, 'wt'), columnIn(cars, 'mpg')];
const r = (x: Float64Array, y: Float64Array) => pearsonCorrelation(x, y).r;

test('theory: the SE of r of 200 normal pairs with rho 0 is near 1 / sqrt(n - 1), within 15 %', () => {
  const [x, y] = [new Float64Array(200), new Float64Array(200)];
  const stream = rng(11);
  fillNormal(x, stream);
  fillNormal(y, stream);
  const found = bootstrapPairs(x, y, r, options);
  expect((found.se as number) * Math.sqrt(199)).toBeGreaterThan(0.85);
  expect((found.se as number) * Math.sqrt(199)).toBeLessThan(1.15);
  expect(found.p as number).toBeGreaterThan(0.05);
});

test('by hand: a statistic that is the mean of x has the limits of the sorted resample means, place 25 of 999', () => {
  const means: number[] = [];
  const found = bootstrapPairs(
    wt,
    mpg,
    (x) => {
      const value = x.reduce((a, b) => a + b, 0) / x.length;
      means.push(value);
      return value;
    },
    options,
  );
  means.sort((a, b) => a - b);
  expect(found.interval).toEqual([means[24], means[974]]);
  // Every mean lies above 0: p = 2 (0 + 1) / (999 + 1).
  expect(found.p).toBeCloseTo(0.002, 12);
});

test('theory: pairs are drawn whole', () => {
  const together = new Set(wt.map((value, i) => 1000 * value + (mpg[i] as number)));
  bootstrapPairs(
    wt,
    mpg,
    (x, y) => {
      expect(x.every((value, i) => together.has(1000 * value + (y[i] as number)))).toBe(true);
      return 0;
    },
    { ...options, resamples: 20 },
  );
});

test('invariance: the same seed gives the same numbers, and the scores are not modified', () => {
  const before = wt.slice();
  expect(bootstrapPairs(wt, mpg, r, options)).toEqual(bootstrapPairs(wt, mpg, r, options));
  expect(wt).toEqual(before);
});

test('degenerate: a few resamples without a value are counted, many leave nothing to say', () => {
  let calls = 0;
  const some = bootstrapPairs(wt, mpg, () => (calls++ % 100 === 0 ? null : calls), options);
  expect(some.how).toBe('percentile bootstrap, B = 999, 10 of them without a value');
  const many = bootstrapPairs(wt, mpg, () => (calls++ % 10 === 0 ? null : calls), options);
  expect(many).toMatchObject({ se: null, p: null, interval: null });
  expect(many.reason).toMatch(/of 999 resamples have no value/);
});
