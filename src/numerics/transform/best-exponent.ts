import { largestSize } from '../inference.ts';
import { sumOfSquares } from '../moments.ts';

/** An exponent of largest likelihood; null with a reason. */
export interface BestExponent {
  readonly lambda: number | null;
  /** Log likelihood at lambda, with constants of the normal density left out. */
  readonly logLikelihood: number | null;
  readonly reason?: string;
}

/** A log likelihood of the exponent and its derivative. */
export interface Profile {
  readonly logLikelihood: (lambda: number) => number;
  readonly score: (lambda: number) => number;
}

const STEP = 0.25;
const FURTHEST = 50;

/**
 * The exponent where a profile log likelihood is largest, between -50 and 50.
 * @param profile log likelihood and derivative
 * @returns exponent and log likelihood; null with a reason when there is no maximum inside
 * @source common practice: climb on a grid, then halve the bracket of the derivative's root
 * @checked outside check cases box_cox_lambda, yeo_johnson_lambda, relative 1e-6
 */
export function bestExponent(profile: Profile): BestExponent {
  let best = 1;
  for (const direction of [1, -1]) {
    // Steps on a grid, as long as the likelihood rises.
    for (;;) {
      const next = best + direction * STEP;
      if (Math.abs(next) > FURTHEST || !(profile.logLikelihood(next) > profile.logLikelihood(best))) break;
      best = next;
    }
  }
  let low = best - STEP;
  let high = best + STEP;
  if (Math.abs(best) + STEP > FURTHEST || !(profile.score(low) > 0 && profile.score(high) < 0)) {
    return { lambda: null, logLikelihood: null, reason: 'no exponent between -50 and 50 is the likeliest' };
  }
  for (let i = 0; i < 60; i++) {
    const middle = (low + high) / 2;
    if (profile.score(middle) > 0) low = middle;
    else high = middle;
  }
  const lambda = (low + high) / 2;
  return { lambda, logLikelihood: profile.logLikelihood(lambda) };
}

/**
 * Log likelihood of scores as a normal sample with its own mean and spread, constants left out.
 * @param y transformed scores (n of 1 or more)
 * @returns -n/2 log(mean squared deviation); -Infinity where a power has run out of range, so that no search ends there
 * @source Box & Cox 1964, eq. 8
 * @checked by hand, 1e-15
 */
export function normalLogLikelihood(y: Float64Array): number {
  if (!(largestSize(y) < 1e140)) return Number.NEGATIVE_INFINITY;
  const total = sumOfSquares(y);
  return total > 0 ? (-y.length / 2) * Math.log(total / y.length) : Number.NEGATIVE_INFINITY;
}
