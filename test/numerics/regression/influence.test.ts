import { expect, test } from 'vitest';
import { regressionInfluence } from '../../../src/numerics/regression/influence.ts';
import { linearRegression } from '../../../src/numerics/regression/linear-regression.ts';
import { lightness, quality } from '../correlation/tuna.ts';

test('by hand: (0, 1), (1, 3), (2, 2) has leverages 5/6, 1/3, 5/6', () => {
  const found = regressionInfluence(Float64Array.of(1, 3, 2), [Float64Array.of(0, 1, 2)]);
  expect(found.hat?.[0]).toBeCloseTo(5 / 6, 14);
  expect(found.hat?.[1]).toBeCloseTo(1 / 3, 14);
  // One degree of freedom: every standardized residual is -1 or 1.
  expect(found.standardized[1]).toBeCloseTo(1, 13);
});

test('agrees with R 4.2 hatvalues, rstandard, rstudent, cooks.distance, dffits (last row)', () => {
  const found = regressionInfluence(quality, [lightness]);
  expect(found.hat?.[8]).toBeCloseTo(0.6704555743034695, 13);
  expect(found.standardized[8]).toBeCloseTo(-2.041530987905924, 12);
  expect(found.studentized[8]).toBeCloseTo(-2.971483902936486, 12);
  expect(found.cooksDistance[8]).toBeCloseTo(4.239727978807317, 12);
  expect(found.dffits[8]).toBeCloseTo(-4.23839472054316, 12);
});

test('theory: leverages add up to the number of coefficients; studentized uses the SD without the row', () => {
  const found = regressionInfluence(quality, [lightness]);
  expect(found.hat?.reduce((a, b) => a + b, 0)).toBeCloseTo(2, 13);
  const s = linearRegression(quality, [lightness]).residualSd as number;
  const without = linearRegression(quality.slice(0, 8), [lightness.slice(0, 8)]).residualSd as number;
  expect((found.studentized[8] as number) * without).toBeCloseTo((found.standardized[8] as number) * s, 12);
});

test('invariance: another unit of the outcome changes nothing', () => {
  const a = regressionInfluence(quality, [lightness]);
  const b = regressionInfluence(
    quality.map((v) => 60 * v),
    [lightness],
  );
  expect(b.cooksDistance[3]).toBeCloseTo(a.cooksDistance[3] as number, 12);
});

test('degenerate: a row of leverage 1 has no residual in SD; others keep theirs', () => {
  const found = regressionInfluence(Float64Array.of(6, 5, 7, 12, 8), [Float64Array.of(8, 8, 8, 19, 8)]);
  expect(found.standardized[3]).toBe(null);
  expect(found.dffits[3]).toBe(null);
  expect(found.standardized[0]).toBeCloseTo(-0.5 / Math.sqrt((5 / 3) * 0.75), 12);
  expect(found.reason).toContain('leverage 1');
  expect(regressionInfluence(Float64Array.of(1, 3, 5), [Float64Array.of(0, 1, 2)]).reason).toContain('exact');
  expect(regressionInfluence(Float64Array.of(1, 3), [Float64Array.of(0, 1)]).hat).toBe(null);
  expect(regressionInfluence(quality, [lightness, lightness]).hat).toBe(null);
});

test('refuses unequal lengths', () => {
  expect(() => regressionInfluence(quality, [Float64Array.of(1)])).toThrow(/must be as long as/);
});
