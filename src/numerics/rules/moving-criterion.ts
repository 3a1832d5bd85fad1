import { mean, standardDeviation } from '../moments.ts';
import { requireScores } from '../scores.ts';
import { flagOutside } from './limits.ts';

/** Van Selst & Jolicoeur's two procedures. */
export type MovingProcedure = 'non-recursive' | 'modified-recursive';

/** What the moving criterion set aside and with which last limits. */
export interface MovingCriterion {
  /** Last lower limit applied, in the scores' unit; null with a reason where there was none. */
  readonly lower: number | null;
  /** Last upper limit applied, in the scores' unit; null with a reason where there was none. */
  readonly upper: number | null;
  /** Criterion of the last pass, in standard deviations; null where there was none. */
  readonly criterion: number | null;
  /** n marks: 1 = set aside. */
  readonly flags: Uint8Array;
  /** Number of times limits were computed. */
  readonly passes: number;
  /** Why no limits were computed. */
  readonly reason?: string;
}

const SIZES = [4, 5, 6, 7, 8, 9, 10, 11, 12, 13, 14, 15, 20, 25, 30, 35, 50, 100];
const CRITERIA: Readonly<Record<MovingProcedure, readonly number[]>> = {
  'non-recursive': [
    1.458, 1.68, 1.841, 1.961, 2.05, 2.12, 2.173, 2.22, 2.246, 2.274, 2.31, 2.326, 2.391, 2.41, 2.4305, 2.45, 2.48, 2.5,
  ],
  'modified-recursive': [
    8, 6.2, 5.3, 4.8, 4.475, 4.25, 4.11, 4, 3.92, 3.85, 3.8, 3.75, 3.64, 3.595, 3.55, 3.54, 3.51, 3.5,
  ],
};

/**
 * Criterion for a cell of n scores, linear between the tabled sizes, constant from 100 on.
 * @param n number of scores, a whole number of 4 or more
 * @param procedure non-recursive or modified recursive
 * @returns criterion in standard deviations
 * @throws RangeError when *n* is not a whole number of 4 or more or *procedure* is none of the two
 * @source Van Selst & Jolicoeur 1994, Q. J. Exp. Psychol. 47A, 631-650, table of criteria (values from memory)
 * @checked tabled sizes and the midpoint of 15 and 20 by hand, 1e-12
 */
export function movingCutoff(n: number, procedure: MovingProcedure): number {
  if (!Number.isInteger(n) || n < 4) throw new RangeError(`*n* must be a whole number of 4 or more; got ${n}`);
  const criteria = CRITERIA[procedure];
  if (criteria === undefined) {
    throw new RangeError(`*procedure* must be non-recursive or modified-recursive; got ${String(procedure)}`);
  }
  if (n >= 100) return criteria[criteria.length - 1]!;
  const right = SIZES.findIndex((size) => size >= n);
  if (SIZES[right] === n) return criteria[right]!;
  const low = SIZES[right - 1]!;
  const share = (n - low) / (SIZES[right]! - low);
  return criteria[right - 1]! + share * (criteria[right]! - criteria[right - 1]!);
}

/**
 * Set aside scores by a criterion that moves with the number of scores, so that the share lost does not depend on n.
 * @param x scores of one cell (n, any unit)
 * @param options procedure: one pass (non-recursive), or repeated with the largest score held out (modified recursive)
 * @returns marks and the last limits; nothing is set aside for fewer than 4 scores or equal scores, with a reason
 * @throws RangeError when *x* holds NaN or an infinity
 * @source Van Selst & Jolicoeur 1994, Q. J. Exp. Psychol. 47A, 631-650: |x - M| > C(n) SD; modified recursive: M and SD
 *   without the largest score, both ends tested, repeated until nothing is dropped or fewer than 4 are left
 * @checked by hand, exact marks
 */
export function movingCriterion(x: Float64Array, options: { readonly procedure: MovingProcedure }): MovingCriterion {
  requireScores(x, 0);
  if (x.length < 4) return nothing(x.length, 'fewer than 4 scores');
  if (x.every((value) => value === x[0])) return nothing(x.length, 'all scores are equal');
  return options.procedure === 'non-recursive' ? onePass(x) : repeated(x);
}

function nothing(n: number, reason: string): MovingCriterion {
  return { lower: null, upper: null, criterion: null, flags: new Uint8Array(n), passes: 0, reason };
}

function onePass(x: Float64Array): MovingCriterion {
  const criterion = movingCutoff(x.length, 'non-recursive');
  const limits = around(x, criterion);
  return { ...limits, criterion, flags: flagOutside(x, limits), passes: 1 };
}

function repeated(x: Float64Array): MovingCriterion {
  const order = Array.from(x.keys()).sort((a, b) => x[a]! - x[b]!);
  const flags = new Uint8Array(x.length);
  let last: MovingCriterion = { lower: null, upper: null, criterion: null, flags, passes: 0 };
  let first = 0;
  let end = order.length;
  while (end - first >= 4) {
    const rest = Float64Array.from(order.slice(first, end - 1), (index) => x[index]!);
    if (rest[0] === rest[rest.length - 1]) return { ...last, reason: 'without the largest, all scores are equal' };
    const criterion = movingCutoff(end - first, 'modified-recursive');
    const limits = around(rest, criterion);
    last = { ...limits, criterion, flags, passes: last.passes + 1 };
    const dropHigh = x[order[end - 1]!]! > limits.upper;
    const dropLow = x[order[first]!]! < limits.lower;
    if (dropHigh) flags[order[--end]!] = 1;
    if (dropLow) flags[order[first++]!] = 1;
    if (!dropHigh && !dropLow) break;
  }
  return last;
}

function around(x: Float64Array, criterion: number): { lower: number; upper: number } {
  const center = mean(x);
  const reach = criterion * standardDeviation(x);
  return { lower: center - reach, upper: center + reach };
}
