/** How a row is put together: what every Finding of one estimator shares, and what a t test gives it. */
import type { TTest } from '../numerics/inference.ts';
import type { Estimator, RowContext } from './estimators.ts';
import type { ConditionCount, EffectSize, Finding } from './finding.ts';
import type { Samples } from './samples.ts';

/** Scores kept after trimming below which a row gives no p (methods 3.1: h >= 4 per group to show a p). */
export const LEAST_FOR_P = 4;

/** The words of a row; `unit` of the context is its unit unless it has none. */
export interface RowWords {
  readonly estimator: string;
  readonly label: string;
  readonly quantity: string;
  readonly group: string;
  readonly method: string;
  readonly sameUnit?: boolean;
  readonly nullValue?: number;
  readonly reversed?: boolean;
}

/** The numbers of a row; what is absent is null. */
export interface RowNumbers {
  readonly estimate: number | null;
  readonly reason?: string | undefined;
  readonly se?: number | null;
  readonly df?: number | null;
  readonly statistic?: { readonly name: string; readonly value: number } | null;
  readonly p?: number | null;
  readonly pHow: string;
  readonly interval?: Finding['interval'];
  readonly effects?: readonly EffectSize[];
  readonly h?: readonly [number, number];
  readonly cautions?: readonly string[];
}

/** Joins words and numbers; withholds p and interval where fewer than 4 scores are left per condition (R22). */
export function makeRow(samples: Samples, context: RowContext, words: RowWords, numbers: RowNumbers): Finding {
  const [n1, n2] = [samples.x.length, samples.y.length];
  const h = numbers.h ?? [n1, n2];
  const few = Math.min(...h) < LEAST_FOR_P;
  const reason = numbers.reason ?? (few ? `fewer than ${LEAST_FOR_P} scores left: described only` : undefined);
  const give = <T>(value: T | null | undefined): T | null => (few || value === undefined ? null : value);
  const sameUnit = words.sameUnit ?? true;
  return {
    estimator: words.estimator,
    label: words.label,
    quantity: words.quantity,
    group: words.group,
    unit: sameUnit ? context.unit : '',
    sameUnit,
    nullValue: words.nullValue ?? 0,
    reversed: words.reversed ?? false,
    trim: context.trim,
    estimate: numbers.estimate,
    ...(reason === undefined ? {} : { reason }),
    se: numbers.se ?? null,
    df: numbers.df ?? null,
    statistic: numbers.statistic ?? null,
    p: give(numbers.p),
    pHow: numbers.pHow,
    interval: give(numbers.interval),
    level: context.level,
    alternative: context.alternative,
    effects: numbers.effects ?? [],
    n: samples.scope === 'within' || samples.scope === 'value' ? n1 : n1 + n2,
    counts: counts(samples, h),
    cautions: [...(numbers.cautions ?? []), ...(few ? ['R22'] : [])],
    method: words.method,
  };
}

/** The numbers of a t test as a row has them. */
export function fromT(test: TTest): RowNumbers {
  return {
    estimate: test.estimate,
    reason: test.reason,
    se: test.se,
    df: test.df,
    statistic: test.t === null ? null : { name: 't', value: test.t },
    p: test.p,
    pHow: 't distribution',
    interval: test.interval,
  };
}

function counts(samples: Samples, h: readonly [number, number]): ConditionCount[] {
  const first = { condition: samples.first, n: samples.x.length, h: h[0] };
  return samples.scope === 'value' ? [first] : [first, { condition: samples.second, n: samples.y.length, h: h[1] }];
}

/** A direction for a quantity that grows as the first condition shrinks. */
export function turned(alternative: RowContext['alternative']): RowContext['alternative'] {
  if (alternative === 'two-sided') return alternative;
  return alternative === 'greater' ? 'less' : 'greater';
}

/** Options of a bootstrap row. */
export function bootOptions(context: RowContext) {
  return { B: context.resamples, seed: context.seed, level: context.level, alternative: context.alternative };
}

/** The numbers of a percentile bootstrap as a row has them. */
export function fromBootstrap(
  test: {
    estimate: number | null;
    se: number | null;
    p: number | null;
    interval: Finding['interval'];
    reason?: string;
  },
  context: RowContext,
) {
  return {
    estimate: test.estimate,
    reason: test.reason,
    se: test.se,
    p: test.p,
    pHow: `percentile bootstrap, B = ${context.resamples}`,
    interval: test.interval,
  };
}

/** How a rank test's p was found, in words. */
export function pMethod(method: string): string {
  return method === 'asymptotic' ? 'normal approximation with tie and continuity correction' : 'exact conditional';
}

/** R17: with fewer than 10 scores a bootstrap is unsteady. */
export function fewForBootstrap(...samples: readonly Float64Array[]): string[] {
  return samples.some((scores) => scores.length < 10) ? ['R17'] : [];
}

/** R3: more than a quarter trimmed at each end. */
export function trimCautions(context: RowContext): string[] {
  return context.trim > 25 ? ['R3'] : [];
}

/** R25: with n signs to flip the smallest p is above alpha. */
export function smallestSignP(n: number, context: RowContext): string[] {
  const smallest = (context.alternative === 'two-sided' ? 2 : 1) / 2 ** n;
  return smallest > 1 - context.level ? ['R25'] : [];
}

/** R25: with two groups to split the smallest p is above alpha. */
export function smallestSplitP({ x, y }: Samples, context: RowContext): string[] {
  let splits = 1;
  for (let i = 1; i <= x.length && splits < 1e6; i++) splits = (splits * (y.length + i)) / i;
  return (context.alternative === 'two-sided' ? 2 : 1) / splits > 1 - context.level ? ['R25'] : [];
}

/** The row where no participant has a score under both conditions. */
export function nobody(
  samples: Samples,
  context: RowContext,
  estimator: string,
  label: string,
  group: string,
): Finding {
  return makeRow(
    samples,
    context,
    { estimator, label, quantity: '', group, method: '' },
    { estimate: null, reason: 'no participant has a score under both conditions', pHow: '' },
  );
}

/** Runs a row only where both groups have someone. */
export function filled(run: Estimator['run']): Estimator['run'] {
  return (samples, context) => {
    if (samples.x.length > 0 && samples.y.length > 0) return run(samples, context);
    const empty = samples.x.length === 0 ? samples.first : samples.second;
    const words = { estimator: 'none', label: '', quantity: '', group: 'none', method: '' };
    return makeRow(samples, context, words, { estimate: null, reason: `nobody is left in ${empty}`, pHow: '' });
  };
}
