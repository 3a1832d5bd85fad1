import { describe, expect, it } from 'vitest';
import type { ExclusionDetail } from '../../cells/exclusion/kind.ts';
import { exclusionKind } from '../../cells/exclusion/kind.ts';
import type { ExclusionSettings } from '../../cells/exclusion/sentence.ts';
import { stripOf } from '../../cells/exclusion/strip.ts';
import { plainSentence } from '../../cells/kind.ts';
import { type Design, declareDesign } from '../../src/analysis/design.ts';
import { blankOf, choose, contextOf, run } from '../support/kind-run.ts';
import { tableOf } from '../support/tables.ts';

// Two officers of ten trials; officer 7 has 900 and 700 among 500 to 560, officer 23 one press of 4000.
const ms = [500, 510, 520, 530, 540, 550, 560, 900, 545, 700, 500, 510, 520, 530, 540, 550, 560, 570, 580, 4000];
const trials = declareDesign(
  tableOf({
    officer: ms.map((_, i) => (i < 10 ? '7' : '23')),
    alert: ms.map((_, i) => (i % 2 ? 'voice' : 'tone')),
    ack_ms: ms,
    age: ms.map((_, i) => (i < 10 ? 30 : 40)),
  }),
  {
    participant: 'officer',
    within: ['alert'],
    between: [],
    outcome: 'ack_ms',
    unit: 'ms',
    direction: 'lower',
    rows: 'several trials',
  },
);
// 24 people on a ring of (a, b), one at (9, 0).
const ring = Array.from({ length: 24 }, (_, i) => [
  Math.cos(i * 1.7) * (1 + (i % 5) / 5),
  Math.sin(i * 1.7) * (1 + (i % 4) / 4),
]);
const people = declareDesign(
  tableOf({
    participant: [...ring.map((_, i) => `p${i + 1}`), 'far'],
    group: Array.from({ length: 25 }, (_, i) => (i % 2 ? 'x' : 'y')),
    a: [...ring.map((each) => each[0] as number), 9],
    b: [...ring.map((each) => each[1] as number), 0],
  }),
  {
    participant: 'participant',
    within: [],
    between: ['group'],
    outcome: 'a',
    unit: '',
    direction: 'lower',
    rows: 'one score',
  },
);

const settings: ExclusionSettings = {
  what: 'trial',
  how: 'beyond',
  participants: [],
  reason: '',
  column: '',
  limit: null,
  measure: 'SD',
  cutoff: 2,
  sides: 'both',
  scope: 'participant',
  least: 70,
};
const together: ExclusionSettings = {
  ...settings,
  what: 'participant',
  how: 'together',
  columns: ['a', 'b'],
  scope: 'pooled',
};
const words = (own: ExclusionSettings, design = trials) =>
  plainSentence(exclusionKind.sentence(own, contextOf({ design })));
const compute = (own: ExclusionSettings, design = trials) =>
  run<Design, ExclusionDetail>(exclusionKind, own, { design });
const notesOf = async (own: ExclusionSettings, design = trials) =>
  exclusionKind.notes?.(await compute(own, design), own) ?? [];
const noteOf = async (id: string, own: ExclusionSettings, design = trials) =>
  (await notesOf(own, design)).find((each) => each.id === id)?.text ?? '';

describe('the sentences of further rules', () => {
  it('by hand: each measure names the middle it is taken from', () => {
    const said = (measure: ExclusionSettings['measure']) =>
      words({ ...settings, measure }).slice('Set aside a trial when its ack_ms is '.length);
    const end = ' of the same officer, whatever the alert.';
    expect(said('double MAD')).toBe(`further than 2 MAD of its side from the median${end}`);
    expect(said('hinge fences')).toBe(`further than 2 hinge distances from the hinges${end}`);
    expect(said('adjusted fences')).toBe(`further than 2 skew-adjusted hinge distances from the hinges${end}`);
    expect(said('Carling')).toBe(`further than Carling\u2019s multiple of the IQR from the median${end}`);
    expect(said('moving')).toBe(`further than the moving criterion from the mean${end}`);
    expect(said('recursive')).toBe(`further than the recursive moving criterion from the mean${end}`);
    expect(words({ ...settings, repeated: true })).toMatch(/is again and again further than 2 SD from the mean/);
  });

  it('by hand: several columns at once', () => {
    expect(words(together, people)).toBe(
      'Set aside a participant whose means of a, b together lie further out than 97.5 % of normal ones, by MCD distance, whatever the group.',
    );
    const parts = exclusionKind.sentence(together, contextOf({ design: people }));
    const { editor } = blankOf(parts, 'columns');
    expect(editor.type === 'choices' && editor.options.map((each) => each.refused ?? null)).toEqual([
      'holds no numbers',
      'holds no numbers',
      null,
      null,
    ]);
  });

  it('by hand: choosing how a score is judged takes "repeated" up and drops it again', () => {
    const parts = exclusionKind.sentence(settings, contextOf({ design: trials }));
    const again = choose(parts, 'how', 'beyond both again');
    expect(again).toEqual({ ...settings, repeated: true });
    const back = exclusionKind.sentence(again as ExclusionSettings, contextOf({ design: trials }));
    expect(choose(back, 'how', 'beyond both')).toEqual(settings);
    expect(choose(exclusionKind.sentence(together, contextOf({ design: people })), 'what', 'trial')).toMatchObject({
      how: 'beyond',
    });
  });

  it('refuses what a procedure does not allow', () => {
    const check = (own: Partial<ExclusionSettings>) => exclusionKind.check({ ...settings, ...own }, contextOf())[0];
    expect(check({ measure: 'recursive', sides: 'above' })).toMatch(/tests both ends/);
    expect(check({ measure: 'moving', repeated: true })).toMatch(/repeats by itself/);
    expect(exclusionKind.check({ ...together, columns: ['a'] }, contextOf())[0]).toMatch(/two or more/);
    expect(check({ measure: 'moving' })).toBe(undefined);
  });
});

