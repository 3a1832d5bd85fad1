/** Rows within participants on signed ranks, ratios and signs. */
import { hodgesLehmannPaired } from '../numerics/hodges-lehmann.ts';
import { oneSampleT } from '../numerics/one-sample-t.ts';
import { differences } from '../numerics/scores.ts';
import { signTest } from '../numerics/sign-test.ts';
import { signedRankTest } from '../numerics/wilcoxon.ts';
import type { Estimator, RowContext } from './estimators.ts';
import type { Finding } from './finding.ts';
import { pairsEffect, shareOfPairs } from './pairs-share.ts';
import { fromT, makeRow, nobody, pMethod, smallestSignP, turned } from './row.ts';
import type { Samples } from './samples.ts';

const within = { scope: 'within', trims: false, sameUnit: true, closedForm: true } as const;

export const WITHIN_RANK_ROWS: readonly Estimator[] = [
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

function countNonPositive(values: Float64Array): number {
  let count = 0;
  for (const value of values) if (value <= 0) count++;
  return count;
}
