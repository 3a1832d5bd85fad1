/** The rows of a comparison within participants: every participant has a score under both conditions. */
import { bootstrapOneSample, bootstrapPaired } from '../numerics/bootstrap.ts';
import { hodgesLehmannPaired } from '../numerics/hodges-lehmann.ts';
import { oneSampleT, pairedT } from '../numerics/one-sample-t.ts';
import { differences } from '../numerics/scores.ts';
import { signTest } from '../numerics/sign-test.ts';
import { betaQuantile, betaQuantileUpper } from '../numerics/tails/beta.ts';
import { trimmedMeanTest } from '../numerics/trimmed-mean.ts';
import { signedRankTest } from '../numerics/wilcoxon.ts';
import { winsorizedMeanTest } from '../numerics/winsorized.ts';
import { yuenPaired } from '../numerics/yuen-paired.ts';
import { pairedEffects, robustPairedEffect } from './effects.ts';
import type { Estimator, RowContext } from './estimators.ts';
import type { EffectSize, Finding, Limits } from './finding.ts';
import { fromT, makeRow, turned } from './row.ts';
import type { Samples } from './samples.ts';

const within = {
  scope: 'within',
  trims: false,
  sameUnit: true,
  closedForm: true,
} as const;

export const WITHIN_ROWS: readonly Estimator[] = [
  { ...within, id: 'paired-t', untrimmed: 'paired-t', name: 'mean of differences', run: pairedMean },
  {
    ...within,
    id: 'trimmed-differences',
    untrimmed: 'paired-t',
    name: 'trimmed mean of differences',
    trims: true,
    run: trimmedDifferences,
  },
  {
    ...within,
    id: 'marginal-trimmed',
    untrimmed: 'paired-t',
    name: 'difference of trimmed means',
    trims: true,
    run: marginalTrimmed,
  },
  {
    ...within,
    id: 'winsorized-differences',
    untrimmed: 'paired-t',
    name: 'winsorized mean of differences',
    trims: true,
    run: winsorizedDifferences,
  },
  {
    ...within,
    id: 'median-differences',
    untrimmed: 'median-differences',
    name: 'median of differences',
    closedForm: false,
    run: medianDifferences,
  },
  {
    ...within,
    id: 'marginal-medians',
    untrimmed: 'marginal-medians',
    name: 'difference of medians',
    closedForm: false,
    run: marginalMedians,
  },
  { ...within, id: 'signed-rank', untrimmed: 'signed-rank', name: 'Hodges\u2013Lehmann estimate', run: signedRank },
  {
    ...within,
    id: 'paired-ratio',
    untrimmed: 'paired-ratio',
    name: 'ratio of geometric means',
    sameUnit: false,
    run: pairedRatio,
  },
  { ...within, id: 'pairs-share', untrimmed: 'pairs-share', name: 'share of pairs', sameUnit: false, run: pairsShare },
];

function pairedMean(samples: Samples, context: RowContext): Finding {
  const { x, y } = samples;
  if (x.length === 0) return nobody(samples, context, 'paired-t', 'mean of differences, paired t', 'means');
  return makeRow(
    samples,
    context,
    {
      estimator: 'paired-t',
      label: 'mean of differences, paired t',
      quantity: 'mean change',
      group: 'means',
      method:
        'Student 1908: t of the mean difference on n \u2212 1 df. Effect sizes: d_av by the average SD (Cumming 2012) with a percentile bootstrap interval; d_z by the SD of the differences with the noncentral t interval.',
    },
    { ...fromT(pairedT(x, y, context)), effects: pairedEffects(x, y, context) },
  );
}

function trimmedDifferences(samples: Samples, context: RowContext): Finding {
  const words = {
    label: `${context.trim} % trimmed mean of differences`,
    group: context.trim === 0 ? 'means' : 'trimmed means',
  };
  if (samples.x.length === 0) return nobody(samples, context, 'trimmed-differences', words.label, words.group);
  const d = differences(samples.x, samples.y);
  const test = trimmedMeanTest(d, { ...context, trim: context.trim });
  return makeRow(
    samples,
    context,
    {
      estimator: 'trimmed-differences',
      ...words,
      quantity: 'typical change',
      method: `Tukey & McLaughlin 1963: g = floor(${context.trim} % of n) = ${test.g} set out of the mean at each end, SE = winsorized SD / ((1 \u2212 2 trim) sqrt n), t on h \u2212 1 = ${test.h - 1} df. Effect size: Algina, Keselman & Penfield 2005, percentile bootstrap interval.`,
    },
    {
      ...fromT(test),
      h: [test.h, test.h],
      effects: [robustPairedEffect(d, context.trim, context)],
      cautions: trimCautions(context),
    },
  );
}

