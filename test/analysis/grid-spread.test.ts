import { describe, expect, it } from 'vitest';
import { axisShares, spreadOf } from '../../src/analysis/grid-spread.ts';

const at = (cutoff: string, trim: string, estimate: number) => {
  return { combination: { cutoff, measure: 'MAD', scope: 'pooled', trim, row: 'welch', score: 'mean' }, estimate };
};

describe('spreadOf', () => {
  it('by hand: range, median and a change of sign between least and most', () => {
    expect(spreadOf([3, -1, 2, 8])).toEqual({
      n: 4,
      least: -1,
      most: 8,
      median: 2.5,
      ends: [-1, 8],
      endsAre: 'range',
      reverses: true,
    });
    expect(spreadOf([3, 1, 2])?.reverses).toBe(false);
    expect(spreadOf([0, 1])?.reverses).toBe(false);
  });

  it('by hand: from 100 analyses on the percentiles 1 and 99 count, so that one odd one does not', () => {
    const many = [-50, ...Array.from({ length: 120 }, (_, i) => 10 + i)];
    const spread = spreadOf(many);
    expect([spread?.endsAre, spread?.reverses, spread?.least]).toEqual(['percentiles', false, -50]);
    // 121 sorted values, type 7: position 1 + 120 x .01 = 2.2, between 10 and 11.
    expect(Math.abs((spread?.ends[0] ?? 0) - 10.2)).toBeLessThan(1e-9);
  });

  it('degenerate: nothing to spread', () => {
    expect(spreadOf([])).toBe(null);
  });
});

describe('axisShares', () => {
  it('by hand: a crossed 2 x 2 of 1, 3, 5, 7: cutoff 16 of 20, trim 4 of 20', () => {
    const shares = axisShares([at('2', '0', 1), at('2', '20', 3), at('3', '0', 5), at('3', '20', 7)]);
    expect(shares.map((each) => each.axis)).toEqual(['cutoff', 'trim']);
    expect(Math.abs((shares[0]?.share ?? 0) - 0.8)).toBeLessThan(1e-14);
    expect(Math.abs((shares[1]?.share ?? 0) - 0.2)).toBeLessThan(1e-14);
    expect(shares[0]?.means).toEqual([
      { value: '2', mean: 2, n: 2 },
      { value: '3', mean: 6, n: 2 },
    ]);
  });

  it('theory: main effects of a whole crossed grid without interactions add up to 1', () => {
    const all = [1, 2, 5].flatMap((a, i) => [0, 7, 3, 4].map((b, j) => at(String(i), String(j), a + b)));
    const sum = axisShares(all).reduce((total, each) => total + (each.share ?? 0), 0);
    expect(Math.abs(sum - 1)).toBeLessThan(1e-12);
  });

  it('degenerate: equal estimates have no share to give; nothing gives nothing', () => {
    expect(axisShares([at('2', '0', 4), at('3', '0', 4)]).map((each) => each.share)).toEqual([null]);
    expect(axisShares([])).toEqual([]);
  });
});
