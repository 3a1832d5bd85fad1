/** All pairs below a comparison of several levels, with simultaneous intervals. */
import { dunnTest } from '../numerics/anova/dunn.ts';
import { gamesHowell } from '../numerics/anova/games-howell.ts';
import { allPairs } from '../numerics/anova/pairs.ts';
import { pairwiseWelch } from '../numerics/anova/pairwise-welch.ts';
import { tukeyHsd } from '../numerics/anova/tukey.ts';
import { tInterval } from '../numerics/inference.ts';
import { pooledRanks } from '../numerics/kruskal-wallis.ts';
import { adjustP } from '../numerics/multiplicity.ts';
import { pairedT } from '../numerics/one-sample-t.ts';
import { differences } from '../numerics/scores.ts';
import { normalQuantileUpper } from '../numerics/tails/normal.ts';
import { trimmedMeanTest } from '../numerics/trimmed-mean.ts';
import type { PairProcedure } from './asked.ts';
import type { Limits } from './finding.ts';
import { columnsOfAll, groupsOfLevels, type Layout } from './layout.ts';
import { LEAST_FOR_P } from './row.ts';

/** One pair of levels, first minus second. */
export interface PairRow {
  readonly first: string;
  readonly second: string;
  readonly estimate: number | null;
  readonly se: number | null;
  readonly df: number | null;
  readonly statistic: { readonly name: string; readonly value: number } | null;
  /** Adjusted for all pairs. */
  readonly p: number | null;
  /** Holds together with those of all other pairs at the level. */
  readonly interval: Limits | null;
}

/** All pairs by one procedure. */
export interface Pairs {
  readonly procedure: PairProcedure;
  /** As it is called above the pairs: "Games\u2013Howell, means". */
  readonly label: string;
  /** Whether the differences are in the outcome's unit (ranks are not). */
  readonly sameUnit: boolean;
  readonly level: number;
  readonly rows: readonly PairRow[];
  readonly reason?: string;
  readonly method: string;
}

export interface PairsContext {
  readonly alpha: number;
  /** Trim of Holm's and Hochberg's pairs: integer percentage at each end, 0 where the planned row does not trim. */
  readonly trim: number;
}

/**
 * Compares all pairs of the levels of one factor.
 *
 * @param layout groups and columns of a question about one factor
 * @param procedure how; `none` gives null, and so does a question about an interaction
 * @param context alpha, trim
 * @returns differences in the outcome's unit (mean ranks for Dunn), p adjusted for all pairs, simultaneous intervals
 * @source Kramer 1956; Games & Howell 1976; Dunn 1964; Holm 1979; Hochberg 1988; intervals of Dunn, Holm and Hochberg at
 *   1 - alpha / m (Bonferroni)
 * @checked agrees with the reference cases tukey_hsd, games_howell, dunn_test, pairwise_welch
 */
export function comparePairs(layout: Layout, procedure: PairProcedure, context: PairsContext): Pairs | null {
  const asked = [...layout.between.filter((each) => each.inEffect), ...layout.within];
  if (procedure === 'none' || asked.length !== 1) return null;
  const names = asked[0]?.levels ?? [];
  const found =
    layout.within.length > 0 ? withinPairs(layout, procedure, context) : betweenPairs(layout, procedure, context);
  const few = leastKept(layout, found.trim) < LEAST_FOR_P;
  const rows = (found.rows ?? []).map(({ first, second, ...rest }) => ({
    first: names[first] ?? '',
    second: names[second] ?? '',
    ...rest,
    ...(few ? { p: null, interval: null } : {}),
  }));
  const reason = found.reason ?? (few ? `fewer than ${LEAST_FOR_P} scores left: described only` : undefined);
  return {
    procedure,
    label: found.label,
    sameUnit: procedure !== 'dunn',
    level: 1 - context.alpha,
    rows,
    ...(reason === undefined ? {} : { reason }),
    method: `${found.method}${aside(layout)}`,
  };
}

/** Other groups of the design are left out of account. */
function aside(layout: Layout): string {
  const others = layout.between.filter((each) => !each.inEffect).map((each) => each.factor);
  return others.length === 0 ? '' : ` Participants are taken together whatever their ${others.join(' and ')}.`;
}

type Numbered = Omit<PairRow, 'first' | 'second'> & { readonly first: number; readonly second: number };

interface Found {
  readonly rows: readonly Numbered[] | null;
  readonly reason?: string;
  readonly label: string;
  readonly method: string;
  readonly trim: number;
}

function leastKept(layout: Layout, trim: number): number {
  const sets = layout.within.length > 0 ? columnsOfAll(layout) : groupsOfLevels(layout);
  return Math.min(...sets.map(({ length }) => length - 2 * Math.floor((trim * length) / 100)));
}

function betweenPairs(layout: Layout, procedure: PairProcedure, context: PairsContext): Found {
  const groups = groupsOfLevels(layout);
  const level = 1 - context.alpha;
  if (procedure === 'tukey') {
    const { pairs, reason } = tukeyHsd(groups, { level });
    const df = groups.reduce((n, scores) => n + scores.length - 1, 0);
    return {
      rows: pairs?.map((each) => ranged(each, df)) ?? null,
      ...(reason === undefined ? {} : { reason }),
      label: 'Tukey\u2013Kramer, means',
      trim: 0,
      method:
        'Tukey 1953, Kramer 1956: studentized range with one pooled variance; p and intervals hold for all pairs together.',
    };
  }
  if (procedure === 'games-howell') {
    const { pairs, reason } = gamesHowell(groups, { level });
    return {
      rows: pairs?.map((each) => ranged(each, each.df)) ?? null,
      ...(reason === undefined ? {} : { reason }),
      label: 'Games\u2013Howell, means',
      trim: 0,
      method:
        'Games & Howell 1976: studentized range with the two groups\u2019 own variances and df; p and intervals hold for all pairs together.',
    };
  }
  return procedure === 'dunn' ? dunnPairs(groups, context) : stepPairs(groups, procedure, context);
}

