/** Cases of one sample against a value, and of pairs. */
import { akpRobustDPaired } from '../../../src/numerics/effect-size/akp-robust-d.ts';
import { pairedD } from '../../../src/numerics/effect-size/paired-d.ts';
import { hodgesLehmannPaired } from '../../../src/numerics/hodges-lehmann.ts';
import type { TTest } from '../../../src/numerics/inference.ts';
import { medianInterval } from '../../../src/numerics/median-ci.ts';
import { oneSampleT, pairedT } from '../../../src/numerics/one-sample-t.ts';
import { permutationPaired } from '../../../src/numerics/permutation-paired.ts';
import { signTest } from '../../../src/numerics/sign-test.ts';
import { trimmedMeanTest } from '../../../src/numerics/trimmed-mean.ts';
import { signedRankTest } from '../../../src/numerics/wilcoxon.ts';
import { yuenPaired } from '../../../src/numerics/yuen-paired.ts';
import {
  alternativeArg,
  type CaseArgs,
  type CaseMethods,
  differencesOrValues,
  intervalText,
  levelArg,
  numberArg,
  pairsOf,
  stringArg,
  trimPercent,
  undefinedResult,
} from './case-data.ts';

export function direction(args: CaseArgs) {
  return { alternative: alternativeArg(args), level: levelArg(args) };
}

/** The keys every t method shares; undefined where the test cannot be made. */
export function tKeys(test: TTest, rest: Record<string, unknown>): Record<string, unknown> {
  if (test.t === null || test.interval === null) return undefinedResult;
  return { se: test.se, t: test.t, df: test.df, p: test.p, ci: intervalText(test.interval), ...rest };
}

/** "exact_conditional" of the cases in our spelling. */
export function exactness(args: CaseArgs): 'exact' | 'exact-conditional' | 'asymptotic' {
  const method = stringArg(args, 'p_method').replace('_', '-');
  if (method === 'exact' || method === 'exact-conditional' || method === 'asymptotic') return method;
  throw new RangeError(`*p_method* must be exact, exact_conditional or asymptotic; got ${method}`);
}

function trimmedTest(x: Float64Array, args: CaseArgs) {
  const test = trimmedMeanTest(x, { trim: trimPercent(args), mu: numberArg(args, 'mu', 0), ...direction(args) });
  return tKeys(test, { n: x.length, g: test.g, h: test.h, trimmed_mean: test.estimate });
}

function medianLimits(x: Float64Array, args: CaseArgs) {
  const variant = stringArg(args, 'variant') === 'interpolated' ? 'interpolated' : 'exact-conservative';
  const { estimate, interval, ranks, coverage } = medianInterval(x, { variant, ...direction(args) });
  if (interval === null) return undefinedResult;
  return { estimate, ci: intervalText(interval), lower_rank: ranks?.[0], upper_rank: ranks?.[1], coverage };
}

function signedRank(x: Float64Array, args: CaseArgs) {
  const test = signedRankTest(x, {
    mu: numberArg(args, 'mu', 0),
    alternative: alternativeArg(args),
    zeroMethod: args.zero_method === 'pratt' ? 'pratt' : 'drop',
    method: exactness(args),
    correct: args.correct === true,
  });
  if (test.p === null) return undefinedResult;
  const { V, wMinus, nZero, nUsed, rankBiserial, z, p } = test;
  return { V, W_minus: wMinus, n_zero: nZero, n_used: nUsed, rank_biserial: rankBiserial, z, p };
}

function signs(x: Float64Array, args: CaseArgs) {
  const test = signTest(x, { mu: numberArg(args, 'mu', 0), alternative: alternativeArg(args) });
  if (test.p === null) return undefinedResult;
  return { n_positive: test.nPositive, n_negative: test.nNegative, n_zero: test.nZero, p: test.p };
}

function hodgesLehmann(x: Float64Array, args: CaseArgs) {
  const { estimate, interval, coverage } = hodgesLehmannPaired(x, direction(args));
  return interval === null ? undefinedResult : { estimate, ci: intervalText(interval), coverage };
}

function flips(x: Float64Array) {
  const test = permutationPaired(x);
  if (test.pTwoSided === null) return undefinedResult;
  return {
    mean_difference: test.estimate,
    n_sign_flips: test.flips,
    p_two_sided_abs: test.pTwoSided,
    p_greater: test.pGreater,
    p_less: test.pLess,
  };
}

const ofDifferences: Record<string, (x: Float64Array, args: CaseArgs) => Record<string, unknown>> = {
  one_sample_t: (x, args) => {
    const test = oneSampleT(x, { mu: numberArg(args, 'mu', 0), ...direction(args) });
    return tKeys(test, { n: x.length, mean: test.estimate, sd: test.sd });
  },
  trimmed_one_sample_t: trimmedTest,
  trimmed_paired_differences_t: trimmedTest,
  median_ci: medianLimits,
  wilcoxon_signed_rank: signedRank,
  sign_test: signs,
  hodges_lehmann_one_sample: hodgesLehmann,
  permutation_paired_mean: flips,
  akp_robust_d_paired: (x, args) => {
    const { value, constant } = akpRobustDPaired(x, { trim: trimPercent(args) });
    return value === null ? undefinedResult : { constant, d: value };
  },
};

function standardized(x: Float64Array, y: Float64Array, args: CaseArgs) {
  const d = pairedD(x, y, direction(args));
  if (d.dZ === null) return undefinedResult;
  return {
    d_z: d.dZ,
    d_av_rms: d.dAverage,
    d_av_mean_sd: d.dMeanSd,
    d_rm: d.dRepeated,
    r: d.r,
    J: d.factor,
    g_z: d.gZ,
    g_av_rms: d.gAverage,
    ci_d_z: d.interval && intervalText(d.interval),
  };
}

const ofPairs: Record<string, (x: Float64Array, y: Float64Array, args: CaseArgs) => Record<string, unknown>> = {
  paired_t: (x, y, args) => {
    const test = pairedT(x, y, direction(args));
    return tKeys(test, { n: x.length, mean_difference: test.estimate, sd_difference: test.sd });
  },
  yuen_paired: (x, y, args) => {
    const test = yuenPaired(x, y, { trim: trimPercent(args), ...direction(args) });
    const { g, h, trimmedMeans, estimate } = test;
    return tKeys(test, { n: x.length, g, h, trimmed_means: trimmedMeans, difference: estimate });
  },
  cohens_d_paired: standardized,
};

export const methods: CaseMethods = {
  ...Object.fromEntries(
    Object.entries(ofDifferences).map(([name, method]) => [
      name,
      (data, args) => {
        const x = differencesOrValues(data, args);
        return x.length === 0 ? undefinedResult : method(x, args);
      },
    ]),
  ),
  ...Object.fromEntries(
    Object.entries(ofPairs).map(([name, method]) => [
      name,
      (data, args) => {
        const { x, y } = pairsOf(data, args);
        return x.length === 0 ? undefinedResult : method(x, y, args);
      },
    ]),
  ),
};
