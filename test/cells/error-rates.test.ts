import { describe, expect, test } from 'vitest';
import { errorRatesKind } from '../../cells/error-rates/kind.ts';
import { type RatesSettings, ratesSentence } from '../../cells/error-rates/sentence.ts';
import { ratesTable, rateText, sayRates } from '../../cells/error-rates/words.ts';
import { plainSentence } from '../../cells/kind.ts';
import type { Rates } from '../../src/analysis/error-rates.ts';
import { groupsOf, pairsOf } from '../support/chains.ts';
import { choose, contextOf, run } from '../support/kind-run.ts';

// Plant weights of the groups trt2 and ctrl: test/reference/cases/plant_growth.csv.
const trt2 = [6.31, 5.12, 5.54, 5.5, 5.37, 5.29, 4.92, 6.15, 5.8, 5.26];
const ctrl = [4.17, 5.58, 5.18, 6.11, 4.5, 4.61, 5.17, 4.53, 5.33, 5.14];
const result = groupsOf(trt2, ctrl);
const context = contextOf({ result });
const settings = errorRatesKind.defaults(context) as RatesSettings;
const few = { ...settings, runs: 200 };

describe('the error-rates cell', () => {
  test('by hand: its sentence in both forms, with the numbers of the data', () => {
    expect(plainSentence(ratesSentence(settings, context))).toBe(
      'Relabel these data 2,000 times through the whole chain, with everyone in, with scores further than 2.5 MAD set aside across and within conditions, and by the rules above.',
    );
    const simulated = choose(ratesSentence(settings, context), 'mode', 'simulate');
    expect(plainSentence(errorRatesKind.sentence(simulated, context))).toBe(
      'Simulate experiments like this one, 5,000 of them: normal scores of 10 participants in a and 10 in b, the spread in a 0.8 times that in b, a true difference of 0 spreads between the means; scores further than 2.5 MAD set aside across or within conditions; 199 resamples in each.',
    );
    const pairs = contextOf({ result: pairsOf(trt2, ctrl) });
    const own = errorRatesKind.defaults(pairs);
    expect(plainSentence(errorRatesKind.sentence({ ...own, mode: 'simulate' }, pairs))).toContain(
      'normal scores of 10 participants under both conditions, 0 % of their variance the participant\u2019s own',
    );
  });

  test('theory: relabelled plants, everyone in keeps near .05 and the best of four is at least as often', async () => {
    const { value } = await run<Rates>(errorRatesKind, few, { result });
    expect(value.rows).toHaveLength(6);
    const [everyone] = value.rows;
    const best = value.rows.at(-1);
    expect((everyone?.rejected ?? 0) / 200).toBeLessThan(0.05 + 3.5 * Math.sqrt(0.0475 / 200));
    expect(best?.rejected).toBeGreaterThanOrEqual(everyone?.rejected ?? 0);
    expect(best?.label).toBe('the best of no cutoff and 3 cutoffs');
  });

  test('agrees with exact levels: normal scores, SD 2:1, 5 and 15 participants: Student .1577, Welch .0563', async () => {
    const simulated = { ...few, mode: 'simulate', first: 5, second: 15, ratio: 2, resamples: 0, runs: 1000 } as const;
    const computed = await run<Rates>(errorRatesKind, simulated, { result });
    // test/reference/error_rates.json, exact_type1_two_group_normal.
    expect(computed.value.exact?.student).toBeCloseTo(0.157715, 4);
    expect(computed.value.exact?.welch).toBeCloseTo(0.056261, 4);
    const student = computed.value.rows[0];
    expect(Math.abs((student?.rejected ?? 0) / 1000 - 0.157715)).toBeLessThan(3.5 * Math.sqrt(0.1328 / 1000));
    const notes = errorRatesKind.notes?.(computed, simulated).map((note) => note.text) ?? [];
    expect(notes.join(' ')).toContain('Student\u2019s t rejects in .1577, Welch\u2019s t in .0563.');
    expect(notes.join(' ')).toContain('more than one and a half times as often');
    expect(JSON.stringify(errorRatesKind.record(computed))).not.toMatch(/NaN|Infinity/);
  });

  test('invariance: the same seed gives the same record, another shape another', async () => {
    const simulated = { ...few, mode: 'simulate', resamples: 0, runs: 600, cutoff: null } as const;
    const once = errorRatesKind.record(await run<Rates>(errorRatesKind, simulated, { result }));
    expect(errorRatesKind.record(await run<Rates>(errorRatesKind, simulated, { result }))).toEqual(once);
    const other = await run<Rates>(errorRatesKind, { ...simulated, shape: 'exponential' }, { result });
    expect(errorRatesKind.record(other)).not.toEqual(once);
    expect(other.value.rows.map((row) => row.cleaning)).not.toContain('set aside across conditions');
  });

  test('by hand: rates are written to the decimals their runs allow', () => {
    expect(rateText(255, 5000)).toBe('.051 [.045, .058]');
    expect(rateText(5, 100)).toBe('.05 [.02, .11]');
    const row = { label: 'no cutoff', cleaning: '', judged: 5000, rejected: 255, intervals: 0, covered: 0 };
    const value: Rates = {
      mode: 'relabel',
      runs: 5000,
      alpha: 0.05,
      difference: 0,
      rows: [row],
      aside: null,
      exact: null,
    };
    expect(sayRates(value)).toBe(
      'In 5,000 relabellings of these data at \u03b1 = .05, the planned row with no cutoff rejects in .051 [.045, .058] although nothing is going on.',
    );
    expect(ratesTable(value).rows).toEqual([['no cutoff', '.051 [.045, .058]', '5,000']]);
  });

  test('degenerate: no method could be judged', () => {
    const value: Rates = { mode: 'relabel', runs: 10, alpha: 0.05, difference: 0, rows: [], aside: null, exact: null };
    expect(sayRates(value)).toContain('no method could be judged');
  });

  test('refuses: to relabel without a cutoff, to simulate without participants, a contrast; veiled while blind', async () => {
    expect(errorRatesKind.check({ ...settings, cutoff: null }, context)).toHaveLength(1);
    expect(errorRatesKind.check({ ...settings, mode: 'simulate', first: null }, context)).toHaveLength(1);
    const contrast = { ...result, scope: 'contrast' } as const;
    await expect(run(errorRatesKind, { ...few, mode: 'simulate' }, { result: contrast })).rejects.toThrow(
      /two conditions/,
    );
    expect(errorRatesKind.blind).toBe('veil');
  });
});
