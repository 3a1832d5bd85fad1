import { describe, expect, test } from 'vitest';
import { declareDesign, type Roles } from '../../src/analysis/design.ts';
import { applyRule } from '../../src/analysis/exclusion.ts';
import { hideConditions, leakWords, shownLevels, sortedLevels } from '../../src/analysis/hidden-design.ts';
import { tableOf } from '../support/tables.ts';

const ROLES: Roles = {
  participant: 'who',
  within: ['alert'],
  between: ['group'],
  outcome: 'ms',
  unit: 'ms',
  direction: 'lower',
  rows: 'several trials',
};

// Two participants, two trials under each alert; participant 2 lacks the voice.
const columns = {
  who: ['1', '1', '1', '1', '2', '2'],
  group: ['new', 'new', 'new', 'new', 'old', 'old'],
  alert: ['voice', 'voice', 'tone', 'tone', 'tone', 'tone'],
  code: [7, 7, 4, 4, 4, 4],
  trial: [1, 2, 1, 2, 1, 2],
  ms: [500, 300, 400, 200, 250, 150],
};
const hidden = hideConditions(declareDesign(tableOf(columns), ROLES));

describe('hiding the conditions', () => {
  test('by hand: factors keep names and sorted levels, every code is gone', () => {
    expect(hidden.factors.map(({ name, scope, levels }) => [name, scope, levels])).toEqual([
      ['alert', 'within', ['tone', 'voice']],
      ['group', 'between', ['new', 'old']],
    ]);
    expect(hidden.factors.flatMap(({ codes }) => [...new Set(codes)])).toEqual([-1, -1]);
    expect(hidden.missingCells).toEqual([{ participant: '2', condition: '' }]);
  });

  test('by hand: the table passes on no condition and no column that tells one', () => {
    expect(hidden.table.columns.map(({ name }) => name)).toEqual(['who', 'trial', 'ms']);
    expect(hidden.hidden?.columns).toEqual(['code']);
  });

  test('by hand: rows stand by participant and value, blocks follow them', () => {
    expect([...hidden.outcome]).toEqual([200, 300, 400, 500, 150, 250]);
    expect([...hidden.table.origin]).toEqual([4, 2, 3, 1, 6, 5]);
    expect([...(hidden.hidden?.blocks ?? [])]).toEqual([0, 1, 0, 1, 0, 0]);
    expect(hidden.hidden?.blockCount).toBe(2);
    expect(hidden.hidden?.sizes).toEqual([{ factor: 'group', sizes: [1, 1] }]);
  });

  test('invariance: a wide file whose columns change places gives the same design', () => {
    const wide = (alerts: readonly string[], scores: readonly number[]) =>
      hideConditions(
        declareDesign(
          { ...tableOf({ who: ['1', '1', '2', '2'], alert: alerts, ms: scores }), origin: Int32Array.of(1, 1, 2, 2) },
          { ...ROLES, between: [], rows: 'one score' },
        ),
      );
    expect(wide(['a', 'b', 'a', 'b'], [5, 3, 2, 2])).toEqual(wide(['a', 'b', 'a', 'b'], [3, 5, 2, 2]));
  });

  test('by hand: a rule on scores sets the same rows aside as in the open', () => {
    const rule = { rule: 'limit', on: 'trial', column: 'ms', side: 'below', limit: 220, reason: 'too fast' } as const;
    const { design } = applyRule(hidden, rule);
    expect(design.hidden).toBe(hidden.hidden);
    expect([...(design.steps[0]?.rows ?? [])].map((row) => hidden.table.origin[row])).toEqual([4, 6]);
  });
});

describe('words about what could tell the conditions', () => {
  test('by hand: columns, unequal groups, and the order of participants', () => {
    const table = tableOf({ ...columns, who: ['1', '1', '3', '3', '2', '2'] });
    const words = leakWords(hideConditions(declareDesign(table, { ...ROLES, within: [] }))).join(' ');
    expect(words).toContain('The groups of group differ in size (1, 2)');
    expect(words).toContain('in shuffled order');
    expect(leakWords(hidden)[0]).toBe('code would tell the condition, and is hidden with it.');
  });

  test('degenerate: an open design has none', () => {
    expect(leakWords(declareDesign(tableOf(columns), ROLES))).toEqual([]);
  });
});

describe('levels in an order no row decides', () => {
  test('by hand: numbers by size, texts by letters', () => {
    expect(sortedLevels(['10', '9', 'b', 'a'].slice(0, 2))).toEqual(['9', '10']);
    expect(sortedLevels(['voice', 'seat pulse', 'tone'])).toEqual(['seat pulse', 'tone', 'voice']);
  });

  test('by hand: as in the file once the conditions are open', () => {
    const column = tableOf({ x: ['b', 'a'] }).columns[0];
    if (column === undefined) throw new Error('no column');
    expect([shownLevels(column, true), shownLevels(column, false)]).toEqual([
      ['a', 'b'],
      ['b', 'a'],
    ]);
  });
});

test('refuses: quietly, without naming the levels, a participant in two groups and repeated rows', () => {
  const two = tableOf({ ...columns, group: ['new', 'old', 'new', 'new', 'old', 'old'] });
  expect(() => declareDesign(two, ROLES, true)).toThrow(/^A who stands in two groups of group\./);
  expect(() => declareDesign(two, ROLES, true)).not.toThrow(/"new"|row/);
  const repeated = { ...ROLES, rows: 'one score' } as const;
  expect(() => declareDesign(tableOf(columns), repeated, true)).toThrow(/^A who has several rows under one condition/);
});
