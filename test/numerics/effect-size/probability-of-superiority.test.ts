import { describe, expect, it } from 'vitest';
import { cliffsDelta } from '../../../src/numerics/effect-size/cliffs-delta.ts';
import { probabilityOfSuperiority } from '../../../src/numerics/effect-size/probability-of-superiority.ts';
import { mannWhitney } from '../../../src/numerics/mann-whitney.ts';
import { close, scores, soybean, sunflower } from '../samples.ts';

describe('probability of superiority', () => {
  it('by hand: 2, 4 against 1, 4: two wins, one tie of four', () => {
    expect(probabilityOfSuperiority(scores(2, 4), scores(1, 4)).value).toBe(0.625);
  });
  it('agrees with the published value: 1 - .130952 for sunflower over soybean (methods 3.4; rtol 1e-6)', () => {
    expect(close(probabilityOfSuperiority(sunflower, soybean).value, 1 - 0.130952, 1e-6)).toBe(true);
  });
  it('theory: U / (n1 n2), limits those of delta', () => {
    const own = probabilityOfSuperiority(sunflower, soybean);
    expect(close(own.value, mannWhitney(sunflower, soybean).superiority, 1e-13)).toBe(true);
    expect(own.interval?.[0]).toBe(((cliffsDelta(sunflower, soybean).interval?.[0] as number) + 1) / 2);
    expect(probabilityOfSuperiority(sunflower, soybean, { alternative: 'less' }).interval?.[0]).toBe(null);
  });
  it('invariance: exchange of the groups gives the complement', () => {
    const own = probabilityOfSuperiority(sunflower, soybean).value as number;
    expect(close(probabilityOfSuperiority(soybean, sunflower).value, 1 - own, 1e-13)).toBe(true);
  });
  it('degenerate: no overlap', () => {
    expect(probabilityOfSuperiority(scores(3, 4), scores(1, 2))).toMatchObject({
      value: 1,
      interval: null,
      reason: 'the scores of the two conditions do not overlap',
    });
  });
  it('refuses an empty group', () => {
    expect(() => probabilityOfSuperiority(sunflower, scores())).toThrow(RangeError);
  });
});
