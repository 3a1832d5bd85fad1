import { describe, expect, it } from 'vitest';
import {
  bisquareLocation,
  huberLocation,
  modifiedOneStepM,
  modifiedOneStepSorted,
  oneStepM,
  oneStepSorted,
} from '../../src/numerics/m-estimator.ts';
import { mean } from '../../src/numerics/moments.ts';
import { close, darwin, scores } from './samples.ts';

describe('M-estimates of location', () => {
  it('by hand: one step from the median of 1, 2, 3, 4, 100 with scale 1', () => {
    // k = 1: |z| <= 1 keeps 2, 3, 4; one below, one above: (9 + 0) / 3
    expect(oneStepSorted(scores(1, 2, 3, 4, 100), 1, 1)).toEqual({ estimate: 3, low: 1, high: 1 });
    // k = 2: 1, 2, 3, 4 stay, one above: (2 + 10) / 4
    expect(oneStepSorted(scores(1, 2, 3, 4, 100), 2, 1)).toEqual({ estimate: 3, low: 0, high: 1 });
    expect(modifiedOneStepSorted(scores(1, 2, 3, 4, 100), 1)).toEqual({ estimate: 3, removed: 2 });
  });
  it('by hand: MOM of Darwin leaves out -67 and -48 (2.24 * 1.4826 * 17 = 56.46 from 24)', () => {
    const own = modifiedOneStepM(darwin);
    expect(own.removed).toBe(2);
    expect(close(own.estimate, 429 / 13, 1e-13)).toBe(true);
  });
  it('agrees with a root found by SciPy 1.10 brentq (rtol 1e-12)', () => {
    expect(close(huberLocation(darwin).estimate, 26.67502925, 1e-12)).toBe(true);
    expect(close(bisquareLocation(darwin).estimate, 28.809121994402737, 1e-12)).toBe(true);
    expect(close(huberLocation(darwin).scale, 25.2042, 1e-12)).toBe(true);
  });
  it('theory: with a bend beyond every score all are the mean', () => {
    expect(close(huberLocation(darwin, { k: 1e6 }).estimate, mean(darwin), 1e-12)).toBe(true);
    expect(close(oneStepM(darwin, { k: 1e6 }).estimate, mean(darwin), 1e-12)).toBe(true);
    expect(close(modifiedOneStepM(darwin, { cutoff: 1e6 }).estimate, mean(darwin), 1e-12)).toBe(true);
    expect(close(bisquareLocation(darwin, { c: 1e8 }).estimate, mean(darwin), 1e-9)).toBe(true);
  });
  it('invariance: offset and unit (rtol 1e-12)', () => {
    for (const estimate of [huberLocation, bisquareLocation, oneStepM, modifiedOneStepM]) {
      const own = estimate(darwin).estimate as number;
      expect(close(estimate(darwin.map((x) => 4 * x - 512)).estimate, 4 * own - 512, 1e-12)).toBe(true);
    }
  });
  it('degenerate: a MAD of 0', () => {
    for (const estimate of [huberLocation, bisquareLocation, oneStepM, modifiedOneStepM]) {
      expect(estimate(scores(3, 3, 3, 9))).toMatchObject({
        estimate: null,
        scale: 0,
        reason: 'the MAD is 0: more than half the scores are identical',
      });
    }
    expect(oneStepSorted(scores(3, 3, 3, 9), 1.28, 0).estimate).toBe(3);
    expect(modifiedOneStepSorted(scores(1, 2), 0.1)).toEqual({ estimate: 1.5, removed: 2 });
  });
  it('refuses no scores and bends that are not positive', () => {
    expect(() => huberLocation(scores())).toThrow(RangeError);
    expect(() => huberLocation(darwin, { k: 0 })).toThrow('*k* must be a positive');
    expect(() => bisquareLocation(darwin, { c: -1 })).toThrow('*c* must be a positive');
    expect(() => oneStepM(darwin, { madConstant: Number.NaN })).toThrow('*madConstant* must be');
    expect(() => modifiedOneStepM(darwin, { cutoff: Infinity })).toThrow('*cutoff* must be');
  });
});
