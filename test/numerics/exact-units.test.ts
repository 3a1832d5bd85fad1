import { describe, expect, it } from 'vitest';
import { exactUnits } from '../../src/numerics/exact-units.ts';
import { scores } from './samples.ts';

describe('whole units', () => {
  it('by hand: decimals become whole numbers, divided by what they share', () => {
    expect(exactUnits(scores(0.1, 0.2, 0.3), 1000)).toEqual({ units: scores(1, 2, 3), unit: 0.1 });
    expect(exactUnits(scores(-4, 6, 10), 1000)).toEqual({ units: scores(-2, 3, 5), unit: 2 });
    expect(exactUnits(scores(0.3 - 0.2, 0.2), 1000)?.units).toEqual(scores(1, 2));
  });
  it('theory: units times unit give the scores back (absolute 1e-15)', () => {
    const x = scores(12.345, -0.005, 7.1);
    const own = exactUnits(x, 1e9);
    own?.units.forEach((value, i) => {
      expect(Math.abs(value * own.unit - (x[i] as number))).toBeLessThan(1e-14);
    });
  });
  it('invariance: the units do not depend on the decimal point', () => {
    expect(exactUnits(scores(0.012, 0.05), 1000)?.units).toEqual(exactUnits(scores(12, 50), 1000)?.units);
  });
  it('degenerate: zeros and no scores', () => {
    expect(exactUnits(scores(0, 0), 10)?.units).toEqual(scores(0, 0));
    expect(exactUnits(scores(), 10)?.units).toHaveLength(0);
  });
  it('refuses, with null, what is not decimal and what needs too many units', () => {
    expect(exactUnits(scores(1 / 3, Math.SQRT2), 1e12)).toBe(null);
    expect(exactUnits(scores(0.001, 100), 1000)).toBe(null);
    expect(exactUnits(scores(1.23456e-13, 3e-13), 1e12)).toBe(null);
  });
});
