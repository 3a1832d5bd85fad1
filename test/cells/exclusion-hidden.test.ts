import { describe, expect, test } from 'vitest';
import { exclusionKind } from '../../cells/exclusion/kind.ts';
import { plainSentence, type Settings } from '../../cells/kind.ts';
import { declareDesign } from '../../src/analysis/design.ts';
import { hideConditions } from '../../src/analysis/hidden-design.ts';
import { blankOf, contextOf, run } from '../support/kind-run.ts';
import { tableOf } from '../support/tables.ts';

const open = declareDesign(
  tableOf({
    who: ['b2', 'b2', 'b2', 'b2', 'a1', 'a1', 'a1', 'a1'],
    alert: ['x', 'x', 'y', 'y', 'x', 'x', 'y', 'y'],
    dose: [1, 1, 2, 2, 1, 1, 2, 2],
    ms: [100, 410, 420, 430, 510, 520, 530, 120],
  }),
  {
    participant: 'who',
    within: ['alert'],
    between: [],
    outcome: 'ms',
    unit: 'ms',
    direction: 'lower',
    rows: 'several trials',
  },
);
const design = hideConditions(open);
const below = {
  ...exclusionKind.defaults(contextOf({ design })),
  how: 'below',
  limit: 150,
  reason: 'too fast',
} as Settings;

describe('an exclusion rule while the conditions are hidden', () => {
  test('by hand: counts are pooled; no row, code or count by condition in tables and record', async () => {
    const computed = await run(exclusionKind, below, { design });
    expect(exclusionKind.tables?.(computed, below)).toEqual([]);
    expect(exclusionKind.record(computed)).toEqual({ setAside: 2, participants: 0, kept: 6 });
    const notes = exclusionKind.notes?.(computed, below).map(({ text }) => text) ?? [];
    expect(notes.join(' ')).toContain('The counts by alert are shown once the conditions are open.');
    expect(notes.join(' ')).not.toMatch(/\bx\b|a1|b2/);
    const shown = await run(exclusionKind, below, { design: open });
    expect(exclusionKind.tables?.(shown, below)).toHaveLength(2);
  });

  test('refuses: scopes that read the condition, and columns that tell it', () => {
    const context = contextOf({ design }, { blind: true });
    const reads = { ...below, how: 'beyond', scope: 'participant-condition', cutoff: 2 };
    expect(exclusionKind.check(reads, context)[0]).toContain('This rule reads the condition');
    expect(exclusionKind.check({ ...below, column: 'dose' }, context)[0]).toContain('Column dose tells the condition');
    expect(exclusionKind.check(reads, contextOf({ design: open }))).toEqual([]);
  });

  test('by hand: such scopes are not offered; participants are named in order of their codes', () => {
    const context = contextOf({ design }, { blind: true });
    const beyond = exclusionKind.defaults(context);
    const { editor } = blankOf(exclusionKind.sentence(beyond, context), 'scope');
    expect(editor.type === 'choice' && editor.options.map(({ value }) => value)).toEqual(['participant', 'pooled']);
    const named = { ...below, what: 'named', participants: ['a1'] };
    const names = blankOf(exclusionKind.sentence(named, context), 'participants').editor;
    expect(names.type === 'choices' && names.options.map(({ value }) => value)).toEqual(['a1', 'b2']);
    expect(plainSentence(exclusionKind.sentence(named, context))).toContain('Set aside who a1');
  });
});
