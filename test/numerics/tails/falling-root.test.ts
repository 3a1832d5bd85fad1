import { describe, expect, test } from 'vitest';
import { fallingRoot } from '../../../src/numerics/tails/falling-root.ts';
import { expectRelative } from './expect-relative.ts';

describe('root of a falling function', () => {
  test('by hand: straight and curved, from both sides, 1e-13', () => {
    expect(fallingRoot((x) => 3 - x, 0, 1)).toBe(3);
    expectRelative(fallingRoot((x) => 2 - x * x * x, 0.1, 0.1)!, Math.cbrt(2), 1e-13);
    expectRelative(fallingRoot((x) => 1 - Math.exp(x - 7), 30, 0.5)!, 7, 1e-13);
  });

  test('degenerate: start at the root, and infinite values away from it', () => {
    expect(fallingRoot((x) => -x, 0, 1)).toBe(0);
    const cut = (x: number) => (x < -2 ? Infinity : x > 5 ? -Infinity : 1 - x);
    expectRelative(fallingRoot(cut, -20, 1)!, 1, 1e-13);
    expectRelative(fallingRoot(cut, 40, 1)!, 1, 1e-13);
  });

  test('degenerate: null where the function is below 0 down to the floor, or never crosses', () => {
    expect(fallingRoot((x) => -1 - x, 4, 1, 0)).toBe(null);
    expect(fallingRoot(() => 1, 4, 1)).toBe(null);
    expectRelative(fallingRoot((x) => 1e-9 - x, 4, 1, 0)!, 1e-9, 1e-4);
  });
});
