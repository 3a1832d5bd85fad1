import { describe, expect, it } from 'vitest';
import { friedmanTest } from '../../src/numerics/friedman.ts';
import { expectAll, expectClose } from './anova/expect-close.ts';
import { handLotion } from './anova/published-scores.ts';

// ranks 1 2 3 | 1 3 2 | 2 1 3
const three = [Float64Array.of(1, 1, 5), Float64Array.of(2, 9, 4), Float64Array.of(3, 7, 6)];

describe('friedmanTest', () => {
  // rank sums 4 6 8 about 6: 2 * 8 / 6 = 8/3; p = exp(-4/3); F = 2 (8/3) / (6 - 8/3) = 1.6, p = 1.8^-2
  it('by hand: three participants, three levels (1e-14)', () => {
    const test = friedmanTest(three);
    expectAll(test, { chi2: 8 / 3, df: 2, p: Math.exp(-4 / 3), kendallsW: 4 / 9, n: 3 }, 1e-14);
    expectAll(test, { imanDavenportF: 1.6, imanDavenportP: 1.8 ** -2 }, 1e-14);
    expect(test.imanDavenportDf).toEqual([2, 4]);
  });

  // R 4.2.2 friedman.test
  it('agrees with R on the hand lotion, with ties (1e-12)', () => {
    expectAll(friedmanTest(handLotion), { chi2: 8.328358208955224, df: 4, p: 0.08026409058182551 }, 1e-12);
  });

  // Conover (1999) 5.8: with two levels and no ties chi2 = (plus - minus)^2 / n, the square of the sign statistic
  it("theory: two levels are the sign test's normal statistic squared (1e-14)", () => {
    const test = friedmanTest([Float64Array.of(1, 2, 3, 4, 9), Float64Array.of(2, 3, 4, 5, 1)]);
    expectClose(test.chi2, (4 - 1) ** 2 / 5, 1e-14);
  });

  it('invariance: increasing changes of each participant, order of levels, exactly', () => {
    const changed = three.map((level) => level.map((score, i) => Math.exp(score) * (i + 1) + 100 * i));
    expect(friedmanTest(changed).chi2).toBe(friedmanTest(three).chi2);
    expectClose(friedmanTest([...three].reverse()).chi2, friedmanTest(three).chi2!, 1e-14);
  });

  it('degenerate: complete agreement, all equal, one or no participant', () => {
    const agreed = friedmanTest([Float64Array.of(1, 2), Float64Array.of(3, 4)]);
    expect([agreed.kendallsW, agreed.imanDavenportF]).toEqual([1, null]);
    expect(agreed.imanDavenportReason).toBe('the ranks of all participants agree');
    expect(friedmanTest([Float64Array.of(1, 2), Float64Array.of(1, 2)]).reason).toMatch('all equal');
    expect(friedmanTest([new Float64Array(0), new Float64Array(0)]).p).toBeNull();
    expect(friedmanTest([Float64Array.of(1), Float64Array.of(2)]).imanDavenportReason).toBe('one participant');
  });

  it('refuses one level', () => {
    expect(() => friedmanTest(three.slice(0, 1))).toThrow('*scores* must hold at least 2 levels; got 1');
  });
});
