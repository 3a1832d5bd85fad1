import { kendallTau } from '../numerics/correlation/kendall.ts';
import { tTest } from '../numerics/inference.ts';
import { linearRegression } from '../numerics/regression/linear-regression.ts';
import { mLine } from '../numerics/regression/m-line.ts';
import { mRegression } from '../numerics/regression/m-regression.ts';
import { repeatedMedians } from '../numerics/regression/repeated-medians.ts';
import { robustStandardErrors } from '../numerics/regression/robust-standard-errors.ts';
import { theilSen } from '../numerics/regression/theil-sen.ts';
import type { AssociationSpec, Pairs } from './association.ts';
import { bootstrapPairs, type PairStatistic } from './association-bootstrap.ts';
import { diagnosePairs, leveragePairs } from './association-diagnostics.ts';
import { type AssociationNumbers, associationFinding, tooManyForPairs } from './association-finding.ts';
import type { AssociationEstimator } from './association-rows.ts';
import type { Limits } from './finding.ts';

interface Words {
  readonly id: string;
  readonly name: string;
  readonly quantity: string;
  readonly method: string;
  readonly resamples: boolean;
  /** Whether a far x can carry the line. */
  readonly carried: boolean;
}

type Numbers = (pairs: Pairs, spec: AssociationSpec) => AssociationNumbers;

/** Fewest pairs of a line with a residual. */
const LEAST_FOR_LINE = 3;

function row(words: Words, numbers: Numbers): AssociationEstimator {
  const of = { ...words, group: 'slopes' as const };
  return {
    id: words.id,
    group: 'slopes',
    name: words.name,
    trims: false,
    resamples: words.resamples,
    run(pairs, spec) {
      const few = pairs.x.length < LEAST_FOR_LINE;
      const found = few ? { estimate: null, reason: 'fewer than 3 pairs', pHow: '' } : numbers(pairs, spec);
      const far = words.carried && leveragePairs(diagnosePairs(pairs.x, pairs.y)).length > 0 ? ['LEVER'] : [];
      return associationFinding(of, pairs, spec, { ...found, cautions: far });
    },
  };
}

const MEAN_SLOPE = 'change of the mean outcome for one unit more';
const MEDIAN_SLOPE = 'typical change of the outcome for one unit more';

const ols = row(
  {
    id: 'ols',
    name: 'least squares',
    quantity: MEAN_SLOPE,
    resamples: false,
    carried: true,
    method: 'ordinary least squares; SE takes one residual spread everywhere; t with n \u2212 2 df (common practice)',
  },
  ({ x, y }, spec) => {
    const found = linearRegression(y, [x]);
    return slopeTest(found.coefficients?.[1], found.se?.[1], found.df, found.reason, spec);
  },
);

function sandwich(hc: 'HC3' | 'HC4', source: string): AssociationEstimator {
  return row(
    {
      id: `ols-${hc.toLowerCase()}`,
      name: `least squares, ${hc}`,
      quantity: MEAN_SLOPE,
      resamples: false,
      carried: true,
      method: `the least-squares slope; ${hc} SE lets the residual spread differ from row to row (${source}); t with n \u2212 2 df`,
    },
    ({ x, y }, spec) => {
      const found = robustStandardErrors(y, [x], { hc });
      return slopeTest(found.coefficients?.[1], found.se?.[1], found.df, found.reason, spec);
    },
  );
}

const theilSenRow = row(
  {
    id: 'theil-sen',
    name: 'Theil\u2013Sen',
    quantity: MEDIAN_SLOPE,
    resamples: true,
    carried: false,
    method:
      'Theil 1950: median of the slopes of all pairs of participants; interval: Sen 1968 with the variance of Kendall\u2019s S; p: Kendall\u2019s test with the same variance; SE: bootstrap over participants',
  },
  (pairs, spec) => {
    const { x, y } = pairs;
    const two = spec.alternative === 'two-sided';
    const found = theilSen(x, y, { level: 1 - (two ? 1 : 2) * spec.alpha });
    const kendall = kendallTau(x, y, { alternative: spec.alternative });
    const { se } = tooManyForPairs(pairs) ?? bootstrapPairs(x, y, (xs, ys) => theilSen(xs, ys).slope, spec);
    return {
      estimate: found.slope,
      reason: found.reason ?? kendall.reason,
      se: found.slope === null ? null : se,
      statistic: kendall.z === null ? null : { name: 'z', value: kendall.z },
      p: found.slope === null ? null : kendall.p,
      pHow: 'normal approximation',
      interval: sided(found.interval, spec),
    };
  },
);

const repeatedMediansRow = row(
  {
    id: 'repeated-medians',
    name: 'repeated medians',
    quantity: MEDIAN_SLOPE,
    resamples: true,
    carried: false,
    method:
      'Siegel 1982: median over participants of each one\u2019s median slope to the others, which up to half of them cannot carry away; SE, p and interval: percentile bootstrap over participants',
  },
  (pairs, spec) => {
    const found = repeatedMedians(pairs.x, pairs.y);
    if (found.slope === null) return { estimate: null, reason: found.reason, pHow: '' };
    const many = tooManyForPairs(pairs);
    const { how, ...rest } = many ?? bootstrapPairs(pairs.x, pairs.y, (xs, ys) => repeatedMedians(xs, ys).slope, spec);
    return { estimate: found.slope, ...rest, pHow: how };
  },
);

function mRow(psi: 'huber' | 'bisquare', id: string, name: string, source: string): AssociationEstimator {
  return row(
    {
      id,
      name,
      quantity: 'change of the outcome for one unit more, large residuals weighted down',
      resamples: true,
      carried: true,
      method: `${source}; scale: median |residual| / .6745 in every step, start at least squares; bounds odd outcomes, not leverage; SE, p and interval: percentile bootstrap over participants`,
    },
    ({ x, y }, spec) => {
      const found = mRegression(y, [x], { psi });
      const slope = found.coefficients?.[1];
      if (slope === undefined) return { estimate: null, reason: found.reason, pHow: '' };
      const statistic: PairStatistic = (xs, ys) => mLine(xs, ys, psi)?.slope ?? null;
      const { how, ...rest } = bootstrapPairs(x, y, statistic, spec);
      return { estimate: slope, ...rest, pHow: how };
    },
  );
}

function slopeTest(
  slope: number | undefined,
  se: number | undefined,
  df: number,
  reason: string | undefined,
  spec: AssociationSpec,
): AssociationNumbers {
  if (slope === undefined || se === undefined) return { estimate: slope ?? null, reason, pHow: '' };
  const test = tTest(slope, 0, se, df, { alternative: spec.alternative, level: 1 - spec.alpha });
  return {
    estimate: slope,
    se,
    df,
    statistic: { name: 't', value: test.t },
    p: test.p,
    pHow: 't distribution',
    interval: test.interval,
  };
}

function sided(interval: Limits | null, { alternative }: AssociationSpec): Limits | null {
  if (interval === null || alternative === 'two-sided') return interval;
  return alternative === 'greater' ? [interval[0], null] : [null, interval[1]];
}

/** The rows in outcome units per unit of the other score, least squares first. */
export const slopeRows: readonly AssociationEstimator[] = [
  ols,
  sandwich('HC3', 'MacKinnon & White 1985'),
  sandwich('HC4', 'Cribari-Neto 2004'),
  theilSenRow,
  repeatedMediansRow,
  mRow('huber', 'huber-m', 'Huber M', 'Huber 1981, 7.8, k = 1.345'),
  mRow('bisquare', 'bisquare-m', 'bisquare M', 'Beaton & Tukey 1974, c = 4.685'),
];
