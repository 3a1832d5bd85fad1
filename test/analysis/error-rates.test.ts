import { describe, expect, test } from 'vitest';
import { addRelabelCounts, rateOf, relabelRates, residualDesign, ruleChoices } from '../../src/analysis/error-rates.ts';
import { withoutRules } from '../../src/analysis/exclusion.ts';
import { rng } from '../../src/numerics/rng.ts';
import { shapeOf } from '../../src/numerics/simulation/shapes.ts';
import { atOnce, groupsOf, pairsOf } from '../support/chains.ts';
import { countFor } from '../support/long-run.ts';

const spec = { measure: 'MAD', cutoff: 2.5 } as const;
const draws = (shape: 'normal' | 'lognormal', n: number, seed: number) => {
  const x = new Float64Array(n);
  shapeOf(shape).fill(x, rng(seed));
  return Array.from(x, (score) => 10 + score);
};

describe('a rate with its interval', () => {
  test('by hand: 50 of 1,000 is .05 [.038, .066], to two decimals', () => {
    const rate = rateOf(50, 1000);
    // Wilson with z 2: (52 -+ sqrt(4 (47.5 + 1))) / 1004.
    expect(rate?.low).toBeCloseTo((52 - 2 * Math.sqrt(48.5)) / 1004, 12);
    expect(rate?.high).toBeCloseTo((52 + 2 * Math.sqrt(48.5)) / 1004, 12);
    expect(rate?.decimals).toBe(2);
    expect(rateOf(250, 5000)?.decimals).toBe(3);
  });

  test('degenerate: none, all, and no runs', () => {
    expect(rateOf(0, 100)).toMatchObject({ rate: 0, low: 0 });
    expect(rateOf(0, 100)?.high).toBeGreaterThan(0.03);
    expect(rateOf(100, 100)?.high).toBe(1);
    expect(rateOf(0, 0)).toBe(null);
  });
});

describe('relabelled data', () => {
  test('by hand: residuals have one median in every condition, and the spread they had', () => {
    const { design } = groupsOf([1, 2, 9], [11, 13, 18]).scores;
    expect(Array.from(residualDesign(withoutRules(design)).outcome)).toEqual([9, 10, 17, 8, 10, 15].map((x) => x));
  });

  test('by hand: the choices of rules, none twice', () => {
    const labels = ruleChoices(groupsOf([1, 2, 9], [11, 13, 18]), spec).map((each) => each.label);
    expect(labels).toEqual([
      'nobody set aside for being extreme',
      'beyond 2 MAD all scores pooled',
      'beyond 2.5 MAD all scores pooled',
      'beyond 3 MAD all scores pooled',
      'beyond 2.5 MAD within condition',
    ]);
  });

  test('theory: everyone in and pooled rules keep the level, within conditions exceeds it, so does the best of four', async () => {
    const runs = countFor(500, 4000);
    const result = groupsOf(draws('lognormal', 20, 31), draws('lognormal', 20, 32));
    const { rejected, judged, best } = await relabelRates({ result, spec, from: 0, to: runs }, atOnce);
    const rates = rejected.map((count, i) => count / (judged[i] as number));
    const se = Math.sqrt((0.05 * 0.95) / runs);
    // Relabelling is exact for any symmetric test, and Welch's is nearly so at 20 + 20 (methods 5.3: .037 to .05).
    expect(rates[0]).toBeLessThan(0.05 + 3.5 * se);
    expect(rates[4]).toBeGreaterThan(0.1);
    expect(best / runs).toBeGreaterThan(Math.max(...rates.slice(0, 4)));
  });

  test('theory: pairs of a planned 2.5 MAD rule; a real difference does not reach the residuals', async () => {
    const x = draws('normal', 16, 33);
    const moved = x.map((score, i) => score + 50 + (i % 3));
    const near = await relabelRates({ result: pairsOf(x, draws('normal', 16, 34)), spec, from: 0, to: 200 }, atOnce);
    const far = await relabelRates({ result: pairsOf(moved, draws('normal', 16, 34)), spec, from: 0, to: 200 }, atOnce);
    for (const { rejected } of [near, far]) expect((rejected[0] as number) / 200).toBeLessThan(0.11);
  });

  test('invariance: any cut into parts gives the same counts', async () => {
    const result = groupsOf(draws('normal', 8, 1), draws('normal', 9, 2));
    const run = (from: number, to: number) => relabelRates({ result, spec, from, to }, atOnce);
    expect(addRelabelCounts([await run(0, 7), await run(7, 30)])).toEqual(await run(0, 30));
  });

  test('refuses: what has no labels to exchange, and no parts', async () => {
    const result = groupsOf([1, 2, 3], [2, 3, 4]);
    const value = { ...result, comparison: { ...result.comparison, effect: { type: 'value', value: 0 } as const } };
    await expect(
      relabelRates({ result: { ...value, scope: 'omnibus' }, spec, from: 0, to: 1 }, atOnce),
    ).rejects.toThrow(/Simulate experiments instead/);
    expect(() => addRelabelCounts([])).toThrow(RangeError);
  });
});
