/** Rows of a planned contrast between participants: the mean of some groups against the mean of others. */
import { linearContrast } from '../numerics/contrast.ts';
import { winsorizedNormalSd } from '../numerics/effect-size/akp-robust-d.ts';
import { noncentralInterval } from '../numerics/effect-size/effect.ts';
import { trimmedSummaries } from '../numerics/groups.ts';
import { trimCount } from '../numerics/scores.ts';
import type { Estimator, RowContext } from './estimators.ts';
import { bootstrapLayout, expanded } from './explained-share.ts';
import type { EffectSize, Finding } from './finding.ts';
import { fromT, LEAST_FOR_P, makeRow, trimCautions } from './row.ts';
import { unequalSpreads } from './rows-omnibus-between.ts';
import type { SamplePart, Samples } from './samples.ts';

const contrast = { scope: 'contrast', sameUnit: true, closedForm: true } as const;

export const CONTRAST_ROWS: readonly Estimator[] = [
  {
    ...contrast,
    id: 'contrast-pooled',
    untrimmed: 'contrast-pooled',
    name: 'contrast of means (one spread)',
    trims: false,
    run: (samples, context) => contrastRow(samples, context, 'pooled'),
  },
  {
    ...contrast,
    id: 'contrast-welch',
    untrimmed: 'contrast-welch',
    name: 'contrast of means (Welch)',
    trims: false,
    run: (samples, context) => contrastRow(samples, context, 'welch'),
  },
  {
    ...contrast,
    id: 'contrast-trimmed',
    untrimmed: 'contrast-welch',
    name: 'contrast of trimmed means',
    trims: true,
    run: (samples, context) => contrastRow(samples, context, 'trimmed'),
  },
];

type Form = 'pooled' | 'welch' | 'trimmed';

/** The weights of a contrast: every group of a side alike, first minus second. */
export function contrastWeights(parts: readonly SamplePart[]): number[] {
  const of = (side: SamplePart['side']) => parts.filter((part) => part.side === side).length;
  return parts.map((part) => (part.side === 'first' ? 1 / of('first') : -1 / of('second')));
}

function contrastRow(samples: Samples, context: RowContext, form: Form): Finding {
  const parts = samples.parts ?? [];
  const groups = parts.map((part) => part.scores);
  const weights = contrastWeights(parts);
  const { trim } = context;
  const test = linearContrast(groups, weights, {
    trim,
    variance: form === 'pooled' ? 'pooled' : 'welch',
    alternative: context.alternative,
    level: context.level,
  });
  const few = Math.min(...groups.map((scores) => scores.length - 2 * trimCount(scores.length, trim))) < LEAST_FOR_P;
  return makeRow(samples, context, wordsOf(form, context, parts), {
    ...fromT(test),
    ...(few
      ? { p: null, interval: null, reason: `fewer than ${LEAST_FOR_P} scores left in a group: described only` }
      : {}),
    h: [keptOn('first', parts, trim), keptOn('second', parts, trim)],
    effects: [standardized(samples, context, form)],
    cautions: [
      ...(form === 'pooled' ? unequalSpreads(groups) : []),
      ...(form === 'trimmed' ? trimCautions(context) : []),
      ...(few ? ['R22'] : []),
    ],
  });
}

function wordsOf(form: Form, context: RowContext, parts: readonly SamplePart[]) {
  const weights = contrastWeights(parts);
  const shown = parts.map((part, i) => `${part.level} ${signed(weights[i] as number)}`).join(', ');
  const trimmed = `${context.trim} % trimmed means`;
  const labels: Readonly<Record<Form, string>> = {
    pooled: 'contrast of means, one spread',
    welch: 'contrast of means, Welch',
    trimmed: `contrast of ${trimmed}`,
  };
  const methods: Readonly<Record<Form, string>> = {
    pooled: `Weights ${shown}; pooled variance of these groups on N \u2212 k df. Effect size: contrast over the pooled SD, noncentral t interval.`,
    welch: `Weights ${shown}; each group's own variance, Satterthwaite df. Effect size: contrast over the root of the mean variance, percentile bootstrap interval.`,
    trimmed: `Weights ${shown}; ${trimmed} with winsorized variances, Satterthwaite df on h \u2212 1 (Wilcox 2012, 7.4). Effect size: contrast over the root of the mean winsorized variance, rescaled as in Algina, Keselman & Penfield 2005, percentile bootstrap interval.`,
  };
  return {
    estimator: `contrast-${form}`,
    label: labels[form],
    quantity: form === 'trimmed' ? 'difference between the typical scores' : 'difference of means',
    group:
      form === 'trimmed' && context.trim > 0
        ? 'trimmed means'
        : form === 'pooled'
          ? 'means'
          : 'means, separate variances',
    method: methods[form],
  };
}

function signed(weight: number): string {
  const text = String(Number(Math.abs(weight).toFixed(3)));
  return weight < 0 ? `\u2212${text}` : text;
}

function keptOn(side: SamplePart['side'], parts: readonly SamplePart[], trim: number): number {
  return parts
    .filter((part) => part.side === side)
    .reduce((h, { scores }) => h + scores.length - 2 * trimCount(scores.length, trim), 0);
}

function standardized(samples: Samples, context: RowContext, form: Form): EffectSize {
  const parts = samples.parts ?? [];
  const groups = parts.map((part) => part.scores);
  const weights = contrastWeights(parts);
  if (form === 'pooled') {
    const test = linearContrast(groups, weights, { variance: 'pooled', level: context.level });
    const scale = Math.sqrt(groups.reduce((sum, scores, j) => sum + (weights[j] as number) ** 2 / scores.length, 0));
    const named = { name: 'd (contrast over pooled SD)', how: 'noncentral t' };
    if (test.t === null || test.df === null)
      return { ...named, value: null, interval: null, reason: test.reason ?? '' };
    return {
      ...named,
      value: test.t * scale,
      interval: noncentralInterval(test.t, test.df, 1 / scale, context.level, 'two-sided'),
    };
  }
  const { trim } = context;
  const name = trim > 0 ? `robust d (contrast, ${trim} % trimmed)` : 'd (contrast over mean variance)';
  const constant = winsorizedNormalSd(trim);
  const value = (scores: readonly Float64Array[]) => overSpread(scores, weights, trim, constant);
  const how = `percentile bootstrap, B = ${context.resamples}`;
  const own = value(groups);
  if (own === null) return { name, value: own, interval: null, how, reason: 'the scores do not vary' };
  const layout = {
    between: [],
    within: [],
    left: [],
    groups: groups.map((scores) => ({ levels: [], scores: [scores] })),
  };
  const boot = { trim, alpha: 1 - context.level, resamples: context.resamples, seed: context.seed };
  return {
    name,
    value: own,
    how,
    ...bootstrapLayout(layout, boot, (counts) =>
      value(groups.map((scores, j) => expanded(scores, counts[j] as Int32Array))),
    ),
  };
}

function overSpread(
  groups: readonly Float64Array[],
  weights: readonly number[],
  trim: number,
  constant: number,
): number | null {
  const summaries = trimmedSummaries(groups, trim);
  if (typeof summaries === 'string') return null;
  const contrastOf = summaries.reduce((sum, one, j) => sum + (weights[j] as number) * one.mean, 0);
  const spread = Math.sqrt(summaries.reduce((sum, one) => sum + one.winsorizedVariance, 0) / summaries.length);
  return spread > 0 ? (constant * contrastOf) / spread : null;
}
