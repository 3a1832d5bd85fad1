/** Rows of several conditions that every participant met, all participants together. */

import { repeatedMeasuresAnova } from '../numerics/anova/repeated-measures.ts';
import { trimmedRepeatedMeasuresAnova } from '../numerics/anova/trimmed-repeated-measures.ts';
import type { WithinEffect } from '../numerics/anova/within-effect.ts';
import { withinFactorsAnova } from '../numerics/anova/within-factors.ts';
import { friedmanTest } from '../numerics/friedman.ts';
import type { MauchlyTest } from '../numerics/mauchly.ts';
import { quadeTest } from '../numerics/quade.ts';
import type { RepeatedScores } from '../numerics/repeated.ts';
import { bootstrapLayout, explainedShare } from './explained-share.ts';
import type { EffectSize, Finding } from './finding.ts';
import { columnsOfAll, type Layout } from './layout.ts';
import {
  type LayoutShape,
  lessBiased,
  makeOmnibusRow,
  type OmnibusContext,
  type OmnibusNumbers,
  type OmnibusRow,
  partialEta,
} from './omnibus-row.ts';
import { friedmanShare, quadeShare, type ShareOfCounts } from './rank-shares.ts';
import { SHARE_WORDS } from './rows-omnibus-between.ts';

const onlyWithin = (shape: LayoutShape) => shape.within.length > 0 && shape.between.length === 0;
const oneWithin = (shape: LayoutShape) => onlyWithin(shape) && shape.within.length === 1 && (shape.within[0] ?? 0) > 2;
/** With a single comparison sphericity always holds: nothing is to be corrected (R6). */
const severalWithin = (shape: LayoutShape) => onlyWithin(shape) && degreesOf(shape) > 1;

function degreesOf(shape: LayoutShape): number {
  return shape.within.reduce((product, k) => product * (k - 1), 1);
}

export const OMNIBUS_WITHIN_ROWS: readonly OmnibusRow[] = [
  {
    id: 'repeated',
    name: 'means, df uncorrected',
    hint: 'analysis of variance; sphericity taken for granted',
    trims: false,
    fits: onlyWithin,
    run: (layout, context) => repeated(layout, context, 'none'),
  },
  {
    id: 'repeated-gg',
    name: 'means, df by Greenhouse\u2013Geisser',
    hint: 'analysis of variance, df corrected for sphericity',
    trims: false,
    fits: severalWithin,
    run: (layout, context) => repeated(layout, context, 'gg'),
  },
  {
    id: 'repeated-hf',
    name: 'means, df by Huynh\u2013Feldt',
    hint: 'analysis of variance, df corrected for sphericity',
    trims: false,
    fits: severalWithin,
    run: (layout, context) => repeated(layout, context, 'hf'),
  },
  {
    id: 'trimmed-repeated',
    name: 'trimmed means',
    hint: 'df corrected for sphericity',
    trims: true,
    fits: oneWithin,
    run: trimmedRepeated,
  },
  {
    id: 'friedman',
    name: 'ranks (Friedman)',
    hint: 'which condition tends to come out higher',
    trims: false,
    fits: oneWithin,
    run: friedman,
  },
  {
    id: 'quade',
    name: 'weighted ranks (Quade)',
    hint: 'participants with a wider range count more',
    trims: false,
    fits: oneWithin,
    run: quade,
  },
];

/** Which correction of the degrees of freedom a row uses. */
export type Sphericity = 'none' | 'gg' | 'hf';

const CORRECTED: Readonly<Record<Sphericity, string>> = {
  none: 'df uncorrected',
  gg: 'Greenhouse\u2013Geisser df',
  hf: 'Huynh\u2013Feldt df',
};

/** All participants as one group. */
function pooled(layout: Layout): Layout {
  return {
    between: [],
    within: layout.within,
    groups: [{ levels: [], scores: columnsOfAll(layout) }],
    left: layout.left,
  };
}

function aside(layout: Layout): string {
  const others = layout.between.map((each) => each.factor);
  return others.length === 0 ? '' : ` All participants together, whatever their ${others.join(' and ')}.`;
}

