/** Cases of two (for some methods more) independent groups. */
import { brunnerMunzel } from '../../../src/numerics/brunner-munzel.ts';
import { akpRobustD } from '../../../src/numerics/effect-size/akp-robust-d.ts';
import { cliffsDelta } from '../../../src/numerics/effect-size/cliffs-delta.ts';
import { cohensD } from '../../../src/numerics/effect-size/cohens-d.ts';
import { explanatoryEffect } from '../../../src/numerics/effect-size/explanatory.ts';
import { hedgesG, smallSampleApproximation } from '../../../src/numerics/effect-size/hedges-g.ts';
import { hodgesLehmannShift } from '../../../src/numerics/hodges-lehmann.ts';
import { kolmogorovTwoSample } from '../../../src/numerics/kolmogorov-two-sample.ts';
import { mannWhitney } from '../../../src/numerics/mann-whitney.ts';
import { medianTest } from '../../../src/numerics/median-test.ts';
import { permutationTwoGroups } from '../../../src/numerics/permutation-two-groups.ts';
import { studentT } from '../../../src/numerics/student.ts';
import { transformedWelch, type WelchTransform } from '../../../src/numerics/transformed-welch.ts';
import { varianceRatio } from '../../../src/numerics/variance-ratio.ts';
import { welchT } from '../../../src/numerics/welch.ts';
import { type YuenTest, yuenPooled, yuenWelch } from '../../../src/numerics/yuen.ts';
import {
  alternativeArg,
  type CaseArgs,
  type CaseMethods,
  groupsOf,
  intervalText,
  numberArg,
  stringArg,
  trimPercent,
  undefinedResult,
} from './case-data.ts';
import { direction, exactness, tKeys } from './one-sample-paired.ts';

type Result = Record<string, unknown>;

function yuenKeys(test: YuenTest): Result {
  return tKeys(test, { h: test.h, trimmed_means: test.trimmedMeans, difference: test.estimate });
}

function rankSum(x: Float64Array, y: Float64Array, args: CaseArgs): Result {
  const options = { alternative: alternativeArg(args), method: exactness(args), correct: args.correct === true };
  const { U, uOther, superiority, rankBiserial, z, p } = mannWhitney(x, y, options);
  if (p === null) return undefinedResult;
  return { U, U_other: uOther, prob_superiority: superiority, rank_biserial: rankBiserial, z, p };
}

function relative(x: Float64Array, y: Float64Array, args: CaseArgs): Result {
  const distribution = args.distribution === 'normal' ? 'normal' : 't';
  const test = brunnerMunzel(x, y, { distribution, ...direction(args) });
  if (test.interval === null) return undefinedResult;
  const { pHat, statistic, p, df, interval } = test;
  return { p_hat: pHat, statistic, p, df, ci_p_hat: intervalText(interval) };
}

function standardized(x: Float64Array, y: Float64Array, args: CaseArgs): Result {
  const wanted = args.denominator === 'second_sd' ? 'second' : args.denominator === 'average' ? 'average' : 'pooled';
  const d = cohensD(x, y, { denominator: wanted, ...direction(args) });
  if (d.value === null) return undefinedResult;
  if (wanted !== 'pooled' || d.interval === null) return { d: d.value };
  const g = hedgesG(x, y, direction(args));
  return {
    d: d.value,
    ci_d: intervalText(d.interval),
    J: g.factor,
    g: g.value,
    ci_g: g.interval && intervalText(g.interval),
    J_approx: smallSampleApproximation(x.length + y.length - 2),
    g_approx: g.approximate,
  };
}

function dominance(x: Float64Array, y: Float64Array, args: CaseArgs): Result {
  const wanted = args.variance === 'unbiased' ? 'unbiased' : 'consistent';
  const { value, superiority, variance, interval } = cliffsDelta(x, y, { variance: wanted, ...direction(args) });
  if (interval === null) return undefinedResult;
  return { delta: value, prob_superiority: superiority, variance, ci: intervalText(interval) };
}

function robust(x: Float64Array, y: Float64Array, args: CaseArgs): Result {
  const { value, constant, pooledSd, byFirst, bySecond } = akpRobustD(x, y, { trim: trimPercent(args) });
  if (value === null) return undefinedResult;
  return { constant, d: value, pooled_winsorized_sd: pooledSd, d_first_sd: byFirst, d_second_sd: bySecond };
}

