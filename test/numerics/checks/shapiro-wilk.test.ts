import { expect, test } from 'vitest';
import { shapiroWilk } from '../../../src/numerics/checks/shapiro-wilk.ts';
import { normalQuantile } from '../../../src/numerics/tails/normal.ts';
import { lightness, quality } from '../correlation/tuna.ts';

test('by hand: three scores 1, 2, 4 have W = (4 - 1)^2 / 2 / SS with SS = 14/3', () => {
  const found = shapiroWilk(Float64Array.of(1, 2, 4));
  expect(found.w).toBeCloseTo(4.5 / (14 / 3), 13);
});

test('agrees with R 4.2 shapiro.test at n = 3, 4 and 9', () => {
  const cases: [Float64Array, number, number][] = [
    [Float64Array.of(1, 2, 4), 0.9642857142857142, 0.6368868450289632],
    [Float64Array.of(1, 2, 4, 8), 0.92020267879194, 0.5380837772749699],
    [quality, 0.9135433393538921, 0.3414681031052583],
    [lightness, 0.840008126164393, 0.05776646499567443],
  ];
  for (const [x, w, p] of cases) {
    const found = shapiroWilk(x);
    expect(found.w).toBeCloseTo(w, 10);
    expect(found.p).toBeCloseTo(p, 9);
  }
});

test('theory: normal quantiles have W near 1 and a p near 1, an exponential shape a small one', () => {
  const share = (i: number) => (i + 0.5) / 200;
  const normal = shapiroWilk(Float64Array.from({ length: 200 }, (_, i) => normalQuantile(share(i))));
  expect(normal.w).toBeGreaterThan(0.998);
  expect(normal.p).toBeGreaterThan(0.99);
  const skewed = shapiroWilk(Float64Array.from({ length: 200 }, (_, i) => -Math.log(share(i))));
  expect(skewed.p).toBeLessThan(1e-10);
});

test('invariance: unit, mirror and order do not matter', () => {
  const plain = shapiroWilk(lightness);
  const turned = shapiroWilk(lightness.map((v) => 1e6 - 250 * v).reverse());
  expect(turned.w).toBeCloseTo(plain.w as number, 12);
  expect(turned.p).toBeCloseTo(plain.p as number, 11);
});

test('degenerate: few, too many and equal scores give a reason', () => {
  expect(shapiroWilk(Float64Array.of(1, 2)).reason).toBe('fewer than 3 scores');
  expect(shapiroWilk(Float64Array.of(3, 3, 3)).reason).toBe('all scores are equal');
  expect(shapiroWilk(new Float64Array(5001)).reason).toContain('more than 5000');
  expect(shapiroWilk(Float64Array.of(0, 0, 0, 0, 0, 0, 0, 0, 0, 0, 1)).p).toBeLessThan(1e-5);
});

test('refuses NaN', () => {
  expect(() => shapiroWilk(Float64Array.of(1, Number.NaN, 2))).toThrow(/\*x\* must hold finite/);
});
