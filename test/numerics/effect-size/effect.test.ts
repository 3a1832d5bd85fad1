import { describe, expect, it } from 'vitest';
import { noncentralInterval, scaled } from '../../../src/numerics/effect-size/effect.ts';
import { noncentralTLower } from '../../../src/numerics/tails/noncentral-t.ts';
import { close } from '../samples.ts';

describe('what effect sizes share', () => {
  it('by hand: scaling keeps a missing limit missing', () => {
    expect([scaled([1, null], 3), scaled([null, 2], 3), scaled(null, 3)]).toEqual([[3, null], [null, 6], null]);
  });
  it('agrees with R 4.2 pt(t, df, ncp) inverted by uniroot (rtol 1e-9)', () => {
    const [low, high] = noncentralInterval(4.050206589547113, 24, Math.sqrt(168 / 26), 0.95, 'two-sided') as [
      number,
      number,
    ];
    expect(close(low, 0.68899308328740505, 1e-9) && close(high, 2.4727992230321343, 1e-9)).toBe(true);
  });
  it('theory: at each limit t lies at the outer tail (rtol 1e-9)', () => {
    const [low, high] = noncentralInterval(1.5, 9, 1, 0.9, 'two-sided') as [number, number];
    expect(close(noncentralTLower(1.5, 9, low), 0.95, 1e-9) && close(noncentralTLower(1.5, 9, high), 0.05, 1e-9)).toBe(
      true,
    );
  });
  it('invariance: turning t turns the limits', () => {
    const [low, high] = noncentralInterval(1.5, 9, 2, 0.9, 'two-sided') as [number, number];
    const [other, another] = noncentralInterval(-1.5, 9, 2, 0.9, 'two-sided') as [number, number];
    expect(close(other, -high, 1e-9) && close(another, -low, 1e-9)).toBe(true);
  });
  it('degenerate: t = 0 gives limits around 0; one direction, one limit', () => {
    const [low, high] = noncentralInterval(0, 9, 1, 0.95, 'two-sided') as [number, number];
    expect(close(low, -high, 1e-9)).toBe(true);
    expect(noncentralInterval(1, 9, 1, 0.95, 'greater')[1]).toBe(null);
    expect(noncentralInterval(1, 9, 1, 0.95, 'less')[0]).toBe(null);
  });
  it('refuses levels of 0 and 1', () => {
    expect(() => noncentralInterval(1, 9, 1, 1, 'two-sided')).toThrow('*level* must be');
  });
});
