import type { Limits, TestOptions, TTest } from './inference.ts';
import { requireScores } from './scores.ts';
import { welchT } from './welch.ts';

export type WelchTransform = 'log' | 'sqrt' | 'reciprocal';

export interface TransformedWelchOptions extends TestOptions {
  readonly transform: WelchTransform;
  /** Added to every score first (default 0). */
  readonly offset?: number;
}

export interface TransformedWelch extends TTest {
  /** The means on the transformed scale, transformed back, minus the offset. */
  readonly backTransformed: readonly [number, number] | null;
  /** Ratio of geometric means and its limits (log only). */
  readonly ratio: number | null;
  readonly ratioInterval: Limits | null;
}

const forward = { log: Math.log, sqrt: Math.sqrt, reciprocal: (value: number) => 1 / value };
const back = { log: Math.exp, sqrt: (value: number) => value * value, reciprocal: (value: number) => 1 / value };
const allowed = {
  log: (value: number) => value > 0,
  sqrt: (value: number) => value >= 0,
  reciprocal: (value: number) => value !== 0,
};
const refusal = { log: 'log of a score <= 0', sqrt: 'square root of a score < 0', reciprocal: 'reciprocal of 0' };

/**
 * Welch's test on transformed scores, with the means transformed back.
 * @param x scores of the first group, at least one, finite
 * @param y scores of the second group, at least one, finite
 * @param options `transform`, `offset` added first, direction, level
 * @returns Welch's test on the transformed scale, `backTransformed`, and for the log the ratio of geometric means with its
 *   interval; null with a reason when a score cannot be transformed, or as Welch's test
 * @throws RangeError when a group is empty or not finite, or the level is out of range
 * @source common practice; ratio: exp of the difference of mean logs
 * @checked cases `transformed_two_sample_t`, rtol 1e-9
 */
export function transformedWelch(x: Float64Array, y: Float64Array, options: TransformedWelchOptions): TransformedWelch {
  requireScores(x);
  requireScores(y, 1, 'y');
  const { transform, offset = 0 } = options;
  const fits = (scores: Float64Array) => scores.every((score) => allowed[transform](score + offset));
  const none = { backTransformed: null, ratio: null, ratioInterval: null };
  if (!fits(x) || !fits(y)) {
    const reason = refusal[transform];
    return { ...none, estimate: null, se: null, df: null, t: null, p: null, interval: null, reason };
  }
  const changed = (scores: Float64Array) => scores.map((score) => forward[transform](score + offset));
  const { means, ...test } = welchT(changed(x), changed(y), options);
  const original = (value: number) => back[transform](value) - offset;
  const backTransformed = [original(means[0]), original(means[1])] as const;
  if (transform !== 'log' || test.estimate === null) return { ...test, ...none, backTransformed };
  const [low, high] = test.interval ?? [null, null];
  const ratioInterval: Limits | null =
    test.interval && ([low === null ? null : Math.exp(low), high === null ? null : Math.exp(high)] as const);
  return { ...test, backTransformed, ratio: Math.exp(test.estimate), ratioInterval };
}
