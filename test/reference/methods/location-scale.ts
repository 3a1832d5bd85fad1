/** Cases of one sample: location, scale, standard errors. */

import { exactBootstrap } from '../../../src/numerics/exact-bootstrap.ts';
import { geometricMean } from '../../../src/numerics/geometric-mean.ts';
import { hodgesLehmannPaired } from '../../../src/numerics/hodges-lehmann.ts';
import { bisquareLocation, huberLocation, modifiedOneStepM, oneStepM } from '../../../src/numerics/m-estimator.ts';
import { meanWithError, variance } from '../../../src/numerics/moments.ts';
import {
  interquartileRange,
  mad,
  median,
  medianAbsoluteDeviation,
  medianSorted,
  type QuantileType,
  quantiles,
  tukeyHinges,
} from '../../../src/numerics/order.ts';
import { harrellDavis, quantileStandardError } from '../../../src/numerics/quantile-estimates.ts';
import { biweightMidvariance, percentageBendMidvariance, qnScale, snScale } from '../../../src/numerics/scale.ts';
import { trimCount } from '../../../src/numerics/scores.ts';
import { medianStandardError } from '../../../src/numerics/se-median.ts';
import { trimmedMean, trimmedMeanErrors, trimmedMeanSorted } from '../../../src/numerics/trimmed-mean.ts';
import { winsorizedMean, winsorizedVariance } from '../../../src/numerics/winsorized.ts';
import {
  type CaseArgs,
  type CaseMethods,
  intervalText,
  levelArg,
  numberArg,
  numbersArg,
  outcomeValues,
  stringArg,
  trimPercent,
  undefinedResult,
} from './case-data.ts';

type OneSample = (x: Float64Array, args: CaseArgs) => Record<string, unknown>;

function constant(args: CaseArgs): { madConstant?: number } {
  return args.mad_constant === undefined ? {} : { madConstant: numberArg(args, 'mad_constant') };
}

function quantileType(args: CaseArgs): QuantileType {
  const type = numberArg(args, 'type', 7);
  if (type !== 6 && type !== 7 && type !== 8) throw new RangeError(`*type* must be 6, 7 or 8; got ${type}`);
  return type;
}

function orUndefined(value: number | null, result: Record<string, unknown>): Record<string, unknown> {
  return value === null ? undefinedResult : result;
}

function trimmed(x: Float64Array, args: CaseArgs) {
  const trim = trimPercent(args);
  const g = trimCount(x.length, trim);
  const errors = trimmedMeanErrors(x, trim);
  return {
    estimate: trimmedMean(x, trim),
    n: x.length,
    g,
    h: x.length - 2 * g,
    se_tukey_mclaughlin: errors.tukeyMcLaughlin,
    se_actual_fraction: errors.actualFraction,
    se_yuen: errors.yuen,
  };
}

const resampled: Record<string, (args: CaseArgs) => (s: Float64Array) => number> = {
  mean: () => (s) => trimmedMeanSorted(s, 0),
  median: () => medianSorted,
  trimmed_mean: (args) => (s) => trimmedMeanSorted(s, trimCount(s.length, trimPercent(args))),
};

function enumerated(x: Float64Array, args: CaseArgs) {
  const statistic = resampled[stringArg(args, 'statistic')];
  if (statistic === undefined) throw new RangeError(`*statistic* must be one offered; got ${String(args.statistic)}`);
  const all = exactBootstrap(x, statistic(args));
  return {
    n_distinct: all.distinct,
    bootstrap_mean: all.mean,
    bootstrap_se: all.se,
    percentile_ci_95: all.interval,
  };
}

function geometric(x: Float64Array, args: CaseArgs) {
  const result = geometricMean(x, { level: levelArg(args) });
  return orUndefined(result.estimate, {
    estimate: result.estimate,
    ci: result.interval && intervalText(result.interval),
    geometric_sd: result.geometricSd,
    harmonic_mean: result.harmonicMean,
  });
}

