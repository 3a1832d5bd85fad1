import { andersonDarling } from '../numerics/checks/anderson-darling.ts';
import { kurtosis } from '../numerics/checks/kurtosis.ts';
import { lillieforsTest } from '../numerics/checks/lilliefors.ts';
import { shapiroWilk } from '../numerics/checks/shapiro-wilk.ts';
import { skewness } from '../numerics/checks/skewness.ts';
import type { Limits } from '../numerics/inference.ts';
import { mad, median } from '../numerics/order.ts';
import { normalQuantileUpper } from '../numerics/tails/normal.ts';

/** A check of shape against the normal one; a distance from it, and p. */
export type ShapeTestId = 'shapiro-wilk' | 'lilliefors' | 'anderson-darling';

export interface ShapeTest {
  readonly id: ShapeTestId;
  /** As the field writes the statistic: "W", "D", "A²*". */
  readonly symbol: string;
  readonly statistic: number | null;
  readonly p: number | null;
  readonly reason?: string;
}

/** A departure from the normal shape without unit, 0 for normal scores. */
export interface Moment {
  readonly value: number | null;
  /** SE in normal samples of this size. */
  readonly se: number | null;
  /** value / se. */
  readonly z: number | null;
  /** value -+ critical z times that SE. */
  readonly interval: Limits | null;
  readonly reason?: string;
}

export interface ShapeChecks {
  readonly n: number;
  /** G1. */
  readonly skew: Moment;
  /** G2. */
  readonly excess: Moment;
  readonly tests: readonly ShapeTest[];
  /** How many lie further than 3 MAD (x 1.4826) from the median; null when that MAD is 0. */
  readonly beyond: number | null;
}

const SYMBOLS: Readonly<Record<ShapeTestId, string>> = {
  'shapiro-wilk': 'W',
  lilliefors: 'D',
  'anderson-darling': 'A\u00b2*',
};

/**
 * Every check of shape.
 *
 * @param x residuals or differences, at least one, any unit
 * @param level of the intervals, between 0 and 1
 * @returns skew, excess kurtosis, three tests, and the count beyond 3 MAD; null with a reason where not defined
 * @source Joanes & Gill 1998 (G1, G2 and their SE in normal samples); Royston 1995; Lilliefors 1967; D'Agostino & Stephens 1986
 * @checked outside check cases shapiro_wilk, lilliefors_test, anderson_darling_normal, skewness, kurtosis
 */
export function shapeChecks(x: Float64Array, level: number): ShapeChecks {
  const skew = skewness(x);
  const excess = kurtosis(x);
  const spread = mad(x);
  const middle = median(x);
  return {
    n: x.length,
    skew: momentOf(skew.bigG1, skew, level),
    excess: momentOf(excess.bigG2, excess, level),
    tests: (Object.keys(SYMBOLS) as ShapeTestId[]).map((id) => shapeTest(id, x)),
    beyond: spread === 0 ? null : x.filter((value) => Math.abs(value - middle) > 3 * spread).length,
  };
}

/** One test of shape. */
export function shapeTest(id: ShapeTestId, x: Float64Array): ShapeTest {
  const { statistic, p, reason } = runTest(id, x);
  return { id, symbol: SYMBOLS[id], statistic, p, ...(reason === undefined ? {} : { reason }) };
}

function runTest(id: ShapeTestId, x: Float64Array) {
  switch (id) {
    case 'shapiro-wilk': {
      const { w, p, reason } = shapiroWilk(x);
      return { statistic: w, p, reason };
    }
    case 'lilliefors': {
      const { d, p, reason } = lillieforsTest(x);
      return { statistic: d, p, reason };
    }
    case 'anderson-darling': {
      const { a2Star, p, reason } = andersonDarling(x);
      return { statistic: a2Star, p, reason };
    }
  }
}

function momentOf(
  value: number | null,
  from: { readonly se: number | null; readonly zSimple: number | null; readonly reason?: string },
  level: number,
): Moment {
  if (value === null || from.se === null) {
    return { value: null, se: null, z: null, interval: null, reason: from.reason ?? 'not defined' };
  }
  const reach = normalQuantileUpper((1 - level) / 2) * from.se;
  return { value, se: from.se, z: from.zSimple, interval: [value - reach, value + reach] };
}