function effectOf(layout: Layout): { effect: WithinEffect; mauchly: MauchlyTest | null } {
  const columns = columnsOfAll(layout);
  if (layout.within.length === 1) {
    const effect = repeatedMeasuresAnova(columns);
    return { effect, mauchly: effect.mauchly };
  }
  const effects = withinFactorsAnova(
    columns,
    layout.within.map((each) => each.levels.length),
  );
  const last = effects.at(-1);
  if (last === undefined) throw new RangeError('*within* must hold a factor; got none');
  return { effect: last, mauchly: last.mauchly };
}

function repeated(layout: Layout, context: OmnibusContext, correction: Sphericity): Finding {
  const { effect, mauchly } = effectOf(layout);
  const id = correction === 'none' ? 'repeated' : `repeated-${correction}`;
  return makeOmnibusRow(
    layout,
    context,
    {
      estimator: id,
      label: `means, ${CORRECTED[correction]}`,
      share: 'partial \u03b7\u00b2',
      method: `Analysis of variance against the conditions' own interaction with participants. ${sphericityWords(effect, mauchly, correction)} Effect size: partial \u03b7\u00b2 with the noncentral F interval of Steiger 2004 at 1 \u2212 2 \u03b1 on the same df.${aside(layout)}`,
    },
    sphericNumbers(effect, correction, context),
  );
}

/** The numbers of a within effect under one correction. */
export function sphericNumbers(effect: WithinEffect, correction: Sphericity, context: OmnibusContext): OmnibusNumbers {
  const factor = epsilonOf(effect, correction);
  const scaled = (df: number | null) => (df === null || factor === null ? null : df * factor);
  const test = { F: factor === null ? null : effect.F, df1: scaled(effect.df1), df2: scaled(effect.df2) };
  const p = correction === 'none' ? effect.p : correction === 'gg' ? effect.pGg : effect.pHf;
  const reason =
    effect.reason ?? (factor === null ? 'too few participants to estimate the sphericity factor' : undefined);
  const total = effect.df1 === null || effect.df2 === null ? 0 : effect.df1 + effect.df2 + 1;
  const departs = correction === 'none' && effect.ggEpsilon !== null && effect.ggEpsilon < 0.75;
  return {
    statistic: test.F === null ? null : { name: 'F', value: test.F },
    df: test.df1,
    df2: test.df2,
    p,
    pHow: 'F distribution',
    share: { ...partialEta(test, context.alpha, reason) },
    level: 1 - 2 * context.alpha,
    others: lessBiased({ F: effect.F, df1: effect.df1, df2: effect.df2 }, total).map((each): EffectSize => each),
    reason,
    cautions: departs ? ['EPS'] : [],
  };
}

function epsilonOf(effect: WithinEffect, correction: Sphericity): number | null {
  if (correction === 'none') return effect.F === null ? null : 1;
  if (correction === 'gg') return effect.ggEpsilon;
  return effect.hfEpsilon === null || effect.hfEpsilon <= 0 ? null : Math.min(1, effect.hfEpsilon);
}

/** Which epsilon the row uses, and what Mauchly's test gives (never for a single comparison, R6). */
export function sphericityWords(effect: WithinEffect, mauchly: MauchlyTest | null, correction: Sphericity): string {
  if (effect.df1 === null || effect.ggEpsilon === null) return '';
  if (effect.lbEpsilon === 1) return 'There is a single comparison, so that sphericity holds by itself.';
  const hf = effect.hfEpsilon === null ? '' : `, by Huynh & Feldt 1976 (Lecoutre 1991) ${effect.hfEpsilon.toFixed(3)}`;
  const used: Readonly<Record<Sphericity, string>> = {
    none: 'The df are not corrected: sphericity is taken for granted.',
    gg: `The df are multiplied by the \u03b5 of Greenhouse & Geisser 1959, ${effect.ggEpsilon.toFixed(3)}.`,
    hf: 'The df are multiplied by the \u03b5 of Huynh & Feldt 1976 in the form of Lecoutre 1991, at most 1.',
  };
  const w = mauchly?.W ?? null;
  const test =
    w === null || mauchly?.p == null
      ? ''
      : ` Mauchly's W = ${w.toFixed(3)}, p = ${mauchly.p.toFixed(3)}, is shown for information and chooses nothing.`;
  return `${used[correction]} Estimated \u03b5: ${effect.ggEpsilon.toFixed(3)} by Greenhouse & Geisser${hf}.${test}`;
}

