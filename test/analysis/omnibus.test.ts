import { describe, expect, it } from 'vitest';
import { findingRecord } from '../../src/analysis/finding.ts';
import { takeLayout } from '../../src/analysis/layout.ts';
import {
  compareLevels,
  defaultOmnibusRow,
  fittingOmnibusRows,
  OMNIBUS_ROWS,
  omnibusRowOf,
  shapeOf,
} from '../../src/analysis/omnibus.ts';
import { scoresOf } from '../support/designs.ts';
import { compareAll, everyLevel } from '../support/omnibus.ts';

const alert = { name: 'alert', scope: 'within', levels: ['tone', 'voice', 'seat pulse'] } as const;
const load = { name: 'load', scope: 'within', levels: ['low', 'high'] } as const;
const training = { name: 'training', scope: 'between', levels: ['standard', 'refreshed'] } as const;
const ship = { name: 'ship', scope: 'between', levels: ['a', 'b', 'c'] } as const;
const ids = (factors: Parameters<typeof fittingOmnibusRows>[0], asked: Parameters<typeof fittingOmnibusRows>[1]) =>
  fittingOmnibusRows(factors, asked).map((row) => row.id);

describe('which rows fit', () => {
  it('by hand: within participants, then with groups beside', () => {
    expect(ids([alert], everyLevel('alert'))).toEqual([
      'repeated',
      'repeated-gg',
      'repeated-hf',
      'trimmed-repeated',
      'friedman',
      'quade',
      'welch-james',
      'trimmed-welch-james',
    ]);
    expect(ids([alert, training], everyLevel('alert'))).toEqual([
      'repeated',
      'repeated-gg',
      'repeated-hf',
      'trimmed-repeated',
      'friedman',
      'quade',
      'mixed',
      'mixed-gg',
      'mixed-hf',
      'welch-james',
      'trimmed-welch-james',
    ]);
  });

  it('by hand: two levels have nothing to correct (R6), and no rank test of several conditions', () => {
    expect(ids([load, training], everyLevel('load'))).toEqual([
      'repeated',
      'mixed',
      'welch-james',
      'trimmed-welch-james',
    ]);
  });

  it('by hand: groups, alone and in a factorial design', () => {
    expect(ids([ship], everyLevel('ship'))).toEqual([
      'anova',
      'welch-anova',
      'brown-forsythe',
      'trimmed-anova',
      'kruskal-wallis',
    ]);
    expect(ids([ship, training], everyLevel('ship')).slice(5)).toEqual([
      'factorial-2',
      'factorial-3',
      'welch-james',
      'trimmed-welch-james',
    ]);
    expect(ids([ship, training], { type: 'interaction', factors: ['ship', 'training'] })).toEqual([
      'factorial-3',
      'welch-james',
      'trimmed-welch-james',
    ]);
  });

  it('by hand: a mixed interaction, with one between factor and with two', () => {
    const asked = { type: 'interaction', factors: ['alert', 'training'] } as const;
    expect(ids([alert, training], asked)).toEqual([
      'mixed',
      'mixed-gg',
      'mixed-hf',
      'welch-james',
      'trimmed-welch-james',
    ]);
    expect(ids([alert, training, ship], asked)).toEqual(ids([alert, training], asked));
    expect(shapeOf([alert, training, ship], asked)).toEqual({ between: [2], within: [3], otherBetween: 1 });
  });

  it('by hand: a new question plans trimmed means wherever a row has them', () => {
    expect(defaultOmnibusRow([alert], everyLevel('alert'))).toBe('trimmed-repeated');
    expect(defaultOmnibusRow([ship], everyLevel('ship'))).toBe('trimmed-anova');
    expect(defaultOmnibusRow([load, training], everyLevel('load'))).toBe('trimmed-welch-james');
  });

  it('theory: ids are unique, and every row that can fit writes its own', () => {
    expect(new Set(OMNIBUS_ROWS.map((row) => row.id)).size).toBe(OMNIBUS_ROWS.length);
    expect(omnibusRowOf('mixed-gg')?.trims).toBe(false);
    expect(omnibusRowOf('bell')).toBeUndefined();
  });
});

describe('compareLevels', () => {
  const plants = scoresOf('plant_growth', { between: ['group'], outcome: 'weight' });

  it('theory: a finding carries the id of its row, both df in its record, levels and pairs beside', () => {
    const result = compareAll(plants, everyLevel('group', 'games-howell'));
    expect(result.findings.map((each) => each.estimator)).toEqual(
      ids([{ name: 'group', scope: 'between', levels: ['a', 'b', 'c'] }], everyLevel('group')),
    );
    expect(findingRecord(result.findings[0] as never)).toMatchObject({ df: 2, df2: 27 });
    expect(Object.keys(findingRecord(result.findings[4] as never))).not.toContain('df2');
    expect(result.levels).toHaveLength(3);
    expect(result.pairs?.rows).toHaveLength(3);
    expect(compareAll(plants, everyLevel('group')).pairs).toBeNull();
  });

  it('by hand: the levels are shown by what the plan names: trimmed means, means, or medians for ranks', () => {
    const shown = (estimator: string) => compareAll(plants, everyLevel('group'), { estimator }).levels[0]?.estimate;
    expect(shown('anova')).toBeCloseTo(5.032, 10);
    expect(shown('trimmed-anova')).toBeCloseTo(29.96 / 6, 10);
    expect(shown('kruskal-wallis')).toBeCloseTo(5.155, 10);
  });

  it('refuses p and intervals of rows and pairs where a rule reads the condition, and keeps estimates', () => {
    const asked = everyLevel('group', 'tukey');
    const { findings, pairs } = compareLevels({
      layout: takeLayout(plants, asked),
      asked,
      comparison: {
        factor: '',
        effect: asked,
        first: '',
        second: '',
        estimator: 'anova',
        trim: 20,
        alternative: 'two-sided',
        alpha: 0.05,
        resamples: 99,
        seed: 1,
      },
      rows: ['anova', 'welch-anova'],
      withheld: true,
    });
    for (const each of [...findings, ...(pairs?.rows ?? [])]) expect([each.p, each.interval]).toEqual([null, null]);
    expect(pairs?.rows[0]?.estimate).toBeCloseTo(0.371, 10);
  });

  it('theory: the same seed gives the same digits', () => {
    expect(compareAll(plants, everyLevel('group'))).toEqual(compareAll(plants, everyLevel('group')));
  });
});
