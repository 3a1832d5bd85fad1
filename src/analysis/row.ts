/** How a row is put together: what every Finding of one estimator shares, and what a t test gives it. */
import type { TTest } from '../numerics/inference.ts';
import type { RowContext } from './estimators.ts';
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
    n: samples.scope === 'within' ? n1 : n1 + n2,
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
  return [
    { condition: samples.first, n: samples.x.length, h: h[0] },
    { condition: samples.second, n: samples.y.length, h: h[1] },
  ];
}

/** A direction for a quantity that grows as the first condition shrinks. */
export function turned(alternative: RowContext['alternative']): RowContext['alternative'] {
  if (alternative === 'two-sided') return alternative;
  return alternative === 'greater' ? 'less' : 'greater';
}
