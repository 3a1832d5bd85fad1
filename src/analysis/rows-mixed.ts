/** Rows of the mixed analysis of variance: conditions within participants, who stand in groups. */
import { factorialAnova } from '../numerics/anova/factorial.ts';
import { mixedAnova } from '../numerics/anova/mixed.ts';
import { noWithinEffect, type WithinEffect, withinEffect } from '../numerics/anova/within-effect.ts';
import { largestSize } from '../numerics/inference.ts';
import { matrix } from '../numerics/matrix.ts';
import type { MauchlyTest } from '../numerics/mauchly.ts';
import { contrastScores, helmertContrasts, squaresAndProducts } from '../numerics/repeated.ts';
import type { Finding } from './finding.ts';
import type { Layout } from './layout.ts';
import { type LayoutShape, makeOmnibusRow, type OmnibusContext, type OmnibusRow } from './omnibus-row.ts';
import { type Sphericity, sphericityWords, sphericNumbers } from './rows-omnibus-within.ts';

const mixed = (shape: LayoutShape) => shape.within.length === 1 && shape.between.length + shape.otherBetween > 0;
const severalMixed = (shape: LayoutShape) => mixed(shape) && (shape.within[0] ?? 0) > 2;

export const MIXED_ROWS: readonly OmnibusRow[] = [
  {
    id: 'mixed',
    name: 'means, groups kept apart, df uncorrected',
    hint: 'mixed analysis of variance; sphericity taken for granted',
    trims: false,
    fits: mixed,
    run: (layout, context) => mixedRow(layout, context, 'none'),
  },
  {
    id: 'mixed-gg',
    name: 'means, groups kept apart, df by Greenhouse\u2013Geisser',
    hint: 'mixed analysis of variance, df corrected for sphericity',
    trims: false,
    fits: severalMixed,
    run: (layout, context) => mixedRow(layout, context, 'gg'),
  },
  {
    id: 'mixed-hf',
    name: 'means, groups kept apart, df by Huynh\u2013Feldt',
    hint: 'mixed analysis of variance, df corrected for sphericity',
    trims: false,
    fits: severalMixed,
    run: (layout, context) => mixedRow(layout, context, 'hf'),
  },
];

/** The effect asked about, against its own interaction with participants within groups. */
export function mixedEffect(layout: Layout): { readonly effect: WithinEffect; readonly mauchly: MauchlyTest | null } {
  const groups = layout.groups.map((group) => group.scores);
  const anova = mixedAnova(groups);
  if (!layout.between.some((each) => each.inEffect)) return { effect: anova.within, mauchly: anova.mauchly };
  const effect = layout.between.length === 1 ? anova.interaction : crossedInteraction(layout);
  return { effect, mauchly: anova.mauchly };
}

/**
 * Interaction of the within factor with one of several between factors: type III sums of squares of every orthonormal
 * comparison of the levels, added up.
 */
function crossedInteraction(layout: Layout): WithinEffect {
  const groups = layout.groups.map((group) => group.scores);
  const empty = groups.findIndex(([first]) => first === undefined || first.length === 0);
  if (empty >= 0) return noWithinEffect(`group ${empty + 1} holds no participants`);
  const contrasts = helmertContrasts(groups[0]?.length ?? 0);
  const compared = groups.map((group) => contrastScores(group, contrasts));
  const levels = layout.between.map((each) => each.levels.length);
  const asked = layout.between.flatMap((each, place) => (each.inEffect ? [place] : []));
  let ssEffect = 0;
  for (let c = 0; c < contrasts.cols; c++) {
    const anova = factorialAnova(
      compared.map((own) => own[c] as Float64Array),
      levels,
      3,
    );
    const found = anova.effects.find(
      ({ factors }) => factors.length === asked.length && asked.every((place) => factors.includes(place)),
    );
    if (found?.ss == null) return noWithinEffect(found?.reason ?? anova.reason ?? 'not defined for these groups');
    ssEffect += found.ss;
  }
  const parts = compared.map(squaresAndProducts);
  const p = contrasts.cols;
  const products = matrix(
    p,
    p,
    Float64Array.from({ length: p * p }, (_, i) =>
      parts.reduce((sum, part) => sum + (part.products.data[i] as number), 0),
    ),
  );
  const dfError = groups.reduce((n, [first]) => n + (first?.length ?? 0) - 1, 0);
  const df = asked.reduce((product, place) => product * ((levels[place] as number) - 1), 1);
  return withinEffect(ssEffect, df, { products, dfError, size: largestSize(...groups.flat()) });
}

function mixedRow(layout: Layout, context: OmnibusContext, correction: Sphericity): Finding {
  const { effect, mauchly } = mixedEffect(layout);
  const groups = layout.between.map((each) => each.factor).join(' and ');
  const corrected = { none: 'df uncorrected', gg: 'Greenhouse\u2013Geisser df', hf: 'Huynh\u2013Feldt df' }[correction];
  return makeOmnibusRow(
    layout,
    context,
    {
      estimator: correction === 'none' ? 'mixed' : `mixed-${correction}`,
      label: `means, ${groups} kept apart, ${corrected}`,
      share: 'partial \u03b7\u00b2',
      method: `Mixed analysis of variance (Winer 1971): participants within ${groups}, error from the covariances pooled over groups; type III, every group alike. ${sphericityWords(effect, mauchly, correction)} Effect size: partial \u03b7\u00b2 with the noncentral F interval of Steiger 2004 at 1 \u2212 2 \u03b1 on the same df.`,
    },
    sphericNumbers(effect, correction, context),
  );
}