/** A pair tested by the studentized range. */
function ranged(
  pair: { first: number; second: number; difference: number; se: number; lower: number; upper: number; p: number },
  df: number,
): Numbered {
  const { first, second, difference, se, lower, upper, p } = pair;
  return {
    first,
    second,
    estimate: difference,
    se,
    df,
    statistic: { name: 't', value: difference / se },
    p,
    interval: [lower, upper],
  };
}

function dunnPairs(groups: readonly Float64Array[], context: PairsContext): Found {
  const { pairs, reason } = dunnTest(groups, { adjust: 'holm' });
  const words = {
    label: 'Dunn with Holm, mean ranks',
    trim: 0,
    method:
      'Dunn 1964: differences of mean ranks among all scores, corrected for ties; p adjusted by Holm 1979, intervals at 1 \u2212 \u03b1 / number of pairs.',
  };
  if (pairs === null) return { rows: null, ...(reason === undefined ? {} : { reason }), ...words };
  const { meanRanks, sizes, variance } = pooledRanks(groups);
  const reach = normalQuantileUpper(context.alpha / pairs.length / 2);
  const rows = pairs.map(({ first, second, z, pAdjusted }): Numbered => {
    const estimate = (meanRanks[first] as number) - (meanRanks[second] as number);
    const se = Math.sqrt(variance * (1 / (sizes[first] as number) + 1 / (sizes[second] as number)));
    const interval: Limits = [estimate - reach * se, estimate + reach * se];
    return { first, second, estimate, se, df: null, statistic: { name: 'z', value: z }, p: pAdjusted, interval };
  });
  return { rows, ...words };
}

const STEP_WORDS = {
  holm: 'Holm 1979: from the smallest p up, whatever the dependence',
  hochberg: 'Hochberg 1988: from the largest p down, for tests that do not depend negatively',
} as const;

function stepPairs(groups: readonly Float64Array[], procedure: PairProcedure, context: PairsContext): Found {
  const adjust = procedure === 'hochberg' ? 'hochberg' : 'holm';
  const { trim } = context;
  const { pairs, reason } = pairwiseWelch(groups, { adjust, trim });
  const level = 1 - context.alpha / (pairs?.length ?? 1);
  const rows = pairs?.map(
    ({ first, second, difference, se, t, df, pAdjusted }): Numbered => ({
      first,
      second,
      estimate: difference,
      se,
      df,
      statistic: { name: 't', value: t },
      p: pAdjusted,
      interval: tInterval(difference, se, df, { level }),
    }),
  );
  return {
    rows: rows ?? null,
    ...(reason === undefined ? {} : { reason }),
    label: `${stepName(adjust)}, ${trim > 0 ? `${trim} % trimmed means` : 'means'}`,
    trim,
    method: `${trim > 0 ? 'Yuen 1974' : 'Welch 1938'} for each pair; ${STEP_WORDS[adjust]}; intervals at 1 \u2212 \u03b1 / number of pairs.`,
  };
}

function stepName(adjust: 'holm' | 'hochberg'): string {
  return adjust === 'holm' ? 'Holm' : 'Hochberg';
}

function withinPairs(layout: Layout, procedure: PairProcedure, context: PairsContext): Found {
  const adjust = procedure === 'hochberg' ? 'hochberg' : 'holm';
  const { trim } = context;
  const columns = columnsOfAll(layout);
  const pairs = allPairs(columns.length);
  const level = 1 - context.alpha / pairs.length;
  const words = {
    label: `${stepName(adjust)}, ${trim > 0 ? `${trim} % trimmed mean of differences` : 'mean of differences'}`,
    trim,
    method: `${trim > 0 ? 'Tukey & McLaughlin 1963: trimmed mean of the differences' : 'Student 1908: paired t'} for each pair; ${STEP_WORDS[adjust]}; intervals at 1 \u2212 \u03b1 / number of pairs.`,
  };
  if ((columns[0]?.length ?? 0) === 0) return { rows: null, reason: 'no participant has every score', ...words };
  const tests = pairs.map(({ first, second }) => {
    const [x, y] = [columns[first] as Float64Array, columns[second] as Float64Array];
    return trim > 0 ? trimmedMeanTest(differences(x, y), { trim, level }) : pairedT(x, y, { level });
  });
  // A pair whose differences do not vary has no p, and takes no part in the adjustment.
  const tested = tests.flatMap((test, i) => (test.p === null ? [] : [i]));
  const adjusted = adjustP(
    tested.map((i) => tests[i]?.p as number),
    adjust,
  );
  const rows = tests.map(
    (test, i): Numbered => ({
      ...(pairs[i] as { first: number; second: number }),
      estimate: test.estimate,
      se: test.se,
      df: test.df,
      statistic: test.t === null ? null : { name: 't', value: test.t },
      p: test.p === null ? null : (adjusted[tested.indexOf(i)] ?? null),
      interval: test.interval,
    }),
  );
  return { rows, ...words };
}
