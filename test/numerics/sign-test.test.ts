import { describe, expect, it } from 'vitest';
import { signTest } from '../../src/numerics/sign-test.ts';
import { close, darwin, scores } from './samples.ts';

describe('sign test', () => {
  it('by hand: three of three positive: p = 2 / 8', () => {
    const test = signTest(scores(1, 2, 3, 0));
    expect([test.nPositive, test.nNegative, test.nZero]).toEqual([3, 0, 1]);
    expect(close(test.p, 0.25, 1e-14)).toBe(true);
  });
  it('agrees with SciPy 1.10 binomtest(13, 15) for Darwin (rtol 1e-13)', () => {
    expect(close(signTest(darwin).p, 0.00738525390625, 1e-13)).toBe(true);
  });
  it('theory: one-sided tails overlap in the observed count', () => {
    const up = signTest(darwin, { alternative: 'greater' }).p as number;
    const down = signTest(darwin, { alternative: 'less' }).p as number;
    // P(X = 13) of binomial(15, 1/2) = 105 / 32768
    expect(close(up + down, 1 + 105 / 32_768, 1e-13)).toBe(true);
  });
  it('invariance: only signs about mu matter', () => {
    expect(signTest(darwin.map((x) => x ** 3)).p).toBe(signTest(darwin).p);
    expect(
      signTest(
        darwin.map((x) => x + 5),
        { mu: 5 },
      ),
    ).toEqual(signTest(darwin));
  });
  it('degenerate: only zeros, decimal zeros included', () => {
    expect(signTest(scores(0.3 - 0.2 - 0.1, 0))).toMatchObject({
      nZero: 2,
      p: null,
      reason: 'all differences are zero',
    });
    expect(close(signTest(scores(-1), { alternative: 'greater' }).p, 1, 1e-14)).toBe(true);
  });
  it('refuses no scores', () => {
    expect(() => signTest(scores())).toThrow(RangeError);
  });
});