function splits(x: Float64Array, y: Float64Array): Result {
  const test = permutationTwoGroups(x, y);
  if (test.pTwoSided === null) return undefinedResult;
  return {
    difference: test.estimate,
    n_permutations: test.splits,
    p_two_sided_abs: test.pTwoSided,
    p_two_sided_doubled: test.pDoubled,
    p_greater: test.pGreater,
    p_less: test.pLess,
  };
}

function transformed(x: Float64Array, y: Float64Array, args: CaseArgs): Result {
  const transform = stringArg(args, 'transform') as WelchTransform;
  const test = transformedWelch(x, y, { transform, offset: numberArg(args, 'offset', 0), ...direction(args) });
  return tKeys(test, {
    difference: test.estimate,
    back_transformed_means: test.backTransformed,
    ratio: test.ratio,
    ci_ratio: test.ratioInterval && intervalText(test.ratioInterval),
  });
}

const ofTwo: Record<string, (x: Float64Array, y: Float64Array, args: CaseArgs) => Result> = {
  student_t: (x, y, args) => {
    const test = studentT(x, y, direction(args));
    return tKeys(test, { means: test.means, difference: test.estimate });
  },
  welch_t: (x, y, args) => {
    const test = welchT(x, y, direction(args));
    return tKeys(test, { means: test.means, difference: test.estimate });
  },
  yuen_welch: (x, y, args) => yuenKeys(yuenWelch(x, y, { trim: trimPercent(args), ...direction(args) })),
  yuen_pooled: (x, y, args) => yuenKeys(yuenPooled(x, y, { trim: trimPercent(args), ...direction(args) })),
  mann_whitney: rankSum,
  brunner_munzel: relative,
  hodges_lehmann_shift: (x, y, args) => {
    const { estimate, interval, coverage } = hodgesLehmannShift(x, y, direction(args));
    return interval === null ? undefinedResult : { estimate, ci: intervalText(interval), coverage };
  },
  ks_two_sample: (x, y) => ({ ...kolmogorovTwoSample(x, y) }),
  permutation_mean_difference: splits,
  variance_ratio_f: (x, y, args) => {
    if (x.length < 2 || y.length < 2) return undefinedResult;
    const { ratio, df1, df2, p, interval } = varianceRatio(x, y, direction(args));
    return interval === null ? undefinedResult : { F: ratio, df1, df2, p, ci: intervalText(interval) };
  },
  cohens_d: standardized,
  cliffs_delta: dominance,
  akp_robust_d: robust,
  transformed_two_sample_t: transformed,
};

const ofMany: Record<string, (groups: readonly Float64Array[], args: CaseArgs) => Result> = {
  median_test: (groups, args) => {
    const ties = args.ties === 'above' || args.ties === 'ignore' ? args.ties : 'below';
    const test = medianTest(groups, { ties, correct: args.correct === true });
    if (test.p === null) return undefinedResult;
    return { chi2: test.chiSquare, df: test.df, p: test.p, grand_median: test.grandMedian, table: test.table };
  },
  explanatory_effect_size: (groups, args) => {
    const { xiSquared, xi, totalVariance } = explanatoryEffect(groups, { trim: trimPercent(args) });
    if (xiSquared === null) return undefinedResult;
    return { xi_squared: xiSquared, xi, rescaled_winsorized_variance: totalVariance };
  },
};

export const methods: CaseMethods = {
  ...Object.fromEntries(
    Object.entries(ofTwo).map(([name, method]) => [
      name,
      (data, args) => {
        const { levels, scores } = groupsOf(data, args);
        const [x, y] = scores;
        if (x === undefined || y === undefined || scores.length !== 2) {
          throw new RangeError(`*levels* must name two groups; got ${levels.length}`);
        }
        return x.length === 0 || y.length === 0 ? undefinedResult : method(x, y, args);
      },
    ]),
  ),
  ...Object.fromEntries(
    Object.entries(ofMany).map(([name, method]) => [
      name,
      (data, args) => {
        const { scores } = groupsOf(data, args);
        return scores.some((group) => group.length === 0) ? undefinedResult : method(scores, args);
      },
    ]),
  ),
};
