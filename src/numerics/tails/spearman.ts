import { normalLower, normalUpper } from './normal.ts';
import { requireInteger, requireNumber } from './require.ts';

/** Up to this n all orders are counted; beyond it the Edgeworth series is used. */
const EXACT_TO = 9;

/** counts[s] = number of orders of n ranks whose squared differences sum to s. */
function countOrders(n: number): Float64Array {
  const top = (n * (n * n - 1)) / 3;
  let layer = new Map<number, Float64Array>([[0, Float64Array.of(1)]]);
  for (let position = 0; position < n; position++) {
    const next = new Map<number, Float64Array>();
    for (const [used, counts] of layer) {
      for (let rank = 0; rank < n; rank++) {
        if (used & (1 << rank)) continue;
        const into = next.get(used | (1 << rank)) ?? new Float64Array(top + 1);
        next.set(used | (1 << rank), into);
        const square = (rank - position) * (rank - position);
        for (let s = 0; s < counts.length && s + square <= top; s++) into[s + square]! += counts[s]!;
      }
    }
    layer = next;
  }
  return layer.get((1 << n) - 1)!;
}

/** P(S <= s) by counting, tables kept: there are only nine. */
const tables = new Map<number, Float64Array>();

function exactLower(s: number, n: number): number {
  let sums = tables.get(n);
  if (sums === undefined) {
    sums = countOrders(n);
    for (let i = 1; i < sums.length; i++) sums[i]! += sums[i - 1]!;
    tables.set(n, sums);
  }
  if (s < 0) return 0;
  const all = sums[sums.length - 1]!;
  return s >= sums.length ? 1 : sums[s]! / all;
}

/** Edgeworth series for P(S > between two even values); `middle` is the odd number between them. */
function edgeworth(middle: number, n: number, upper: boolean): number {
  const b = 1 / n;
  const x = ((6 * middle * b) / (n * n - 1) - 1) * Math.sqrt(n - 1);
  const y = x * x;
  const far = 0.0879 + 0.0151 * b - y * (0.0072 - 0.0831 * b + y * b * (0.0131 - 4.6e-4 * y));
  const inner = -0.0758 + b * (0.1033 + 0.3932 * b) - y * b * far;
  const correction = x * b * (0.2274 + b * (0.2531 + 0.1745 * b) + y * inner) * Math.exp(-0.5 * y);
  const value = upper ? normalUpper(x) + correction : normalLower(x) - correction;
  return Math.min(1, Math.max(0, value));
}

function check(s: number, n: number): void {
  requireNumber('s', s);
  requireInteger('n', n, 2);
}

/**
 * Lower tail of the sum of squared rank differences of two rankings without ties.
 * @param s sum of squared differences, any number; odd values count as the even one below
 * @param n number of participants ranked, whole, at least 2
 * @returns P(S <= s) where all orders are equally likely: exact for n <= 9, else good to about 1e-4
 * @throws RangeError if s is NaN or n is out of range
 * @source exact counts for n <= 9; Best & Roberts 1975, AS 89 (Edgeworth series) beyond
 * @checked grid spearman_cdf, 1e-11 (n <= 9)
 */
export function spearmanLower(s: number, n: number): number {
  check(s, n);
  const top = (n * (n * n - 1)) / 3;
  if (s < 0 || s >= top) return s < 0 ? 0 : 1;
  if (n <= EXACT_TO) return exactLower(Math.floor(s), n);
  return edgeworth(2 * Math.floor(s / 2) + 1, n, false);
}

/**
 * Upper tail of the sum of squared rank differences of two rankings without ties, s included.
 * @param s sum of squared differences, any number; odd values count as the even one above
 * @param n number of participants ranked, whole, at least 2
 * @returns P(S >= s) where all orders are equally likely: exact for n <= 9, else good to about 1e-4
 * @throws RangeError if s is NaN or n is out of range
 * @source P(S >= s) = P(S <= (n^3 - n) / 3 - s) by symmetry for n <= 9; Best & Roberts 1975, AS 89 beyond
 * @checked grid spearman_cdf, 1e-11 (n <= 9)
 */
export function spearmanUpper(s: number, n: number): number {
  check(s, n);
  const top = (n * (n * n - 1)) / 3;
  if (s <= 0 || s > top) return s <= 0 ? 1 : 0;
  if (n <= EXACT_TO) return exactLower(top - Math.ceil(s), n);
  return edgeworth(2 * Math.ceil(s / 2) - 1, n, true);
}
