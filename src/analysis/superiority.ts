import { probabilityOfSuperiority } from '../numerics/effect-size/probability-of-superiority.ts';
import type { RowContext } from './estimators.ts';
import type { EffectSize } from './finding.ts';
import type { Samples } from './samples.ts';

/** Probability that a score of the first group is the lower or the higher. */
export function superiority(samples: Samples, context: RowContext): EffectSize {
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
