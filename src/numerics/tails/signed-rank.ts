import { requireInteger, requireNumber, requireProbability } from './require.ts';

/** Largest number of differences for which the exact distribution is offered. */
const MOST = 1000;

/** P(S = s) for s = 0..limit, S the sum of a random half of the weights (each in or out with probability 1/2). */
function halfSums(weights: readonly number[], limit: number): Float64Array {
  const mass = new Float64Array(limit + 1);
  mass[0] = 1;
  let top = 0;
  for (const weight of weights) {
    top = Math.min(limit, top + weight);
    for (let s = top; s >= weight; s--) mass[s] = 0.5 * (mass[s]! + mass[s - weight]!);
    for (let s = Math.min(top, weight - 1); s >= 0; s--) mass[s]! *= 0.5;
  }
  return mass;
}

function cumulated(mass: Float64Array): Float64Array {
  const sums = new Float64Array(mass.length);
  let sum = 0;
  for (let s = 0; s < mass.length; s++) {
    sum += mass[s]!;
    sums[s] = sum;
  }
  return sums;
}

/** The table of the last n asked for: a sweep asks for the same one many times. */
let kept: { readonly n: number; readonly lower: Float64Array } = { n: 0, lower: Float64Array.of(1) };

/** P(V <= v) for v up to the middle of 0..n(n+1)/2. */
function lowerHalf(n: number): Float64Array {
  if (kept.n !== n) {
    const weights = Array.from({ length: n }, (_, i) => i + 1);
    kept = { n, lower: cumulated(halfSums(weights, Math.floor((n * (n + 1)) / 4))) };
  }
  return kept.lower;
}

function tail(v: number, n: number, upper: boolean): number {
  requireNumber('v', v);
  requireInteger('n', n, 1, MOST);
  const total = (n * (n + 1)) / 2;
  const whole = Math.floor(v);
  if (whole < 0 || whole >= total) return whole < 0 === upper ? 1 : 0;
  const lower = lowerHalf(n);
  // P(V > v) = P(V <= total - v - 1) by symmetry, so the smaller tail is always read off the table.
  if (2 * whole < total) return upper ? 1 - lower[whole]! : lower[whole]!;
  const rest = lower[total - whole - 1]!;
  return upper ? rest : 1 - rest;
}

/**
 * Lower tail of the signed-rank statistic without ties, exact.
 * @param v sum of the positive ranks, any number
 * @param n number of non-zero differences, whole, 1..1000
 * @returns P(V <= v) under symmetry about zero
 * @throws RangeError if v is NaN or n is out of range
 * @source Streitberg & Roehmel 1986: shift algorithm, weights 1..n
 * @checked grid signrank_cdf, 1e-11
 */
export function signedRankLower(v: number, n: number): number {
  return tail(v, n, false);
}

/**
 * Upper tail of the signed-rank statistic without ties, exact.
 * @param v sum of the positive ranks, any number
 * @param n number of non-zero differences, whole, 1..1000
 * @returns P(V > v) under symmetry about zero
 * @throws RangeError if v is NaN or n is out of range
 * @source Streitberg & Roehmel 1986: shift algorithm, weights 1..n
 * @checked grid signrank_cdf, 1e-11
 */
export function signedRankUpper(v: number, n: number): number {
  return tail(v, n, true);
}

/**
 * Smallest signed-rank sum whose lower tail reaches a probability.
 * @param p 0..1; a lower tail within 1e-14 of it counts as reaching it
 * @param n number of non-zero differences, whole, 1..1000
 * @returns the smallest whole v with P(V <= v) >= p
 * @throws RangeError if p or n is out of range
 * @source definition, by bisection
 * @checked by hand, exact
 */
export function signedRankQuantile(p: number, n: number): number {
  requireProbability('p', p);
  requireInteger('n', n, 1, MOST);
  const aim = p * (1 - 1e-14);
  let below = -1;
  let reached = (n * (n + 1)) / 2;
  while (reached - below > 1) {
    const middle = Math.floor((below + reached) / 2);
    if (tail(middle, n, false) >= aim) reached = middle;
    else below = middle;
  }
  return reached;
}

/** Twice each midrank, halved again where no midrank ends in .5; with the factor used. */
function wholeWeights(ranks: Float64Array): { weights: number[]; factor: number } {
  requireInteger('ranks.length', ranks.length, 1, MOST);
  const doubled = Array.from(ranks, (rank) => 2 * rank);
  for (const each of doubled) {
    if (!Number.isInteger(each) || each <= 0 || each > 2 * MOST) {
      throw new RangeError(`*ranks* must be midranks, multiples of one half above 0; got ${each / 2}`);
    }
  }
  if (doubled.some((each) => each % 2 === 1)) return { weights: doubled, factor: 2 };
  return { weights: doubled.map((each) => each / 2), factor: 1 };
}

/**
 * Both tails of the signed-rank statistic given the ranks, ties included: exact over all signs of these ranks.
 * @param ranks midranks of the absolute non-zero differences, 1..1000 of them; not modified
 * @param v sum of the positive ranks
 * @returns lower = P(V <= v), upper = P(V >= v); both contain P(V = v)
 * @throws RangeError if v is NaN or a rank is not a positive multiple of one half
 * @source Streitberg & Roehmel 1986: shift algorithm over the doubled midranks
 * @checked by hand (full enumeration), 1e-14; agrees with signedRankLower without ties, 1e-13
 */
export function signedRankTied(ranks: Float64Array, v: number): { lower: number; upper: number } {
  requireNumber('v', v);
  const { weights, factor } = wholeWeights(ranks);
  const total = weights.reduce((sum, each) => sum + each, 0);
  const atMost = Math.floor(factor * v + 1e-9);
  const atLeast = Math.ceil(factor * v - 1e-9);
  if (atLeast > total) return { lower: 1, upper: 0 };
  if (atMost < 0) return { lower: 0, upper: 1 };
  // The distribution is symmetric, so sums up to the nearer end suffice for both tails.
  const left = atMost + atLeast <= total;
  const included = left ? atMost : total - atLeast;
  const excluded = left ? atLeast - 1 : total - atMost - 1;
  const sums = cumulated(halfSums(weights, Math.max(0, included, excluded)));
  const near = included < 0 ? 0 : sums[included]!;
  const far = excluded < 0 ? 1 : 1 - sums[excluded]!;
  return left ? { lower: near, upper: far } : { lower: far, upper: near };
}
