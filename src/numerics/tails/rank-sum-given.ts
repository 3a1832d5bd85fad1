import { hypergeometricMass } from './hypergeometric.ts';
import { requireNumber } from './require.ts';

/** Distribution of twice U among the first a + b ranks, one entry for each a; index = 2U, cut at the limit. */
type Stage = Map<number, Float64Array>;

/** Sizes of the groups of tied ranks, lowest rank first. */
function groupSizes(midranks: Float64Array): number[] {
  for (const rank of midranks) requireNumber('midranks', rank);
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

/** Adds weight * from, shifted, to into; sums beyond the end of into are beyond the limit. */
function addShifted(into: Float64Array, from: Float64Array, shift: number, weight: number): void {
  const end = Math.min(from.length, into.length - shift);
  for (let s = 0; s < end; s++) into[s + shift]! += weight * from[s]!;
}

/** The stage after one more group of tied ranks. */
function withGroup(stage: Stage, before: number, size: number, n1: number, n2: number, limit: number): Stage {
  const next: Stage = new Map();
  const after = before + size;
  for (let a = Math.max(0, after - n2); a <= Math.min(n1, after); a++) {
    const into = new Float64Array(Math.min(limit, 2 * a * (after - a)) + 1);
    for (let c = 0; c <= Math.min(a, size); c++) {
      const from = stage.get(a - c);
      if (from === undefined) continue;
      // c of the group lie above all b earlier scores of the other sample and tie with the rest of their group.
      const b = before - (a - c);
      const shift = 2 * c * b + c * (size - c);
      if (shift <= limit) addShifted(into, from, shift, hypergeometricMass(c, after, size, a));
    }
    next.set(a, into);
  }
  return next;
}

function sumTo(mass: Float64Array, last: number): number {
  let sum = 0;
  for (let s = 0; s <= Math.min(last, mass.length - 1); s++) sum += mass[s]!;
  return sum;
}

/**
 * Both tails of the Mann-Whitney statistic over all assignments of given midranks to the samples.
 * @param midranks midranks of all scores; not modified
 * @param n1 scores in the first sample, whole, above 0
 * @param n2 scores in the second sample, n1 + n2 = midranks.length
 * @param u Mann-Whitney statistic of the first sample, a tied pair counting one half
 * @returns lower = P(U <= u), upper = P(U >= u)
 * @throws RangeError if a midrank is NaN
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
  const limit = Math.max(0, included, excluded);
  let stage: Stage = new Map([[0, Float64Array.of(1)]]);
  let before = 0;
  for (const size of sizes) {
    stage = withGroup(stage, before, size, n1, n2, limit);
    before += size;
  }
  const mass = stage.get(n1)!;
  const near = sumTo(mass, included);
  const far = 1 - sumTo(mass, excluded);
  return left ? { lower: near, upper: far } : { lower: far, upper: near };
}
