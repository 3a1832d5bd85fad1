import { expect, test } from 'vitest';
import { furthest, grubbsTest } from '../../../src/numerics/rules/grubbs.ts';

// Mass spectrometer readings of the NIST/SEMATECH e-Handbook 1.3.5.17.1 (Tietjen & Moore 1972): 245.57 is the odd one.
const nist = Float64Array.of(199.31, 199.53, 200.19, 200.82, 201.92, 201.95, 202.18, 245.57);

test('by hand: in 0, 0, 0, 4 the furthest lies (n - 1) / sqrt(n) SD out, as far as any can', () => {
  const found = furthest(Float64Array.of(0, 0, 0, 4));
  expect(found?.distance).toBeCloseTo(1.5, 15);
  expect(found?.index).toBe(3);
});

test('agrees with the NIST/SEMATECH e-Handbook: G = 2.4688, critical value 2.032 one-sided, 2.127 two-sided', () => {
  const found = grubbsTest(nist);
  expect(found.g).toBeCloseTo(2.4688, 4);
  expect(found.critical).toBeCloseTo(2.1266, 4);
  expect(grubbsTest(nist, { alpha: 0.1 }).critical).toBeCloseTo(2.032, 3);
  expect([...found.flags]).toEqual([0, 0, 0, 0, 0, 0, 0, 1]);
});

test('theory: p at the critical value is alpha', () => {
  // Equal spacing apart from the last score, moved until G meets the critical value at the p of a bisection.
  let low = 6;
  let high = 60;
  const sample = (last: number) => Float64Array.of(1, 2, 3, 4, 5, last);
  for (let i = 0; i < 200; i++) {
    const middle = (low + high) / 2;
    if ((grubbsTest(sample(middle)).p as number) > 0.05) low = middle;
    else high = middle;
  }
  const found = grubbsTest(sample(high));
  expect(found.g).toBeCloseTo(found.critical as number, 9);
});

test('invariance: another unit and order change nothing but the index', () => {
  const turned = grubbsTest(nist.map((score) => 5 - 2 * score).reverse());
  const plain = grubbsTest(nist);
  expect(turned.g).toBeCloseTo(plain.g as number, 12);
  expect(turned.p).toBeCloseTo(plain.p as number, 12);
  expect(turned.index).toBe(0);
});

test('degenerate: few or equal scores give a reason; the largest possible G has p = 0', () => {
  expect(grubbsTest(Float64Array.of(1, 9)).reason).toBe('fewer than 3 scores');
  expect(grubbsTest(Float64Array.of(2, 2, 2))).toMatchObject({ g: null, p: null, reason: 'all scores are equal' });
  expect(grubbsTest(Float64Array.of(0, 0, 0, 0, 4)).p).toBeCloseTo(0, 12);
});

test('refuses an alpha of 0 or 1', () => {
  expect(() => grubbsTest(nist, { alpha: 0 })).toThrow(/\*alpha\* must be between 0 and 1/);
  expect(() => grubbsTest(nist, { alpha: 1 })).toThrow(/\*alpha\* must be between 0 and 1/);
});
