import { refusalOf } from '../../src/analysis/asked.ts';
import type { Result } from '../../src/analysis/compare.ts';
import { ESTIMATORS } from '../../src/analysis/estimators.ts';
import { findingRecord } from '../../src/analysis/finding.ts';
import { OMNIBUS_ROWS } from '../../src/analysis/omnibus.ts';
import type { Scores } from '../../src/analysis/score.ts';
import { type Context, currentNumber, defineKind, type Json } from '../kind.ts';
import { computeComparison } from './compute.ts';
import { comparisonNotes } from './notes.ts';
import { comparisonSentence } from './sentence.ts';
import { askedOf, type ComparisonSettings, rowsFor, scopeOf } from './settings.ts';
import { effectTable, findingTable, sayFinding } from './words.ts';
import { levelTable, omnibusTable, pairTable, sayOmnibus } from './words-omnibus.ts';

/** Compares conditions by every row that fits the design; the plan names one of them. */
export const comparisonKind = defineKind<ComparisonSettings, { readonly scores: 'scores' }, 'result', null>({
  name: 'comparison',
  version: 1,
  title: () => 'comparison',
  offer: 'Compare conditions, or scores with a value',
  takes: { scores: 'scores' },
  gives: 'result',
  blind: 'veil',
  defaults: (context) => defaultSettings(context),
  check: (settings, context) => checkSettings(settings, context),
  async compute(settings, { scores }, env) {
    return { value: await computeComparison(settings, scores, env), detail: null };
  },
  sentence: comparisonSentence,
  say: ({ value }) => (value.scope === 'omnibus' ? sayOmnibus(value) : sayFinding(value)),
  flow: ({ value }) => ({ count: value.findings[0]?.n ?? 0, label: 'compared' }),
  notes: ({ value }) => comparisonNotes(value),
  tables: ({ value }) =>
    value.scope === 'omnibus'
      ? [omnibusTable(value), levelTable(value), ...pairTable(value), effectTable(value)]
      : [findingTable(value), effectTable(value)],
  record: ({ value }) => ({
    planned: value.planned,
    findings: value.findings.map(findingRecord),
    left: value.left.map((each) => each.participant),
    ...omnibusRecord(value),
  }),
});

/** The levels and pairs of a comparison of several, as they are saved. */
function omnibusRecord(result: Result): { readonly [key: string]: Json } {
  if (result.levels === undefined) return {};
  return {
    levels: result.levels.map(({ label, estimate, interval, n, h }) => [label, estimate, interval, n, h]),
    pairs: (result.pairs?.rows ?? []).map((row) => ({
      pair: [row.first, row.second],
      estimate: row.estimate,
      se: row.se,
      df: row.df,
      statistic: row.statistic?.value ?? null,
      p: row.p,
      interval: row.interval,
    })),
  };
}

function checkSettings(settings: ComparisonSettings, context: Context): string[] {
  const asked = askedOf(settings, (value) => currentNumber(value, context.shared));
  if (asked === undefined && (settings.first === '' || settings.second === '')) {
    return ['Say which two conditions are compared.'];
  }
  const known = [...ESTIMATORS, ...OMNIBUS_ROWS].find((row) => row.id === settings.estimator);
  if (known === undefined) return ['Say which quantity the plan names.'];
  const scores = context.given.scores as Scores | undefined;
  if (scores !== undefined) {
    const refused = asked === undefined ? null : refusalOf(scores.design.factors, asked);
    const unfit = refused ?? unfitRow(settings, scores, known.name);
    if (unfit !== null) return [unfit];
  }
  return known.trims && settings.trim === null ? ['Say how much is trimmed at each end.'] : [];
}

/** Why the planned row does not go with the question, or null. */
function unfitRow(settings: ComparisonSettings, scores: Scores, name: string): string | null {
  const { factors } = scores.design;
  const scope = scopeOf(factors, settings);
  if (scope === undefined || rowsFor(factors, settings).some((row) => row.id === settings.estimator)) return null;
  const other = ESTIMATORS.find((row) => row.id === settings.estimator)?.scope;
  const pair = (scope === 'within' || scope === 'between') && (other === 'within' || other === 'between');
  if (settings.effect === undefined && pair) {
    return `The ${name} is for conditions ${other} participants, but ${settings.factor} varies ${scope} participants. Choose another quantity.`;
  }
  return `The row called \u201c${name}\u201d does not answer this question under the design above. Choose another quantity.`;
}

function defaultSettings(context: Context): ComparisonSettings {
  const scores = context.given.scores as Scores | undefined;
  const design = scores?.design ?? context.design;
  const factor = design?.factors[0];
  const rest = { trim: 20, alternative: 'two-sided', alpha: 0.05, resamples: 1999 } as const;
  if (design !== undefined && factor === undefined) {
    return {
      factor: '',
      first: '',
      second: '',
      effect: { type: 'value', value: 0 },
      estimator: 'trimmed-mean',
      ...rest,
    };
  }
  return {
    factor: factor?.name ?? '',
    first: factor?.levels[1] ?? '',
    second: factor?.levels[0] ?? '',
    estimator: factor?.scope === 'between' ? 'yuen-welch' : 'trimmed-differences',
    ...rest,
  };
}
