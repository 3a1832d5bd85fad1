import { expect, test } from 'vitest';
import { diagnosePairs, leveragePairs } from '../../src/analysis/association-diagnostics.ts';
import { referencePairs } from '../support/associations.ts';

test('by hand: x 1, 2, 3, 4, 15 has leverages 1/5 + (x - 5)^2 / 130; only the last is above 4/5', () => {
  const found = diagnosePairs(Float64Array.of(1, 2, 3, 4, 15), Float64Array.of(1, 3, 2, 5, 4));
  expect(found.pairs.map((pair) => pair.hat)).toEqual(
    [16, 9, 4, 1, 100].map((square) => expect.closeTo(0.2 + square / 130, 12)),
  );
  expect(found.limits.hat).toBeCloseTo(0.8, 15);
  expect(leveragePairs(found)).toEqual([4]);
});

// R 4.2.2 hatvalues, as recorded in test/reference/cases/stars_cyg.json (regression_influence).
test('agrees with R: leverages of stars 1 and 2; the four giants alone lie beyond 4/47', () => {
  const { x, y } = referencePairs('stars_cyg', 'log_te', 'log_light');
  const found = diagnosePairs(x, y);
  expect(found.pairs[0]?.hat).toBeCloseTo(0.022201902895248826, 10);
  expect(found.pairs[1]?.hat).toBeCloseTo(0.03734095599759804, 10);
  expect(
    leveragePairs(found)
      .map((i) => i + 1)
      .sort((a, b) => a - b),
  ).toEqual([11, 20, 30, 34]);
  // SciPy 1.10 f.ppf(.5, 2, 45).
  expect(found.limits.cook).toBeCloseTo(0.7039344015673953, 12);
});

test('invariance: another unit of x leaves leverage, Cook and residual', () => {
  const { x, y } = referencePairs('mtcars', 'wt', 'mpg');
  const [plain, scaled] = [
    diagnosePairs(x, y),
    diagnosePairs(
      x.map((v) => 453.6 * v - 9),
      y,
    ),
  ];
  plain.pairs.forEach((pair, i) => {
    expect(scaled.pairs[i]?.hat).toBeCloseTo(pair.hat as number, 9);
    expect(scaled.pairs[i]?.cook).toBeCloseTo(pair.cook as number, 9);
    expect(scaled.pairs[i]?.studentized).toBeCloseTo(pair.studentized as number, 9);
  });
});

test('degenerate: few pairs, an x that does not vary and an exact line give a reason', () => {
  expect(diagnosePairs(Float64Array.of(1, 2), Float64Array.of(1, 2)).reason).toBe('fewer than 3 pairs');
  expect(diagnosePairs(new Float64Array(4), Float64Array.of(1, 2, 3, 4)).pairs).toEqual([]);
  expect(diagnosePairs(Float64Array.of(1, 2, 3, 4), Float64Array.of(2, 4, 6, 8)).reason).toMatch(/exact/);
});
