import { describe, expect, it } from 'vitest';
import { expanded } from '../../src/analysis/explained-share.ts';
import { friedmanShare, kruskalShare, quadeShare } from '../../src/analysis/rank-shares.ts';
import { friedmanTest } from '../../src/numerics/friedman.ts';
import { kruskalWallis } from '../../src/numerics/kruskal-wallis.ts';
import { rng } from '../../src/numerics/rng.ts';
import { expectedOf } from '../support/cases.ts';

/** Scores with ties. */
const groups = [5, 7, 6].map((n, g) => Float64Array.from({ length: n }, (_, i) => ((i * 7 + g * 3) % 9) + g));
const columns = [0, 1, 2, 3].map((c) => Float64Array.from({ length: 8 }, (_, i) => ((i * 5 + c * c * 3) % 7) + c));

function draw(sizes: readonly number[], seed: number): Int32Array[] {
  const random = rng(seed);
  return sizes.map((n) => {
    const counts = new Int32Array(n);
    for (let i = 0; i < n; i++) {
      const at = random.below(n);
      counts[at] = (counts[at] as number) + 1;
    }
    return counts;
  });
}

describe('rank effect sizes of resamples', () => {
  it('theory: they are those of the resample written out, 12 digits', () => {
    for (let seed = 1; seed <= 25; seed++) {
      const counts = draw([5, 7, 6], seed);
      const drawn = groups.map((scores, j) => expanded(scores, counts[j] as Int32Array));
      expect(kruskalShare(groups)(counts)).toBeCloseTo(kruskalWallis(drawn).epsilon2 as number, 12);
      const people = draw([8], seed);
      const written = columns.map((column) => expanded(column, people[0] as Int32Array));
      expect(friedmanShare(columns)(people)).toBeCloseTo(friedmanTest(written).kendallsW as number, 12);
      const whole = [new Int32Array(8).fill(1)];
      expect(quadeShare(columns)(people)).toBeCloseTo(quadeShare(written)(whole) as number, 12);
    }
  });

  it('agrees with the reference case kruskal_wallis of plant_growth through its rows: epsilon squared of everyone once', () => {
    const own = expectedOf('plant_growth', 'kruskal_wallis');
    expect(own.epsilon2).toBeCloseTo((own.H as number) / 29, 12);
    const once = groups.map((scores) => new Int32Array(scores.length).fill(1));
    expect(kruskalShare(groups)(once)).toBeCloseTo(kruskalWallis(groups).epsilon2 as number, 12);
  });

  it('by hand: complete agreement is 1, and no ranks no share', () => {
    const agree = [Float64Array.of(1, 2), Float64Array.of(2, 3), Float64Array.of(5, 9)];
    const once = [Int32Array.of(1, 1)];
    expect(friedmanShare(agree)(once)).toBeCloseTo(1, 12);
    expect(quadeShare(agree)(once)).toBeCloseTo(1, 12);
    const flat = [Float64Array.of(1, 1), Float64Array.of(1, 1)];
    expect([friedmanShare(flat)(once), quadeShare(flat)(once)]).toEqual([null, null]);
    expect(kruskalShare(flat)([Int32Array.of(1, 1), Int32Array.of(1, 1)])).toBeNull();
  });

  it('by hand: ranks 1 2 of a range 3 and 2 1 of a range 1 weigh 2 and 1: 1 / 9; equal ranges give Kendall W', () => {
    const apart = [Float64Array.of(1, 5), Float64Array.of(4, 4)];
    expect(quadeShare(apart)([Int32Array.of(1, 1)])).toBeCloseTo(1 / 9, 12);
    const even = [Float64Array.of(1, 5, 2), Float64Array.of(4, 2, 5)];
    const once = [Int32Array.of(1, 1, 1)];
    expect(quadeShare(even)(once)).toBeCloseTo(friedmanShare(even)(once) as number, 12);
  });

  it('invariance: a monotone change of the scores leaves them', () => {
    const people = draw([8], 3);
    expect(friedmanShare(columns.map((column) => column.map((score) => score ** 3)))(people)).toBe(
      friedmanShare(columns)(people),
    );
  });
});
