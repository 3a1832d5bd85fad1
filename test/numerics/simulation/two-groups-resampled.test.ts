import { describe, expect, test } from 'vitest';
import { permutationTwoGroups } from '../../../src/numerics/permutation-two-groups.ts';
import { rng } from '../../../src/numerics/rng.ts';
import { OUTCOME } from '../../../src/numerics/simulation/outcome.ts';
import { shapeOf } from '../../../src/numerics/simulation/shapes.ts';
import { bootstrapDecider, permutationDecider } from '../../../src/numerics/simulation/two-groups-resampled.ts';

const sample = (n: number, seed: number, shift = 0) => {
  const x = new Float64Array(n);
  shapeOf('normal').fill(x, rng(seed));
  return x.map((score) => score + shift).sort();
};
const judged = OUTCOME.judged;

describe('resampled decisions', () => {
  test('theory: far apart rejects by every test, in the middle of the null by none', () => {
    const [x, y] = [sample(15, 1), sample(15, 2)];
    const far = y.map((score) => score + 5);
    const boot = { percentile: 0, studentized: 0 };
    const perm = { means: 0, studentized: 0 };
    bootstrapDecider({ alpha: 0.05, trim: 20, B: 199, seed: 4 })(x, far, 0, 3, boot);
    permutationDecider({ alpha: 0.05, B: 199, seed: 4 })(x, far, 3, perm);
    for (const marks of [boot.percentile, boot.studentized, perm.means, perm.studentized]) {
      expect(marks & OUTCOME.rejected).toBe(OUTCOME.rejected);
    }
    bootstrapDecider({ alpha: 0.05, trim: 20, B: 199, seed: 4 })(x, x.slice(), 0, 3, boot);
    permutationDecider({ alpha: 0.05, B: 199, seed: 4 })(x, x.slice(), 3, perm);
    expect([perm.means, perm.studentized]).toEqual([judged, judged]);
    expect(boot.percentile).toBe(judged | OUTCOME.hasInterval | OUTCOME.covered);
  });

  test('agrees with the exact permutation test wherever its p is clear of alpha (seeds 20 to 59)', () => {
    const decide = permutationDecider({ alpha: 0.05, B: 999, seed: 8 });
    let compared = 0;
    for (let i = 0; i < 40; i++) {
      const [x, y] = [sample(8, 20 + i), sample(7, 120 + i, i / 20)];
      const exact = permutationTwoGroups(x, y).pTwoSided ?? 1;
      // Four standard errors of a share of 999 near .05.
      if (Math.abs(exact - 0.05) < 0.03) continue;
      const out = { means: 0, studentized: 0 };
      decide(x, y, i, out);
      expect((out.means & OUTCOME.rejected) !== 0).toBe(exact < 0.05);
      compared++;
    }
    expect(compared).toBeGreaterThan(25);
  });

  test('invariance: a unit, and who decided before, change no decision', () => {
    const decide = bootstrapDecider({ alpha: 0.05, trim: 20, B: 199, seed: 4 });
    const [x, y] = [sample(12, 5), sample(14, 6, 0.9)];
    const alone = { percentile: 0, studentized: 0 };
    bootstrapDecider({ alpha: 0.05, trim: 20, B: 199, seed: 4 })(x, y, -0.9, 77, alone);
    const after = { percentile: 0, studentized: 0 };
    decide(sample(9, 7), sample(9, 8), 0, 3, after);
    decide(
      x.map((score) => 8 * score),
      y.map((score) => 8 * score),
      -7.2,
      77,
      after,
    );
    expect(after).toEqual(alone);
  });

  test('degenerate: too few scores give no decision', () => {
    const out = { percentile: 9, studentized: 9 };
    bootstrapDecider({ alpha: 0.05, trim: 20, B: 19, seed: 4 })(Float64Array.of(1), Float64Array.of(1, 2), 0, 0, out);
    expect(out).toEqual({ percentile: 0, studentized: 0 });
    const perm = { means: 9, studentized: 9 };
    permutationDecider({ alpha: 0.05, B: 19, seed: 4 })(Float64Array.of(1), Float64Array.of(1, 2), 0, perm);
    expect(perm).toEqual({ means: 0, studentized: 0 });
  });

  test('refuses: a seed that is no word', () => {
    const out = { means: 0, studentized: 0 };
    const decide = permutationDecider({ alpha: 0.05, B: 19, seed: -1 });
    expect(() => decide(Float64Array.of(1, 2), Float64Array.of(1, 2), 0, out)).toThrow(RangeError);
  });
});
