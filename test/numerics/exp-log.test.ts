import { describe, expect, it } from 'vitest';
import { portableExp, portableLog } from '../../src/numerics/exp-log.ts';

/** Distance in units in the last place, both positive or both negative and normal. */
function units(a: number, b: number): number {
  const view = new DataView(new ArrayBuffer(16));
  view.setFloat64(0, Math.abs(a));
  view.setFloat64(8, Math.abs(b));
  return Math.abs(Number(view.getBigInt64(0) - view.getBigInt64(8)));
}

describe('portable exp and log', () => {
  it('agrees with mpmath 1.2.1, 40 digits (2 units in the last place)', () => {
    for (const [x, want] of [
      [1, Math.E],
      [-1, 0.36787944117144233],
      [0.5, 1.6487212707001282],
      [10.25, 28282.54192033498],
      [-700, 9.859676543759771e-305],
      [709, 8.218407461554972e307],
      [1e-10, 1.0000000001],
    ] as const) {
      expect(units(portableExp(x), want)).toBeLessThanOrEqual(2);
    }
    for (const [x, want] of [
      [2, Math.LN2],
      [0.5, -Math.LN2],
      [10, Math.LN10],
      [1e-300, -690.7755278982137],
      [3e-310, -712.7027665394861],
      [1.0000001, 9.999999505838704e-8],
    ] as const) {
      expect(units(portableLog(x), want)).toBeLessThanOrEqual(2);
    }
  });
  it('agrees with the built-in functions over their range (3 units in the last place, theirs 1)', () => {
    for (let i = -7000; i <= 7090; i += 7) {
      const x = i / 10 + 0.0123;
      expect(units(portableExp(x), Math.exp(x))).toBeLessThanOrEqual(3);
      const y = Math.exp(x);
      if (Math.abs(x) > 0.1) expect(units(portableLog(y), Math.log(y))).toBeLessThanOrEqual(3);
    }
  });
  it('theory: log of exp gives x back (absolute 1e-13), exp(a + b) = exp(a) exp(b) (rtol 1e-13)', () => {
    for (let x = -50; x <= 50; x += 0.37) expect(Math.abs(portableLog(portableExp(x)) - x)).toBeLessThan(1e-13);
    expect(Math.abs(portableExp(3.25) / (portableExp(1.25) * portableExp(2)) - 1)).toBeLessThan(1e-13);
  });
  it('invariance: doubling the argument of log adds log 2', () => {
    expect(Math.abs(portableLog(2 * 0.7) - portableLog(0.7) - Math.LN2)).toBeLessThan(1e-15);
  });
  it('degenerate: ends of the range and subnormals', () => {
    expect([
      portableExp(0),
      portableExp(710),
      portableExp(-746),
      portableExp(-Infinity),
      portableExp(Infinity),
    ]).toEqual([1, Infinity, 0, 0, Infinity]);
    expect([portableLog(1), portableLog(0), portableLog(Infinity)]).toEqual([0, -Infinity, Infinity]);
    expect(Math.abs(portableExp(-740) / Math.exp(-740) - 1)).toBeLessThan(1e-2);
  });
  it('refuses NaN and negative logs', () => {
    expect(() => portableExp(Number.NaN)).toThrow('*x* must be a number');
    expect(() => portableLog(-1)).toThrow('*x* must be at least 0');
    expect(() => portableLog(Number.NaN)).toThrow(RangeError);
  });
});
