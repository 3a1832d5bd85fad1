/** Rows of two conditions whose p and interval come from resampling or relabelling: bootstrap-t, BCa, permutation. */
import { bootstrapOneSample, bootstrapTwoGroups } from '../numerics/bootstrap.ts';
import { pairedT } from '../numerics/one-sample-t.ts';
import { differences } from '../numerics/scores.ts';
import { trimmedMeanTest } from '../numerics/trimmed-mean.ts';
import { welchT } from '../numerics/welch.ts';
import { yuenWelch } from '../numerics/yuen.ts';
import { robustGroups, robustPaired, standardizedGroups, standardizedPairs } from './effects-once.ts';
import type { Estimator, RowContext } from './estimators.ts';
import type { Finding } from './finding.ts';
import {
  bootOptions,
  fewForBootstrap,
  filled,
  fromT,
  makeRow,
  nobody,
  smallestSignP,
  smallestSplitP,
  trimCautions,
} from './row.ts';
import type { Samples } from './samples.ts';
import { signFlipTest, splitTest } from './typical-values.ts';

/** Scores below which BCa's jackknife is not to be trusted (methods R17). */
const LEAST_FOR_BCA = 20;

const shared = { sameUnit: true, closedForm: false } as const;

export const WITHIN_RESAMPLED_ROWS: readonly Estimator[] = [
  {
    ...shared,
    scope: 'within',
    id: 'trimmed-differences-boot-t',
    untrimmed: 'trimmed-differences-boot-t',
    name: 'trimmed mean of differences (bootstrap-t)',
    trims: true,
    run: differencesBootstrapT,
  },
  {
    ...shared,
    scope: 'within',
    id: 'trimmed-differences-bca',
    untrimmed: 'trimmed-differences-bca',
    name: 'trimmed mean of differences (BCa)',
    trims: true,
    run: differencesBca,
  },
  {
    ...shared,
    scope: 'within',
    id: 'permutation-differences',
    untrimmed: 'permutation-differences',
    name: 'mean of differences (permutation)',
    trims: false,
    run: permutedDifferences,
  },
];

export const BETWEEN_RESAMPLED_ROWS: readonly Estimator[] = [
  {
    ...shared,
    scope: 'between',
    id: 'yuen-boot-t',
    untrimmed: 'yuen-boot-t',
    name: 'difference of trimmed means (bootstrap-t)',
    trims: true,
    run: filled(groupsBootstrapT),
  },
  {
    ...shared,
    scope: 'between',
    id: 'yuen-bca',
    untrimmed: 'yuen-bca',
    name: 'difference of trimmed means (BCa)',
    trims: true,
    run: filled(groupsBca),
  },
  {
    ...shared,
    scope: 'between',
    id: 'permutation-groups',
    untrimmed: 'permutation-groups',
    name: 'difference of means (permutation)',
    trims: false,
    run: filled(permutedGroups),
  },
];

function drawn(context: RowContext): string {
  return `${context.resamples} resamples of participants, seed ${context.seed}`;
}

function differencesBootstrapT(samples: Samples, context: RowContext): Finding {
  const words = { label: `${context.trim} % trimmed mean of differences, bootstrap-t`, group: trimmedGroup(context) };
  if (samples.x.length === 0) return nobody(samples, context, 'trimmed-differences-boot-t', words.label, words.group);
  const d = differences(samples.x, samples.y);
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
      estimator: 'trimmed-differences-boot-t',
      ...words,
      quantity: 'typical change',
      method: `Bootstrap-t (Hall 1988; Wilcox 2012, 4.4): |t| of resampled differences about their trimmed mean gives the critical value, ${drawn(context)}; symmetric, SE of Tukey & McLaughlin 1963.`,
    },
    {
      ...fromT(test),
      df: null,
      p: boot.p,
      pHow: `bootstrap-t, B = ${context.resamples}`,
      interval: boot.interval,
      reason: test.reason ?? boot.reason,
      h: [test.h, test.h],
      effects: robustPaired(samples, context),
      cautions: [...trimCautions(context), ...fewForBootstrap(d)],
    },
  );
}

function differencesBca(samples: Samples, context: RowContext): Finding {
  const words = { label: `${context.trim} % trimmed mean of differences, BCa`, group: trimmedGroup(context) };
  if (samples.x.length === 0) return nobody(samples, context, 'trimmed-differences-bca', words.label, words.group);
  const d = differences(samples.x, samples.y);
  const test = trimmedMeanTest(d, { ...context, trim: context.trim });
  const numbers = bcaNumbers(d.length, context, () =>
    bootstrapOneSample(d, 'trimmed-mean', { ...bootOptions(context), trim: context.trim, method: 'bca' }),
  );
  return makeRow(
    samples,
    context,
    {
      estimator: 'trimmed-differences-bca',
      ...words,
      quantity: 'typical change',
      method: `BCa bootstrap (Efron 1987): percentile limits moved for bias and acceleration, ${drawn(context)}; from ${LEAST_FOR_BCA} participants on.`,
    },
    {
      ...numbers,
      estimate: test.estimate,
      h: [test.h, test.h],
      effects: robustPaired(samples, context),
      cautions: [...trimCautions(context), ...(d.length < LEAST_FOR_BCA ? ['R17'] : [])],
    },
  );
}

