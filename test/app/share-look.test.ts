import { describe, expect, it } from 'vitest';
import { columnLooks, participantColumns, usedOtherwise, uses } from '../../src/app/share-look.ts';
import type { StoredColumn } from '../../src/worksheet/format.ts';
import { testRegistry } from '../support/kinds.ts';
import { cell, dataBlock, worksheet } from '../support/worksheets.ts';

function text(name: string, values: readonly string[], type: 'text' | 'date' = 'text'): StoredColumn {
  const levels = [...new Set(values)];
  return { name, type, levels, codes: values.map((value) => levels.indexOf(value)) };
}

function looksOf(columns: readonly StoredColumn[], settings = {}) {
  const rows = (columns[0] as { codes?: readonly number[] }).codes?.length ?? 0;
  const cells = [cell('c1', 'design', { participant: 'who', ...settings })];
  return columnLooks(worksheet(cells, { data: [{ ...dataBlock('d1', []), rows, columns }] }), testRegistry);
}

const twelve = Array.from({ length: 12 }, (_, i) => `text ${i}`);

describe('columns that look identifying', () => {
  // Which columns identify a person: common practice of data protection.
  it.each([
    ['email', 'its name says an e-mail address'],
    ['E-Mail', 'its name says an e-mail address'],
    ['DateOfBirth', 'its name says a date of birth'],
    ['dob', 'its name says a date of birth'],
    ['mobile phone', 'its name says a telephone number'],
    ['lastName', 'its name says a name'],
    ['Name', 'its name says a name'],
    ['participant_name', 'its name says a name'],
    ['postcode', 'its name says an address'],
    ['student_id', 'its name says an official number'],
  ])('by hand: by its name, %s', (name, why) => {
    expect(looksOf([text(name, ['a', 'b'])])[0]?.why).toBe(why);
  });

  it.each(['alert', 'condition_name', 'filename', 'telling', 'zipper', 'score'])(
    'by hand: not by its name, %s',
    (name) => {
      expect(looksOf([text(name, ['a', 'b'])])[0]?.why).toBeNull();
    },
  );

  it('by hand: by what it holds, although its name says nothing', () => {
    const whys = looksOf([
      text('v1', ['a@b.org', 'c@d.org']),
      text('v2', ['+44 20 7946 0000', '(020) 7946-0001']),
      text('v3', twelve),
      text('v4', ['1961-02-03', '1999-12-31'], 'date'),
      text('v5', ['2026-02-03', '2026-03-31'], 'date'),
      text('v6', ['tone', 'voice', 'tone', 'voice']),
      text('v7', ['2026', '2027']),
    ]).map(({ column, why }) => [column, why]);
    expect(whys).toEqual([
      ['v1', 'it holds e-mail addresses'],
      ['v2', 'it holds telephone numbers'],
      ['v3', 'nearly every text in it is different (12 of 12)'],
      ['v4', 'its dates lie more than ten years apart, as dates of birth do'],
      ['v5', null],
      ['v6', null],
      ['v7', null],
    ]);
  });

  it('by hand: the participant column is apart; a column a cell uses says which', () => {
    const looks = looksOf([text('who', twelve), text('email', twelve), text('free', twelve)], { outcome: 'email' });
    expect(looks.map(({ column, usedBy }) => [column, usedBy])).toEqual([
      ['email', 'design'],
      ['free', null],
    ]);
  });

  it('by hand: settings name a column deep down, in lists and within a formula, and not in other texts', () => {
    expect(uses({ a: { b: ['x', 'rt'] } }, 'rt')).toBe(true);
    expect(uses({ formula: '100 - rt' }, 'rt')).toBe(true);
    expect(uses({ reason: 'a short rt' }, 'rt')).toBe(false);
    expect(uses({ row: 'trial', what: 'trial' }, 'trial')).toBe(false);
  });

  it('by hand: the participant column, and what else uses it', () => {
    const data = [{ ...dataBlock('d1', []), columns: [text('who', []), text('x', [])] }];
    const design = cell('c1', 'design', { participant: 'who' });
    expect(participantColumns(worksheet([design], { data }))).toEqual(['who']);
    expect(participantColumns(worksheet([cell('c1', 'design', { participant: 'derived' })], { data }))).toEqual([]);
    expect(usedOtherwise(worksheet([design], { data }), testRegistry, 'who')).toBeNull();
    const derive = cell('c2', 'derive', { of: 'who' });
    expect(usedOtherwise(worksheet([design, derive], { data }), testRegistry, 'who')).toBe('derive');
  });
});
