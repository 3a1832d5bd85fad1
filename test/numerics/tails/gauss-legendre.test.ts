import { expect, test } from 'vitest';
import { gaussLegendre } from '../../../src/numerics/tails/gauss-legendre.ts';
import { expectRelative } from './expect-relative.ts';

test('by hand: two nodes at the root of 1/3 with weight 1, 1e-15', () => {
  const { nodes, weights } = gaussLegendre(2);
  expectRelative(nodes[1]!, Math.sqrt(1 / 3), 1e-15);
  expect(nodes[0]).toBe(-nodes[1]!);
  expectRelative(weights[0]!, 1, 1e-15);
});

test('theory: powers up to 2n - 1 are integrated exactly, 1e-14', () => {
  for (const n of [1, 5, 12, 20]) {
    const { nodes, weights } = gaussLegendre(n);
    for (let power = 0; power < 2 * n; power++) {
      let sum = 0;
      for (let i = 0; i < n; i++) sum += weights[i]! * nodes[i]! ** power;
      expect(Math.abs(sum - (power % 2 === 0 ? 2 / (power + 1) : 0))).toBeLessThanOrEqual(1e-14);
    }
  }
});
