/** The rows of a comparison between participants: two independent groups. */
import { bootstrapTwoGroups } from '../numerics/bootstrap.ts';
import { brunnerMunzel } from '../numerics/brunner-munzel.ts';
import { probabilityOfSuperiority } from '../numerics/effect-size/probability-of-superiority.ts';
import { hodgesLehmannShift } from '../numerics/hodges-lehmann.ts';
import { mannWhitney } from '../numerics/mann-whitney.ts';
import { standardDeviation } from '../numerics/moments.ts';
import { studentT } from '../numerics/student.ts';
import { welchT } from '../numerics/welch.ts';
import { yuenWelch } from '../numerics/yuen.ts';
import { robustEffect, studentEffect, welchEffect } from './effects.ts';
import type { Estimator, RowContext } from './estimators.ts';
import type { EffectSize, Finding } from './finding.ts';
import { fromT, makeRow, turned } from './row.ts';
import { bootOptions, fromBootstrap, pMethod } from './rows-within.ts';
import type { Samples } from './samples.ts';

const between = {
  scope: 'between',
  trims: false,
  sameUnit: true,
  closedForm: true,
} as const;

export const BETWEEN_ROWS: readonly Estimator[] = [
  { ...between, id: 'student', untrimmed: 'student', name: 'difference of means (Student)', run: filled(student) },
  { ...between, id: 'welch', untrimmed: 'welch', name: 'difference of means (Welch)', run: filled(welch) },
  {
    ...between,
    id: 'yuen-welch',
    untrimmed: 'welch',
    name: 'difference of trimmed means',
    trims: true,
    run: filled(yuen),
  },
  {
    ...between,
    id: 'winsorized-groups',
    untrimmed: 'winsorized-groups',
    name: 'difference of winsorized means',
    trims: true,
    closedForm: false,
    run: filled(winsorizedGroups),
  },
  {
    ...between,
    id: 'median-groups',
    untrimmed: 'median-groups',
    name: 'difference of medians',
    closedForm: false,
    run: filled(medianGroups),
  },
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

/** Runs a row only where both groups have someone. */
function filled(run: Estimator['run']): Estimator['run'] {
  return (samples, context) => {
    if (samples.x.length > 0 && samples.y.length > 0) return run(samples, context);
    const empty = samples.x.length === 0 ? samples.first : samples.second;
    const words = { estimator: 'none', label: '', quantity: '', group: 'none', method: '' };
    return makeRow(samples, context, words, { estimate: null, reason: `nobody is left in ${empty}`, pHow: '' });
  };
}

function student(samples: Samples, context: RowContext): Finding {
  const { x, y } = samples;
  return makeRow(
    samples,
    context,
    {
      estimator: 'student',
      label: 'difference of means, Student t',
      quantity: 'difference of means',
      group: 'means',
      method:
        'Student 1908: pooled variance on n1 + n2 \u2212 2 df. Effect size: Hedges 1981, g with the noncentral t interval.',
    },
    { ...fromT(studentT(x, y, context)), effects: [studentEffect(x, y, context)], cautions: unequalSpread(samples) },
  );
}

function welch(samples: Samples, context: RowContext): Finding {
  const { x, y } = samples;
  return makeRow(
    samples,
    context,
    {
      estimator: 'welch',
      label: 'difference of means, Welch t',
      quantity: 'difference of means',
      group: 'means, separate variances',
      method:
        'Welch 1938: separate variances, Satterthwaite df. Effect size: g by the average variance (Bonett 2008), percentile bootstrap interval.',
    },
    { ...fromT(welchT(x, y, context)), effects: [welchEffect(x, y, context)], cautions: smallVariableGroup(samples) },
  );
}

function yuen(samples: Samples, context: RowContext): Finding {
  const { x, y } = samples;
  const test = yuenWelch(x, y, { ...context, trim: context.trim });
  return makeRow(
    samples,
    context,
    {
      estimator: 'yuen-welch',
      label: `difference of ${context.trim} % trimmed means, Yuen\u2013Welch`,
      quantity: 'difference between the typical scores',
      group: context.trim === 0 ? 'means, separate variances' : 'trimmed means',
      method: `Yuen 1974: ${context.trim} % trimmed at each end (g = ${test.g.join(' and ')}), winsorized variances, Satterthwaite df on h \u2212 1. Effect size: Algina, Keselman & Penfield 2005, percentile bootstrap interval.`,
    },
    {
      ...fromT(test),
      h: [test.h[0], test.h[1]],
      effects: [robustEffect(x, y, context.trim, context)],
      cautions: context.trim > 25 ? ['R3'] : [],
    },
  );
}

function winsorizedGroups(samples: Samples, context: RowContext): Finding {
  const { x, y } = samples;
  const test = bootstrapTwoGroups(x, y, 'winsorized-mean', { ...bootOptions(context), trim: context.trim });
  return makeRow(
    samples,
    context,
    {
      estimator: 'winsorized-groups',
      label: `difference of ${context.trim} % winsorized means, bootstrap`,
      quantity: 'difference with the tails pulled in',
      group: context.trim === 0 ? 'means' : 'winsorized means',
      method: `Percentile bootstrap with the winsorizing inside each resample (methods 3.2), ${context.resamples} resamples within each group, seed ${context.seed}. An ordinary t on winsorized scores is refused: its level is 23 to 29 % instead of 5 % (simulated).`,
    },
    {
      ...fromBootstrap(test, context),
      effects: [robustEffect(x, y, context.trim, context)],
      cautions: context.trim > 25 ? ['R3'] : [],
    },
  );
}

function medianGroups(samples: Samples, context: RowContext): Finding {
  const test = bootstrapTwoGroups(samples.x, samples.y, 'median', bootOptions(context));
  return makeRow(
    samples,
    context,
    {
      estimator: 'median-groups',
      label: 'difference of medians, bootstrap',
      quantity: 'difference between the middle scores',
      group: 'medians',
      method: `Percentile bootstrap of the difference of medians (Wilcox 2012, 5.4.2), ${context.resamples} resamples within each group, seed ${context.seed}.`,
    },
    { ...fromBootstrap(test, context), effects: [superiority(samples, context)] },
  );
}

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
      cautions: ['R15', ...smallestRankP(samples, context)],
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

function superiority(samples: Samples, context: RowContext): EffectSize {
  const lower = context.direction !== 'higher';
  const [a, b] = lower ? [samples.y, samples.x] : [samples.x, samples.y];
  const effect = probabilityOfSuperiority(a, b, { level: context.level });
  return {
    name: `P(${context.first} ${lower ? 'lower' : 'higher'})`,
    value: effect.value,
    interval: effect.interval,
    how: 'Cliff 1996',
    ...(effect.reason === undefined ? {} : { reason: effect.reason }),
  };
}

/** R18: unequal n and unequal spread together bias Student's test. */
function unequalSpread({ x, y }: Samples): string[] {
  if (x.length < 2 || y.length < 2) return [];
  const [sx, sy] = [standardDeviation(x), standardDeviation(y)];
  const ratio = Math.max(sx, sy) / Math.min(sx, sy);
  const sizes = Math.max(x.length, y.length) / Math.min(x.length, y.length);
  return ratio > 1.5 && sizes > 1.1 ? ['R18'] : [];
}

/** R24: Welch's test with fewer than 6 scores in the more variable group. */
function smallVariableGroup({ x, y }: Samples): string[] {
  if (x.length < 2 || y.length < 2) return [];
  const n = standardDeviation(x) > standardDeviation(y) ? x.length : y.length;
  return n < 6 ? ['R24'] : [];
}

function smallestRankP({ x, y }: Samples, context: RowContext): string[] {
  let splits = 1;
  for (let i = 1; i <= x.length && splits < 1e6; i++) splits = (splits * (y.length + i)) / i;
  return (context.alternative === 'two-sided' ? 2 : 1) / splits > 1 - context.level ? ['R25'] : [];
}

function clip(value: number | null): number | null {
  return value === null ? null : Math.min(1, Math.max(0, value));
}
