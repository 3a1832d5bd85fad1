/** Effect sizes that several rows of one comparison share: found once for a pair of samples, not once a row. */
import { differences } from '../numerics/scores.ts';
import { pairedEffects, robustEffect, robustPairedEffect, welchEffect } from './effects.ts';
import type { RowContext } from './estimators.ts';
import type { EffectSize } from './finding.ts';
import type { Samples } from './samples.ts';

const known = new WeakMap<Samples, Map<string, readonly EffectSize[]>>();

/** What was found before for the same samples and settings, else what `find` gives. */
function once(name: string, samples: Samples, context: RowContext, find: () => readonly EffectSize[]): EffectSize[] {
  const key = [name, context.trim, context.level, context.resamples, context.seed].join(' ');
  const own = known.get(samples) ?? new Map<string, readonly EffectSize[]>();
  known.set(samples, own);
  const found = own.get(key) ?? find();
  own.set(key, found);
  return [...found];
}

/** Robust d of the differences at the row's trim. */
export function robustPaired(samples: Samples, context: RowContext): EffectSize[] {
  return once('robust pairs', samples, context, () => [
    robustPairedEffect(differences(samples.x, samples.y), context.trim, context),
  ]);
}

/** Robust d of two groups at the row's trim. */
export function robustGroups(samples: Samples, context: RowContext): EffectSize[] {
  return once('robust groups', samples, context, () => [robustEffect(samples.x, samples.y, context.trim, context)]);
}

/** d by the average SD, and d_z. */
export function standardizedPairs(samples: Samples, context: RowContext): EffectSize[] {
  return once('pairs', samples, context, () => pairedEffects(samples.x, samples.y, context));
}

/** g by the average variance. */
export function standardizedGroups(samples: Samples, context: RowContext): EffectSize[] {
  return once('groups', samples, context, () => [welchEffect(samples.x, samples.y, context)]);
}