describe('further rules', () => {
  it('by hand: repeated 2 SD sets 700 aside after 900, and says so with R13 and R21', async () => {
    const once = await compute(settings);
    const again = await compute({ ...settings, repeated: true });
    expect(exclusionKind.record(once)).toMatchObject({ setAside: [8, 20] });
    expect(exclusionKind.record(again)).toMatchObject({ setAside: [8, 10, 20] });
    expect(exclusionKind.same?.(once.value, again.value)).toBe(false);
    expect(await noteOf('R13', { ...settings, repeated: true })).toMatch(
      /here 2 trials in the first pass, 3 in 3 passes\..*21 % of normal and 44 % of lognormal/,
    );
    expect(await noteOf('R21', { ...settings, repeated: true })).toMatch(/masking.*swamping/);
    expect(await noteOf('R13', settings)).toBe('');
  });

  it('by hand: the moving criterion of ten scores is 2.173 SD, and the margin says that it moves', async () => {
    // Officer 23: 4000 lies 2.84 SD from the mean of ten scores; officer 7: 900 lies 2.60 SD.
    expect(exclusionKind.record(await compute({ ...settings, measure: 'moving' }))).toMatchObject({
      setAside: [8, 20],
    });
    expect(await noteOf('MOVING', { ...settings, measure: 'moving' })).toMatch(/here 10 scores each/);
    expect(exclusionKind.say(await compute({ ...settings, measure: 'recursive' }), settings)).toMatch(/set aside/);
  });

  it('theory: every measure prints its conventions with an author or the word common practice', async () => {
    const all = ['double MAD', 'hinge fences', 'adjusted fences', 'Carling', 'moving', 'recursive'] as const;
    for (const measure of all) {
      const said = (await notesOf({ ...settings, measure })).find((each) => each.lead === 'Conventions.')?.text ?? '';
      expect(said, measure).toMatch(/(19|20)\d\d|common practice/);
      expect(said, measure).toMatch(/exactly on the limit is kept/);
      expect(said, measure).toMatch(measure === 'recursive' ? /pass after pass/ : /one pass/);
    }
  });

  it('by hand: R12 for a double MAD of fewer than 20 scores, R4 where a side has no spread', async () => {
    expect(await noteOf('R12', { ...settings, measure: 'double MAD' })).toMatch(
      /on a side of the median within a officer|officer/,
    );
    const flat = declareDesign(
      tableOf({
        officer: ms.map(() => '7'),
        alert: ms.map((_, i) => (i % 2 ? 'a' : 'b')),
        ack_ms: ms.map((_, i) => (i < 17 ? 5 : i)),
      }),
      trials.roles,
    );
    expect(await noteOf('R4', { ...settings, measure: 'Carling' }, flat)).toMatch(/For 7 more than half/);
    expect(await noteOf('ADJUSTED', { ...settings, measure: 'adjusted fences' })).toMatch(/10 scores each/);
  });

  it('by hand: the participant far out on both columns is set aside, with its distance on the strip', async () => {
    const computed = await compute(together, people);
    expect(exclusionKind.record(computed)).toMatchObject({ participants: ['far'], setAside: [25] });
    const strip = stripOf(computed.value, computed.detail, 'participants', 'words');
    expect(strip.x).toHaveLength(25);
    expect(strip.unit).toBe('');
    expect(strip.limits.to?.[0]).toBeCloseTo(Math.sqrt(7.377758908227871), 10);
    expect([...strip.mark].reduce((sum, mark) => sum + mark, 0)).toBe(1);
    expect(await noteOf('MCDN', together, people)).toMatch(/25 participants and 2 columns are few/);
    expect((await notesOf(together, people)).some((each) => each.id === 'BLINDCUT')).toBe(true);
  });

  it('degenerate: columns that say the same have no distance, and the cell says so', async () => {
    const twin = { ...together, columns: ['a', 'a'] };
    expect(exclusionKind.say(await compute(twin, people), twin)).toBe('The rule sets nothing aside.');
    expect(await noteOf('TOGETHER', twin, people)).toMatch(/combination of the others/);
    const none = { ...together, within: null };
    expect(exclusionKind.record(await compute(none, people))).toMatchObject({ setAside: [] });
  });

  it('refuses a column that is not there or holds no numbers', async () => {
    await expect(compute({ ...together, columns: ['a', 'group'] }, people)).rejects.toThrow(/holds text/);
    await expect(compute({ ...together, columns: ['a', 'z'] }, people)).rejects.toThrow(/no column called "z"/);
  });
});

describe('blindness of further rules', () => {
  it('theory: relabelling the alerts within each officer leaves marks, limits and notes byte for byte', async () => {
    const table = { ...trials.table };
    const turned = declareDesign(
      {
        ...table,
        columns: table.columns.map((each) =>
          each.name === 'alert' && each.type !== 'number' ? { ...each, codes: each.codes.toReversed() } : each,
        ),
      },
      trials.roles,
    );
    for (const measure of [
      'double MAD',
      'hinge fences',
      'adjusted fences',
      'Carling',
      'moving',
      'recursive',
    ] as const) {
      const [a, b] = [await compute({ ...settings, measure }), await compute({ ...settings, measure }, turned)];
      expect(a.detail.flagged).toEqual(b.detail.flagged);
    }
  });
});
