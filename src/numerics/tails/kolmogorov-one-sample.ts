import { binomialTerm } from './binomial.ts';
import { requireInteger, requireNumber } from './require.ts';

/** Largest sample for which the exact distribution is offered. */
const MOST = 5000;
const BIG = 1e140;

/** Square matrix as one row after another, times a power of BIG. */
interface Scaled {
  readonly entries: Float64Array;
  readonly power: number;
}

/** Transition matrix of Marsaglia, Tsang & Wang for k - h = n d, of m = 2k - 1 rows. */
function transition(m: number, h: number): Float64Array {
  const entries = new Float64Array(m * m);
  for (let i = 0; i < m; i++) for (let j = 0; j <= Math.min(i + 1, m - 1); j++) entries[i * m + j] = 1;
  let power = 1;
  for (let i = 0; i < m; i++) {
    power *= h;
    entries[i * m]! -= power;
    entries[(m - 1) * m + (m - 1 - i)]! -= power;
  }
  if (2 * h > 1) entries[(m - 1) * m]! += Math.exp(m * Math.log(2 * h - 1));
  for (let i = 0; i < m; i++) {
    let factorial = 1;
    for (let j = i; j >= 0; j--) {
      factorial *= i - j + 1;
      entries[i * m + j]! /= factorial;
    }
  }
  return entries;
}

function product(a: Scaled, b: Scaled, m: number): Scaled {
  const entries = new Float64Array(m * m);
  for (let i = 0; i < m; i++) {
    for (let l = 0; l < m; l++) {
      const factor = a.entries[i * m + l]!;
      if (factor === 0) continue;
      for (let j = 0; j < m; j++) entries[i * m + j]! += factor * b.entries[l * m + j]!;
    }
  }
  const middle = (m - 1) / 2;
  if (entries[middle * m + middle]! < BIG) return { entries, power: a.power + b.power };
  return { entries: entries.map((each) => each / BIG), power: a.power + b.power + 1 };
}

function raised(base: Scaled, exponent: number, m: number): Scaled {
  if (exponent === 1) return base;
  const half = raised(base, Math.floor(exponent / 2), m);
  const square = product(half, half, m);
  return exponent % 2 === 0 ? square : product(square, base, m);
}

/** P(D <= d) from the middle entry of the n-th power, times n! / n^n. */
function byMatrix(d: number, n: number): number {
  const k = Math.floor(n * d) + 1;
  const m = 2 * k - 1;
  const { entries, power } = raised({ entries: transition(m, k - n * d), power: 0 }, n, m);
  let value = entries[(k - 1) * m + (k - 1)]!;
  let scale = power;
  for (let i = 1; i <= n; i++) {
    value *= i / n;
    if (value < 1 / BIG && scale > 0) {
      value *= BIG;
      scale -= 1;
    }
  }
  for (; scale > 0; scale--) value *= BIG;
  return Math.min(1, value);
}

/** P(D+ >= d): every term is positive. */
function oneSidedUpper(d: number, n: number): number {
  let sum = 0;
  for (let j = 0; j <= n * (1 - d); j++) {
    const p = d + j / n;
    const q = 1 - d - j / n;
    if (q > 0) sum += (binomialTerm(j, n, p, q) * d) / p;
  }
  return sum;
}

/** Whether both one-sided excesses at once are impossible, or too rare for the 12th digit of their sum. */
function oneSidedSuffices(d: number, n: number): boolean {
  return d >= 0.5 || n * d * d > 4.5;
}

function check(d: number, n: number): void {
  requireNumber('d', d);
  requireInteger('n', n, 1, MOST);
}

/**
 * Lower tail of the largest distance between a sample's distribution and the true continuous one, exact.
 * @param d distance; 0 and below give 0, 1 and above give 1
 * @param n sample size, whole, 1..5000
 * @returns P(D <= d)
 * @throws RangeError if d is NaN or n is out of range
 * @source Marsaglia, Tsang & Wang 2003: n! / n^n times the middle entry of the n-th power of a matrix
 * @checked grid kolm_1s, 1e-11
 */
export function kolmogorovOneSampleLower(d: number, n: number): number {
  check(d, n);
  if (n * d <= 0.5 || d >= 1) return d >= 1 ? 1 : 0;
  return oneSidedSuffices(d, n) ? 1 - Math.min(1, 2 * oneSidedUpper(d, n)) : byMatrix(d, n);
}

/**
 * Upper tail of the largest distance between a sample's distribution and the true continuous one, exact.
 * @param d distance; 0 and below give 1, 1 and above give 0
 * @param n sample size, whole, 1..5000
 * @returns P(D > d)
 * @throws RangeError if d is NaN or n is out of range
 * @source Birnbaum & Tingey 1951: twice d sum C(n, j) (d + j / n)^(j - 1) (1 - d - j / n)^(n - j) where that suffices
 * @checked grid kolm_1s, 1e-11
 */
export function kolmogorovOneSampleUpper(d: number, n: number): number {
  check(d, n);
  if (n * d <= 0.5 || d >= 1) return d >= 1 ? 0 : 1;
  return oneSidedSuffices(d, n) ? Math.min(1, 2 * oneSidedUpper(d, n)) : 1 - byMatrix(d, n);
}
