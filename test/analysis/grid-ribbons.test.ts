import { describe, expect, it } from 'vitest';
import { gridRibbons } from '../../src/analysis/grid-ribbons.ts';
import { claimLower, extreme, resultOf, trialColumns } from '../support/joint.ts';

describe('gridRibbons', () => {
  it('agrees with the comparison cell, digit for digit, where the worksheet stands', () => {
    for (const rules of [[], [extreme('MAD', 2.5, 'participant')]]) {
      const result = resultOf(trialColumns(12, 8), {}, {}, rules);
      const own = result.findings[result.planned];
      const [trim, cutoff] = gridRibbons(result, claimLower);
      expect([trim?.along, cutoff?.along]).toEqual(['trim', 'cutoff']);
      expect([trim?.now, cutoff?.now]).toEqual([20, rules.length === 0 ? null : 2.5]);
      for (const ribbon of [trim, cutoff]) {
        const here = ribbon?.points.find((point) => point.at === ribbon.now);
        expect([here?.estimate, [here?.low, here?.high], here?.p]).toEqual([own?.estimate, own?.interval, own?.p]);
      }
    }
  });

  it('by hand: every trim from 0 to 25 %, cutoffs from 1.5 to 4 and none; a smaller cutoff keeps no more rows', () => {
    const [trim, cutoff] = gridRibbons(resultOf(trialColumns(12, 8)), claimLower);
    expect(trim?.points.map((point) => point.at)).toEqual(Array.from({ length: 26 }, (_, i) => i));
    expect(cutoff?.points.map((point) => point.at)).toEqual([
      1.5,
      1.75,
      2,
      2.25,
      2.5,
      2.75,
      3,
      3.25,
      3.5,
      3.75,
      4,
      null,
    ]);
    const kept = cutoff?.points.map((point) => point.kept) ?? [];
    expect(kept).toEqual([...kept].sort((a, b) => a - b));
  });

  it('degenerate: a planned row without a trim is followed along the cutoff, its trimmed neighbour along the trim', () => {
    const [trim, cutoff] = gridRibbons(resultOf(trialColumns(9, 5), {}, { estimator: 'signed-rank' }), claimLower);
    expect([trim?.what, trim?.now]).toEqual(['trimmed mean of differences', 0]);
    expect(cutoff?.points.at(-1)?.estimate).not.toBe(trim?.points[0]?.estimate);
  });
});
