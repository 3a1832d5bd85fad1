import { expect, test } from 'vitest';
import { deviance } from '../../../src/numerics/tails/deviance.ts';
import { expectRelative } from './expect-relative.ts';

test('by hand: 2 log 2 - 1 at (2, 1), 1e-15', () => {
  expectRelative(deviance(2, 1), 2 * Math.LN2 - 1, 1e-15);
});

// Source: Taylor series m (u^2 / 2 - u^3 / 6 + u^4 / 12), u = (x - m) / m.
test('theory: keeps its digits near the mean, 1e-12', () => {
  const mean = 2 ** 20;
  const u = 2 ** -12;
  expectRelative(
    deviance(mean * (1 + u), mean),
    mean * u * u * (1 / 2 - u / 6 + (u * u) / 12 - (u * u * u) / 20),
    1e-12,
  );
});

test('theory: the two forms agree where they meet, 1e-14', () => {
  for (const x of [0.5999999, 0.6000001, 1.3999999, 1.4000001])
    expectRelative(deviance(x, 1), x * Math.log(x) + 1 - x, 1e-13);
});

test('degenerate: no count gives the mean, a count at the mean gives 0', () => {
  expect(deviance(0, 3)).toBe(3);
  expect(deviance(3, 3)).toBe(0);
});
