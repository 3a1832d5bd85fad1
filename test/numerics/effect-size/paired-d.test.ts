import { describe, expect, it } from 'vitest';
import { pairedD } from '../../../src/numerics/effect-size/paired-d.ts';
import { close, darwin, drugOne, drugTwo, scores } from '../samples.ts';

describe('standardized differences of pairs', () => {
  it('by hand: 1, 2, 6 against 0, 3, 3: differences 1, -1, 3', () => {
    const own = pairedD(scores(1, 2, 6), scores(0, 3, 3));
    // Means 3 and 2, variances 7 and 3, covariance 3: SD of differences 2
    expect(close(own.dZ, 0.5, 1e-14) && close(own.dAverage, 1 / Math.sqrt(5), 1e-14)).toBe(true);
    expect(close(own.dMeanSd, 2 / (Math.sqrt(7) + Math.sqrt(3)), 1e-14) && close(own.r, 3 / Math.sqrt(21), 1e-13)).toBe(
      true,
    );
    expect(close(own.dRepeated, 0.5 * Math.sqrt(2 * (1 - 3 / Math.sqrt(21))), 1e-13)).toBe(true);
    expect(close(own.factor, 1 / Math.sqrt(Math.PI), 1e-13) && close(own.gZ, 0.5 / Math.sqrt(Math.PI), 1e-13)).toBe(
      true,
    );
  });
  it('agrees with R 4.2 pt inverted by uniroot: limits of dZ for Darwin (rtol 1e-8)', () => {
    const { interval } = pairedD(darwin, new Float64Array(15));
    expect(close(interval?.[0], 0.00070424870179377271, 1e-6) && close(interval?.[1], 1.0916029278014328, 1e-8)).toBe(
      true,
    );
  });
  it('theory: dZ sqrt(n) is the paired t; corrected values are J times the plain', () => {
    const own = pairedD(drugTwo, drugOne);
    expect(close((own.dZ as number) * Math.sqrt(10), 4.062127683382037, 1e-12)).toBe(true);
    expect(close(own.gAverage, (own.factor as number) * (own.dAverage as number), 1e-14)).toBe(true);
    expect(pairedD(drugTwo, drugOne, { alternative: 'greater' }).interval?.[1]).toBe(null);
  });
  it('invariance: unit and offset of both conditions', () => {
    const own = pairedD(drugTwo, drugOne);
    const moved = pairedD(
      drugTwo.map((x) => 8 * x + 64),
      drugOne.map((x) => 8 * x + 64),
    );
    expect(
      close(moved.dRepeated, own.dRepeated as number, 1e-12) &&
        close(moved.interval?.[0], own.interval?.[0] as number, 1e-9),
    ).toBe(true);
  });
  it('degenerate: equal differences, a condition without spread, two pairs, one pair', () => {
    const moved = drugOne.map((x) => x + 0.1);
    expect(pairedD(moved, drugOne)).toMatchObject({
      dZ: null,
      dRepeated: null,
      interval: null,
      reason: 'all differences are equal',
    });
    expect(pairedD(darwin, new Float64Array(15))).toMatchObject({ r: null, dRepeated: null });
    expect(pairedD(scores(1, 4), scores(0, 1))).toMatchObject({ factor: null, gZ: null });
    expect(pairedD(scores(1), scores(2)).reason).toBe('only one pair');
  });
  it('refuses unequal lengths', () => {
    expect(() => pairedD(drugOne, scores(1))).toThrow('*y* must be as long');
  });
});
