import { describe, expect, test } from 'vitest';
import { declareDesign, type Roles } from '../../src/analysis/design.ts';
import { hideConditions } from '../../src/analysis/hidden-design.ts';
import { scoreDesign } from '../../src/analysis/score.ts';
import { veilWidth } from '../../src/analysis/veil-width.ts';
import { standardDeviation } from '../../src/numerics/moments.ts';
import { rng } from '../../src/numerics/rng.ts';
import { tQuantileUpper } from '../../src/numerics/tails/t.ts';
import { tableOf } from '../support/tables.ts';

/** Half the paired t interval, from its formula. */
function halfWidth(x: Float64Array, y: Float64Array): number {
  return (
    (tQuantileUpper(0.025, x.length - 1) * standardDeviation(x.map((each, i) => each - (y[i] as number)))) /
    Math.sqrt(x.length)
  );
}

const MEAN = { statistic: 'mean', trim: 0 } as const;
const base: Roles = {
  participant: 'who',
  within: [],
  between: [],
  outcome: 'y',
  unit: '',
  direction: 'lower',
  rows: 'one score',
};

describe('the bound within participants', () => {
  const table = tableOf({
    who: ['1', '1', '2', '2', '3', '3', '4', '4'],
    alert: ['a', 'b', 'a', 'b', 'a', 'b', 'a', 'b'],
    y: [1, 2, 1, 3, 1, 1, 1, 4],
  });
  const hidden = hideConditions(declareDesign(table, { ...base, within: ['alert'] }));

  test('by hand: differences 1, 2, 0, 3 with both signs, no trim', () => {
    // Squares 1 + 4 + 0 + 9 twice = 28 over 8 - 1 = 4; t(.975; 3) = 3.182446305 (scipy.stats.t.ppf, SciPy 1.10).
    const width = veilWidth(hidden, MEAN, { factor: 'alert', trim: 0, alpha: 0.05 });
    expect(width).toBeCloseTo((3.182446305 * 2) / Math.sqrt(4), 6);
  });

  test('degenerate: too few participants, a factor that is not there, an open design', () => {
    const two = tableOf({ who: ['1', '1'], alert: ['a', 'b'], y: [1, 2] });
    const small = hideConditions(declareDesign(two, { ...base, within: ['alert'] }));
    expect(veilWidth(small, MEAN, { factor: 'alert', trim: 0, alpha: 0.05 })).toBe(null);
    expect(veilWidth(hidden, MEAN, { factor: 'other', trim: 0, alpha: 0.05 })).toBe(null);
    const open = declareDesign(table, { ...base, within: ['alert'] });
    expect(veilWidth(open, MEAN, { factor: 'alert', trim: 0, alpha: 0.05 })).toBe(null);
  });

  test('theory: without trimming never less than the half width of the open interval, two conditions', () => {
    const draw = rng(11);
    for (let round = 0; round < 50; round++) {
      const score = () => draw.uniform() + draw.uniform() + draw.uniform();
      const shift = score();
      const pairs = Array.from({ length: 15 }, () => [score(), shift + score()] as const);
      const rows = tableOf({
        who: pairs.flatMap((_, i) => [`p${i}`, `p${i}`]),
        alert: pairs.flatMap(() => ['a', 'b']),
        y: pairs.flat(),
      });
      const design = declareDesign(rows, { ...base, within: ['alert'] });
      const { values } = scoreDesign(design, MEAN);
      const side = (k: number) => values.filter((_, i) => i % 2 === k);
      // Uncentred and over twice the differences: at least (2n - 2) / (2n - 1) of the variance, about the mean or not.
      const open = halfWidth(side(0), side(1));
      const bound = veilWidth(hideConditions(design), MEAN, { factor: 'alert', trim: 0, alpha: 0.05 }) ?? 0;
      expect(bound).toBeGreaterThanOrEqual(open * Math.sqrt(28 / 29) * (1 - 1e-12));
    }
  });
});

test('by hand: the bound between participants, from all scores and the declared sizes', () => {
  const table = tableOf({
    who: ['1', '2', '3', '4', '5', '6', '7'],
    group: ['n', 'n', 'n', 'o', 'o', 'o', 'o'],
    y: [1, 2, 3, 4, 5, 6, 7],
  });
  const hidden = hideConditions(declareDesign(table, { ...base, between: ['group'] }));
  // Variance of 1 to 7 = 28/6; sizes 3 and 4: 28/6 (1/3 + 1/4); t(.975; 2) = 4.302652730 (SciPy 1.10).
  const width = veilWidth(hidden, MEAN, { factor: 'group', trim: 0, alpha: 0.05 });
  expect(width).toBeCloseTo(4.30265273 * Math.sqrt((28 / 6) * (1 / 3 + 1 / 4)), 6);
});
