import { describe, expect, it } from 'vitest';
import { byGroup } from '../../src/analysis/checks-residuals.ts';
import { spreadChecks } from '../../src/analysis/checks-spread.ts';
import { expectedOf } from '../support/cases.ts';
import { csv } from '../support/samples.ts';

const { g, series } = csv('gravity') as { g: number[]; series: number[] };
const groupOf = (code: number) => Float64Array.from(g.filter((_, at) => series[at] === code));

describe('spreadChecks', () => {
  it('agrees with the reference cases gravity, series 1, 4 and 8: four tests, rtol 1e-9', () => {
    const { tests } = spreadChecks(['1', '4', '8'], [1, 4, 8].map(groupOf), 0.95);
    const levels = ['1', '4', '8'];
    const known = [
      expectedOf('gravity', 'levene_test', { center: 'mean', levels }),
      expectedOf('gravity', 'levene_test', { center: 'median', levels }),
      expectedOf('gravity', 'bartlett_test', { levels }),
      expectedOf('gravity', 'fligner_killeen', { levels }),
    ];
    tests.forEach((test, at) => {
      const own = known[at] as Record<string, number>;
      expect((test.statistic as number) / (own.F ?? own.chi2 ?? NaN)).toBeCloseTo(1, 9);
      expect((test.p as number) / (own.p as number)).toBeCloseTo(1, 9);
    });
    expect(tests.map(({ id }) => id)).toEqual(['levene', 'brown-forsythe', 'bartlett', 'fligner-killeen']);
    expect(tests.map(({ df1, df2 }) => [df1, df2])).toEqual([
      [2, 26],
      [2, 26],
      [2, null],
      [2, null],
    ]);
  });

  it('agrees with the reference case gravity, series 1 and 8: ratio of SDs with its interval, rtol 1e-9', () => {
    const known = expectedOf('gravity', 'variance_ratio_f', { levels: ['1', '8'] });
    const limits = known.ci as unknown as [number, number];
    const { ratio } = spreadChecks(['8', '1'], [groupOf(8), groupOf(1)], 0.95);
    expect([ratio?.larger, ratio?.smaller]).toEqual([1, 0]);
    expect((ratio?.value as number) / Math.sqrt(known.F as number)).toBeCloseTo(1, 9);
    expect((ratio?.interval?.[0] as number) / Math.sqrt(limits[0])).toBeCloseTo(1, 9);
    expect((ratio?.interval?.[1] as number) / Math.sqrt(limits[1])).toBeCloseTo(1, 9);
  });

  it('by hand: the sign of the pairing of size and spread', () => {
    const small = Float64Array.of(1, 2, 3);
    const large = Float64Array.of(1, 2, 3, 4, 5, 2, 3);
    const wide = small.map((value) => 10 * value);
    const pairing = (...groups: Float64Array[]) => spreadChecks([], groups, 0.95).pairing;
    expect(pairing(wide, large)).toBe('negative');
    expect(
      pairing(
        small.map((value) => value / 10),
        large,
      ),
    ).toBe('positive');
    expect(pairing(wide, small)).toBe('none');
  });

  it('by hand: the largest and smallest of several groups get no interval', () => {
    const { ratio } = spreadChecks([], [groupOf(1), groupOf(4), groupOf(8)], 0.95);
    expect(ratio?.interval).toBeNull();
    expect([ratio?.larger, ratio?.smaller]).toEqual([0, 2]);
  });

  it('invariance: means do not matter to ratio and tests, 1e-9', () => {
    const groups = [1, 4].map(groupOf);
    const moved = groups.map((scores, at) => scores.map((value) => value + 50 * at));
    const [a, b] = [spreadChecks([], groups, 0.95), spreadChecks([], moved, 0.95)];
    expect(a.ratio?.value).toBeCloseTo(b.ratio?.value as number, 9);
    expect(a.tests[1]?.p).toBeCloseTo(b.tests[1]?.p as number, 9);
  });

  it('degenerate: a single score or no spread in a group leaves the ratio out with a reason', () => {
    const one = spreadChecks(['a', 'b'], [Float64Array.of(4), Float64Array.of(1, 2, 3)], 0.95);
    expect(one.groups[0]?.sd).toBeNull();
    expect([one.ratio, one.reason]).toEqual([null, 'a group has fewer than two scores, or scores that are all equal']);
    const flat = spreadChecks(['a', 'b'], [Float64Array.of(4, 4, 4), Float64Array.of(4, 4, 4)], 0.95);
    expect(flat.ratio).toBeNull();
    expect(flat.tests.every(({ p, reason }) => p === null && (reason ?? '') !== '')).toBe(true);
  });

  it('refuses a single group', () => {
    expect(() => spreadChecks(['a'], byGroup(groupOf(1), new Int32Array(8), 1), 0.95)).toThrow(RangeError);
  });
});
