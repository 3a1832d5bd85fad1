import type { Result } from '../../src/analysis/compare.ts';
import { samplesFor } from '../../src/analysis/samples.ts';
import { pearsonCorrelation } from '../../src/numerics/correlation/pearson.ts';
import { standardDeviation } from '../../src/numerics/moments.ts';
import { type Context, defineKind } from '../kind.ts';
import { relabelled, simulatedRates } from './compute.ts';
import { type RatesSettings, ratesSentence } from './sentence.ts';
import { ratesNotes, ratesTable, sayRates } from './words.ts';

/** How often the chain, and each test beside it, would reject: in these data relabelled, or in experiments like this one. */
export const errorRatesKind = defineKind<RatesSettings, { readonly result: 'result' }, 'rates', null>({
  name: 'error-rates',
  version: 1,
  title: () => 'error rates',
  offer: 'Relabel these data through the whole chain, or simulate experiments like this one',
  takes: { result: 'result' },
  gives: 'rates',
  blind: 'veil',
  defaults: (context) => defaultSettings(context),
  check: (settings) => checkSettings(settings),
  async compute(settings, { result }, env) {
    const value =
      settings.mode === 'relabel'
        ? await relabelled(settings, result, env)
        : await simulatedRates(settings, result, env);
    return { value, detail: null };
  },
  sentence: ratesSentence,
  say: ({ value }) => sayRates(value),
  notes: ({ value }) => ratesNotes(value),
  tables: ({ value }) => [ratesTable(value)],
  record: ({ value }) => ({
    runs: value.runs,
    rates: value.rows.map((row) => [row.judged, row.rejected, row.intervals, row.covered]),
    aside: value.aside,
    exact: value.exact === null ? null : [value.exact.student, value.exact.welch],
  }),
});

function checkSettings(settings: RatesSettings): string[] {
  if (settings.mode === 'relabel') {
    return settings.cutoff === null ? ['Say the cutoff of the rule that is tried across and within conditions.'] : [];
  }
  const { first, second, ratio, own, difference } = settings;
  return [first, second, ratio, own, difference].some((each) => each === null)
    ? ['Fill in participants, spreads and the true difference of the simulated experiments.']
    : [];
}

/** Numbers of participants, ratio of spreads and likeness of pairs as they are here; to one decimal, so that they read well. */
function defaultSettings(context: Context): RatesSettings {
  const result = context.given.result as Result | undefined;
  const fixed: RatesSettings = {
    mode: 'relabel',
    runs: 2000,
    measure: 'MAD',
    cutoff: 2.5,
    shape: 'normal',
    first: 20,
    second: 20,
    ratio: 1,
    own: 50,
    difference: 0,
    equal: 'means',
    resamples: 199,
  };
  if (result === undefined || (result.scope !== 'within' && result.scope !== 'between')) return fixed;
  const { x, y } = samplesFor(result.scores, result.comparison);
  if (x.length < 3 || y.length < 3) return fixed;
  const ratio = standardDeviation(x) / standardDeviation(y);
  const alike = result.scope === 'within' ? pearsonCorrelation(x, y).r : null;
  const most = (n: number) => Math.min(200, n);
  return {
    ...fixed,
    first: most(x.length),
    second: most(y.length),
    ratio: Number.isFinite(ratio) ? Math.min(10, Math.max(0.1, Math.round(10 * ratio) / 10)) : 1,
    own: alike === null ? 50 : Math.min(95, Math.max(0, 5 * Math.round(20 * alike))),
  };
}
