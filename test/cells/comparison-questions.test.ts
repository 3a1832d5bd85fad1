import { describe, expect, it } from 'vitest';
import { claimKind } from '../../cells/claim/kind.ts';
import { comparisonKind } from '../../cells/comparison/kind.ts';
import type { ComparisonSettings } from '../../cells/comparison/settings.ts';
import { plainSentence, type Settings } from '../../cells/kind.ts';
import { standingKind } from '../../cells/standing/kind.ts';
import type { ClaimValue } from '../../src/analysis/claim.ts';
import type { Result } from '../../src/analysis/compare.ts';
import type { Sweep } from '../../src/analysis/sweep.ts';
import { scoresOf } from '../support/designs.ts';
import { blankOf, choose, contextOf, run, sharedOf } from '../support/kind-run.ts';

const scores = scoresOf('epilepsy_visits', {
  participant: 'id',
  within: ['visit'],
  between: ['treatment'],
  outcome: 'seizures',
  unit: 'seizures',
  direction: 'lower',
});
const context = contextOf({ scores });
const pair = comparisonKind.defaults(context) as ComparisonSettings;
const ask = (value: string, from: Settings = pair) =>
  choose(comparisonKind.sentence(from, context), 'first', value) as ComparisonSettings;
const everyVisit = ask('\u0001levels\u0000visit');
const sentenceOf = (settings: Settings, own = context) => plainSentence(comparisonKind.sentence(settings, own));

describe('what the first blank offers', () => {
  it('by hand: levels, every level, interaction, chosen levels, every score; no contrast of two groups', () => {
    const { editor } = blankOf(comparisonKind.sentence(pair, context), 'first');
    expect(editor.type === 'choice' && editor.options.map((each) => each.label)).toEqual([
      'v1',
      'v2',
      'v3',
      'v4',
      'placebo',
      'progabide',
      'every visit',
      'every treatment',
      'visit differences between treatment groups',
      'chosen levels of visit',
      'every score',
    ]);
  });

  it('by hand: with two levels only there is no question about several of them', () => {
    const two = scoresOf('sleep', { participant: 'subject', within: ['drug'], outcome: 'extra_hours' });
    const own = contextOf({ scores: two });
    const { editor } = blankOf(comparisonKind.sentence(comparisonKind.defaults(own), own), 'first');
    expect(editor.type === 'choice' && editor.options.map((each) => each.label)).toEqual([
      'drug1',
      'drug2',
      'every score',
    ]);
    const asked = { ...pair, factor: 'drug', effect: { type: 'levels', factor: 'drug', pairs: 'none' } };
    expect(comparisonKind.check(asked, own)).toEqual(['drug has two levels only: compare drug1 with drug2 directly.']);
  });

  it('by hand: each choice reads as a sentence and plans trimmed means', () => {
    expect(sentenceOf(everyVisit)).toBe(
      'Compare every visit on the 20 % trimmed means, without pairs, at \u03b1 = .05.',
    );
    const withPairs = choose(comparisonKind.sentence(everyVisit, context), 'pairs', 'holm');
    expect(sentenceOf(withPairs)).toBe(
      'Compare every visit on the 20 % trimmed means, with all pairs by Holm, at \u03b1 = .05.',
    );
    expect(sentenceOf(ask('\u0001interaction\u0000visit\u0000treatment'))).toBe(
      'Compare visit differences between treatment groups on the 20 % trimmed means (Welch\u2013James), at \u03b1 = .05.',
    );
    expect(sentenceOf(ask('\u0001contrast\u0000visit'))).toBe(
      'Compare, among chosen levels of visit, v1 with the mean of v2, v3 and v4 on the 20 % trimmed mean of differences, two-sided, at \u03b1 = .05.',
    );
    expect(sentenceOf(ask('\u0001value'))).toBe(
      'Compare every score with 0 seizures on the 20 % trimmed mean, two-sided, at \u03b1 = .05.',
    );
  });

  it('by hand: going back to a level gives the pair again, without an effect in the settings', () => {
    const back = ask('visit\u0000v3', everyVisit);
    expect(Object.keys(back)).not.toContain('effect');
    expect(back).toMatchObject({ factor: 'visit', first: 'v3', estimator: 'trimmed-differences' });
    expect(ask('treatment\u0000placebo', everyVisit)).toMatchObject({
      factor: 'treatment',
      second: 'progabide',
      estimator: 'yuen-welch',
    });
  });

  it('by hand: a level taken by one side of a contrast leaves the other', () => {
    const contrast = ask('\u0001contrast\u0000visit');
    const { editor } = blankOf(comparisonKind.sentence(contrast, context), 'first-levels');
    if (editor.type !== 'choices') throw new Error('no choices');
    expect(editor.set(['v1', 'v2'])).toMatchObject({ effect: { first: ['v1', 'v2'], second: ['v3', 'v4'] } });
  });

  it('by hand: the value may be a shared number', () => {
    const value = { ...ask('\u0001value'), effect: { type: 'value', value: { shared: 'chance' } } };
    expect(sentenceOf(value, { ...context, shared: [sharedOf('chance', 5)] })).toMatch(/with 5 seizures/);
    expect(comparisonKind.check(value, { ...context, shared: [sharedOf('chance', null)] })[0]).toMatch(/which value/);
  });

  it('refuses a row that does not answer the question, and a condition that is not there, with a sentence', () => {
    expect(comparisonKind.check({ ...everyVisit, estimator: 'paired-t' }, context)[0]).toMatch(
      /does not answer this question/,
    );
    const lost = { ...everyVisit, effect: { type: 'levels', factor: 'load', pairs: 'none' } };
    expect(comparisonKind.check(lost, context)[0]).toMatch(/no condition called "load"/);
    expect(sentenceOf(lost)).toMatch(/every load/);
  });

  it('by hand: without the design above the sentence still reads', () => {
    expect(sentenceOf(everyVisit, contextOf())).toBe(
      'Compare every visit on the 20 % trimmed means, without pairs, at \u03b1 = .05.',
    );
    expect(sentenceOf(pair, contextOf())).toBe(
      'Compare v2 with v1 on the 20 % trimmed mean of differences, two-sided, at \u03b1 = .05.',
    );
  });
});

