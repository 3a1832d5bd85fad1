/** How a row about several levels is put together: an F or rank statistic with a share of variance as its estimate. */

import { trimCount } from '../numerics/scores.ts';
import { noncentralFParameter } from '../numerics/tails/noncentral-f.ts';
import type { ConditionCount, EffectSize, Finding, Limits } from './finding.ts';
import { cellsOf, type Layout, peopleIn } from './layout.ts';
import { LEAST_FOR_P } from './row.ts';

/** What a row about several levels needs beside its layout. */
export interface OmnibusContext {
  /** Integer percentage trimmed at each end; 0 for rows that do not trim. */
  readonly trim: number;
  readonly alpha: number;
  readonly resamples: number;
  readonly seed: number;
}

/** What decides which rows fit: numbers of levels asked about, and of groups beside them. */
export interface LayoutShape {
  readonly between: readonly number[];
  readonly within: readonly number[];
  /** Between factors of the design that are not asked about. */
  readonly otherBetween: number;
}

/** One row of a comparison of several levels. */
export interface OmnibusRow {
  /** Kebab-case word in saved files; never renamed or reused. */
  readonly id: string;
  /** The quantity as it stands in the sentence: "trimmed means". */
  readonly name: string;
  /** What tells it from others of the quantity: "Welch F". */
  readonly hint: string;
  readonly trims: boolean;
  fits(shape: LayoutShape): boolean;
  run(layout: Layout, context: OmnibusContext): Finding;
}

export interface OmnibusWords {
  readonly estimator: string;
  readonly label: string;
  /** Name of the share that is the row's estimate: "partial \u03b7\u00b2". */
  readonly share: string;
  readonly method: string;
}

export interface OmnibusNumbers {
  readonly statistic: { readonly name: string; readonly value: number } | null;
  readonly df: number | null;
  readonly df2: number | null;
  readonly p: number | null;
  readonly pHow: string;
  readonly share: EffectSize;
  /** Confidence level of the share's interval. */
  readonly level: number;
  readonly others?: readonly EffectSize[];
  readonly reason?: string | undefined;
  readonly cautions?: readonly string[];
}

/** Joins words and numbers; withholds p and interval where fewer than 4 scores are left under a level (R22). */
export function makeOmnibusRow(
  layout: Layout,
  context: OmnibusContext,
  words: OmnibusWords,
  numbers: OmnibusNumbers,
): Finding {
  const counts = countsOf(layout, context.trim);
  const few = Math.min(...counts.map((each) => each.h)) < LEAST_FOR_P;
  const reason =
    numbers.reason ?? (few ? `fewer than ${LEAST_FOR_P} scores left: described only` : numbers.share.reason);
  return {
    estimator: words.estimator,
    label: words.label,
    quantity: words.share,
    group: words.share,
    unit: '',
    sameUnit: false,
    nullValue: 0,
    reversed: false,
    trim: context.trim,
    estimate: numbers.share.value,
    ...(reason === undefined ? {} : { reason }),
    se: null,
    df: numbers.df,
    df2: numbers.df2,
    statistic: numbers.statistic,
    p: few ? null : numbers.p,
    pHow: numbers.pHow,
    interval: few ? null : numbers.share.interval,
    level: numbers.level,
    alternative: 'two-sided',
    effects: [{ ...numbers.share, interval: few ? null : numbers.share.interval }, ...(numbers.others ?? [])],
    n: peopleIn(layout),
    counts,
    cautions: [...(numbers.cautions ?? []), ...(few ? ['R22'] : []), ...(context.trim > 25 ? ['R3'] : [])],
    method: words.method,
  };
}

function countsOf(layout: Layout, trim: number): ConditionCount[] {
  return cellsOf(layout).map(({ label, scores }) => ({
    condition: label,
    n: scores.length,
    h: scores.length - 2 * trimCount(scores.length, trim),
  }));
}

interface FValue {
  readonly F: number | null;
  readonly df1: number | null;
  readonly df2: number | null;
}

/**
 * Partial eta squared of an F value, with the interval of its population value.
 *
 * @param test F >= 0 on df1 and df2 degrees of freedom; null gives no value
 * @param alpha level of the test, 0 to .5
 * @returns df1 F / (df1 F + df2); limits from the noncentrality at which F is the upper and the lower alpha quantile, so
 *   that the lower limit is above 0 exactly when p < alpha: a 1 - 2 alpha interval
 * @source Steiger 2004: lambda / (lambda + N), N = df1 + df2 + 1
 * @checked by hand; agrees with the reference cases one_way_anova (eta2), rtol 1e-9
 */
export function partialEta(test: FValue, alpha: number, reason?: string): EffectSize {
  const { F, df1, df2 } = test;
  const named = { name: 'partial \u03b7\u00b2', how: 'noncentral F' };
  if (F === null || df1 === null || df2 === null) {
    return { ...named, value: null, interval: null, reason: reason ?? 'not defined for these scores' };
  }
  const share = (ncp: number) => ncp / (ncp + df1 + df2 + 1);
  const limit = (p: number) => (F > 0 ? share(noncentralFParameter(F, df1, df2, p)) : 0);
  const interval: Limits = [limit(1 - alpha), limit(alpha)];
  return { ...named, value: (df1 * F) / (df1 * F + df2), interval };
}

/** Omega and epsilon squared of an F value, not cut off at 0; `total` is the number of scores behind it. */
export function lessBiased(test: FValue, total: number): EffectSize[] {
  const { F, df1, df2 } = test;
  if (F === null || df1 === null || df2 === null) return [];
  const above = df1 * (F - 1);
  const plain = (name: string, value: number) => ({ name, value, interval: null, how: '', reason: 'no interval' });
  return [
    plain('partial \u03c9\u00b2', above / (above + total)),
    plain('partial \u03b5\u00b2', above / (df1 * F + df2)),
  ];
}
