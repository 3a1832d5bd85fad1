import { describe, expect, test } from 'vitest';
import { normalLower, normalUpper } from '../../../src/numerics/tails/normal.ts';
import { owensT } from '../../../src/numerics/tails/owens-t.ts';
import { expectRelative } from './expect-relative.ts';

describe("Owen's T", () => {
  test('by hand: h = 0 is an angle, a = 1 a product of tails, 1e-13', () => {
    for (const a of [1e-8, 0.5, 1, 3, 1e7]) expectRelative(owensT(0, a), Math.atan(a) / (2 * Math.PI), 1e-14);
    for (const h of [0, 0.4, 3, 12, 25]) expectRelative(owensT(h, 1), 0.5 * normalLower(h) * normalUpper(h), 1e-12);
  });

  test('theory: even in h, odd in a, continuous across a = 1, 1e-13', () => {
    expect(owensT(-2, 0.7)).toBe(owensT(2, 0.7));
    expect(owensT(2, -3)).toBe(-owensT(2, 3));
    expectRelative(owensT(1.5, 1 + 1e-14), owensT(1.5, 1), 1e-13);
  });

  test('degenerate: infinite arguments and no wedge', () => {
    expect(owensT(1.3, Infinity)).toBe(0.5 * normalUpper(1.3));
    expect([owensT(Infinity, 2), owensT(3, 0), owensT(40, 1)]).toEqual([0, 0, 0]);
  });

  test('refuses NaN', () => {
    expect(() => owensT(Number.NaN, 1)).toThrow('*h* must be a number; got NaN');
    expect(() => owensT(1, Number.NaN)).toThrow('*a* must be a number; got NaN');
  });
});
