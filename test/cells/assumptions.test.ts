import { beforeAll, describe, expect, it } from 'vitest';
import { assumptionsKind } from '../../cells/assumptions/kind.ts';
import type { AssumptionsSettings } from '../../cells/assumptions/settings.ts';
import { shareText } from '../../cells/assumptions/share.ts';
import { sentencesOf } from '../../cells/assumptions/words.ts';
import { type Computed, plainSentence } from '../../cells/kind.ts';
import type { Checks } from '../../src/analysis/checks.ts';
import { plantScores, sleepScores, visitScores } from '../support/check-layouts.ts';
import { blankOf, choose, contextOf, run } from '../support/kind-run.ts';

type Given = typeof sleepScores;
const settingsFor = (scores: Given, more: Partial<AssumptionsSettings> = {}): AssumptionsSettings => ({
  ...(assumptionsKind.defaults(contextOf({ scores })) as AssumptionsSettings),
  ...more,
});
const every = { first: '', second: '' };
const looks = {
  pair: [sleepScores, settingsFor(sleepScores)],
  groups: [plantScores, settingsFor(plantScores, every)],
  visits: [visitScores, settingsFor(visitScores, every)],
  mixed: [visitScores, settingsFor(visitScores, { ...every, by: 'treatment' })],
} as const;
type Look = keyof typeof looks;

const made = {} as Record<Look, Computed<Checks, null>>;
beforeAll(async () => {
  for (const name of Object.keys(looks) as Look[])
    made[name] = await run<Checks, null>(assumptionsKind, looks[name][1], { scores: looks[name][0] });
}, 60_000);
const saidIn = (name: Look) =>
  Object.fromEntries(sentencesOf(made[name].value).map(({ lead, text }) => [lead, text])) as Record<string, string>;

describe('its sentence', () => {
  it('by hand: a pair within participants, groups, and groups kept apart', () => {
    const written = (name: Look) =>
      plainSentence(assumptionsKind.sentence(looks[name][1], contextOf({ scores: looks[name][0] })));
    expect(written('pair')).toBe(
      'Check what the comparison of drug2 with drug1 assumes, and how often Shapiro\u2013Wilk at \u03b1 = .05 would find an exponential population, a t with 3 df or 10 % contamination with so many participants.',
    );
    expect(written('groups')).toMatch(/^Check what the comparison of every group assumes, .*twice the SD with so many/);
    expect(written('mixed')).toMatch(/comparison of every visit, apart by treatment, assumes.* or, for the SD, Brown/);
  });

  it('refuses, with their sentences: the distance with tables for a fixed curve (R7), every level of two', () => {
    const context = contextOf({ scores: sleepScores });
    const parts = assumptionsKind.sentence(looks.pair[1], context);
    const refusedIn = (key: string, value: string) => {
      const { editor } = blankOf(parts, key);
      const options = editor.type === 'choice' || editor.type === 'choices' ? editor.options : [];
      return options.find((option) => option.value === value)?.refused ?? '';
    };
    expect(refusedIn('test', 'kolmogorov-smirnov')).toMatch(/Lilliefors is the same distance with the tables that fit/);
    expect(refusedIn('first', 'drug\u0000')).toBe('drug has two levels only: choose one of them');
    expect(refusedIn('departures', 'spread')).toMatch(/one group only/);
    expect(assumptionsKind.check({ ...looks.pair[1], test: 'kolmogorov-smirnov' }, context)[0]).toMatch(
      /^Kolmogorov\u2013Smirnov against the fitted curve: Its tables/,
    );
  });

  it('by hand: choosing a level keeps two different ones; choosing every level clears both', () => {
    const context = contextOf({ scores: visitScores });
    const settings = settingsFor(visitScores);
    const first = (value: string) => choose(assumptionsKind.sentence(settings, context), 'first', value);
    expect(first('visit\u0000v1')).toMatchObject({ first: 'v1', second: 'v2' });
    expect(first('visit\u0000')).toMatchObject({ factor: 'visit', first: '', second: '' });
    expect(first('treatment\u0000placebo')).toMatchObject({ factor: 'treatment', first: 'placebo' });
  });

  it('refuses open blanks and unknown words of a file', () => {
    const check = (more: Partial<AssumptionsSettings>) =>
      assumptionsKind.check({ ...looks.pair[1], ...more }, contextOf({ scores: sleepScores }));
    expect(check({})).toEqual([]);
    expect(check({ factor: '' })[0]).toMatch(/which comparison/);
    expect(check({ second: '' })[0]).toMatch(/which two conditions/);
    expect(check({ test: 'kappa' })[0]).toMatch(/by which test/);
    expect(check({ departures: ['uniform'] })[0]).toMatch(/No departure is called "uniform"/);
  });
});

