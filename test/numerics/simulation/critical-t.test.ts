import { describe, expect, test } from 'vitest';
import { rng } from '../../../src/numerics/rng.ts';
import { criticalT } from '../../../src/numerics/simulation/critical-t.ts';
import { tQuantileUpper } from '../../../src/numerics/tails/t.ts';

describe('critical values between whole degrees of freedom', () => {
  test('agrees with the quantile in every decision (seed 5)', () => {
    const critical = criticalT(0.025, 40);
    const draw = rng(5);
    for (let i = 0; i < 400; i++) {
      const df = 0.7 + 39 * draw.uniform();
      const exact = tQuantileUpper(0.025, df);
      for (const t of [exact * (1 + 1e-12), exact * (1 - 1e-12), 5 * draw.uniform()]) {
        expect(t > critical(df, t)).toBe(t > exact);
      }
    }
  });

  test('by hand: 2.262 on 9 df', () => {
    expect(criticalT(0.025, 9)(9, 1)).toBeCloseTo(2.262157, 6);
  });
});
