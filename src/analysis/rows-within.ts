/** Rows within participants on means, trimmed means and medians: every participant has a score under both conditions. */
import { bootstrapOneSample, bootstrapPaired } from '../numerics/bootstrap.ts';
import { pairedT } from '../numerics/one-sample-t.ts';
import { differences } from '../numerics/scores.ts';
import { trimmedMeanTest } from '../numerics/trimmed-mean.ts';
import { winsorizedMeanTest } from '../numerics/winsorized.ts';
import { yuenPaired } from '../numerics/yuen-paired.ts';
import { robustPaired, standardizedPairs } from './effects-once.ts';
import type { Estimator, RowContext } from './estimators.ts';
import type { Finding } from './finding.ts';
import { pairsEffect } from './pairs-share.ts';
import { bootOptions, fewForBootstrap, fromBootstrap, fromT, makeRow, nobody, trimCautions } from './row.ts';
import type { Samples } from './samples.ts';

const within = {
  scope: 'within',
  trims: false,
  sameUnit: true,
  closedForm: true,
} as const;

export const WITHIN_MEAN_ROWS: readonly Estimator[] = [
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
    { ...fromT(pairedT(x, y, context)), effects: standardizedPairs(samples, context) },
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
      effects: robustPaired(samples, context),
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
      effects: robustPaired(samples, context),
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
      effects: robustPaired(samples, context),
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
    { ...fromBootstrap(test, context), effects: [pairsEffect(samples, context)], cautions: fewForBootstrap(samples.x) },
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
    { ...fromBootstrap(test, context), effects: [pairsEffect(samples, context)], cautions: fewForBootstrap(samples.x) },
  );
}
