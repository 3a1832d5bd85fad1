import { describe, test } from 'vitest';
import { chiLogDensity, chiMixture } from '../../../src/numerics/tails/chi-mixture.ts';
import { normalLower } from '../../../src/numerics/tails/normal.ts';
import { tLower } from '../../../src/numerics/tails/t.ts';
import { expectRelative } from './expect-relative.ts';

describe('mean over the chi distribution', () => {
  test('theory: with rate 0 the mixture is the normal tail itself, so the density integrates to one, 1e-13', () => {
    for (const df of [0.3, 1, 7.5, 400, 1e8]) expectRelative(chiMixture(0, 1.5, df), normalLower(-1.5), 1e-13);
  });

  test('theory: with shift 0 the mixture is the central t tail, 1e-12', () => {
    for (const df of [0.7, 3, 60])
      for (const t of [-80, -2, 0.3, 5]) expectRelative(chiMixture(t, 0, df), tLower(t, df), 1e-12);
  });

  // Source: log of sqrt(2 / pi) s exp(-s^2 / 2) at s = 1, the density of log |Z|.
  test('by hand: one degree of freedom is the absolute normal value, 1e-14', () => {
    expectRelative(chiLogDensity(1)(0), 0.5 * Math.log(2 / Math.PI) - 0.5, 1e-14);
    expectRelative(chiLogDensity(1)(Math.LN2), 0.5 * Math.log(2 / Math.PI) + Math.LN2 - 2, 1e-14);
  });
});