function marginalTrimmed(samples: Samples, context: RowContext): Finding {
  const words = {
    label: `difference of ${context.trim} % trimmed means`,
    group: context.trim === 0 ? 'means' : 'differences of trimmed means',
  };
  if (samples.x.length === 0) return nobody(samples, context, 'marginal-trimmed', words.label, words.group);
  const test = yuenPaired(samples.x, samples.y, { ...context, trim: context.trim });
  return makeRow(
    samples,
    context,
    {
      estimator: 'marginal-trimmed',
      ...words,
      quantity: 'difference between the typical scores',
      method: `Yuen 1974 for dependent samples (Wilcox 2012, 5.9.5): each condition trimmed on its own, g = ${test.g} at each end, winsorized covariance with pairs kept, t on h \u2212 1 = ${test.h - 1} df.`,
    },
    {
      ...fromT(test),
      h: [test.h, test.h],
      effects: [robustPairedEffect(differences(samples.x, samples.y), context.trim, context)],
      cautions: trimCautions(context),
    },
  );
}

function winsorizedDifferences(samples: Samples, context: RowContext): Finding {
  const words = {
    label: `${context.trim} % winsorized mean of differences`,
    group: context.trim === 0 ? 'means' : 'winsorized means',
  };
  if (samples.x.length === 0) return nobody(samples, context, 'winsorized-differences', words.label, words.group);
  const d = differences(samples.x, samples.y);
  const test = winsorizedMeanTest(d, { ...context, trim: context.trim });
  return makeRow(
    samples,
    context,
    {
      estimator: 'winsorized-differences',
      ...words,
      quantity: 'change with the tails pulled in',
      method: `Dixon & Tukey 1968: the ${test.g} lowest and highest differences pulled in to their neighbours, SE = winsorized SD (n \u2212 1) / ((h \u2212 1) sqrt n), t on h \u2212 1 = ${test.h - 1} df.`,
    },
    {
      ...fromT(test),
      h: [test.h, test.h],
      effects: [robustPairedEffect(d, context.trim, context)],
      cautions: trimCautions(context),
    },
  );
}

function medianDifferences(samples: Samples, context: RowContext): Finding {
  if (samples.x.length === 0) return nobody(samples, context, 'median-differences', 'median of differences', 'medians');
  const test = bootstrapOneSample(differences(samples.x, samples.y), 'median', bootOptions(context));
  return makeRow(
    samples,
    context,
    {
      estimator: 'median-differences',
      label: 'median of differences, bootstrap',
      quantity: 'middle change',
      group: 'medians',
      method: `Percentile bootstrap of the median of the differences (Efron & Tibshirani 1993; Wilcox 2012, 5.9.11), ${context.resamples} resamples of participants, seed ${context.seed}; SE = SD of the resampled medians.`,
    },
    { ...fromBootstrap(test, context), effects: [pairsEffect(samples, context)] },
  );
}

function marginalMedians(samples: Samples, context: RowContext): Finding {
  if (samples.x.length === 0) return nobody(samples, context, 'marginal-medians', 'difference of medians', 'medians');
  const test = bootstrapPaired(samples.x, samples.y, 'median', bootOptions(context));
  return makeRow(
    samples,
    context,
    {
      estimator: 'marginal-medians',
      label: 'difference of medians, bootstrap',
      quantity: 'difference between the middle scores',
      group: 'differences of medians',
      method: `Percentile bootstrap of the difference of the two medians (Wilcox 2012, 5.9.11), ${context.resamples} resamples of participants, pairs kept, seed ${context.seed}.`,
    },
    { ...fromBootstrap(test, context), effects: [pairsEffect(samples, context)] },
  );
}

function signedRank(samples: Samples, context: RowContext): Finding {
  const label = 'Hodges\u2013Lehmann, signed-rank';
  if (samples.x.length === 0) return nobody(samples, context, 'signed-rank', label, 'pseudomedians');
  const d = differences(samples.x, samples.y);
  const test = signedRankTest(d, { alternative: context.alternative });
  const located = hodgesLehmannPaired(d, context);
  return makeRow(
    samples,
    context,
    {
      estimator: 'signed-rank',
      label,
      quantity: 'centre of symmetry of the change',
      group: 'pseudomedians',
      method: `Hodges & Lehmann 1963: median of the pairwise means of the differences, interval from their order at the signed-rank quantile (${located.how}); test of Wilcoxon 1945, ${pMethod(test.method)}, zero differences dropped (${test.nZero}).`,
    },
    {
      estimate: located.estimate,
      reason: test.reason ?? located.reason,
      statistic: { name: 'V', value: test.V },
      p: test.p,
      pHow: pMethod(test.method),
      interval: test.p === null ? null : located.interval,
      effects: [pairsEffect(samples, context)],
      cautions: smallestSignP(test.nUsed, context),
    },
  );
}

