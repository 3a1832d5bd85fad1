/** Rows of two independent groups on ranks and ratios. */
import { brunnerMunzel } from '../numerics/brunner-munzel.ts';
import { hodgesLehmannShift } from '../numerics/hodges-lehmann.ts';
import { mannWhitney } from '../numerics/mann-whitney.ts';
import { welchT } from '../numerics/welch.ts';
import type { Estimator, RowContext } from './estimators.ts';
import type { Finding } from './finding.ts';
import { filled, fromT, makeRow, pMethod, smallestSplitP, turned } from './row.ts';
import type { Samples } from './samples.ts';
import { superiority } from './superiority.ts';

const between = { scope: 'between', trims: false, sameUnit: true, closedForm: true } as const;

export const BETWEEN_RANK_ROWS: readonly Estimator[] = [
  { ...between, id: 'rank-sum', untrimmed: 'rank-sum', name: 'Hodges\u2013Lehmann shift', run: filled(rankSum) },
  {
    ...between,
    id: 'brunner-munzel',
    untrimmed: 'brunner-munzel',
    name: 'probability of being lower or higher',
    sameUnit: false,
    run: filled(brunner),
  },
  {
    ...between,
    id: 'group-ratio',
    untrimmed: 'group-ratio',
    name: 'ratio of geometric means',
    sameUnit: false,
    run: filled(groupRatio),
  },
];

function rankSum(samples: Samples, context: RowContext): Finding {
  const { x, y } = samples;
  const test = mannWhitney(x, y, { alternative: context.alternative });
  const located = hodgesLehmannShift(x, y, context);
  return makeRow(
    samples,
    context,
    {
      estimator: 'rank-sum',
      label: 'Hodges\u2013Lehmann shift, Mann\u2013Whitney',
      quantity: 'shift between two distributions of one shape',
      group: 'shifts',
      method: `Hodges & Lehmann 1963: median of all differences between the groups, interval from their order at the rank-sum quantile (${located.how}); test of Mann & Whitney 1947, ${pMethod(test.method)}.`,
    },
    {
      estimate: located.estimate,
      reason: test.reason ?? located.reason,
      statistic: { name: 'U', value: test.U },
      p: test.p,
      pHow: pMethod(test.method),
      interval: test.p === null ? null : located.interval,
      effects: [superiority(samples, context)],
      cautions: ['R15', ...smallestSplitP(samples, context)],
    },
  );
}

function brunner(samples: Samples, context: RowContext): Finding {
  const lower = context.direction !== 'higher';
  // P(X < Y) grows as the first condition shrinks; for "higher" the two change places.
  const [a, b] = lower ? [samples.x, samples.y] : [samples.y, samples.x];
  // brunnerMunzel's "greater" means that its first argument is larger, and pHat is P(first < second).
  const alternative = lower ? context.alternative : turned(context.alternative);
  const test = brunnerMunzel(a, b, { alternative, level: context.level });
  return makeRow(
    samples,
    context,
    {
      estimator: 'brunner-munzel',
      label: `P(${context.first} ${lower ? 'lower' : 'higher'}), Brunner\u2013Munzel`,
      quantity: `probability that a ${context.first} score is the ${lower ? 'lower' : 'higher'}, equal scores as half`,
      group: 'probabilities',
      sameUnit: false,
      nullValue: 0.5,
      reversed: lower,
      method:
        'Brunner & Munzel 2000: ranks with unequal spreads and ties, t with estimated df; the interval is cut at 0 and 1.',
    },
    {
      estimate: test.pHat,
      reason: test.reason,
      se: test.se,
      df: test.df,
      statistic: test.statistic === null ? null : { name: 'W', value: test.statistic },
      p: test.p,
      pHow: 't distribution',
      interval: test.interval === null ? null : [clip(test.interval[0]), clip(test.interval[1])],
    },
  );
}

function groupRatio(samples: Samples, context: RowContext): Finding {
  const words = {
    estimator: 'group-ratio',
    label: 'ratio of geometric means',
    quantity: 'typical proportion',
    group: 'ratios',
    sameUnit: false,
    nullValue: 1,
    method: "Welch's t test of log scores, turned back: a ratio of geometric means with its interval.",
  };
  const nonPositive = [...samples.x, ...samples.y].filter((value) => value <= 0).length;
  if (nonPositive > 0) {
    const reason = `${nonPositive} scores are zero or negative and have no logarithm`;
    return makeRow(samples, context, words, {
      estimate: null,
      reason,
      pHow: 't distribution of logs',
      cautions: ['R5'],
    });
  }
  const test = welchT(samples.x.map(Math.log), samples.y.map(Math.log), context);
  const back = (value: number | null) => (value === null ? null : Math.exp(value));
  return makeRow(samples, context, words, {
    ...fromT(test),
    estimate: back(test.estimate),
    se: null,
    interval: test.interval === null ? null : [back(test.interval[0]), back(test.interval[1])],
    pHow: 't distribution of logs',
  });
}

function clip(value: number | null): number | null {
  return value === null ? null : Math.min(1, Math.max(0, value));
}
