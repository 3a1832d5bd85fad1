import { describe, expect, it } from 'vitest';
import { sorted } from '../../src/numerics/order.ts';
import { medianStandardError, medianStandardErrorSorted } from '../../src/numerics/se-median.ts';
import { close, darwin, scores } from './samples.ts';

describe('standard error of the median', () => {
  it('by hand: Darwin, k = round(8 - 2.5758 * 1.9365) = 3: (56 - 6) / 5.15166', () => {
    const own = medianStandardError(darwin);
    expect(own.k).toBe(3);
    expect(close(own.se, 50 / (2 * 2.5758293035489004), 1e-13)).toBe(true);
  });
  it('agrees with common practice: the sorted form is the same', () => {
    expect(medianStandardErrorSorted(sorted(darwin))).toEqual(medianStandardError(darwin));
  });
  it('theory: near 1.2533 / sqrt(n) for normal quantiles, n = 999 (within 3 %)', () => {
    const x = Float64Array.from({ length: 999 }, (_, i) => Math.log((i + 1) / (999 - i)) / 1.5958);
    // Logistic quantiles scaled to the normal density at the median, sqrt(2/pi) = .7979 (common practice).
    expect(Math.abs(medianStandardError(x).se / (1.2533 / Math.sqrt(999)) - 1)).toBeLessThan(0.03);
  });
  it('invariance: unit and offset', () => {
    expect(
      close(medianStandardError(darwin.map((x) => 4 * x + 64)).se, 4 * medianStandardError(darwin).se, 1e-13),
    ).toBe(true);
  });
  it('degenerate: k is at least 1, equal scores have no error', () => {
    expect(medianStandardError(scores(1, 2)).k).toBe(1);
    expect(medianStandardError(scores(2, 2, 2)).se).toBe(0);
  });
  it('refuses a single score', () => {
    expect(() => medianStandardError(scores(1))).toThrow(RangeError);
  });
});