function pairedRatio(samples: Samples, context: RowContext): Finding {
  const words = {
    estimator: 'paired-ratio',
    label: 'ratio of geometric means',
    quantity: 'typical proportional change',
    group: 'ratios',
    sameUnit: false,
    nullValue: 1,
    method:
      't test of the mean log ratio, turned back: a ratio of geometric means with its t interval. It asks about proportions, not about differences in the unit.',
  };
  const nonPositive = countNonPositive(samples.x) + countNonPositive(samples.y);
  if (samples.x.length === 0 || nonPositive > 0) {
    const reason =
      nonPositive > 0
        ? `${nonPositive} scores are zero or negative and have no logarithm`
        : 'no participant has both scores';
    return makeRow(samples, context, words, {
      estimate: null,
      reason,
      pHow: 't distribution of log ratios',
      cautions: nonPositive > 0 ? ['R5'] : [],
    });
  }
  const logs = samples.x.map((value, i) => Math.log(value / (samples.y[i] as number)));
  const test = oneSampleT(logs, context);
  const back = (value: number | null) => (value === null ? null : Math.exp(value));
  return makeRow(samples, context, words, {
    ...fromT(test),
    estimate: back(test.estimate),
    se: null,
    interval: test.interval === null ? null : [back(test.interval[0]), back(test.interval[1])],
    pHow: 't distribution of log ratios',
  });
}

function pairsShare(samples: Samples, context: RowContext): Finding {
  const lower = context.direction !== 'higher';
  const label = `P(${context.first} ${lower ? 'lower' : 'higher'}) within pairs`;
  const words = {
    estimator: 'pairs-share',
    label,
    quantity: `share of participants whose ${context.first} score is the ${lower ? 'lower' : 'higher'}`,
    group: 'probabilities',
    sameUnit: false,
    nullValue: 0.5,
    reversed: lower,
    method:
      'Sign test (exact binomial, equal pairs dropped); share counts equal pairs as half, interval by Clopper & Pearson 1934.',
  };
  if (samples.x.length === 0)
    return makeRow(samples, context, words, {
      estimate: null,
      reason: 'no participant has both scores',
      pHow: 'exact binomial',
    });
  const test = signTest(differences(samples.x, samples.y), { alternative: context.alternative });
  const { value, interval } = shareOfPairs(
    samples,
    lower,
    lower ? turned(context.alternative) : context.alternative,
    context.level,
  );
  return makeRow(samples, context, words, {
    estimate: value,
    reason: test.reason,
    p: test.p,
    pHow: 'exact binomial',
    interval: test.p === null ? null : interval,
    cautions: smallestSignP(test.nPositive + test.nNegative, context),
  });
}

/** Share of pairs in which the first is lower (or higher), equal pairs as half, with the Clopper-Pearson interval. */
function shareOfPairs(samples: Samples, lower: boolean, alternative: RowContext['alternative'], level: number) {
  const n = samples.x.length;
  let wins = 0;
  for (let i = 0; i < n; i++) {
    const d = (samples.x[i] as number) - (samples.y[i] as number);
    wins += d === 0 ? 0.5 : d < 0 === lower ? 1 : 0;
  }
  const tail = alternative === 'two-sided' ? (1 - level) / 2 : 1 - level;
  const low = wins === 0 ? 0 : betaQuantile(tail, wins, n - wins + 1);
  const high = wins === n ? 1 : betaQuantileUpper(tail, wins + 1, n - wins);
  const interval: Limits =
    alternative === 'greater' ? [low, null] : alternative === 'less' ? [null, high] : [low, high];
  return { value: wins / n, interval };
}

function pairsEffect(samples: Samples, context: RowContext): EffectSize {
  const lower = context.direction !== 'higher';
  const share = shareOfPairs(samples, lower, 'two-sided', context.level);
  return {
    name: `P(${context.first} ${lower ? 'lower' : 'higher'}) within pairs`,
    value: share.value,
    interval: share.interval,
    how: 'Clopper & Pearson 1934',
  };
}

function nobody(samples: Samples, context: RowContext, estimator: string, label: string, group: string): Finding {
  return makeRow(
    samples,
    context,
    { estimator, label, quantity: '', group, method: '' },
    { estimate: null, reason: 'no participant has a score under both conditions', pHow: '' },
  );
}

/** Options of a bootstrap row. */
export function bootOptions(context: RowContext) {
  return { B: context.resamples, seed: context.seed, level: context.level, alternative: context.alternative };
}

/** The numbers of a percentile bootstrap as a row has them. */
export function fromBootstrap(
  test: { estimate: number | null; se: number | null; p: number | null; interval: Limits | null; reason?: string },
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

function trimCautions(context: RowContext): string[] {
  return context.trim > 25 ? ['R3'] : [];
}

function smallestSignP(n: number, context: RowContext): string[] {
  const smallest = (context.alternative === 'two-sided' ? 2 : 1) / 2 ** n;
  return smallest > 1 - context.level ? ['R25'] : [];
}

function countNonPositive(values: Float64Array): number {
  let count = 0;
  for (const value of values) if (value <= 0) count++;
  return count;
}