function trimmedRepeated(layout: Layout, context: OmnibusContext): Finding {
  const test = trimmedRepeatedMeasuresAnova(columnsOfAll(layout), { trim: context.trim });
  const epsilon =
    test.epsilonTilde === null
      ? ''
      : ` \u03b5\u0302 = ${(test.epsilonHat ?? 1).toFixed(3)}, corrected for its bias ${Math.min(1, test.epsilonTilde).toFixed(3)}, multiplies the df.`;
  return makeOmnibusRow(
    layout,
    context,
    {
      estimator: 'trimmed-repeated',
      label: `${context.trim} % trimmed means, df corrected`,
      share: context.trim === 0 ? 'share of variance' : 'robust share of variance',
      method: `Wilcox 2012, 8.2: each condition ${context.trim} % trimmed at each end, error from the winsorized scores.${epsilon} ${SHARE_WORDS}${aside(layout)}`,
    },
    {
      statistic: test.F === null ? null : { name: 'F', value: test.F },
      df: test.df1,
      df2: test.df2,
      p: test.p,
      pHow: 'F distribution',
      reason: test.reason,
      share: explainedShare(pooled(layout), context),
      level: 1 - context.alpha,
    },
  );
}

function friedman(layout: Layout, context: OmnibusContext): Finding {
  const test = friedmanTest(columnsOfAll(layout));
  return makeOmnibusRow(
    layout,
    context,
    {
      estimator: 'friedman',
      label: 'ranks within participants, Friedman',
      share: 'agreement (Kendall W)',
      method: `Friedman 1937: chi-square of the rank sums within participants, corrected for ties. Effect size: Kendall's coefficient of agreement W = chi-square / (n (k \u2212 1)), 0 to 1; percentile bootstrap over participants.${aside(layout)}`,
    },
    {
      statistic: test.chi2 === null ? null : { name: '\u03c7\u00b2', value: test.chi2 },
      df: test.df,
      df2: null,
      p: test.p,
      pHow: 'chi-square approximation',
      reason: test.reason,
      share: agreement(layout, context, 'Kendall W', friedmanShare),
      level: 1 - context.alpha,
      cautions: ['R15'],
    },
  );
}

function quade(layout: Layout, context: OmnibusContext): Finding {
  const test = quadeTest(columnsOfAll(layout));
  return makeOmnibusRow(
    layout,
    context,
    {
      estimator: 'quade',
      label: 'weighted ranks, Quade',
      share: 'weighted agreement',
      method: `Quade 1979: ranks within participants, each participant weighted by the rank of the range of their scores. Effect size: Kendall\u2019s W of the ranks with those weights, 0 to 1; percentile bootstrap over participants.${aside(layout)}`,
    },
    {
      statistic: test.F === null ? null : { name: 'F', value: test.F },
      df: test.df1,
      df2: test.df2,
      p: test.p,
      pHow: 'F distribution',
      reason: test.reason,
      share: agreement(layout, context, 'weighted agreement', quadeShare),
      level: 1 - context.alpha,
      cautions: ['R15'],
    },
  );
}

function agreement(
  layout: Layout,
  context: OmnibusContext,
  name: string,
  shareOf: (columns: RepeatedScores) => ShareOfCounts,
): EffectSize {
  const columns = columnsOfAll(layout);
  const how = `percentile bootstrap over participants, B = ${context.resamples}`;
  const read = shareOf(columns);
  const value = read([new Int32Array(columns[0]?.length ?? 0).fill(1)]);
  if (value === null) return { name, value, interval: null, how, reason: 'not defined for these scores' };
  return { name, value, how, ...bootstrapLayout(pooled(layout), context, read) };
}
