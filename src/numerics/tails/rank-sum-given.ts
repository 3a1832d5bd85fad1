import { hypergeometricMass } from './hypergeometric.ts';

/**
 * Distributions of U among the ranks met so far, one for each number a of them in the first sample, cut at a limit.
 * With ties the index is 2U. One set of buffers serves all stages: it is walked from the largest a down.
 */
interface Stages {
  readonly mass: readonly Float64Array[];
  readonly n1: number;
  readonly n2: number;
  readonly limit: number;
  /** Index of one whole pair: 1, or 2 with ties. */
  readonly pair: number;
}

function emptyStages(n1: number, n2: number, limit: number, pair: number): Stages {
  const mass = Array.from({ length: n1 + 1 }, (_, a) => new Float64Array(Math.min(limit, pair * a * n2) + 1));
  mass[0]![0] = 1;
  return { mass, n1, n2, limit, pair };
}

/** Sizes of the groups of tied ranks, lowest rank first. */
function groupSizes(midranks: Float64Array): number[] {
  const sorted = midranks.slice().sort();
  const sizes: number[] = [];
  let start = 0;
  for (let i = 1; i <= sorted.length; i++) {
    if (i < sorted.length && sorted[i] === sorted[start]) continue;
    sizes.push(i - start);
    start = i;
  }
  return sizes;
}

/** Adds weight * from[0..last], shifted, to into. */
function addShifted(into: Float64Array, from: Float64Array, last: number, shift: number, weight: number): void {
  const end = Math.min(last, into.length - 1 - shift);
  for (let s = 0; s <= end; s++) into[s + shift]! += weight * from[s]!;
}

/** P(c of a tied group of `size` are in the first sample | a of the `after` lowest are). */
function shareOf(c: number, after: number, size: number, a: number): number {
  if (size === 1) return (c === 1 ? a : after - a) / after;
  return hypergeometricMass(c, after, size, a);
}

/** Takes one more group of tied ranks in, a single rank being a group of one. */
function takeIn(stages: Stages, before: number, size: number): void {
  const { mass, n1, n2, limit, pair } = stages;
  const after = before + size;
  for (let a = Math.min(n1, after); a >= Math.max(0, after - n2); a--) {
    const into = mass[a]!;
    if (a <= before) {
      const weight = shareOf(0, after, size, a);
      for (let s = Math.min(limit, pair * a * (before - a)); s >= 0; s--) into[s]! *= weight;
    }
    for (let c = 1; c <= Math.min(a, size); c++) {
      // c of the group lie above all b earlier scores of the other sample and tie with the rest of their group.
      const b = before - (a - c);
      if (b < 0 || b > n2) continue;
      const shift = pair * c * b + 0.5 * pair * c * (size - c);
      addShifted(into, mass[a - c]!, Math.min(limit, pair * (a - c) * b), shift, shareOf(c, after, size, a));
    }
  }
}

/**
 * Distribution of the Mann-Whitney statistic without ties, by positive terms only.
 * @param n1 scores in the first sample, whole, above 0
 * @param n2 scores in the second sample, whole, above 0
 * @param limit largest statistic wanted, whole, 0..n1 n2
 * @returns P(U = u) for u = 0..limit
 * @source Mann & Whitney 1947: f(a, b; u) = a / (a + b) f(a - 1, b; u - b) + b / (a + b) f(a, b - 1; u)
 * @checked agrees with exact integer counts, 1e-13
 */
export function latticeMass(n1: number, n2: number, limit: number): Float64Array {
  const stages = emptyStages(n1, n2, limit, 1);
  for (let before = 0; before < n1 + n2; before++) takeIn(stages, before, 1);
  return stages.mass[n1]!.slice(0, limit + 1);
}

/** P(U = u) on the index 2U, from 0 to the limit. */
function tiedMass(sizes: readonly number[], n1: number, n2: number, limit: number): Float64Array {
  const stages = emptyStages(n1, n2, limit, 2);
  let before = 0;
  for (const size of sizes) {
    takeIn(stages, before, size);
    before += size;
  }
  return stages.mass[n1]!;
}

function sumTo(mass: Float64Array, last: number): number {
  let sum = 0;
  for (let s = 0; s <= Math.min(last, mass.length - 1); s++) sum += mass[s]!;
  return sum;
}

/**
 * Both tails of the Mann-Whitney statistic over all assignments of given midranks to the samples.
 * @param midranks midranks of all scores, no NaN; not modified
 * @param n1 scores in the first sample, whole, above 0
 * @param n2 scores in the second sample, n1 + n2 = midranks.length
 * @param u Mann-Whitney statistic of the first sample, a tied pair counting one half
 * @returns lower = P(U <= u), upper = P(U >= u)
 * @source Streitberg & Roehmel 1986: f(a, b) gathers f(a - c, b - (t - c)) shifted by c b + c (t - c) / 2
 * @checked by hand (full enumeration), 1e-14
 */
export function rankSumGiven(
  midranks: Float64Array,
  n1: number,
  n2: number,
  u: number,
): { lower: number; upper: number } {
  const total = 2 * n1 * n2;
  const atMost = Math.floor(2 * u + 1e-9);
  const atLeast = Math.ceil(2 * u - 1e-9);
  if (atLeast > total) return { lower: 1, upper: 0 };
  if (atMost < 0) return { lower: 0, upper: 1 };
  // Turning the order of the ranks turns U into n1 n2 - U, so only the nearer end is enumerated.
  const left = atMost + atLeast <= total;
  const sizes = groupSizes(midranks);
  if (!left) sizes.reverse();
  const included = left ? atMost : total - atLeast;
  const excluded = left ? atLeast - 1 : total - atMost - 1;
  const mass = tiedMass(sizes, n1, n2, Math.max(0, included, excluded));
  const near = sumTo(mass, included);
  const far = 1 - sumTo(mass, excluded);
  return left ? { lower: near, upper: far } : { lower: far, upper: near };
}
