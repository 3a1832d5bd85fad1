import { describe, expect, it } from 'vitest';
import { effectsOf } from '../../../src/numerics/anova/effects.ts';

describe('effectsOf', () => {
  it('by hand: three factors', () => {
    expect(effectsOf(3)).toEqual([[0], [1], [2], [0, 1], [0, 2], [1, 2], [0, 1, 2]]);
  });

  it('theory: 2^k - 1 effects, none twice', () => {
    expect(new Set(effectsOf(6).map(String)).size).toBe(63);
  });

  it('degenerate: one factor', () => {
    expect(effectsOf(1)).toEqual([[0]]);
  });

  it('refuses no factor and too many', () => {
    expect(() => effectsOf(0)).toThrow('*count* must be a whole number from 1 to 8; got 0');
    expect(() => effectsOf(9)).toThrow(RangeError);
  });
});
