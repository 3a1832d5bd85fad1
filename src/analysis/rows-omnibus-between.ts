/** Rows of several independent groups that leave other between factors out of account. */
import { brownForsytheF } from '../numerics/anova/brown-forsythe.ts';
import { oneWayAnova } from '../numerics/anova/one-way.ts';
import { kruskalWallis } from '../numerics/kruskal-wallis.ts';
import { standardDeviation } from '../numerics/moments.ts';
import { welchAnova } from '../numerics/welch-anova.ts';
import { bootstrapLayout, explainedShare } from './explained-share.ts';
import type { Finding } from './finding.ts';
import { groupsOfLevels, type Layout } from './layout.ts';
import {
  type LayoutShape,
  lessBiased,
  makeOmnibusRow,
  type OmnibusContext,
  type OmnibusRow,
  partialEta,
} from './omnibus-row.ts';
import { kruskalShare } from './rank-shares.ts';

const oneBetween = (shape: LayoutShape) => shape.between.length === 1 && shape.within.length === 0;

export const OMNIBUS_BETWEEN_ROWS: readonly OmnibusRow[] = [
  { id: 'anova', name: 'means', hint: 'analysis of variance, one spread', trims: false, fits: oneBetween, run: anova },
  {
    id: 'welch-anova',
    name: 'means (Welch)',
    hint: 'each group\u2019s own spread',
    trims: false,
    fits: oneBetween,
    run: welch,
  },
  {
    id: 'brown-forsythe',
    name: 'means (Brown\u2013Forsythe)',
    hint: 'each group\u2019s own spread, F*',
    trims: false,
    fits: oneBetween,
    run: brownForsythe,
  },
  {
    id: 'trimmed-anova',
    name: 'trimmed means',
    hint: 'each group\u2019s own spread',
    trims: true,
    fits: oneBetween,
    run: trimmed,
  },
  {
    id: 'kruskal-wallis',
    name: 'ranks (Kruskal\u2013Wallis)',
    hint: 'which group tends to score higher',
    trims: false,
    fits: oneBetween,
    run: kruskal,
  },
];

/** The layout as groups of the one factor asked about, other between factors put together. */
function pooled(layout: Layout): Layout {
  const factor = layout.between.filter((each) => each.inEffect);
  const groups = groupsOfLevels(layout).map((scores, code) => ({ levels: [code], scores: [scores] }));
  return { between: factor, within: [], groups, left: layout.left };
}

/** How the row reads where the design has other groups: they are left out of account. */
function aside(layout: Layout): string {
  const others = layout.between.filter((each) => !each.inEffect).map((each) => each.factor);
  return others.length === 0 ? '' : ` Scores are put together over ${others.join(' and ')}.`;
}

const fNumbers = (test: {
  F: number | null;
  df1: number | null;
  df2: number | null;
  p: number | null;
  reason?: string;
}) => ({
  statistic: test.F === null ? null : { name: 'F', value: test.F },
  df: test.df1,
  df2: test.df2,
  p: test.p,
  pHow: 'F distribution',
  reason: test.reason,
});

function anova(layout: Layout, context: OmnibusContext): Finding {
  const test = oneWayAnova(groupsOfLevels(layout));
  const total = groupsOfLevels(layout).reduce((n, scores) => n + scores.length, 0);
  return makeOmnibusRow(
    layout,
    context,
    {
      estimator: 'anova',
      label: 'means, analysis of variance',
      share: 'partial \u03b7\u00b2',
      method: `Fisher 1925: between-groups over within-groups mean square, one spread for all groups. Effect size: \u03b7\u00b2 with the noncentral F interval of Steiger 2004 at 1 \u2212 2 \u03b1, whose lower limit is above 0 exactly when p is below \u03b1.${aside(layout)}`,
    },
    {
      ...fNumbers(test),
      share: partialEta(test, context.alpha, test.reason),
      level: 1 - 2 * context.alpha,
      others: lessBiased(test, total),
      cautions: unequalSpreads(groupsOfLevels(layout)),
    },
  );
}

function welch(layout: Layout, context: OmnibusContext): Finding {
  const own = pooled(layout);
  return makeOmnibusRow(
    layout,
    context,
    {
      estimator: 'welch-anova',
      label: 'means, Welch F',
      share: 'share of variance',
      method: `Welch 1951: groups weighted by n over their own variance, estimated df. ${SHARE_WORDS}${aside(layout)}`,
    },
    {
      ...fNumbers(welchAnova(groupsOfLevels(layout))),
      share: explainedShare(own, context),
      level: 1 - context.alpha,
      cautions: smallVariableGroup(groupsOfLevels(layout)),
    },
  );
}

