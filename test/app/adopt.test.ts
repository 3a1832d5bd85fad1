import { describe, expect, it } from 'vitest';
import { registry } from '../../cells/registry.ts';
import { demoWorksheet, plans } from '../../demo-data/worksheets.ts';
import type { ExtremeRule } from '../../src/analysis/rules.ts';
import { adoptedWorksheet } from '../../src/app/adopt.ts';
import type { Cell, Worksheet } from '../../src/worksheet/format.ts';

const demo = (name: string): Worksheet => {
  const plan = plans.find((each) => each.name === name);
  if (plan === undefined) throw new Error(`no demo ${name}`);
  const made = demoWorksheet({ ...plan, file: 'x.csv' }, 'a,b\n1,2\n');
  const claim = made.cells.find((cell) => cell.kind === 'claim')?.id ?? '';
  const grid: Cell = { id: 'grid', kind: 'sensitivity', version: 1, settings: {}, from: { claim } };
  return { ...made, cells: [...made.cells, grid] };
};

const rule = (measure: ExtremeRule['measure'], cutoff: number | null, scope: ExtremeRule['scope']): ExtremeRule => {
  return { rule: 'extreme', on: 'trial', column: 'y', measure, cutoff, scope, sides: 'both' };
};
const mean = { statistic: 'mean', trim: 0 } as const;
const settingsOf = (worksheet: Worksheet, kind: string, nth = 0) =>
  worksheet.cells.filter((cell) => cell.kind === kind)[nth]?.settings ?? {};
const numberOf = (worksheet: Worksheet, id: string) => worksheet.shared.find((each) => each.id === id);

describe('adoptedWorksheet', () => {
  const bridge = demo('bridge-alerts');
  const at = (target: Parameters<typeof adoptedWorksheet>[3], worksheet = bridge) =>
    adoptedWorksheet(worksheet, registry, 'grid', target);

  it('by hand: shared numbers take trim and cutoff, the comparison the row; named rules and limits stay', () => {
    const next = at({
      rules: [rule('MAD', 2.5, 'participant')],
      trim: 10,
      estimator: 'winsorized-differences',
      score: mean,
      outcome: 'y',
    });
    expect(numberOf(next, 'trim')?.value).toBe(10);
    expect(numberOf(next, 'cutoff')?.value).toBe(2.5);
    expect(settingsOf(next, 'comparison')).toMatchObject({
      estimator: 'winsorized-differences',
      trim: { shared: 'trim' },
    });
    for (const nth of [0, 1, 2])
      expect(settingsOf(next, 'exclusion', nth)).toEqual(settingsOf(bridge, 'exclusion', nth));
    expect(next.cells.length).toBe(bridge.cells.length);
  });

  it('by hand: another distance goes into the cell, and the shared cutoff is counted in it', () => {
    const next = at({
      rules: [rule('SD', 3, 'pooled')],
      trim: 20,
      estimator: 'trimmed-differences',
      score: mean,
      outcome: 'y',
    });
    expect(settingsOf(next, 'exclusion', 2)).toMatchObject({
      measure: 'SD',
      scope: 'pooled',
      cutoff: { shared: 'cutoff' },
    });
    expect(numberOf(next, 'cutoff')).toMatchObject({ value: 3, unit: 'SD' });
  });

  it('by hand: no rule is no cutoff; a number the shared one cannot hold becomes the cell\u2019s own', () => {
    const strict = at({
      rules: [rule('MAD', 2, 'participant')],
      trim: 20,
      estimator: 'trimmed-differences',
      score: mean,
      outcome: 'y',
    });
    const none = at({ rules: [], trim: 20, estimator: 'trimmed-differences', score: mean, outcome: 'y' }, strict);
    expect(numberOf(none, 'cutoff')?.value).toBe(null);
    const far = at({
      rules: [rule('MAD', 6, 'participant')],
      trim: 20,
      estimator: 'trimmed-differences',
      score: mean,
      outcome: 'y',
    });
    expect(numberOf(far, 'cutoff')?.value).toBe(null);
    expect(settingsOf(far, 'exclusion', 2).cutoff).toBe(6);
  });

  it('by hand: the trim of trials is the score\u2019s own, and a row without a trim leaves the trim alone', () => {
    const score = { statistic: 'trimmed mean', trim: 10 } as const;
    const next = at({ rules: [], trim: 0, estimator: 'paired-t', score, outcome: 'y' });
    expect(settingsOf(next, 'score')).toEqual({ statistic: 'trimmed mean', trim: 10 });
    expect(numberOf(next, 'trim')?.value).toBe(20);
  });

  it('by hand: a worksheet without a rule gets an exclusion cell between design and score', () => {
    const gloves = demo('glove-peg-test');
    const next = at(
      { rules: [rule('SD', 2.5, 'pooled')], trim: 20, estimator: 'yuen-welch', score: mean, outcome: 'y' },
      gloves,
    );
    const added = next.cells.find((cell) => cell.kind === 'exclusion');
    expect(added?.settings).toMatchObject({
      what: 'trial',
      how: 'beyond',
      measure: 'SD',
      cutoff: 2.5,
      scope: 'pooled',
      column: '',
    });
    expect(added?.from.design).toBe(next.cells.find((cell) => cell.kind === 'design')?.id);
    expect(next.cells.find((cell) => cell.kind === 'score')?.from.design).toBe(added?.id);
  });

  it('invariance: the state it is in already changes nothing, and the record before is not touched', () => {
    const before = JSON.stringify(bridge);
    expect(at({ rules: [], trim: 20, estimator: 'trimmed-differences', score: mean, outcome: 'y' })).toBe(bridge);
    at({ rules: [rule('SD', 3, 'pooled')], trim: 5, estimator: 'marginal-trimmed', score: mean, outcome: 'y' });
    expect(JSON.stringify(bridge)).toBe(before);
  });

  it('degenerate: a cell without a comparison above leaves the worksheet as it is', () => {
    expect(
      adoptedWorksheet(bridge, registry, 'none such', {
        rules: [],
        trim: 5,
        estimator: 'paired-t',
        score: mean,
        outcome: 'y',
      }),
    ).toBe(bridge);
  });
});
