import { expect, test } from 'vitest';
import { median } from '../../../src/numerics/order.ts';
import { rng } from '../../../src/numerics/rng.ts';
import { medcouple } from '../../../src/numerics/rules/medcouple.ts';

/** Every pair written out (Brys, Hubert & Struyf 2004), for scores without ties at the median. */
function allPairs(x: Float64Array): number {
  const center = median(x);
  const d = [...x].map((score) => score - center);
  const values: number[] = [];
  for (const a of d.filter((v) => v >= 0)) {
    for (const b of d.filter((v) => v <= 0)) values.push(a === 0 && b === 0 ? 0 : (a + b) / (a - b));
  }
  return median(Float64Array.from(values));
}

test('by hand: 1, 2, 3, 5, 9 has median 3 and pairs with median 1/3', () => {
  // a in {0, 2, 6}, b in {-2, -1, 0}: -1 -1 0; 0 1/3 1; 1/2 5/7 1 -> middle of nine = 1/3.
  expect(medcouple(Float64Array.of(9, 1, 3, 2, 5))).toBeCloseTo(1 / 3, 15);
});

test('by hand: scores equal to the median count -1, 0, 1 by their order', () => {
  // 0, 1, 1, 4, 9: above 8, 3, 0, 0 and below 0, 0, -1 give 1 1 7/9; 1 1 1/2; 1 0 -1; 0 -1 -1: middle pair 7/9 and 1/2.
  expect(medcouple(Float64Array.of(0, 1, 1, 4, 9))).toBeCloseTo(23 / 36, 15);
});

test('agrees with all pairs written out, odd and even n up to 240', () => {
  const stream = rng(7);
  for (const n of [2, 3, 10, 31, 100, 240]) {
    const x = Float64Array.from({ length: n }, () => -Math.log(1 - stream.uniform()));
    expect(medcouple(x)).toBeCloseTo(allPairs(x), 13);
  }
});

test('agrees with R robustbase 0.95 on the drug1 scores of sleep (case sleep/171)', () => {
  expect(medcouple(Float64Array.of(0.7, -1.6, -0.2, -1.2, -0.1, 3.4, 3.7, 0.8, 0, 2))).toBeCloseTo(0.22, 14);
});

test('theory: between -1 and 1, 0 for symmetric scores, positive for a longer upper tail', () => {
  expect(medcouple(Float64Array.of(-5, -2, -1, 1, 2, 5))).toBeCloseTo(0, 15);
  expect(medcouple(Float64Array.of(1, 2, 4, 8, 16, 32, 64))).toBeGreaterThan(0.3);
});

test('invariance: mirrored scores change its sign, another unit nothing', () => {
  const x = Float64Array.of(1, 2, 4, 8, 16, 32, 64, 80);
  const mc = medcouple(x) as number;
  expect(medcouple(x.map((score) => -score))).toBeCloseTo(-mc, 14);
  expect(medcouple(x.map((score) => 3 + 10 * score))).toBeCloseTo(mc, 13);
});

test('degenerate: no scores null, equal scores 0', () => {
  expect(medcouple(new Float64Array(0))).toBe(null);
  expect(medcouple(Float64Array.of(4, 4, 4))).toBe(0);
});

test('refuses NaN', () => {
  expect(() => medcouple(Float64Array.of(1, Number.NaN))).toThrow(/\*x\* must hold finite/);
});
