import { describe, expect, it } from 'vitest';
import type { Layout } from '../../src/analysis/layout.ts';
import { lessBiased, makeOmnibusRow, partialEta } from '../../src/analysis/omnibus-row.ts';
import { noncentralFLower } from '../../src/numerics/tails/noncentral-f.ts';

const layout: Layout = {
  between: [{ factor: 'g', levels: ['a', 'b'], inEffect: true }],
  within: [],
  groups: [
    { levels: [0], scores: [Float64Array.of(1, 2, 3, 4, 5)] },
    { levels: [1], scores: [Float64Array.of(2, 3, 9)] },
  ],
  left: [],
};
const words = { estimator: 'x', label: 'x', share: 's', method: 'm' };
const numbers = {
  statistic: { name: 'F', value: 4 },
  df: 1,
  df2: 6,
  p: 0.09,
  pHow: 'F distribution',
  share: { name: 's', value: 0.4, interval: [0, 0.7] as const, how: '' },
  level: 0.9,
};

describe('a row about several levels', () => {
  it('by hand: the share is the estimate, in no unit, with counts of every level', () => {
    const context = { trim: 0, alpha: 0.05, resamples: 99, seed: 1 };
    const made = makeOmnibusRow(
      { ...layout, groups: [layout.groups[0] as never, { levels: [1], scores: [Float64Array.of(2, 3, 9, 4)] }] },
      context,
      words,
      numbers,
    );
    expect(made).toMatchObject({ estimate: 0.4, unit: '', df: 1, df2: 6, n: 9, p: 0.09, level: 0.9 });
    expect(made.counts).toEqual([
      { condition: 'a', n: 5, h: 5 },
      { condition: 'b', n: 4, h: 4 },
    ]);
  });

  it('refuses p and interval where fewer than four scores are left, keeping the estimate', () => {
    const made = makeOmnibusRow(layout, { trim: 0, alpha: 0.05, resamples: 99, seed: 1 }, words, numbers);
    expect([made.estimate, made.p, made.interval]).toEqual([0.4, null, null]);
    expect(made.cautions).toEqual(['R22']);
  });

  it('theory: the limits of partial eta squared are those whose noncentral F has the F value as its alpha quantiles', () => {
    const { value, interval } = partialEta({ F: 5, df1: 2, df2: 27 }, 0.05);
    expect(value).toBeCloseTo(10 / 37, 12);
    const [low, high] = interval as [number, number];
    const ncp = (share: number) => (30 * share) / (1 - share);
    expect(noncentralFLower(5, 2, 27, ncp(low))).toBeCloseTo(0.95, 8);
    expect(noncentralFLower(5, 2, 27, ncp(high))).toBeCloseTo(0.05, 8);
  });

  it('degenerate: F = 0 has the share 0 and the limits 0; no F no share, with the reason', () => {
    expect(partialEta({ F: 0, df1: 2, df2: 27 }, 0.05)).toMatchObject({ value: 0, interval: [0, 0] });
    expect(partialEta({ F: null, df1: null, df2: null }, 0.05, 'why')).toMatchObject({ value: null, reason: 'why' });
    expect(lessBiased({ F: null, df1: null, df2: null }, 4)).toEqual([]);
  });
});
