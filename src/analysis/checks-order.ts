import { autocorrelation } from '../numerics/checks/autocorrelation.ts';
import { runsTest } from '../numerics/checks/runs-test.ts';
import { type Limits, largestSize, noSpread } from '../numerics/inference.ts';
import { mean, standardDeviation } from '../numerics/moments.ts';
import { linearRegression } from '../numerics/regression/linear-regression.ts';
import { fUpper } from '../numerics/tails/f.ts';
import { tQuantileUpper } from '../numerics/tails/t.ts';
import type { CheckLayout } from './checks-layout.ts';
import { byGroup, centre, columnOf, participantMeans, type Residuals } from './checks-residuals.ts';

/** Whether neighbours in the file resemble each other. */
export interface OrderChecks {
  readonly n: number;
  /** Correlation with the participant before, -1 to 1; about -1/n where order means nothing. */
  readonly lag1: number | null;
  readonly durbinWatson: number | null;
  readonly runs: number | null;
  readonly p: number | null;
  readonly reason?: string;
}

/**
 * Independence in the order of the file: one residual a participant.
 *
 * @param layout participants in file order
 * @param residuals of the layout; where there are several a participant, their means freed of the group's are looked at
 * @returns lag-1 autocorrelation, Durbin-Watson ratio, runs about the median with p; null with a reason
 * @source Box & Jenkins 1976; Durbin & Watson 1950; Wald & Wolfowitz 1940
 * @checked outside check cases autocorrelation, runs_test
 */
export function orderChecks(layout: CheckLayout, residuals: Residuals): OrderChecks {
  const { group, groups, columns } = residuals.shape;
  const x = columns === 1 ? residuals.values : centre(participantMeans(layout), { group, groups, columns: 1 });
  const none = { n: x.length, lag1: null, durbinWatson: null, runs: null, p: null };
  const { r, durbinWatson, reason } = autocorrelation(x, { lags: 1 });
  if (r === null) return { ...none, reason: reason ?? 'not defined' };
  const test = runsTest(x);
  return {
    ...none,
    lag1: r[0] as number,
    durbinWatson,
    runs: test.runs,
    p: test.p,
    ...(test.reason === undefined ? {} : { reason: test.reason }),
  };
}

/** Whether differences between levels, or spreads of groups, grow with the level of the scores. */
export interface AdditivityChecks {
  /** What may grow: the change within participants, or the SD of groups. */
  readonly what: 'change' | 'spread';
  /** 0 where it is the same at every level, 1 where it is in proportion to the level; null with a reason. */
  readonly growth: number | null;
  readonly interval: Limits | null;
  /** Of Tukey's single degree of freedom; null for spreads. */
  readonly F: number | null;
  readonly df: number | null;
  readonly p: number | null;
  /** Why something is null. */
  readonly reason?: string;
}

/**
 * Change, or spread, against level. Within participants by Tukey's single degree of freedom; between groups the slope of
 * log SD on log mean.
 *
 * @param layout participants with their columns
 * @param residuals of the layout
 * @param level of the interval, between 0 and 1
 * @returns growth and test; null with a reason
 * @source Tukey 1949, Biometrics 5, 232-242: N = sum r_ij a_i b_j, lambda = N / (sum a^2 sum b^2), SS = N lambda, F on 1 and
 *   df - 1, growth = lambda times the mean score; between groups: Tukey 1977, Exploratory Data Analysis, spread against level
 * @checked by hand; with two levels the F of the regression of differences on means
 */
export function additivityChecks(layout: CheckLayout, residuals: Residuals, level: number): AdditivityChecks {
  return layout.columns.length > 1 ? singleDegree(layout, residuals, level) : spreadOnLevel(layout, level);
}

function singleDegree(layout: CheckLayout, residuals: Residuals, level: number): AdditivityChecks {
  const { product, aa, bb, rr, size } = singleDegreeSums(layout, residuals);
  const none = { what: 'change', growth: null, interval: null, F: null, df: null, p: null } as const;
  if (noSpread(Math.sqrt(aa), size)) return { ...none, reason: 'the participants\u2019 means do not vary' };
  if (noSpread(Math.sqrt(bb), size)) return { ...none, reason: 'the levels do not differ at all' };
  const df = residuals.df - 1;
  const lambda = product / (aa * bb);
  const left = rr - product * lambda;
  if (df < 1 || noSpread(Math.sqrt(Math.max(0, left)), size))
    return { ...none, reason: 'nothing is left over to test it with' };
  const F = (product * lambda) / (left / df);
  const tested = { ...none, F, df, p: fUpper(F, 1, df) };
  if (layout.values.some((value) => value <= 0))
    return { ...tested, reason: 'scores of zero or less have no proportions' };
  const reach = tQuantileUpper((1 - level) / 2, df) * Math.sqrt(left / df / (aa * bb));
  const grand = mean(layout.values);
  return { ...tested, growth: lambda * grand, interval: [(lambda - reach) * grand, (lambda + reach) * grand] };
}

/** N and the sums of squares of participants, levels and residuals. */
function singleDegreeSums(layout: CheckLayout, residuals: Residuals) {
  const k = layout.columns.length;
  const { group, groups } = residuals.shape;
  const a = centre(participantMeans(layout), { group, groups, columns: 1 });
  const grand = mean(layout.values);
  const b = Float64Array.from({ length: k }, (_, j) => mean(columnOf(layout, j)) - grand);
  const r = k === 2 ? halves(residuals.values) : residuals.values;
  let product = 0;
  for (let at = 0; at < r.length; at++)
    product += (r[at] as number) * (a[Math.floor(at / k)] as number) * (b[at % k] as number);
  const squares = (x: Float64Array) => x.reduce((sum, value) => sum + value * value, 0);
  return { product, aa: squares(a), bb: squares(b), rr: squares(r), size: largestSize(layout.values) };
}

/** Differences as the residuals of both levels: half of each, with either sign. */
function halves(differences: Float64Array): Float64Array {
  return Float64Array.from({ length: 2 * differences.length }, (_, at) => {
    const half = (differences[at >> 1] as number) / 2;
    return at % 2 === 0 ? half : -half;
  });
}

function spreadOnLevel(layout: CheckLayout, level: number): AdditivityChecks {
  const none = { what: 'spread', growth: null, interval: null, F: null, df: null, p: null } as const;
  if (layout.groups.length < 2) return { ...none, reason: 'one group has one spread and one level' };
  if (layout.groups.length < 3) return { ...none, reason: 'any two groups lie on a line' };
  const own = byGroup(layout.values, layout.group, layout.groups.length);
  if (own.some((scores) => scores.length < 2)) return { ...none, reason: 'a group has one score only' };
  const means = Float64Array.from(own, mean);
  const sds = Float64Array.from(own, standardDeviation);
  if (!means.every((value) => value > 0) || !sds.every((value) => value > 0))
    return { ...none, reason: 'a mean or a spread is not above zero' };
  const fit = linearRegression(sds.map(Math.log), [means.map(Math.log)], { level });
  if (fit.coefficients === null) return { ...none, reason: fit.reason ?? 'the means do not differ' };
  const interval: Limits | null = fit.lower && fit.upper ? [fit.lower[1] as number, fit.upper[1] as number] : null;
  return { ...none, growth: fit.coefficients[1] as number, interval, df: fit.df, p: fit.p?.[1] ?? null };
}
