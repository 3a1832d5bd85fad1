import { expect, test } from 'vitest';
import { lillieforsTableP } from '../../../src/numerics/checks/lilliefors-table.ts';
import { standardScores } from '../../../src/numerics/checks/standard-scores.ts';
import { rng } from '../../../src/numerics/rng.ts';
import { normalLower, normalQuantile, normalUpper } from '../../../src/numerics/tails/normal.ts';

function distance(x: Float64Array): number {
  const z = standardScores(x) as Float64Array;
  const n = z.length;
  return z.reduce((d, v, i) => Math.max(d, (i + 1) / n - normalLower(v), (n - i) / n - normalUpper(v)), 0);
}

test('by hand: a tabled percentile gives its probability', () => {
  expect(lillieforsTableP(0.19190794, 20)).toBeCloseTo(0.05, 12);
  expect(lillieforsTableP(0.12930804, 20)).toBeCloseTo(0.5, 12);
});

test('agrees with Stephens 1974 (from memory): 5 % point .895, 10 % point .819 of the scaled distance, linear between percentiles', () => {
  const scale = Math.sqrt(100) - 0.01 + 0.085;
  expect(Math.abs(lillieforsTableP(0.895 / scale, 100) - 0.05)).toBeLessThan(0.003);
  expect(Math.abs(lillieforsTableP(0.819 / scale, 100) - 0.1)).toBeLessThan(0.0065);
});

test('theory: of 2,000 normal samples of 17 (seed 91) about a tenth and half lie beyond those points, within 3.5 SE', () => {
  const stream = rng(91);
  const ps = Array.from({ length: 2000 }, () =>
    lillieforsTableP(distance(Float64Array.from({ length: 17 }, () => normalQuantile(stream.uniform() || 0.5))), 17),
  );
  for (const alpha of [0.1, 0.5]) {
    const share = ps.filter((p) => p <= alpha).length / ps.length;
    expect(Math.abs(share - alpha)).toBeLessThan(3.5 * Math.sqrt((alpha * (1 - alpha)) / ps.length));
  }
});

test('invariance: p falls with the distance at every size', () => {
  for (const n of [4, 11, 64, 750, 4000]) {
    let last = 1;
    for (let d = 0.3; d < 1.5; d += 0.01) {
      const p = lillieforsTableP(d / (Math.sqrt(n) - 0.01 + 0.85 / Math.sqrt(n)), n);
      expect(p).toBeLessThanOrEqual(last);
      last = p;
    }
  }
});

test('degenerate: outside the table p stops at .99 and .001', () => {
  expect(lillieforsTableP(0.01, 30)).toBe(0.99);
  expect(lillieforsTableP(0.9, 30)).toBe(0.001);
});

test('refuses a distance of 0 and sizes below 4', () => {
  expect(() => lillieforsTableP(0, 10)).toThrow(/\*d\* must be above 0/);
  expect(() => lillieforsTableP(0.2, 3)).toThrow(/\*n\* must be a whole number of 4 or more/);
});
