import { latticeMass, rankSumGiven } from './rank-sum-given.ts';
import { requireInteger, requireNumber, requireProbability } from './require.ts';

/** Largest n1 * n2 for which the untied distribution is tabulated, where the smaller sample has at most FEW scores. */
const MOST_PAIRS = 1_000_000;
/** Beyond this size of the smaller sample the factors of the Gaussian binomial cancel too much (1e-11 at 150). */
const FEW = 100;
/** Largest n1 * n2 where both samples are larger than that: about half a second. */
const MOST_PAIRS_OF_MANY = 40_000;
/** Largest n1 * n2 for which the distribution with ties is enumerated within about 50 ms. */
const MOST_TIED_PAIRS = 10_000;

/** Multiplies a polynomial by (1 - q^up) / (1 - q^down), in place, for powers 0..top. */
function timesRatio(mass: Float64Array, up: number, down: number, top: number): void {
  for (let u = top; u >= up; u--) mass[u]! -= mass[u - up]!;
  for (let u = down; u <= top; u++) mass[u]! += mass[u - down]!;
}

/** P(U = u) for u up to the middle of 0..n1 n2: Gaussian binomial coefficients, one factor at a time. */
function gaussianBinomial(few: number, many: number): Float64Array {
  const half = Math.floor((few * many) / 2);
  const mass = new Float64Array(half + 1);
  mass[0] = 1;
  for (let i = 1; i <= few; i++) {
    const end = i * many;
    const middle = Math.min(half, Math.floor(end / 2));
    timesRatio(mass, many + i, i, middle);
    for (let u = 0; u <= middle; u++) mass[u]! *= i / (many + i);
    // Each stage is symmetric; copying keeps the cancellation out of its far side.
    for (let u = middle + 1; u <= Math.min(half, end); u++) mass[u] = mass[end - u]!;
  }
  return mass;
}

/** P(U <= u) for u up to the middle of 0..n1 n2. */
function buildLowerHalf(few: number, many: number): Float64Array {
  const lower = few <= FEW ? gaussianBinomial(few, many) : latticeMass(few, many, Math.floor((few * many) / 2));
  for (let u = 1; u < lower.length; u++) lower[u]! += lower[u - 1]!;
  return lower;
}

/** The table of the last sizes asked for: a sweep asks for the same one many times. */
let kept: { few: number; many: number; lower: Float64Array } = { few: 0, many: 0, lower: Float64Array.of(1) };

function lowerHalf(few: number, many: number): Float64Array {
  if (kept.few !== few || kept.many !== many) kept = { few, many, lower: buildLowerHalf(few, many) };
  return kept.lower;
}

function check(n1: number, n2: number): void {
  requireInteger('n1', n1, 1);
  requireInteger('n2', n2, 1);
  const most = Math.min(n1, n2) <= FEW ? MOST_PAIRS : MOST_PAIRS_OF_MANY;
  if (n1 * n2 > most) throw new RangeError(`*n1 n2* must be at most ${most} here; got ${n1 * n2}`);
}

function tail(u: number, n1: number, n2: number, upper: boolean): number {
  requireNumber('u', u);
  check(n1, n2);
  const total = n1 * n2;
  const whole = Math.floor(u);
  if (whole < 0 || whole >= total) return whole < 0 === upper ? 1 : 0;
  const lower = lowerHalf(Math.min(n1, n2), Math.max(n1, n2));
  // P(U > u) = P(U <= total - u - 1) by symmetry, so the smaller tail is always read off the table.
  if (2 * whole < total) return upper ? 1 - lower[whole]! : lower[whole]!;
  const rest = lower[total - whole - 1]!;
  return upper ? rest : 1 - rest;
}

/**
 * Whether the exact distribution with ties is offered for these sizes.
 * @param n1 scores in the first sample
 * @param n2 scores in the second sample
 * @returns true where n1 n2 <= 10,000
 * @source measured: about 50 ms at the cap
 * @checked by hand
 */