function bcaNumbers(least: number, context: RowContext, run: () => ReturnType<typeof bootstrapOneSample>) {
  const pHow = `BCa bootstrap, B = ${context.resamples}`;
  if (least < LEAST_FOR_BCA)
    return { pHow, reason: `BCa is given from ${LEAST_FOR_BCA} scores under each condition on` };
  const { se, p, interval, reason } = run();
  return { pHow, se, p, interval, reason };
}

function permutedDifferences(samples: Samples, context: RowContext): Finding {
  const label = 'mean of differences, permutation';
  if (samples.x.length === 0) return nobody(samples, context, 'permutation-differences', label, 'means');
  const d = differences(samples.x, samples.y);
  const test = pairedT(samples.x, samples.y, context);
  const permuted = signFlipTest(d, context);
  return makeRow(
    samples,
    context,
    {
      estimator: 'permutation-differences',
      label,
      quantity: 'mean change',
      group: 'means',
      method: `Fisher 1935: the two conditions exchanged within participants, ${permuted.how}; the interval holds the means the test does not reject, from the means of subsets of participants (Hartigan 1969). If nothing is going on the two scores of a participant are interchangeable.`,
    },
    {
      ...fromT(test),
      df: null,
      p: test.p === null ? null : permuted.p,
      pHow: permuted.how,
      interval: test.p === null ? null : permuted.interval,
      reason: test.reason ?? permuted.reason,
      effects: standardizedPairs(samples, context),
      cautions: smallestSignP(d.length, context),
    },
  );
}

function groupsBootstrapT(samples: Samples, context: RowContext): Finding {
  const { x, y } = samples;
  const test = yuenWelch(x, y, { ...context, trim: context.trim });
  const boot = bootstrapTwoGroups(x, y, 'trimmed-mean', {
    ...bootOptions(context),
    trim: context.trim,
    method: 't-symmetric',
  });
  return makeRow(
    samples,
    context,
    {
      estimator: 'yuen-boot-t',
      label: `${context.trim} % trimmed means, bootstrap-t`,
      quantity: 'difference between the typical scores',
      group: context.trim === 0 ? 'means, separate variances' : 'trimmed means',
      method: `Bootstrap-t (Hall 1988; Wilcox 2012, 5.3): |t| of groups resampled about their own trimmed means gives the critical value, ${drawn(context)}; symmetric, SE of Yuen 1974.`,
    },
    {
      ...fromT(test),
      df: null,
      p: boot.p,
      pHow: `bootstrap-t, B = ${context.resamples}`,
      interval: boot.interval,
      reason: test.reason ?? boot.reason,
      h: [test.h[0], test.h[1]],
      effects: robustGroups(samples, context),
      cautions: [...trimCautions(context), ...fewForBootstrap(x, y)],
    },
  );
}

function groupsBca(samples: Samples, context: RowContext): Finding {
  const { x, y } = samples;
  const least = Math.min(x.length, y.length);
  const test = yuenWelch(x, y, { ...context, trim: context.trim });
  const numbers = bcaNumbers(least, context, () =>
    bootstrapTwoGroups(x, y, 'trimmed-mean', { ...bootOptions(context), trim: context.trim, method: 'bca' }),
  );
  return makeRow(
    samples,
    context,
    {
      estimator: 'yuen-bca',
      label: `${context.trim} % trimmed means, BCa`,
      quantity: 'difference between the typical scores',
      group: context.trim === 0 ? 'means, separate variances' : 'trimmed means',
      method: `BCa bootstrap (Efron 1987): percentile limits moved for bias and acceleration, ${context.resamples} resamples within each group, seed ${context.seed}; from ${LEAST_FOR_BCA} participants a group on.`,
    },
    {
      ...numbers,
      estimate: test.estimate,
      h: [test.h[0], test.h[1]],
      effects: robustGroups(samples, context),
      cautions: [...trimCautions(context), ...(least < LEAST_FOR_BCA ? ['R17'] : [])],
    },
  );
}

function permutedGroups(samples: Samples, context: RowContext): Finding {
  const { x, y } = samples;
  const test = welchT(x, y, context);
  const permuted = test.p === null ? null : splitTest(x, y, context);
  return makeRow(
    samples,
    context,
    {
      estimator: 'permutation-groups',
      label: 'means, permutation',
      quantity: 'difference of means',
      group: 'means, separate variances',
      method: `Pitman 1937: participants relabelled between the groups, ${permuted?.how ?? 'not done'}; drawn relabellings by Welch's t (Janssen 1997), (b + 1) / (B + 1). If nothing is going on scores are interchangeable between the groups.`,
    },
    {
      ...fromT(test),
      df: null,
      p: permuted?.p ?? null,
      pHow: permuted?.how ?? '',
      interval: permuted?.interval ?? null,
      reason: test.reason ?? permuted?.reason,
      effects: standardizedGroups(samples, context),
      cautions: smallestSplitP(samples, context),
    },
  );
}

function trimmedGroup(context: RowContext): string {
  return context.trim === 0 ? 'means' : 'trimmed means';
}
