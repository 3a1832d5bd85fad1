import { percentileInference } from '../numerics/bootstrap-limits.ts';
import { standardDeviation } from '../numerics/moments.ts';
import { resample } from '../numerics/resample.ts';
import type { AssociationSpec } from './association.ts';
import type { Limits } from './finding.ts';

/** A statistic of pairs; null where these pairs have none. */
export type PairStatistic = (x: Float64Array, y: Float64Array) => number | null;

/** What a bootstrap of pairs gives; p and interval are null with a reason. */
export interface PairBootstrap {
  readonly se: number | null;
  readonly p: number | null;
  readonly interval: Limits | null;
  /** "percentile bootstrap, B = 999", with the resamples that had no value. */
  readonly how: string;
  readonly reason?: string;
}

/** Largest share of resamples without a value that is passed over. */
const MOST_UNDEFINED = 0.05;

/**
 * Percentile bootstrap of a statistic of pairs: participants are drawn with replacement, both scores together.
 *
 * @param x scores (n of 2 or more, any unit)
 * @param y scores paired with *x*
 * @param statistic what is estimated; its value without association is 0
 * @param spec resamples, seed, alpha and direction
 * @returns SE (SD of the resamples' values), p and interval; resamples without a value are left out and counted, and where they
 *   are more than 5 % nothing is given
 * @source Efron 1979; Wilcox 2012, 9.3.15 and 10.11 (pairs are resampled whole)
 * @checked theory: SE of r of a binormal sample; invariance under another order of the spec's fields
 */
export function bootstrapPairs(
  x: Float64Array,
  y: Float64Array,
  statistic: PairStatistic,
  spec: Pick<AssociationSpec, 'resamples' | 'seed' | 'alpha' | 'alternative'>,
): PairBootstrap {
  const n = x.length;
  const { resamples: B, seed } = spec;
  const values = new Float64Array(B);
  const xs = new Float64Array(n);
  const ys = new Float64Array(n);
  let given = 0;
  resample([n], B, seed, ([counts]) => {
    draw(counts as Int32Array, [x, y], [xs, ys]);
    const value = statistic(xs, ys);
    if (value !== null) values[given++] = value;
  });
  const without = B - given;
  const how = `percentile bootstrap, B = ${B}${without > 0 ? `, ${without} of them without a value` : ''}`;
  if (without > MOST_UNDEFINED * B) {
    const reason = `${without} of ${B} resamples have no value: no interval`;
    return { se: null, p: null, interval: null, how, reason };
  }
  const own = values.slice(0, given);
  const { p, interval, reason } = percentileInference(own, 0, 1 - spec.alpha, spec.alternative);
  return { se: standardDeviation(own), p, interval, how, ...(reason === undefined ? {} : { reason }) };
}

/** Writes the resample that the counts describe, in the order of the pairs, and clears the counts. */
function draw(counts: Int32Array, from: readonly [Float64Array, Float64Array], to: [Float64Array, Float64Array]): void {
  let at = 0;
  for (let i = 0; i < counts.length; i++) {
    for (let times = counts[i] as number; times > 0; times--) {
      to[0][at] = from[0][i] as number;
      to[1][at] = from[1][i] as number;
      at++;
    }
    counts[i] = 0;
  }
}
