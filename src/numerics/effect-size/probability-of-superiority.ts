import type { TestOptions } from '../inference.ts';
import { cliffsDelta } from './cliffs-delta.ts';
import type { Effect } from './effect.ts';

/**
 * Probability that a score of the first group exceeds one of the second, ties as half.
 * @param x scores of the first group, at least one, finite
 * @param y scores of the second group, at least one, finite
 * @param options direction, level
 * @returns value U / (n1 n2), 0 to 1; interval that of Cliff's delta as (delta + 1) / 2, so it stays within 0 to 1;
 *   interval null with a reason for a group of one or when the groups do not overlap
 * @throws RangeError when a group is empty or not finite, or the level is out of range
 * @source Cliff (1996); value: Mann & Whitney (1947)
 * @checked cases `cliffs_delta`, `mann_whitney`, rtol 1e-9
 */
export function probabilityOfSuperiority(x: Float64Array, y: Float64Array, options: TestOptions = {}): Effect {
  const delta = cliffsDelta(x, y, options);
  const value = delta.superiority;
  if (delta.interval === null) return { value, interval: null, reason: delta.reason ?? 'no interval' };
  const [low, high] = delta.interval;
  return { value, interval: [low === null ? null : (low + 1) / 2, high === null ? null : (high + 1) / 2] };
}
