/** Rows that keep every between factor of the design in the analysis: factorial and Welch-James. */
import { factorialAnova } from '../numerics/anova/factorial.ts';
import { trimCount } from '../numerics/scores.ts';
import { welchJames } from '../numerics/welch-james.ts';
import { explainedShare } from './explained-share.ts';
import type { Finding } from './finding.ts';
import { type Layout, peopleIn } from './layout.ts';
import {
  type LayoutShape,
  lessBiased,
  makeOmnibusRow,
  type OmnibusContext,
  type OmnibusRow,
  partialEta,
} from './omnibus-row.ts';
import { SHARE_WORDS, unequalSpreads } from './rows-omnibus-between.ts';

const betweenFactors = (shape: LayoutShape) => shape.between.length + shape.otherBetween;
const factorial = (shape: LayoutShape) => shape.within.length === 0 && betweenFactors(shape) > 1;
/** Types II and III differ only where a larger interaction contains the effect. */
const containedFactorial = (shape: LayoutShape) => factorial(shape) && shape.otherBetween > 0;
const johansen = (shape: LayoutShape) => factorial(shape) || shape.within.length > 0;

export const FACTORIAL_ROWS: readonly OmnibusRow[] = [
  {
    id: 'factorial-2',
    name: 'means, type II',
    hint: 'factorial analysis of variance; given the other main effects',
    trims: false,
    fits: containedFactorial,
    run: (layout, context) => factorialRow(layout, context, 2),
  },
  {
    id: 'factorial-3',
    name: 'means, type III',
    hint: 'factorial analysis of variance; every cell alike',
    trims: false,
    fits: factorial,
    run: (layout, context) => factorialRow(layout, context, 3),
  },
  {
    id: 'welch-james',
    name: 'means (Welch\u2013James)',
    hint: 'own spreads and covariances in every group',
    trims: false,
    fits: johansen,
    run: (layout, context) => welchJamesRow(layout, context, 'welch-james'),
  },
  {
    id: 'trimmed-welch-james',
    name: 'trimmed means (Welch\u2013James)',
    hint: 'own spreads and covariances in every group',
    trims: true,
    fits: johansen,
    run: (layout, context) => welchJamesRow(layout, context, 'trimmed-welch-james'),
  },
];

function factorialRow(layout: Layout, context: OmnibusContext, type: 2 | 3): Finding {
  const cells = layout.groups.map((group) => group.scores[0] as Float64Array);
  const asked = layout.between.flatMap((each, place) => (each.inEffect ? [place] : []));
  const result = factorialAnova(
    cells,
    layout.between.map((each) => each.levels.length),
    type,
  );
  const effect = result.effects.find(
    ({ factors }) => factors.length === asked.length && asked.every((place) => factors.includes(place)),
  );
  const test = effect ?? { F: null, df1: null, df2: null, p: null };
  const reason = effect?.reason ?? result.reason;
  const agree = asked.length === layout.between.length;
  return makeOmnibusRow(
    layout,
    context,
    {
      estimator: `factorial-${type}`,
      label: agree ? 'means, factorial, types II and III' : `means, factorial, type ${type === 2 ? 'II' : 'III'}`,
      share: 'partial \u03b7\u00b2',
      method: `Analysis of variance of ${layout.between.map((each) => each.factor).join(' by ')} with all interactions, one spread for all groups (Yates 1934). ${typeWords(type, agree)} Effect size: partial \u03b7\u00b2 with the noncentral F interval of Steiger 2004 at 1 \u2212 2 \u03b1.`,
    },
    {
      statistic: test.F === null ? null : { name: 'F', value: test.F },
      df: test.df1,
      df2: test.df2,
      p: test.p,
      pHow: 'F distribution',
      reason,
      share: partialEta(test, context.alpha, reason),
      level: 1 - 2 * context.alpha,
      others: lessBiased(test, peopleIn(layout)),
      cautions: unequalSpreads(cells),
    },
  );
}

function typeWords(type: 2 | 3, agree: boolean): string {
  if (agree) return 'Sums of squares of types II and III agree for the largest interaction.';
  return type === 2
    ? 'Sums of squares of type II: what the effect adds to all effects that do not contain it; groups weigh by their n.'
    : 'Sums of squares of type III: what the effect adds to all others, with effects that add up to 0; every group weighs alike.';
}

function welchJamesRow(layout: Layout, context: OmnibusContext, estimator: string): Finding {
  const test = welchJames(
    layout.groups.map((group) => group.scores),
    {
      between: layout.between.map((each) => each.levels.length),
      within: layout.within.map((each) => each.levels.length),
    },
    { between: layout.between.map((each) => each.inEffect), within: layout.within.map(() => true) },
    { trim: context.trim },
  );
  const trims = context.trim > 0;
  return makeOmnibusRow(
    layout,
    context,
    {
      estimator,
      label: `${trims ? `${context.trim} % trimmed means` : 'means'}, Welch\u2013James`,
      share: trims ? 'robust share of variance' : 'share of variance',
      method: `Johansen 1980 (Keselman, Wilcox & Lix 2003): the cells' ${trims ? `${context.trim} % trimmed ` : ''}means with ${trims ? 'winsorized ' : ''}covariances of each group's own, every cell alike, no spread or sphericity taken as equal; F with estimated df. ${SHARE_WORDS}`,
    },
    {
      statistic: test.F === null ? null : { name: 'F', value: test.F },
      df: test.df1,
      df2: test.df2,
      p: test.p,
      pHow: 'F distribution',
      reason: test.reason,
      share: explainedShare(layout, context),
      level: 1 - context.alpha,
      cautions: smallGroups(layout, context.trim),
    },
  );
}

/** WJN: too few scores kept in a group for its covariances (from memory: three for each comparison within participants). */
function smallGroups(layout: Layout, trim: number): string[] {
  const comparisons = layout.within.reduce((product, each) => product * each.levels.length, 1) - 1;
  const least = Math.min(...layout.groups.map((group) => kept(group.scores[0]?.length ?? 0, trim)));
  return comparisons > 0 && least < 3 * comparisons ? ['WJN'] : [];
}

function kept(n: number, trim: number): number {
  return n - 2 * trimCount(n, trim);
}
