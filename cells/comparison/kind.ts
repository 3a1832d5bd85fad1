import type { ComparisonSpec, Result } from '../../src/analysis/compare.ts';
import { estimatorOf } from '../../src/analysis/estimators.ts';
import { findingRecord } from '../../src/analysis/finding.ts';
import { takeSamples } from '../../src/analysis/samples.ts';
import type { Scores } from '../../src/analysis/score.ts';
import { withholdsTextbook } from '../../src/analysis/withhold.ts';
import { type Context, defineKind, numberOf, Refusal } from '../kind.ts';
import { comparisonNotes } from './notes.ts';
import { type ComparisonSettings, comparisonSentence } from './sentence.ts';
import { effectTable, findingTable, sayFinding } from './words.ts';

/** Compares two conditions by every row that fits the design; the plan names one of them. */
export const comparisonKind = defineKind<ComparisonSettings, { readonly scores: 'scores' }, 'result', null>({
  name: 'comparison',
  version: 1,
  title: () => 'comparison',
  offer: 'Compare two conditions',
  takes: { scores: 'scores' },
  gives: 'result',
  blind: 'veil',
  defaults: (context) => defaultSettings(context),
  check(settings, context) {
    if (settings.first === '' || settings.second === '') return ['Say which two conditions are compared.'];
    const estimator = estimatorOf(settings.estimator);
    if (!estimator) return ['Say which quantity the plan names.'];
    const scores = context.given.scores as Scores | undefined;
    const factor = scores?.design.factors.find((each) => each.name === settings.factor);
    if (factor && estimator.scope !== factor.scope) {
      return [
        `The ${estimator.name} is for conditions ${estimator.scope} participants, but ${settings.factor} varies ${factor.scope} participants. Choose another quantity.`,
      ];
    }
    return estimator.trims && settings.trim === null ? ['Say how much is trimmed at each end.'] : [];
  },
  async compute(settings, { scores }, env) {
    const comparison = specOf(settings, env.seed);
    const samples = takeSamples(scores, settings.factor, settings.first, settings.second);
    if (samples.x.length === 0 || samples.y.length === 0)
      refuseEmpty(samples.x.length === 0 ? settings.first : settings.second);
    const { unit, direction, rows } = scores.design.roles;
    const withheld = withholdsTextbook(scores.design.rules, rows);
    const findings = await env.run('compare', { samples, comparison, unit, direction, withheld });
    const planned = findings.findIndex((finding) => finding.estimator === comparison.estimator);
    const value: Result = { scores, comparison, scope: samples.scope, findings, planned, left: samples.left };
    return { value, detail: null };
  },
  sentence: comparisonSentence,
  say: ({ value }) => sayFinding(value),
  flow: ({ value }) => ({ count: value.findings[0]?.n ?? 0, label: 'compared' }),
  notes: ({ value }) => comparisonNotes(value),
  tables: ({ value }) => [findingTable(value), effectTable(value)],
  record: ({ value }) => ({
    planned: value.planned,
    findings: value.findings.map(findingRecord),
    left: value.left.map((each) => each.participant),
  }),
});

function specOf(settings: ComparisonSettings, seed: number): ComparisonSpec {
  return { ...settings, trim: numberOf(settings.trim) ?? 0, seed };
}

function refuseEmpty(condition: string): never {
  throw new Refusal(
    `Nobody is left with a score under ${condition}, so there is nothing to compare. Look at the rules above, or at the missing combinations.`,
  );
}

function defaultSettings(context: Context): ComparisonSettings {
  const scores = context.given.scores as Scores | undefined;
  const factor = scores?.design.factors[0];
  return {
    factor: factor?.name ?? '',
    first: factor?.levels[1] ?? '',
    second: factor?.levels[0] ?? '',
    estimator: factor?.scope === 'between' ? 'yuen-welch' : 'trimmed-differences',
    trim: 20,
    alternative: 'two-sided',
    alpha: 0.05,
    resamples: 1999,
  };
}
