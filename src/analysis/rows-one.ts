/** Rows of every participant's score against a value: the estimate is the distance from the value. */
import { bootstrapOneSample } from '../numerics/bootstrap.ts';
import { noncentralInterval } from '../numerics/effect-size/effect.ts';
import { hodgesLehmannPaired } from '../numerics/hodges-lehmann.ts';
import { oneSampleT } from '../numerics/one-sample-t.ts';
import { differences } from '../numerics/scores.ts';
import { signTest } from '../numerics/sign-test.ts';
import { trimmedMeanTest } from '../numerics/trimmed-mean.ts';
import { signedRankTest } from '../numerics/wilcoxon.ts';
import { robustPaired } from './effects-once.ts';
import type { Estimator, RowContext } from './estimators.ts';
import type { EffectSize, Finding } from './finding.ts';
import { pairsEffect, shareOfPairs } from './pairs-share.ts';
import {
  bootOptions,
  fewForBootstrap,
  fromBootstrap,
  fromT,
  makeRow,
  pMethod,
  smallestSignP,
  trimCautions,
  turned,
} from './row.ts';
import type { Samples } from './samples.ts';
import { signFlipTest } from './typical-values.ts';

const one = { scope: 'value', trims: false, sameUnit: true, closedForm: true } as const;

export const VALUE_ROWS: readonly Estimator[] = [
  { ...one, id: 'one-sample-t', untrimmed: 'one-sample-t', name: 'mean', run: someone(meanRow) },
  {
    ...one,
    id: 'trimmed-mean',
    untrimmed: 'one-sample-t',
    name: 'trimmed mean',
    trims: true,
    run: someone(trimmedRow),
  },
  {
    ...one,
    id: 'trimmed-mean-boot-t',
    untrimmed: 'trimmed-mean-boot-t',
    name: 'trimmed mean (bootstrap-t)',
    trims: true,
    closedForm: false,
    run: someone(bootstrapTRow),
  },
  { ...one, id: 'median', untrimmed: 'median', name: 'median', closedForm: false, run: someone(medianRow) },
  {
    ...one,
    id: 'permutation-mean',
    untrimmed: 'permutation-mean',
    name: 'mean (sign flips)',
    closedForm: false,
    run: someone(flippedRow),
  },
  {
    ...one,
    id: 'one-signed-rank',
    untrimmed: 'one-signed-rank',
    name: 'Hodges\u2013Lehmann estimate',
    run: someone(signedRankRow),
  },
  {
    ...one,
    id: 'share-beyond',
    untrimmed: 'share-beyond',
    name: 'share of scores beyond the value',
    sameUnit: false,
    run: someone(shareRow),
  },
];

/** Runs a row only where there is a score. */
function someone(run: Estimator['run']): Estimator['run'] {
  return (samples, context) => {
    if (samples.x.length > 0) return run(samples, context);
    const words = { estimator: 'none', label: '', quantity: '', group: 'none', method: '' };
    return makeRow(samples, context, words, { estimate: null, reason: 'nobody has a score', pHow: '' });
  };
}

function distances(samples: Samples): Float64Array {
  return differences(samples.x, samples.y);
}

function meanRow(samples: Samples, context: RowContext): Finding {
  return makeRow(
    samples,
    context,
    {
      estimator: 'one-sample-t',
      label: 'mean, one-sample t',
      quantity: `mean minus ${samples.second}`,
      group: 'means',
      method:
        'Student 1908: t of the mean on n \u2212 1 df. Effect size: d by the SD of the scores with the noncentral t interval.',
    },
    { ...fromT(oneSampleT(distances(samples), context)), effects: [standardizedMean(samples, context)] },
  );
}

/** Distance of the mean from the value over the SD of the scores. */
function standardizedMean(samples: Samples, context: RowContext): EffectSize {
  const test = oneSampleT(distances(samples), { level: context.level });
  const named = { name: 'd (SD of the scores)', how: 'noncentral t' };
  if (test.t === null || test.df === null) return { ...named, value: null, interval: null, reason: test.reason ?? '' };
  const root = Math.sqrt(samples.x.length);
  const interval = noncentralInterval(test.t, test.df, root, context.level, 'two-sided');
  return { ...named, value: test.t / root, interval };
}

function trimmedRow(samples: Samples, context: RowContext): Finding {
  const test = trimmedMeanTest(distances(samples), { ...context, trim: context.trim });
  return makeRow(
    samples,
    context,
    {
      estimator: 'trimmed-mean',
      label: `${context.trim} % trimmed mean`,
      quantity: `typical score minus ${samples.second}`,
      group: context.trim === 0 ? 'means' : 'trimmed means',
      method: `Tukey & McLaughlin 1963: g = floor(${context.trim} % of n) = ${test.g} set out of the mean at each end, SE = winsorized SD / ((1 \u2212 2 trim) sqrt n), t on h \u2212 1 = ${test.h - 1} df. Effect size: Algina, Keselman & Penfield 2005, percentile bootstrap interval.`,
    },
    { ...fromT(test), h: [test.h, test.h], effects: robustOf(samples, context), cautions: trimCautions(context) },
  );
}

/** The robust d of differences from a constant is that of the scores themselves. */
function robustOf(samples: Samples, context: RowContext): EffectSize[] {
  return robustPaired(samples, context).map((effect) => ({ ...effect, name: `robust d (${context.trim} % trimmed)` }));
}

