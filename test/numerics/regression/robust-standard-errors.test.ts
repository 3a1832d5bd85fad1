import { expect, test } from 'vitest';
import { type HcType, robustStandardErrors } from '../../../src/numerics/regression/robust-standard-errors.ts';
import { lightness, quality } from '../correlation/tuna.ts';

test('by hand: with an intercept only HC0 is sqrt(sum e^2) / n and HC3 has 1 - h = 2/3', () => {
  const y = Float64Array.of(1, 2, 6);
  expect(robustStandardErrors(y, [], { hc: 'HC0' }).se?.[0]).toBeCloseTo(Math.sqrt(14) / 3, 14);
  expect(robustStandardErrors(y, [], { hc: 'HC3' }).se?.[0]).toBeCloseTo((Math.sqrt(14) / 3) * 1.5, 13);
});

test('agrees with a transcription in R 4.2 of the five forms', () => {
  const slopes: Record<HcType, number> = {
    HC0: 0.0547460774506714,
    HC1: 0.06207621693889607,
    HC2: 0.08691993295649511,
    HC3: 0.1449981451920637,
    HC4: 0.2489828554130971,
  };
  for (const [hc, se] of Object.entries(slopes)) {
    expect(robustStandardErrors(quality, [lightness], { hc: hc as HcType }).se?.[1]).toBeCloseTo(se, 12);
  }
});

test('theory: HC1 is HC0 times sqrt(n / (n - p)), and HC0 to HC3 rise', () => {
  const se = (hc: HcType) => robustStandardErrors(quality, [lightness], { hc }).se?.[1] as number;
  expect(se('HC1') / se('HC0')).toBeCloseTo(Math.sqrt(9 / 7), 13);
  expect(se('HC2')).toBeGreaterThan(se('HC0'));
  expect(se('HC3')).toBeGreaterThan(se('HC2'));
});

test('invariance: a shift of the predictor leaves the slope and its SE', () => {
  const plain = robustStandardErrors(quality, [lightness]);
  const shifted = robustStandardErrors(quality, [lightness.map((v) => v - 50)]);
  expect(shifted.se?.[1]).toBeCloseTo(plain.se?.[1] as number, 11);
});

test('degenerate: a row of leverage 1 undefines HC2 to HC4, not HC0 (case anscombe/081)', () => {
  const x = Float64Array.of(8, 8, 8, 19, 8);
  const y = Float64Array.of(6, 5, 7, 12, 8);
  expect(robustStandardErrors(y, [x], { hc: 'HC3' })).toMatchObject({
    se: null,
    reason: expect.stringContaining('leverage 1'),
  });
  expect(robustStandardErrors(y, [x], { hc: 'HC0' }).se?.length).toBe(2);
  expect(robustStandardErrors(Float64Array.of(1, 3), [Float64Array.of(0, 1)]).reason).toContain('no residual left');
  expect(robustStandardErrors(Float64Array.of(1, 3, 5), [Float64Array.of(0, 1, 2)]).reason).toContain('exact');
  expect(robustStandardErrors(quality, [lightness, lightness]).coefficients).toBe(null);
});

test('refuses an unknown form', () => {
  expect(() => robustStandardErrors(quality, [lightness], { hc: 'HC5' as HcType })).toThrow(/\*hc\* must be HC0/);
});
