import { describe, expect, it } from 'vitest';
import { designKind } from '../../cells/design/kind.ts';
import type { DesignSettings } from '../../cells/design/sentence.ts';
import { plainSentence } from '../../cells/kind.ts';
import type { Design } from '../../src/analysis/design.ts';
import { blankOf, choose, contextOf, run } from '../support/kind-run.ts';
import { tableOf } from '../support/tables.ts';

/** Two trials of each alert for three officers; one officer has no voice alert, one time is missing. */
const table = tableOf({
  officer: ['7', '7', '7', '7', '8', '8', '8', '8', '9', '9'].map((who) => `P${who}`),
  training: [
    'standard',
    'standard',
    'standard',
    'standard',
    'refresher',
    'refresher',
    'refresher',
    'refresher',
    'standard',
    'standard',
  ],
  alert: ['tone', 'tone', 'voice', 'voice', 'tone', 'tone', 'voice', 'voice', 'tone', 'tone'],
  trial: [1, 2, 3, 4, 1, 2, 3, 4, 1, 2],
  ack_ms: [500, 510, 400, 410, 600, null, 500, 510, 700, 710],
});
const settings: DesignSettings = {
  participant: 'officer',
  within: ['alert'],
  between: ['training'],
  outcome: 'ack_ms',
  unit: 'ms',
  direction: 'lower',
  rows: 'several trials',
};
const context = contextOf({ table });
const words = (own: DesignSettings) => plainSentence(designKind.sentence(own, context));

describe('the design sentence', () => {
  it('by hand: reads as in product.md, with the levels of a single condition', () => {
    expect(words(settings)).toBe(
      'Each officer met every alert (tone, voice); training differs between officers; the outcome is ack_ms in ms, with several trials each, where lower is better.',
    );
    expect(words({ ...settings, within: [], rows: 'one score', direction: 'neither', unit: '' })).toBe(
      'Each officer met one condition only; training differs between officers; the outcome is ack_ms in no unit, with one score each, where neither is better.',
    );
    expect(words({ ...settings, between: ['training', 'trial'], within: [] })).toMatch(
      /; training, trial differ between officers;/,
    );
  });

  it('by hand: filling one blank gives the settings whole', () => {
    const parts = designKind.sentence(settings, context);
    expect(choose(parts, 'rows', 'one score')).toEqual({ ...settings, rows: 'one score' });
    expect(choose(parts, 'direction', 'higher')).toEqual({ ...settings, direction: 'higher' });
    expect(choose(parts, 'participant', 'training')).toEqual({ ...settings, participant: 'training' });
    const within = blankOf(parts, 'within').editor;
    expect(within.type === 'choices' && within.set([])).toEqual({ ...settings, within: [] });
    const refused = within.type === 'choices' ? within.options.filter((each) => each.refused !== undefined) : [];
    expect(refused.map((each) => each.value)).toEqual(['officer', 'training', 'ack_ms']);
    const outcome = blankOf(parts, 'outcome').editor;
    expect(outcome.type === 'choice' && outcome.options.find((each) => each.value === 'alert')?.refused).toBe(
      'holds no numbers',
    );
    const unit = blankOf(parts, 'unit').editor;
    expect(unit.type === 'text' && unit.set('s')).toEqual({ ...settings, unit: 's' });
  });
});

describe('the design cell', () => {
  it('by hand: words, flow, record and table agree on who has what', async () => {
    const computed = await run<Design>(designKind, settings, { table });
    expect(designKind.say(computed, settings)).toBe('3 officers with 9 complete rows.');
    expect(designKind.flow?.(computed, settings)).toEqual({ count: 3, label: 'officers', share: 0.9 });
    expect(designKind.record(computed)).toEqual({
      participants: 3,
      rows: 10,
      missingRows: 1,
      factors: [
        { name: 'alert', scope: 'within', levels: ['tone', 'voice'] },
        { name: 'training', scope: 'between', levels: ['standard', 'refresher'] },
      ],
      missingCells: [['P9', 'voice']],
    });
    expect(designKind.tables?.(computed, settings)[0]?.rows).toEqual([['P9', 'voice']]);
  });

  it('by hand: notes and cautions name what is missing', async () => {
    const computed = await run<Design>(designKind, settings, { table });
    expect(designKind.notes?.(computed, settings)).toEqual([
      {
        type: 'note',
        text: 'The unit of analysis is the officer: trials are scored per officer before any test.',
        id: 'R10',
      },
      { type: 'note', text: 'No officer stands in two training groups.' },
      { type: 'caution', text: '1 row without officer, condition or outcome is left out.' },
      {
        type: 'caution',
        text: 'Without any row: officer P9 under voice. A comparison that needs such a score leaves that officer out.',
      },
    ]);
  });

  it('by hand: a new cell guesses the parts from names and levels', () => {
    expect(designKind.defaults(context)).toEqual({ ...settings, direction: 'neither' });
    const scores = tableOf({ wearer: ['a', 'b'], glove: ['thin', 'thick'], seconds: [39.5, 44] });
    expect(designKind.defaults(contextOf({ table: scores }))).toMatchObject({
      participant: 'wearer',
      within: [],
      between: ['glove'],
      outcome: 'seconds',
      rows: 'one score',
    });
    expect(designKind.defaults(contextOf())).toMatchObject({ participant: '', outcome: '' });
  });

  it.each([
    [{ ...settings, participant: '' }, 'Say which column tells participants apart.'],
    [{ ...settings, outcome: '' }, 'Say which column is the outcome: it has to hold numbers.'],
    [
      { ...settings, within: [], between: [] },
      'Say which column is the condition: one that every participant met, or one that differs between participants.',
    ],
  ])('refuses open blanks: %#', (own, sentence) => {
    expect(designKind.check(own, context)).toEqual([sentence]);
  });

  it('refuses a participant in two groups, repeated rows and an outcome without numbers, naming them', async () => {
    expect(designKind.check(settings, context)).toEqual([]);
    await expect(run(designKind, { ...settings, within: [], between: ['alert'] }, { table })).rejects.toThrow(
      /P7.*alert|alert.*P7/,
    );
    await expect(run(designKind, { ...settings, rows: 'one score' }, { table })).rejects.toThrow(/P7/);
    await expect(run(designKind, { ...settings, outcome: 'alert', within: [] }, { table })).rejects.toThrow(
      /^The outcome has to be numbers/,
    );
  });
});
