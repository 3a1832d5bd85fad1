import { describe, expect, it } from 'vitest';
import { lineEnds, pointsOf, rowChart, rowsOf, scatterChart } from '../../cells/association/chart.ts';
import { associationKind } from '../../cells/association/kind.ts';
import { type AssociationSettings, guessParticipant } from '../../cells/association/sentence.ts';
import { plainSentence, type ViewContext } from '../../cells/kind.ts';
import type { Association } from '../../src/analysis/association.ts';
import { columnOf } from '../../src/data/table.ts';
import { blankOf, choose, contextOf, run, sharedOf } from '../support/kind-run.ts';
import { referenceColumns } from '../support/reference-columns.ts';
import { tableOf } from '../support/tables.ts';

const stars = referenceColumns('stars_cyg');
const table = tableOf(Object.fromEntries(Object.entries(stars).map(([name, values]) => [name, Array.from(values)])));
const context = contextOf({ table });
const defaults = associationKind.defaults(context) as AssociationSettings;
const settings: AssociationSettings = { ...defaults, resamples: 99 };
const computed = run<Association, null>(associationKind, settings, { table });

describe('the association sentence', () => {
  it('by hand: the best guess from the table, and the sentence of product.md', () => {
    expect(defaults).toMatchObject({ x: 'log_te', y: 'log_light', participant: 'star', resamples: 999 });
    expect(plainSentence(associationKind.sentence(defaults, context))).toBe(
      'Relate log_te of each star to log_light by percentage-bend correlation, with 999 resamples, two-sided, at \u03b1 = .05.',
    );
    expect(plainSentence(associationKind.sentence({ ...defaults, estimator: 'ols', participant: null }, context))).toBe(
      'Relate log_te of each row to log_light by the slope of least squares, two-sided, at \u03b1 = .05.',
    );
  });

  it('by hand: the winsorized row shows its share, which may be shared', () => {
    const own = { ...defaults, estimator: 'winsorized', trim: { shared: 'trim' } };
    const shared = [sharedOf('trim', 10, '%')];
    expect(plainSentence(associationKind.sentence(own, { ...context, shared }))).toMatch(
      /by 10 % winsorized correlation/,
    );
  });

  it('by hand: columns that are no numbers, or tell participants apart, are refused', () => {
    const mixed = contextOf({ table: tableOf({ who: ['a', 'b'], x: [1, 2], y: [3, 4] }) });
    const editor = blankOf(
      associationKind.sentence({ ...defaults, x: 'x', y: 'y', participant: 'who' }, mixed),
      'x',
    ).editor;
    expect(editor.type === 'choice' && editor.options.map((each) => each.refused ?? null)).toEqual([
      'holds no numbers',
      null,
      null,
    ]);
    expect(choose(associationKind.sentence(defaults, context), 'participant', '\u0000')).toEqual({
      ...defaults,
      participant: null,
    });
  });

  it('by hand: participants are told apart by the first column with another whole number or text in every row', () => {
    expect(guessParticipant(table)).toBe('star');
    expect(guessParticipant(tableOf({ x: [1.5, 2.5], who: ['a', 'b'] }))).toBe('who');
    expect(guessParticipant(tableOf({ x: [1, 1], y: [0.5, 2] }))).toBe(null);
  });

  it('refuses settings that say nothing', () => {
    expect(associationKind.check({ ...defaults, x: '' }, context)[0]).toMatch(/which two columns/);
    expect(associationKind.check({ ...defaults, x: 'log_light' }, context)[0]).toMatch(/not related to itself/);
    expect(associationKind.check({ ...defaults, participant: 'log_te' }, context)[0]).toMatch(/is no score/);
    expect(associationKind.check({ ...defaults, estimator: 'welch' }, context)[0]).toMatch(/which correlation/);
    expect(associationKind.check({ ...defaults, estimator: 'winsorized', trim: null }, context)[0]).toMatch(
      /winsorized/,
    );
    expect(associationKind.check(defaults, context)).toEqual([]);
  });
});

