import { describe, expect, it } from 'vitest';
import { geometricMean } from '../../src/numerics/geometric-mean.ts';
import { transformedWelch } from '../../src/numerics/transformed-welch.ts';
import { welchT } from '../../src/numerics/welch.ts';
import { close, scores, soybean, sunflower } from './samples.ts';

describe('Welch on transformed scores', () => {
  it('by hand: square roots of 1, 9 and 0, 4 with offset 0: means 2 and 1, back 4 and 1', () => {
    const own = transformedWelch(scores(1, 9), scores(0, 4), { transform: 'sqrt' });
    expect([own.estimate, own.backTransformed, own.ratio]).toEqual([1, [4, 1], null]);
  });
  it('agrees with SciPy 1.10 ttest_ind of logs (rtol 1e-11)', () => {
    const own = transformedWelch(sunflower, soybean, { transform: 'log' });
    expect(close(own.t, 3.9979850457345716, 1e-11) && close(own.p, 0.0005697467072713098, 1e-10)).toBe(true);
  });
  it('theory: the log back-transforms to geometric means and their ratio', () => {
    const own = transformedWelch(sunflower, soybean, { transform: 'log' });
    const means = [sunflower, soybean].map((x) => geometricMean(x).estimate as number) as [number, number];
    expect(close(own.backTransformed?.[0], means[0], 1e-12) && close(own.ratio, means[0] / means[1], 1e-12)).toBe(true);
    expect(close(own.ratioInterval?.[0], Math.exp(own.interval?.[0] as number), 1e-13)).toBe(true);
    expect(transformedWelch(sunflower, soybean, { transform: 'log', alternative: 'less' }).ratioInterval?.[0]).toBe(
      null,
    );
  });
  it('theory: reciprocals by hand through Welch', () => {
    const own = transformedWelch(sunflower, soybean, { transform: 'reciprocal', offset: 1 });
    const plain = welchT(
      sunflower.map((x) => 1 / (x + 1)),
      soybean.map((x) => 1 / (x + 1)),
    );
    expect([own.t, own.p]).toEqual([plain.t, plain.p]);
    expect(close(own.backTransformed?.[0], 1 / plain.means[0] - 1, 1e-13)).toBe(true);
  });
  it('invariance: the log ratio does not depend on the unit', () => {
    const own = transformedWelch(
      sunflower.map((x) => x * 8),
      soybean.map((x) => x * 8),
      { transform: 'log' },
    );
    expect(close(own.ratio, transformedWelch(sunflower, soybean, { transform: 'log' }).ratio as number, 1e-12)).toBe(
      true,
    );
  });
  it('degenerate: scores that cannot be transformed; no spread', () => {
    const x = scores(0, 1);
    expect(transformedWelch(x, x, { transform: 'log' })).toMatchObject({
      estimate: null,
      p: null,
      reason: 'log of a score <= 0',
    });
    expect(transformedWelch(x, x, { transform: 'log', offset: 1 }).reason).toBe(undefined);
    expect(transformedWelch(scores(-1, 1), x, { transform: 'sqrt' }).reason).toBe('square root of a score < 0');
    expect(transformedWelch(x, x, { transform: 'reciprocal' }).reason).toBe('reciprocal of 0');
    const flat = transformedWelch(scores(2, 2), scores(3, 3), { transform: 'log' });
    expect([flat.reason, flat.ratioInterval, close(flat.ratio, 2 / 3, 1e-13)]).toEqual([
      'all scores within each condition are equal',
      null,
      true,
    ]);
  });
  it('refuses empty groups', () => {
    expect(() => transformedWelch(scores(), soybean, { transform: 'log' })).toThrow(RangeError);
  });
});