function brownForsythe(layout: Layout, context: OmnibusContext): Finding {
  return makeOmnibusRow(
    layout,
    context,
    {
      estimator: 'brown-forsythe',
      label: 'means, Brown\u2013Forsythe F*',
      share: 'share of variance',
      method: `Brown & Forsythe 1974: F* with the groups' own variances weighted by 1 \u2212 n / N, numerator df k \u2212 1, denominator df by Satterthwaite. ${SHARE_WORDS}${aside(layout)}`,
    },
    {
      ...fNumbers(brownForsytheF(groupsOfLevels(layout))),
      share: explainedShare(pooled(layout), context),
      level: 1 - context.alpha,
    },
  );
}

function trimmed(layout: Layout, context: OmnibusContext): Finding {
  return makeOmnibusRow(
    layout,
    context,
    {
      estimator: 'trimmed-anova',
      label: `${context.trim} % trimmed means, Welch-type F`,
      share: context.trim === 0 ? 'share of variance' : 'robust share of variance',
      method: `Welch's test on trimmed means (Lix & Keselman 1998; Wilcox 2012, 7.1): ${context.trim} % trimmed at each end of each group, winsorized variances, weights h (h \u2212 1) / ((n \u2212 1) s\u00b2), estimated df. ${SHARE_WORDS}${aside(layout)}`,
    },
    {
      ...fNumbers(welchAnova(groupsOfLevels(layout), { trim: context.trim })),
      share: explainedShare(pooled(layout), context),
      level: 1 - context.alpha,
    },
  );
}

function kruskal(layout: Layout, context: OmnibusContext): Finding {
  const test = kruskalWallis(groupsOfLevels(layout));
  const own = pooled(layout);
  const interval =
    test.epsilon2 === null ? { interval: null } : bootstrapLayout(own, context, kruskalShare(groupsOfLevels(layout)));
  return makeOmnibusRow(
    layout,
    context,
    {
      estimator: 'kruskal-wallis',
      label: 'ranks, Kruskal\u2013Wallis',
      share: 'rank \u03b5\u00b2',
      method: `Kruskal & Wallis 1952: H of the mean ranks, corrected for ties, referred to chi-square. Effect size: \u03b5\u00b2 = H / (N \u2212 1) (Tomczak & Tomczak 2014), percentile bootstrap over participants.${aside(layout)}`,
    },
    {
      statistic: test.H === null ? null : { name: 'H', value: test.H },
      df: test.df,
      df2: null,
      p: test.p,
      pHow: 'chi-square approximation',
      reason: test.reason,
      share: {
        name: 'rank \u03b5\u00b2',
        value: test.epsilon2,
        how: `percentile bootstrap over participants, B = ${context.resamples}`,
        ...interval,
      },
      level: 1 - context.alpha,
      cautions: ['R15'],
    },
  );
}

/** What every row says of its share of variance. */
export const SHARE_WORDS =
  'Effect size: variance of the (trimmed) means over itself plus the winsorized variance rescaled to that of normal scores (after Wilcox & Tian 2011), every group alike; percentile bootstrap over participants, which cannot reach 0.';

/** Ratio of the largest to the smallest SD, and whether the larger spreads stand in the larger or the smaller groups. */
export function spreadOf(groups: readonly Float64Array[]): { ratio: number; withSize: number } | null {
  if (groups.some((scores) => scores.length < 2)) return null;
  const sds = groups.map((scores) => standardDeviation(scores));
  const [meanN, meanSd] = [average(groups.map((scores) => scores.length)), average(sds)];
  const withSize = groups.reduce((sum, scores, j) => sum + (scores.length - meanN) * ((sds[j] as number) - meanSd), 0);
  return { ratio: Math.max(...sds) / Math.min(...sds), withSize };
}

function average(values: readonly number[]): number {
  return values.reduce((sum, value) => sum + value, 0) / values.length;
}

/** R18: unequal n and unequal spread together bias the classical F. */
export function unequalSpreads(groups: readonly Float64Array[]): string[] {
  const spread = spreadOf(groups);
  const sizes = groups.map((scores) => scores.length);
  return spread !== null && spread.ratio > 1.5 && Math.max(...sizes) / Math.min(...sizes) > 1.1 ? ['R18'] : [];
}

/** R24: Welch's test with fewer than 6 scores in the most variable group. */
function smallVariableGroup(groups: readonly Float64Array[]): string[] {
  if (groups.some((scores) => scores.length < 2)) return [];
  const sds = groups.map((scores) => standardDeviation(scores));
  const most = groups[sds.indexOf(Math.max(...sds))];
  return most !== undefined && most.length < 6 ? ['R24'] : [];
}