describe('what it says', () => {
  it('agrees with the reference case sleep: W of the differences, and what ten pairs could show', () => {
    // W = .8299, p = .0333 (shapiro.test of drug1 - drug2).
    expect(saidIn('pair').Shape).toMatch(
      /Shapiro\u2013Wilk W = \.83, p = \.033\. Evidence against normal differences; with n = 10 the test would miss an exponential population in \d+ % \(\u00b1 3\) of studies, a t with 3 df in \d+ % \(\u00b1 \d\), 10 % contamination in/,
    );
    expect(assumptionsKind.say(made.pair, looks.pair[1])).toMatch(/^Shapiro.* The check did not select the test\.$/);
  });

  it('by hand: no strong evidence is said with what could have been missed', () => {
    expect(saidIn('groups').Shape).toMatch(
      /W = \.97, p = \.438\. No strong evidence against normal residuals; with n = 30/,
    );
  });

  it('by hand: spread of groups names sizes, ratio, level and what could have been missed', () => {
    expect(saidIn('groups').Spread).toMatch(
      /^SDs from 0\.44 \(trt2, n = 10\) to 0\.79 \(trt1, n = 10\), ratio at most 1\.8, in groups of one size: the classical F would keep about its level here, .* Brown\u2013Forsythe F\(2, 27\) = 1\.12, p = \.341; with these n it would miss twice the SD/,
    );
  });

  it('agrees with the reference case epilepsy_visits: both epsilons, Mauchly as information only', () => {
    expect(saidIn('visits').Sphericity).toMatch(
      /= \.75 \(Greenhouse\u2013Geisser\), \.79 \(Huynh\u2013Feldt\).*\.33 at the least: read the corrected df.*Mauchly W = \.53, \u03c7\u00b2\(5\) = 36\.30, p < \.001, is information only/,
    );
    expect(saidIn('visits').Shape).toMatch(/on the 6 differences between two levels.*Holm.*no interval fits/);
    expect(Object.keys(saidIn('mixed'))).toContain('Spread');
    expect(Object.keys(saidIn('visits'))).not.toContain('Spread');
  });

  it('theory: a pair never gets sphericity (R6), and raw scores are never pooled (R8): the margin says so', () => {
    expect(Object.keys(saidIn('pair'))).not.toContain('Sphericity');
    const ids = (name: Look) => (assumptionsKind.notes?.(made[name], looks[name][1]) ?? []).map(({ id }) => id);
    expect(ids('pair')).toEqual(expect.arrayContaining(['R6', 'R8']));
    expect(ids('groups')).toContain('R8');
    expect(ids('visits')).not.toContain('R6');
  });

  it('theory: no verdict in any word of sentences, notes and tables', () => {
    for (const name of Object.keys(looks) as Look[]) {
      const settings = looks[name][1];
      const all = [
        ...sentencesOf(made[name].value).map(({ text }) => text),
        ...(assumptionsKind.notes?.(made[name], settings) ?? []).map(({ text }) => text),
        ...(assumptionsKind.tables?.(made[name], settings) ?? []).flatMap(({ title, rows }) => [title, ...rows.flat()]),
      ].join('\n');
      expect(all).not.toMatch(
        /\b(met|violated|passed|failed|acceptable|normally distributed|(is|are) normal)\b|\u2713|\u2714/i,
      );
    }
  });

  it('by hand: a simulated share has no more digits than its error allows', () => {
    expect(shareText(0.46, { share: 0.54, se: 0.0158, runs: 1000 })).toBe('46 % (\u00b1 3)');
    expect(shareText(0.004, { share: 0.996, se: 0.002, runs: 1000 })).toBe('0.4 % (\u00b1 0.4)');
    // Three runs of a thousand: the upper 95 % limit of none at all.
    expect(shareText(0, { share: 1, se: 0, runs: 1000 })).toBe('fewer than 0.3 %');
    expect(shareText(1, { share: 0, se: 0, runs: 1000 })).toBe('more than 99.7 %');
  });
});

describe('tables, record and blinding', () => {
  it('theory: every table has full-precision values of the same shape', () => {
    for (const name of Object.keys(looks) as Look[]) {
      for (const { columns, rows, raw } of assumptionsKind.tables?.(made[name], looks[name][1]) ?? []) {
        expect(rows.every((row) => row.length === columns.length)).toBe(true);
        expect(raw?.map((row) => row.length)).toEqual(rows.map((row) => row.length));
      }
    }
  });

  it('by hand: the five largest influences of sleep, patient 9 in front', () => {
    const table = assumptionsKind.tables?.(made.pair, looks.pair[1]).at(-1);
    expect(table?.rows).toHaveLength(5);
    expect(table?.rows[0]?.[0]).toBe('9');
    expect(table?.columns.map(({ name }) => name)).toEqual([
      'participant',
      'Cook\u2019s distance',
      'estimate without',
      'change in SE',
    ]);
  });

  it('invariance: the record is plain data without NaN, and comes out again', async () => {
    for (const name of Object.keys(looks) as Look[]) {
      const record = assumptionsKind.record(made[name]);
      expect(JSON.parse(JSON.stringify(record))).toEqual(record);
    }
    const again = await run<Checks>(assumptionsKind, looks.pair[1], { scores: sleepScores });
    expect(assumptionsKind.record(again)).toEqual(assumptionsKind.record(made.pair));
  });

  it('theory: it is veiled while blind, and gives nothing that chooses a test', () => {
    expect([assumptionsKind.blind, assumptionsKind.gives, assumptionsKind.takes]).toEqual([
      'veil',
      'checks',
      { scores: 'scores' },
    ]);
  });
});
