import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { type PermutationOptions, signFlipTest, splitsOf, splitTest } from '../../src/analysis/typical-values.ts';
import { permutationPaired } from '../../src/numerics/permutation-paired.ts';
import { permutationTwoGroups } from '../../src/numerics/permutation-two-groups.ts';
import { differences } from '../../src/numerics/scores.ts';
import { welchT } from '../../src/numerics/welch.ts';
import { sleepSamples, toothSamples } from '../support/samples.ts';

const options: PermutationOptions = { alternative: 'two-sided', level: 0.95, resamples: 1999, seed: 5 };
const d = differences(sleepSamples.x, sleepSamples.y);

/** Expected values of a case of the outside check data. */
function expected(file: string, method: string): Record<string, number> {
  const url = new URL(`../reference/cases/${file}.json`, import.meta.url);
  const { cases } = JSON.parse(readFileSync(url, 'utf8')) as {
    cases: { method: string; expect: Record<string, number> }[];
  };
  const found = cases.find((each) => each.method === method);
  if (!found) throw new Error(`no case ${method} in ${file}`);
  return found.expect;
}

describe('signFlipTest', () => {
  it('agrees with the reference case permutation_paired_mean of sleep, rtol 1e-12', () => {
    const own = expected('sleep', 'permutation_paired_mean');
    // The case counts drug1 minus drug2, or the other way round: the two-sided p is the same.
    expect(signFlipTest(d, options).p).toBeCloseTo(own.p_two_sided_abs as number, 12);
    expect(signFlipTest(d, { ...options, alternative: 'greater' }).p).toBeCloseTo(
      permutationPaired(d).pGreater as number,
      12,
    );
    expect(signFlipTest(d, { ...options, alternative: 'less' }).p).toBeCloseTo(
      permutationPaired(d).pLess as number,
      12,
    );
  });

  it('by hand: three differences 1, 2, 6 have the subset means 1, 1.5, 2, 3, 3.5, 4, 6', () => {
    const small = signFlipTest(Float64Array.of(1, 2, 6), { ...options, level: 0.5 });
    // (7 + 1) / 4 = 2: the second smallest and the second largest.
    expect(small.interval).toEqual([1.5, 4]);
    // All eight flips: the sum as large as 9 once on each side.
    expect(small.p).toBe(0.25);
    expect(small.how).toBe('all 8 sign flips');
  });

  it('theory: p is at most alpha exactly when 0 lies outside the interval', () => {
    for (const shift of [0, 0.5, 1, 1.5, 2, 2.5]) {
      const { p, interval } = signFlipTest(
        d.map((value) => value - shift),
        options,
      );
      const outside = (interval?.[0] as number) > 0 || (interval?.[1] as number) < 0;
      expect(outside).toBe((p as number) <= 0.05);
    }
  });

  it('theory: drawn flips come near every flip (Monte Carlo error of p .05 with 1,999 draws: .005)', () => {
    const long = Float64Array.from({ length: 18 }, (_, i) => ((i * 7) % 11) - 3);
    const drawn = signFlipTest(long, options);
    expect(drawn.how).toBe('sign flips, 1,999 drawn');
    expect(Math.abs((drawn.p as number) - (permutationPaired(long).pTwoSided as number))).toBeLessThan(0.02);
  });

  it('degenerate: too few flips for the level give p and no interval', () => {
    expect(signFlipTest(Float64Array.of(1, 2), options)).toMatchObject({ p: 0.5, interval: null });
  });
});

describe('splitTest', () => {
  it('agrees with the reference case permutation_mean_difference of sleep, rtol 1e-12', () => {
    const { x, y } = sleepSamples;
    const own = expected('sleep', 'permutation_mean_difference');
    expect(splitTest(x, y, options).p).toBeCloseTo(own.p_two_sided_doubled as number, 12);
    expect(splitTest(x, y, options).how).toBe('all 184,756 splits, smaller tail doubled');
  });

  it('by hand: 1, 2 against 3, 7: the exchanges give the shifts -6, -5, -3.5, -2, -1 and their interval', () => {
    const found = splitTest(Float64Array.of(1, 2), Float64Array.of(3, 7), { ...options, level: 1 / 3 });
    // Six splits; (5 + 1) / 3 = 2.
    expect(found.interval).toEqual([-5, -2]);
    expect(found.p).toBeCloseTo(2 / 6, 12);
  });

  it('theory: drawn splits come near the exact p, and the interval is its dual', () => {
    const { x, y } = toothSamples;
    expect(splitsOf(x.length, y.length)).toBeGreaterThan(200_000);
    const drawn = splitTest(x, y, options);
    const exact = permutationTwoGroups(x, y).pTwoSided as number;
    // Equal group sizes: studentizing changes the order of few splits. Monte Carlo error .0055 at p .06.
    expect(Math.abs((drawn.p as number) - exact)).toBeLessThan(0.02);
    const { estimate, se } = welchT(x, y);
    const reach = ((drawn.interval?.[1] as number) - (drawn.interval?.[0] as number)) / 2;
    expect(((drawn.interval?.[0] as number) + (drawn.interval?.[1] as number)) / 2).toBeCloseTo(estimate as number, 10);
    expect(reach / (se as number)).toBeGreaterThan(1.9);
    expect(reach / (se as number)).toBeLessThan(2.2);
  });

  it('invariance: exchanging the groups turns the interval of every split', () => {
    const [x, y] = [Float64Array.of(4, 9, 1, 7, 3), Float64Array.of(2, 8, 6, 11)];
    const one = splitTest(x, y, { ...options, level: 0.8 });
    const other = splitTest(y, x, { ...options, level: 0.8 });
    expect(other.interval?.[0]).toBeCloseTo(-(one.interval?.[1] as number), 12);
    expect(other.p).toBeCloseTo(one.p as number, 12);
  });

  it('degenerate: groups without spread give no p, with a reason', () => {
    const flat = new Float64Array(30).fill(2);
    expect(splitTest(flat, flat, options)).toMatchObject({
      p: null,
      interval: null,
      reason: expect.stringMatching(/vary/),
    });
  });
});
