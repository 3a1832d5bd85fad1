import { describe, expect, it } from 'vitest';
import {
  declareDesign,
  fullCondition,
  participantNoun,
  type Roles,
  withinCondition,
  withinConditions,
} from '../../src/analysis/design.ts';
import { tableOf } from '../support/tables.ts';

const roles: Roles = {
  participant: 'officer',
  within: ['alert'],
  between: ['training'],
  outcome: 'ms',
  unit: 'ms',
  direction: 'lower',
  rows: 'several trials',
};

const table = tableOf({
  officer: ['a', 'a', 'a', 'b', 'b', 'c'],
  training: ['new', 'new', 'new', 'old', 'old', 'new'],
  alert: ['tone', 'tone', 'voice', 'tone', 'voice', 'tone'],
  ms: [500, 510, 400, 600, null, 550],
});

describe('declareDesign', () => {
  it('by hand: participants by first appearance, complete rows kept, missing rows counted', () => {
    const design = declareDesign(table, roles);
    expect(design.participants).toEqual(['a', 'b', 'c']);
    expect([...design.kept]).toEqual([1, 1, 1, 1, 0, 1]);
    expect(design.missingRows).toBe(1);
  });

  it('by hand: lists every combination without a row, a row without an outcome not counting', () => {
    expect(declareDesign(table, roles).missingCells).toEqual([
      { participant: 'b', condition: 'voice' },
      { participant: 'c', condition: 'voice' },
    ]);
  });

  it('by hand: conditions cross in order, the last factor varying fastest', () => {
    const two = tableOf({ p: ['1', '1', '1', '1'], a: ['x', 'x', 'y', 'y'], b: ['u', 'v', 'u', 'v'], s: [1, 2, 3, 4] });
    const design = declareDesign(two, { ...roles, participant: 'p', within: ['a', 'b'], between: [], outcome: 's' });
    expect(withinConditions(design).map((each) => each.label)).toEqual(['x, u', 'x, v', 'y, u', 'y, v']);
    expect([...withinCondition(design)]).toEqual([0, 1, 2, 3]);
    expect([...fullCondition(design)]).toEqual([0, 1, 2, 3]);
  });

  it('invariance: numbers as participant codes make the same design as text', () => {
    const text = declareDesign(tableOf({ p: ['7', '7', '9', '9'], c: ['x', 'y', 'x', 'y'], s: [1, 2, 3, 4] }), {
      ...roles,
      participant: 'p',
      within: ['c'],
      between: [],
      outcome: 's',
    });
    const number = declareDesign(tableOf({ p: [7, 7, 9, 9], c: ['x', 'y', 'x', 'y'], s: [1, 2, 3, 4] }), text.roles);
    expect(number.participants).toEqual(text.participants);
    expect(number.kept).toEqual(text.kept);
  });

  it('refuses a participant in two groups, naming the participant and both rows (methods R9)', () => {
    const wrong = tableOf({ officer: ['a', 'a'], training: ['new', 'old'], alert: ['tone', 'voice'], ms: [1, 2] });
    expect(() => declareDesign(wrong, roles)).toThrow(
      /officer a stands in two groups of training: "new" in row 1 and "old" in row 2/,
    );
  });

  it('refuses repeated rows where one score each was stated, naming the rows', () => {
    expect(() => declareDesign(table, { ...roles, rows: 'one score' })).toThrow(
      /officer a has 2 rows under tone \(rows 1, 2\)/,
    );
  });

  it('refuses an outcome of text, naming the column, the value and its row', () => {
    const wrong = tableOf({ officer: ['a', 'b'], training: ['n', 'o'], alert: ['x', 'y'], ms: ['12', 'abc'] });
    expect(() => declareDesign(wrong, roles)).toThrow(/column "ms" holds text, such as "abc" in row 2/);
  });

  it('refuses a missing column, naming those that are there', () => {
    expect(() => declareDesign(table, { ...roles, outcome: 'seconds' })).toThrow(
      /no column called "seconds".*officer, training, alert, ms/,
    );
  });

  it('degenerate: a score too large to square is refused with its row', () => {
    const huge = tableOf({ officer: ['a', 'b'], training: ['n', 'o'], alert: ['x', 'y'], ms: [1, 1e308] });
    expect(() => declareDesign(huge, roles)).toThrow(/Row 2 of column "ms" holds 1e\+308, too large/);
  });

  it('degenerate: a factor with one level only is refused with its level', () => {
    const one = tableOf({ officer: ['a', 'b'], training: ['n', 'n'], alert: ['x', 'y'], ms: [1, 2] });
    expect(() => declareDesign(one, roles)).toThrow(/"training" has one level only \("n"\)/);
  });

  it('by hand: the noun is the column name where that is a word', () => {
    expect(participantNoun(roles)).toBe('officer');
    expect(participantNoun({ ...roles, participant: 'P_ID' })).toBe('participant');
    expect(participantNoun({ ...roles, participant: 'id' })).toBe('participant');
  });
});