function maritzJarrett(x: Float64Array, args: CaseArgs) {
  const variant = args.variant === 'm_minus_1' ? 'm-minus-1' : 'order-statistic';
  const { se, m } = quantileStandardError(x, numberArg(args, 'prob'), variant);
  return orUndefined(se, { se, m });
}

const oneSample: Record<string, OneSample> = {
  mean: (x) => ({ ...meanWithError(x) }),
  median: (x) => ({ estimate: median(x), n: x.length }),
  quantile: (x, args) => ({ estimate: quantiles(x, numbersArg(args, 'probs'), quantileType(args)) }),
  tukey_hinges: (x) => ({ estimate: tukeyHinges(x) }),
  harrell_davis: (x, args) => ({ estimate: numbersArg(args, 'probs').map((p) => harrellDavis(x, p)) }),
  trimmed_mean: trimmed,
  winsorized_mean: (x, args) => ({
    estimate: winsorizedMean(x, trimPercent(args)),
    n: x.length,
    g: trimCount(x.length, trimPercent(args)),
  }),
  winsorized_variance: (x, args) => {
    if (x.length < 2) return undefinedResult;
    const own = winsorizedVariance(x, trimPercent(args));
    return { variance: own, sd: Math.sqrt(own) };
  },
  huber_location: (x, args) => {
    const result = huberLocation(x, { k: numberArg(args, 'k'), ...constant(args) });
    return orUndefined(result.estimate, { ...result });
  },
  bisquare_location: (x, args) => {
    const result = bisquareLocation(x, { c: numberArg(args, 'c'), ...constant(args) });
    return orUndefined(result.estimate, { ...result });
  },
  one_step_m: (x, args) => {
    const result = oneStepM(x, { k: numberArg(args, 'k'), ...constant(args) });
    return orUndefined(result.estimate, { ...result });
  },
  modified_one_step_m: (x, args) => {
    const result = modifiedOneStepM(x, { cutoff: numberArg(args, 'cutoff'), ...constant(args) });
    return orUndefined(result.estimate, { ...result });
  },
  hodges_lehmann_location: (x) => ({ estimate: hodgesLehmannPaired(x).estimate }),
  geometric_mean: geometric,
  standard_deviation: (x) => {
    if (x.length < 2) return undefinedResult;
    return { sd: Math.sqrt(variance(x)), variance: variance(x) };
  },
  median_absolute_deviation: (x, args) => ({
    mad: mad(x, numberArg(args, 'constant', 1.4826)),
    raw: medianAbsoluteDeviation(x),
  }),
  interquartile_range: (x, args) => ({ iqr: interquartileRange(x, quantileType(args)) }),
  sn_scale: (x, args) => {
    if (x.length < 2) return undefinedResult;
    const { value, raw } = snScale(x, args.finite_correction === true);
    return { sn: value, raw };
  },
  qn_scale: (x, args) => {
    if (x.length < 2) return undefinedResult;
    const { value, raw } = qnScale(x, args.finite_correction === true);
    return { qn: value, raw };
  },
  percentage_bend_midvariance: (x, args) => {
    const result = percentageBendMidvariance(x, numberArg(args, 'beta'));
    return orUndefined(result.variance, { ...result });
  },
  biweight_midvariance: (x, args) => {
    const result = biweightMidvariance(x, numberArg(args, 'c', 9));
    return orUndefined(result.variance, { ...result });
  },
  se_median_mckean_schrader: (x) => (x.length < 2 ? undefinedResult : { ...medianStandardError(x) }),
  se_quantile_maritz_jarrett: (x, args) => (x.length < 2 ? undefinedResult : maritzJarrett(x, args)),
  exact_bootstrap: enumerated,
};

export const methods: CaseMethods = Object.fromEntries(
  Object.entries(oneSample).map(([name, method]) => [
    name,
    (data, args) => {
      const x = outcomeValues(data, args);
      return x.length === 0 ? undefinedResult : method(x, args);
    },
  ]),
);
