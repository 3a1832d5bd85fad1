import { describe, expect, test } from 'vitest';
import { permutationPaired } from '../../../src/numerics/permutation-paired.ts';
import { rng } from '../../../src/numerics/rng.ts';
import { OUTCOME } from '../../../src/numerics/simulation/outcome.ts';
import { pairDecider } from '../../../src/numerics/simulation/pairs.ts';
import { shapeOf } from '../../../src/numerics/simulation/shapes.ts';
import { trimmedMeanTest } from '../../../src/numerics/trimmed-mean.ts';
import { signedRankTest } from '../../../src/numerics/wilcoxon.ts';
import { countFor } from '../../support/long-run.ts';

const empty = () => ({ pairedT: 0, trimmed: 0, signedRank: 0, percentile: 0, signFlip: 0 });
const isRejected = (marks: number) => (marks & OUTCOME.rejected) !== 0;

describe('decisions of pairs', () => {
  test('agrees with the tests themselves: 200 experiments (seed 6)', () => {
    const draw = rng(6);
    const decide = pairDecider({ alpha: 0.05, trim: 20, B: 0, seed: 1 }, 40);
    for (let i = 0; i < 200; i++) {
      const d = new Float64Array(6 + draw.below(20));
      shapeOf('t3').fill(d, draw);
      const moved = d.map((score) => score + 0.7).sort();
      const out = empty();
      decide(moved, { means: 0.7, trimmedMeans: 0.7 }, i, out);
      expect(isRejected(out.pairedT)).toBe((trimmedMeanTest(moved, { trim: 0 }).p ?? 1) < 0.05);
      const trimmed = trimmedMeanTest(moved, { trim: 20 });
      expect(isRejected(out.trimmed)).toBe((trimmed.p ?? 1) < 0.05);
      const [low, high] = (trimmed.interval ?? [NaN, NaN]) as [number, number];
      expect((out.trimmed & OUTCOME.covered) !== 0).toBe(low <= 0.7 && 0.7 <= high);
      expect(isRejected(out.signedRank)).toBe((signedRankTest(moved).p ?? 1) <= 0.05);
    }
  });

  test('agrees with the exact sign-flip test wherever its p is clear of alpha', () => {
    const decide = pairDecider({ alpha: 0.05, trim: 20, B: 999, seed: 3 }, 12);
    let compared = 0;
    for (let i = 0; i < 30; i++) {
      const d = new Float64Array(12);
      shapeOf('normal').fill(d, rng(40 + i));
      const moved = d.map((score) => score + i / 30).sort();
      const exact = permutationPaired(moved).pTwoSided ?? 1;
      if (Math.abs(exact - 0.05) < 0.03) continue;
      const out = empty();
      decide(moved, { means: 0, trimmedMeans: 0 }, i, out);
      expect(isRejected(out.signFlip)).toBe(exact < 0.05);
      compared++;
    }
    expect(compared).toBeGreaterThan(15);
  });

  // Methods 5.2, one mean at .05: n 10, 20, 40 (100,000 runs).
  test.each([
    ['lognormal', [0.162, 0.133, 0.109]],
    ['exponential', [0.099, 0.081, 0.07]],
    ['contaminated', [0.026, 0.022, 0.029]],
    ['normal', [0.0506, 0.0505, 0.0485]],
  ] as const)('agrees with methods 5.2, one mean of %s scores (seed 52)', (id, reference) => {
    const runs = countFor(1500, 40_000);
    const shape = shapeOf(id);
    [10, 20, 40].forEach((n, which) => {
      const decide = pairDecider({ alpha: 0.05, trim: 0, B: 0, seed: 1 }, n);
      const draw = rng(52, n);
      const x = new Float64Array(n);
      let rejected = 0;
      for (let i = 0; i < runs; i++) {
        shape.fill(x, draw);
        const out = empty();
        decide(x.map((score) => score - shape.mean).sort(), { means: 0, trimmedMeans: 0 }, i, out);
        if (isRejected(out.pairedT)) rejected++;
      }
      const p = reference[which] ?? NaN;
      const se = Math.sqrt(p * (1 - p) * (1 / runs + 1 / 100_000));
      expect(Math.abs(rejected / runs - p)).toBeLessThan(3.5 * se + 0.0005);
    });
  });

  test('degenerate: one difference, and differences all equal', () => {
    const decide = pairDecider({ alpha: 0.05, trim: 20, B: 19, seed: 1 }, 5);
    const out = empty();
    decide(Float64Array.of(1), { means: 0, trimmedMeans: 0 }, 0, out);
    expect(out).toEqual(empty());
    decide(Float64Array.of(2, 2, 2), { means: 0, trimmedMeans: 0 }, 0, out);
    expect([out.pairedT, out.trimmed]).toEqual([0, 0]);
  });
});