export function feasible(n1: number, n2: number): boolean {
  return n1 * n2 <= MOST_TIED_PAIRS;
}

/**
 * Lower tail of the Mann-Whitney statistic without ties, exact.
 * @param u pairs in which the score of the first sample is the larger, any number
 * @param n1 scores in the first sample, whole, at least 1
 * @param n2 scores in the second sample, whole, at least 1
 * @returns P(U <= u) where both samples come from one distribution
 * @throws RangeError if u is NaN, a size is not a positive whole number, or n1 n2 is above 1,000,000 (40,000 where both exceed 100)
 * @source Mann & Whitney 1947; counts are the coefficients of the Gaussian binomial (n1 + n2 choose n1)_q
 * @checked grid wilcox_cdf, 1e-11
 */
export function rankSumLower(u: number, n1: number, n2: number): number {
  return tail(u, n1, n2, false);
}

/**
 * Upper tail of the Mann-Whitney statistic without ties, exact.
 * @param u pairs in which the score of the first sample is the larger, any number
 * @param n1 scores in the first sample, whole, at least 1
 * @param n2 scores in the second sample, whole, at least 1
 * @returns P(U > u) where both samples come from one distribution
 * @throws RangeError if u is NaN, a size is not a positive whole number, or n1 n2 is above 1,000,000 (40,000 where both exceed 100)
 * @source Mann & Whitney 1947; counts are the coefficients of the Gaussian binomial (n1 + n2 choose n1)_q
 * @checked grid wilcox_cdf, 1e-11
 */
export function rankSumUpper(u: number, n1: number, n2: number): number {
  return tail(u, n1, n2, true);
}

/**
 * Smallest Mann-Whitney statistic whose lower tail reaches a probability.
 * @param p 0..1; a lower tail within 1e-13 of it counts as reaching it
 * @param n1 scores in the first sample, whole, at least 1
 * @param n2 scores in the second sample, whole, at least 1
 * @returns the smallest whole u with P(U <= u) >= p
 * @throws RangeError if an argument is out of range
 * @source definition, by bisection
 * @checked by hand, exact
 */
export function rankSumQuantile(p: number, n1: number, n2: number): number {
  requireProbability('p', p);
  check(n1, n2);
  const aim = p * (1 - 1e-13);
  let below = -1;
  let reached = n1 * n2;
  while (reached - below > 1) {
    const middle = Math.floor((below + reached) / 2);
    if (tail(middle, n1, n2, false) >= aim) reached = middle;
    else below = middle;
  }
  return reached;
}

/**
 * Both tails of the Mann-Whitney statistic given the ranks, ties included: exact over all assignments of these ranks.
 * @param midranks midranks of all n1 + n2 scores, any order; not modified
 * @param n1 scores in the first sample, whole, 1..N-1
 * @param u pairs in which the first sample's score is the larger, a tied pair counting one half
 * @returns lower = P(U <= u), upper = P(U >= u); both contain P(U = u)
 * @throws RangeError if u is NaN, n1 is out of range or n1 n2 exceeds the cap of `feasible`
 * @source Streitberg & Roehmel 1986: shift algorithm, here one group of tied ranks at a time
 * @checked by hand (full enumeration), 1e-14; agrees with rankSumLower without ties, 1e-12
 */
export function rankSumTied(midranks: Float64Array, n1: number, u: number): { lower: number; upper: number } {
  requireNumber('u', u);
  requireInteger('midranks.length', midranks.length, 2);
  requireInteger('n1', n1, 1, midranks.length - 1);
  const n2 = midranks.length - n1;
  if (!feasible(n1, n2)) throw new RangeError(`*n1 n2* must be at most ${MOST_TIED_PAIRS}; got ${n1 * n2}`);
  for (const rank of midranks) requireNumber('midranks', rank);
  const tied = new Set(midranks).size < midranks.length;
  if (tied) return rankSumGiven(midranks, n1, n2, u);
  return { lower: rankSumLower(u, n1, n2), upper: rankSumUpper(Math.ceil(u) - 1, n1, n2) };
}