describe('the association cell', () => {
  it('agrees with methods 3.5: percentage bend .31, p .036 of 47 stars, in words', async () => {
    expect(associationKind.say(await computed, settings)).toMatch(
      /^log_te and log_light, percentage-bend correlation: \.31, 95 % interval \[.*\], t\(45\) = 2\.16, p = \.036; n = 47\.$/,
    );
    expect(associationKind.flow?.(await computed, settings)).toEqual({ count: 47, label: 'related' });
    expect(associationKind.blind).toBe('veil');
  });

  it('theory: every row has words for how it is computed, with an author\u2019s year or the word common practice', async () => {
    const [rows, methods, points] = associationKind.tables?.(await computed, settings) ?? [];
    expect(rows?.rows).toHaveLength(15);
    expect(rows?.raw?.[0]?.[3]).toBe((await computed).value.findings[0]?.estimate);
    expect(methods?.rows.every((row) => /\d{4}|common practice/.test(row[1] ?? ''))).toBe(true);
    expect(points?.rows).toHaveLength(47);
    expect(points?.title).toMatch(/common practice/);
    expect(points?.rows[10]?.at(-1)).toBe('leverage');
  });

  it('by hand: leverage is named with its participants and numbers, the skipped pairs are counted', async () => {
    const notes = associationKind.notes?.(await computed, settings) ?? [];
    const text = (id: string) => notes.find((each) => each.id === id)?.text ?? '';
    expect(text('LEVER')).toMatch(
      /^Star 30, 11, 20, 34 lie far out on log_te \(leverage .*limit .* = \.09, common practice\)/,
    );
    expect(text('SKIP')).toMatch(/leave out 5 of 47 by projections and 7 of 47 by the MCD/);
    // sin(pi .256085 / 2) = .391
    expect(text('TAU')).toMatch(/a tau of \.26 goes with an r of \.39/);
    expect(text('FEWPAIRS')).toBe('');
  });

  it('by hand: few participants, and who is not related, are said', async () => {
    const small = tableOf({
      who: ['a', 'b', 'c', 'd', 'e', 'f', 'g'],
      x: [1, 2, 3, 4, 5, 7, null],
      y: [2, 1, 4, 3, 6, 5, 1],
    });
    const own = { ...settings, x: 'x', y: 'y', participant: 'who' };
    const notes = associationKind.notes?.(await run(associationKind, own, { table: small }), own) ?? [];
    expect(notes.map((each) => each.text).join(' ')).toMatch(/Not related: g \(no x\)/);
    // Critical r with 4 df: 2.776 / sqrt(4 + 2.776^2) = .811.
    expect(notes.find((each) => each.id === 'FEWPAIRS')?.text).toMatch(/With 6 participants .* r of \.81/);
  });

  it('invariance: the record replays to the same numbers', async () => {
    const again = await run<Association, null>(associationKind, settings, { table });
    expect(associationKind.record(again)).toEqual(associationKind.record(await computed));
    expect(associationKind.record(again)).toMatchObject({ planned: 4, leverage: ['30', '11', '20', '34'], left: [] });
  });

  it('refuses rows that repeat a participant, and a table without pairs', async () => {
    const trials = tableOf({ who: ['a', 'a', 'b'], x: [1, 2, 3], y: [1, 2, 3] });
    const own = { ...settings, x: 'x', y: 'y', participant: 'who' };
    await expect(run(associationKind, own, { table: trials })).rejects.toThrow(/one row per participant/);
    const empty = tableOf({ who: ['a', 'b'], x: [1, null], y: [null, 2] });
    await expect(run(associationKind, own, { table: empty })).rejects.toThrow(/Nobody has a value in both x and y/);
  });
});

describe('the association figures', () => {
  const view: ViewContext = {
    cellId: 'c',
    settings,
    shared: [],
    theme: 'light',
    width: 900,
    reference: null,
    sweep: null,
  };

  it('by hand: the four giants are marked by shape and named; lines run over the range of x', async () => {
    const { value } = await computed;
    const far = pointsOf(value).filter((point) => point.far);
    expect(far.map((point) => point.name)).toEqual(['11', '20', '30', '34']);
    const ends = lineEnds(value);
    const te = columnOf(table, 'log_te');
    const values = te?.type === 'number' ? te.values : [];
    expect(ends.map((each) => each.x)).toEqual([
      Math.min(...values),
      Math.max(...values),
      Math.min(...values),
      Math.max(...values),
    ]);
    expect(JSON.stringify(scatterChart(value, view))).toMatch(/diamond/);
  });

  it('theory: correlations keep within their axis, one-sided intervals run to its edge, one row is the planned', async () => {
    const own = { ...settings, alternative: 'greater' as const };
    const { value } = await run<Association, null>(associationKind, own, { table });
    const rows = rowsOf(value, 'correlations');
    expect(rows.every((row) => row.high === 1 && (row.low ?? 0) >= -1)).toBe(true);
    expect(rows.filter((row) => row.planned).map((row) => row.label)).toEqual(['percentage-bend correlation']);
    expect(rowsOf(value, 'slopes')).toHaveLength(7);
    const wide = JSON.stringify(rowChart(8, 900, { title: 'correlation', domain: [-1, 1] }));
    expect(wide).toContain('"domain":[-1,1]');
    expect(JSON.stringify(rowChart(8, 390, { title: 'correlation', domain: null }))).toContain('"numbers"');
  });
});