function bootstrapTRow(samples: Samples, context: RowContext): Finding {
  const d = distances(samples);
  const test = trimmedMeanTest(d, { ...context, trim: context.trim });
  const boot = bootstrapOneSample(d, 'trimmed-mean', {
    ...bootOptions(context),
    trim: context.trim,
    method: 't-symmetric',
  });
  return makeRow(
    samples,
    context,
    {
      estimator: 'trimmed-mean-boot-t',
      label: `${context.trim} % trimmed mean, bootstrap-t`,
      quantity: `typical score minus ${samples.second}`,
      group: context.trim === 0 ? 'means' : 'trimmed means',
      method: `Bootstrap-t (Hall 1988; Wilcox 2012, 4.4): |t| of resampled scores about their trimmed mean gives the critical value, ${context.resamples} resamples, seed ${context.seed}; symmetric, SE of Tukey & McLaughlin 1963.`,
    },
    {
      ...fromT(test),
      df: null,
      p: boot.p,
      pHow: `bootstrap-t, B = ${context.resamples}`,
      interval: boot.interval,
      reason: test.reason ?? boot.reason,
      h: [test.h, test.h],
      effects: robustOf(samples, context),
      cautions: [...trimCautions(context), ...fewForBootstrap(d)],
    },
  );
}

function medianRow(samples: Samples, context: RowContext): Finding {
  const test = bootstrapOneSample(distances(samples), 'median', bootOptions(context));
  return makeRow(
    samples,
    context,
    {
      estimator: 'median',
      label: 'median, bootstrap',
      quantity: `middle score minus ${samples.second}`,
      group: 'medians',
      method: `Percentile bootstrap of the median (Efron & Tibshirani 1993; Wilcox 2012, 4.4), ${context.resamples} resamples of participants, seed ${context.seed}; SE = SD of the resampled medians.`,
    },
    {
      ...fromBootstrap(test, context),
      effects: [pairsEffectOf(samples, context)],
      cautions: fewForBootstrap(samples.x),
    },
  );
}

function pairsEffectOf(samples: Samples, context: RowContext): EffectSize {
  return { ...pairsEffect(samples, context), name: shareLabel(samples, context) };
}

function flippedRow(samples: Samples, context: RowContext): Finding {
  const d = distances(samples);
  const test = oneSampleT(d, context);
  const flipped = signFlipTest(d, context);
  return makeRow(
    samples,
    context,
    {
      estimator: 'permutation-mean',
      label: 'mean, sign flips',
      quantity: `mean minus ${samples.second}`,
      group: 'means',
      method: `Fisher 1935: distances from the value turned round, ${flipped.how}; the interval holds the means the test does not reject, from the means of subsets of participants (Hartigan 1969). It takes the scores as symmetric about their centre.`,
    },
    {
      ...fromT(test),
      df: null,
      p: test.p === null ? null : flipped.p,
      pHow: flipped.how,
      interval: test.p === null ? null : flipped.interval,
      reason: test.reason ?? flipped.reason,
      effects: [standardizedMean(samples, context)],
      cautions: smallestSignP(d.length, context),
    },
  );
}

function signedRankRow(samples: Samples, context: RowContext): Finding {
  const d = distances(samples);
  const test = signedRankTest(d, { alternative: context.alternative });
  const located = hodgesLehmannPaired(d, context);
  return makeRow(
    samples,
    context,
    {
      estimator: 'one-signed-rank',
      label: 'Hodges\u2013Lehmann, signed-rank',
      quantity: `centre of symmetry minus ${samples.second}`,
      group: 'pseudomedians',
      method: `Hodges & Lehmann 1963: median of the pairwise means, interval from their order at the signed-rank quantile (${located.how}); test of Wilcoxon 1945, ${pMethod(test.method)}, scores equal to the value dropped (${test.nZero}).`,
    },
    {
      estimate: located.estimate,
      reason: test.reason ?? located.reason,
      statistic: { name: 'V', value: test.V },
      p: test.p,
      pHow: pMethod(test.method),
      interval: test.p === null ? null : located.interval,
      effects: [pairsEffectOf(samples, context)],
      cautions: smallestSignP(test.nUsed, context),
    },
  );
}

function shareLabel(samples: Samples, context: RowContext): string {
  return `P(score ${context.direction !== 'higher' ? 'below' : 'above'} ${samples.second})`;
}

function shareRow(samples: Samples, context: RowContext): Finding {
  const lower = context.direction !== 'higher';
  const test = signTest(distances(samples), { alternative: context.alternative });
  const side = lower ? turned(context.alternative) : context.alternative;
  const { value, interval } = shareOfPairs(samples, lower, side, context.level);
  const words = {
    estimator: 'share-beyond',
    label: shareLabel(samples, context),
    quantity: `share of participants whose score is the ${lower ? 'lower' : 'higher'}`,
    group: 'probabilities',
    sameUnit: false,
    nullValue: 0.5,
    reversed: lower,
    method:
      'Sign test (exact binomial, equal scores dropped); the share counts equal scores as half, interval by Clopper & Pearson 1934.',
  };
  return makeRow(samples, context, words, {
    estimate: value,
    reason: test.reason,
    p: test.p,
    pHow: 'exact binomial',
    interval: test.p === null ? null : interval,
    cautions: smallestSignP(test.nPositive + test.nNegative, context),
  });
}
