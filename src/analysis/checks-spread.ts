import { bartlettTest } from '../numerics/bartlett.ts';
import { flignerKilleen } from '../numerics/fligner-killeen.ts';
import type { GroupScores } from '../numerics/groups.ts';
import type { Limits } from '../numerics/inference.ts';
import { leveneTest } from '../numerics/levene.ts';
import { mean, standardDeviation } from '../numerics/moments.ts';
import { varianceRatio } from '../numerics/variance-ratio.ts';

export interface GroupSpread {
  readonly name: string;
  readonly n: number;
  readonly mean: number;
  /** Null for a single participant. */
  readonly sd: number | null;
}

export type SpreadTestId = 'levene' | 'brown-forsythe' | 'bartlett' | 'fligner-killeen';

export interface SpreadTest {
  readonly id: SpreadTestId;
  readonly statistic: number | null;
  readonly df1: number | null;
  /** Null for the chi-square tests. */
  readonly df2: number | null;
  readonly p: number | null;
  readonly reason?: string;
}

/** The largest SD over the smallest. */
export interface SpreadRatio {
  readonly larger: number;
  readonly smaller: number;
  readonly value: number;
  /** Of the ratio of SDs, two groups only: the largest and smallest of several are not two groups chosen beforehand. */
  readonly interval: Limits | null;
}

export interface SpreadChecks {
  readonly groups: readonly GroupSpread[];
  readonly ratio: SpreadRatio | null;
  /** Why there is no ratio. */
  readonly reason?: string;
  /** Whether the smaller groups have the larger SDs (negative), the larger ones (positive), or sizes are equal (none). */
  readonly pairing: 'negative' | 'positive' | 'none';
  readonly tests: readonly SpreadTest[];
}

/**
 * Spread of independent groups, never of conditions that the same participants met.
 *
 * @param names one a group
 * @param scores of each group, two groups or more, each at least one score
 * @param level of the interval of the ratio, between 0 and 1
 * @returns SD of each group, their ratio, how size and SD pair, and four tests; null with a reason where not defined
 * @source Levene 1960; Brown & Forsythe 1974; Bartlett 1937; Fligner & Killeen 1976; ratio of SDs: square root of the F
 *   interval of two variances (relies on normal scores); sign of the pairing: Scheffe 1959, 10.4
 * @checked outside check cases levene_test, bartlett_test, fligner_killeen, variance_ratio_f
 */
export function spreadChecks(names: readonly string[], scores: GroupScores, level: number): SpreadChecks {
  const groups = scores.map((own, at) => ({
    name: names[at] ?? '',
    n: own.length,
    mean: mean(own),
    sd: own.length < 2 ? null : standardDeviation(own),
  }));
  const known = groups.flatMap(({ sd }, at) => (sd === null || sd === 0 ? [] : [at]));
  const whole = known.length === groups.length;
  return {
    groups,
    ratio: whole ? ratioOf(groups, scores, level) : null,
    ...(whole ? {} : { reason: 'a group has fewer than two scores, or scores that are all equal' }),
    pairing: pairingOf(groups),
    tests: testsOf(scores),
  };
}

function ratioOf(groups: readonly GroupSpread[], scores: GroupScores, level: number): SpreadRatio {
  const sds = groups.map(({ sd }) => sd as number);
  const larger = sds.indexOf(Math.max(...sds));
  // With equal SDs the two must still be different groups.
  const smaller = sds.lastIndexOf(Math.min(...sds));
  const value = (sds[larger] as number) / (sds[smaller] as number);
  if (groups.length !== 2) return { larger, smaller, value, interval: null };
  const { interval } = varianceRatio(scores[larger] as Float64Array, scores[smaller] as Float64Array, { level });
  const [low, high] = interval ?? [null, null];
  return {
    larger,
    smaller,
    value,
    interval: low === null || high === null ? null : [Math.sqrt(low), Math.sqrt(high)],
  };
}

/** Sign of the sum of products of size and variance about their means. */
function pairingOf(groups: readonly GroupSpread[]): SpreadChecks['pairing'] {
  const sizes = groups.map(({ n }) => n);
  const variances = groups.map(({ sd }) => (sd ?? 0) ** 2);
  const middle = sizes.reduce((sum, n) => sum + n, 0) / sizes.length;
  const product = sizes.reduce((sum, n, at) => sum + (n - middle) * (variances[at] as number), 0);
  if (sizes.every((n) => n === sizes[0]) || product === 0) return 'none';
  return product < 0 ? 'negative' : 'positive';
}

function testsOf(scores: GroupScores): SpreadTest[] {
  const f = (id: SpreadTestId, center: 'mean' | 'median'): SpreadTest => {
    const { F, df1, df2, p, reason } = leveneTest(scores, { center });
    return { id, statistic: F, df1, df2, p, ...(reason === undefined ? {} : { reason }) };
  };
  const chi = (id: SpreadTestId, test: ReturnType<typeof bartlettTest>): SpreadTest => {
    const { chi2, df, p, reason } = test;
    return { id, statistic: chi2, df1: df, df2: null, p, ...(reason === undefined ? {} : { reason }) };
  };
  return [
    f('levene', 'mean'),
    f('brown-forsythe', 'median'),
    chi('bartlett', bartlettTest(scores)),
    chi('fligner-killeen', flignerKilleen(scores)),
  ];
}