describe('what a question about several levels comes to', () => {
  const settings = choose(comparisonKind.sentence(everyVisit, context), 'pairs', 'holm') as ComparisonSettings;

  it('by hand: words, tables and record; df 3 and 174 of the reference case repeated_measures_anova', async () => {
    const computed = await run<Result>(comparisonKind, settings, { scores });
    expect(comparisonKind.say(computed, settings)).toMatch(
      /^every visit, 20 % trimmed means, df corrected: F\(\d\.\d, \d+\.\d\) = \d\.\d\d, p = \.\d{3}, robust share of variance = \.\d\d \[\.\d\d, \.\d\d\] \(95 % interval\); n = 59\.$/,
    );
    expect(comparisonKind.flow?.(computed, settings)).toEqual({ count: 59, label: 'compared' });
    const tables = comparisonKind.tables?.(computed, settings) ?? [];
    expect(tables.map((each) => each.title)).toEqual([
      'every row',
      'each level by itself, 95 % intervals',
      'all pairs: Holm, 20 % trimmed mean of differences',
      'effect sizes, and how each row is computed',
    ]);
    for (const table of tables) for (const row of table.rows) expect(row).toHaveLength(table.columns.length);
    const record = comparisonKind.record(computed) as {
      levels: unknown[];
      pairs: unknown[];
      findings: { df2?: number }[];
    };
    expect([record.levels.length, record.pairs.length]).toEqual([4, 6]);
    expect(record.findings[0]?.df2).toBe(174);
    expect(JSON.stringify(record)).not.toMatch(/NaN|Infinity/);
  });

  it('by hand: the margin says that the rows do not tell which, and how pairs are made', async () => {
    const computed = await run<Result>(comparisonKind, settings, { scores });
    const notes = comparisonKind.notes?.(computed, settings) ?? [];
    expect(notes.some((each) => /not which/.test(each.text))).toBe(true);
    expect(notes.some((each) => each.lead === 'Pairs.' && /Holm 1979/.test(each.text))).toBe(true);
    for (const note of notes) expect(note.text).not.toMatch(/undefined|NaN|\$\{/);
  });

  it('by hand: an interaction warns about the scale (R19)', async () => {
    const asked = ask('\u0001interaction\u0000visit\u0000treatment');
    const computed = await run<Result>(comparisonKind, asked, { scores });
    expect(comparisonKind.notes?.(computed, asked).find((each) => each.id === 'R19')?.text).toMatch(
      /equal differences in seizures/,
    );
    expect(computed.value.levels).toHaveLength(8);
  });

  it('refuses a claim from it, and says what to add', async () => {
    const result = (await run<Result>(comparisonKind, settings, { scores })).value;
    const claim = claimKind.defaults(contextOf({ result }));
    expect(claimKind.check(claim, contextOf({ result }))[0]).toMatch(/Add a comparison of two conditions/);
    await expect(run(claimKind, claim, { result })).rejects.toThrow(/says whether anything differs, not what/);
  });

  it('invariance: settings without an effect compute and record as before', async () => {
    const computed = await run<Result>(comparisonKind, pair, { scores });
    expect(Object.keys(comparisonKind.record(computed) as object)).toEqual(['planned', 'findings', 'left']);
    expect(computed.value.scope).toBe('within');
  });
});

describe('contrasts and values', () => {
  it('theory: a contrast within participants bears a claim and a strip, its planned line equal to the row', async () => {
    const contrast = ask('\u0001contrast\u0000visit');
    const result = (await run<Result>(comparisonKind, contrast, { scores })).value;
    expect(result.comparison).toMatchObject({ first: 'v1', second: 'the mean of v2, v3 and v4' });
    const claim = claimKind.defaults(contextOf({ result }));
    const value = (await run<ClaimValue>(claimKind, { ...claim, relation: 'higher' }, { result })).value;
    expect(value.words).toBe('v1 is higher than the mean of v2, v3 and v4 on seizures.');
    const sweep = (await run<Sweep>(standingKind, {}, { claim: value })).value;
    expect(sweep.specifications[sweep.planned]?.finding).toEqual(result.findings[result.planned]);
    expect(sweep.specifications.length).toBeGreaterThan(20);
  });

  it('theory: a contrast of groups bears a strip too', async () => {
    const plants = scoresOf('plant_growth', { between: ['group'], outcome: 'weight' });
    const own = contextOf({ scores: plants });
    const contrast = choose(
      comparisonKind.sentence(comparisonKind.defaults(own), own),
      'first',
      '\u0001contrast\u0000group',
    );
    expect((contrast as ComparisonSettings).estimator).toBe('contrast-trimmed');
    const result = (await run<Result>(comparisonKind, contrast, { scores: plants })).value;
    const claim = (await run<ClaimValue>(claimKind, claimKind.defaults(contextOf({ result })), { result })).value;
    const sweep = (await run<Sweep>(standingKind, {}, { claim })).value;
    expect(sweep.specifications[sweep.planned]?.finding).toEqual(result.findings[result.planned]);
    expect(sweep.groups.map((each) => each.group)).toEqual(expect.arrayContaining(['means', 'trimmed means']));
  });

  it('by hand: every score against a value: one column of counts, and the distance in the unit', async () => {
    const value = { ...ask('\u0001value'), effect: { type: 'value', value: 5 } };
    const computed = await run<Result>(comparisonKind, value, { scores });
    expect(comparisonKind.say(computed, value)).toMatch(
      /^every score minus 5 seizures, 20 % trimmed mean: .* seizures, 95 % interval/,
    );
    const [rows] = comparisonKind.tables?.(computed, value) ?? [];
    for (const row of rows?.rows ?? []) expect(row).toHaveLength(rows?.columns.length ?? 0);
    for (const note of comparisonKind.notes?.(computed, value) ?? []) expect(note.text).not.toMatch(/undefined|NaN/);
  });

  it('degenerate: a design without conditions starts with a value', () => {
    const rivers = contextOf({ scores: scoresOf('rivers', { outcome: 'length' }) });
    const first = comparisonKind.defaults(rivers);
    expect(sentenceOf(first, rivers)).toBe(
      'Compare every score with 0 on the 20 % trimmed mean, two-sided, at \u03b1 = .05.',
    );
    expect(comparisonKind.check(first, rivers)).toEqual([]);
  });
});
