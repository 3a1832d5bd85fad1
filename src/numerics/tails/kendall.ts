import { requireInteger, requireNumber } from './require.ts';

/** Largest number of pairs of scores for which the exact distribution is offered. */
const MOST = 1000;

/** P(C = c) for i scores from that for i - 1: the mean of i neighbours; lower half computed, upper half copied. */
function next(mass: Float64Array, i: number): Float64Array {
  const end = (i * (i - 1)) / 2;
  const grown = new Float64Array(end + 1);
  let window = 0;
  for (let c = 0; 2 * c <= end; c++) {
    if (c < mass.length) window += mass[c]!;
    if (c >= i) window -= mass[c - i]!;
    grown[c] = window / i;
    grown[end - c] = grown[c]!;
  }
  return grown;
}

/** The table of the last n asked for: a sweep asks for the same one many times. */
let kept: { readonly n: number; readonly lower: Float64Array } = { n: 1, lower: Float64Array.of(1) };

/** P(C <= c) for c up to the middle. */
function lowerHalf(n: number): Float64Array {
  if (kept.n === n) return kept.lower;
  let mass: Float64Array = Float64Array.of(1);
  for (let i = 2; i <= n; i++) mass = next(mass, i);
  const lower = mass.slice(0, Math.floor((n * (n - 1)) / 4) + 1);
  for (let c = 1; c < lower.length; c++) lower[c]! += lower[c - 1]!;
  kept = { n, lower };
  return lower;
}

function tail(concordant: number, n: number, upper: boolean): number {
  requireNumber('concordant', concordant);
  requireInteger('n', n, 1, MOST);
  const total = (n * (n - 1)) / 2;
  const whole = Math.floor(concordant);
  if (whole < 0 || whole >= total) return whole < 0 === upper ? 1 : 0;
  const lower = lowerHalf(n);
  // P(C > c) = P(C <= total - c - 1) by symmetry, so the smaller tail is always read off the table.
  if (2 * whole < total) return upper ? 1 - lower[whole]! : lower[whole]!;
  const rest = lower[total - whole - 1]!;
  return upper ? rest : 1 - rest;
}

/**
 * Lower tail of the number of concordant pairs of two rankings without ties, exact.
 * @param concordant number of concordant pairs, any number
 * @param n number of participants ranked, whole, 1..1000
 * @returns P(C <= concordant) where all orders are equally likely
 * @throws RangeError if concordant is NaN or n is out of range
 * @source Kendall 1938: counts f(n, c) = f(n - 1, c) + ... + f(n - 1, c - n + 1)
 * @checked grid kendall_cdf, 1e-11
 */
export function kendallLower(concordant: number, n: number): number {
  return tail(concordant, n, false);
}

/**
 * Upper tail of the number of concordant pairs of two rankings without ties, exact.
 * @param concordant number of concordant pairs, any number
 * @param n number of participants ranked, whole, 1..1000
 * @returns P(C > concordant) where all orders are equally likely
 * @throws RangeError if concordant is NaN or n is out of range
 * @source Kendall 1938: counts f(n, c) = f(n - 1, c) + ... + f(n - 1, c - n + 1)
 * @checked grid kendall_cdf, 1e-11
 */
export function kendallUpper(concordant: number, n: number): number {
  return tail(concordant, n, true);
}
