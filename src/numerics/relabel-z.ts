import { normalQuantileUpper } from './tails/normal.ts';
import { tTwoSided } from './tails/t.ts';

/** Largest df log(1 + t^2 / df) of the fits: beyond it (p below about 6e-5) the tails themselves are asked. */
const REACH = 16;
/** Up to here (p above about .05) fewer powers do. */
const NEAR = 4;

/** Powers of (u, v) in [-1, 1] x [-1, 1], all powers of u for one of v; the highest power last. */
interface Fit {
  /** u = reach * uScale - uShift brings df log(1 + t^2 / df) to [-1, 1], and v the same for 1 / df. */
  readonly uScale: number;
  readonly uShift: number;
  readonly vScale: number;
  readonly vShift: number;
  readonly rows: number;
  readonly columns: number;
  readonly powers: Float64Array;
}

/** z over the root of df log(1 + t^2 / df), which is close to 1 and smooth. */
function ratio(reach: number, inverse: number): number {
  const df = 1 / inverse;
  const t = Math.sqrt(df * Math.expm1(reach / df));
  return normalQuantileUpper(tTwoSided(t, df) / 2) / Math.sqrt(reach);
}

function node(i: number, n: number): number {
  return Math.cos(((i + 0.5) * Math.PI) / n);
}

/** Coefficients of the Chebyshev polynomials from 0 to n - 1 in powers, row k for the k-th polynomial. */
function chebyshevPowers(n: number): Float64Array[] {
  const rows = Array.from({ length: n }, () => new Float64Array(n));
  rows[0]![0] = 1;
  if (n > 1) rows[1]![1] = 1;
  for (let k = 2; k < n; k++) {
    for (let i = 0; i < n; i++) {
      rows[k]![i] = 2 * (i > 0 ? (rows[k - 1]![i - 1] as number) : 0) - (rows[k - 2]![i] as number);
    }
  }
  return rows;
}

/** From values at the nodes to powers, along one direction. */
function powersOf(values: Float64Array): Float64Array {
  const n = values.length;
  const polynomials = chebyshevPowers(n);
  const out = new Float64Array(n);
  for (let k = 0; k < n; k++) {
    let weight = 0;
    for (let i = 0; i < n; i++) weight += (values[i] as number) * Math.cos((k * (i + 0.5) * Math.PI) / n);
    weight *= (k === 0 ? 1 : 2) / n;
    for (let i = 0; i < n; i++) out[i]! += weight * (polynomials[k]![i] as number);
  }
  return out;
}

function fitBetween(from: number, to: number, low: number, high: number, rows: number, columns: number): Fit {
  const along = Array.from({ length: rows }, (_, i) => {
    const reach = (from + to) / 2 + ((to - from) / 2) * node(i, rows);
    return powersOf(
      Float64Array.from({ length: columns }, (_, j) =>
        ratio(reach, (low + high) / 2 + ((high - low) / 2) * node(j, columns)),
      ),
    );
  });
  const powers = new Float64Array(rows * columns);
  for (let j = 0; j < columns; j++) {
    powers.set(powersOf(Float64Array.from(along, (row) => row[j] as number)), j * rows);
  }
  const [uScale, vScale] = [2 / (to - from), 2 / (high - low)];
  const [uShift, vShift] = [(from + to) / (to - from), (low + high) / (high - low)];
  return { uScale, uShift, vScale, vShift, rows, columns, powers };
}

const inner = new Float64Array(10);

/** Powers in 1 / df and in its reach that leave an error below 1e-10; made when first wanted. */
const fits: (Fit | null)[] = [null, null, null, null];
const SHAPES = [
  [0, NEAR, 1e-9, 0.125, 5, 7],
  [0, NEAR, 0.125, 0.25, 7, 9],
  [NEAR, REACH, 1e-9, 0.125, 8, 9],
  [NEAR, REACH, 0.125, 0.25, 10, 9],
] as const;

function fitAt(which: number): Fit {
  const known = fits[which];
  if (known !== null && known !== undefined) return known;
  const [from, to, low, high, rows, columns] = SHAPES[which] as (typeof SHAPES)[number];
  const made = fitBetween(from, to, low, high, rows, columns);
  fits[which] = made;
  return made;
}

/** The polynomial of five powers of u and seven of v, where most statistics lie; its chains do not wait for each other. */
function nearValue(c: Float64Array, u: number, v: number): number {
  let a0 = c[30] as number;
  let a1 = c[31] as number;
  let a2 = c[32] as number;
  let a3 = c[33] as number;
  let a4 = c[34] as number;
  for (let at = 25; at >= 0; at -= 5) {
    a0 = a0 * v + (c[at] as number);
    a1 = a1 * v + (c[at + 1] as number);
    a2 = a2 * v + (c[at + 2] as number);
    a3 = a3 * v + (c[at + 3] as number);
    a4 = a4 * v + (c[at + 4] as number);
  }
  return (((a4 * u + a3) * u + a2) * u + a1) * u + a0;
}

function fittedValue({ rows, columns, powers }: Fit, u: number, v: number): number {
  if (rows === 5) return nearValue(powers, u, v);
  const last = (columns - 1) * rows;
  for (let i = 0; i < rows; i++) inner[i] = powers[last + i] as number;
  for (let at = last - rows; at >= 0; at -= rows) {
    for (let i = 0; i < rows; i++) inner[i] = (inner[i] as number) * v + (powers[at + i] as number);
  }
  let sum = 0;
  for (let i = rows - 1; i >= 0; i--) sum = sum * u + (inner[i] as number);
  return sum;
}

/**
 * The normal deviate with the same two-sided p as a t statistic: Z of an average over tests.
 * @param t statistic, finite
 * @param df degrees of freedom, > 0
 * @returns z with the sign of t and P(|Z| >= |z|) = P(|T| >= |t|)
 * @source definition; from df 4 on and p above 6e-5 by a Chebyshev fit of z / sqrt(df log(1 + t^2 / df)) (Wallace 1959),
 *   made once from the tails themselves
 * @checked agrees with the tails, 1e-10
 */
export function normalFromT(t: number, df: number): number {
  return normalFromInverse(t, 1 / df);
}

/**
 * The same, from one over the degrees of freedom, as separate variances give them.
 * @param t statistic, finite
 * @param inverse 1 / df, > 0
 * @returns z with the sign of t and P(|Z| >= |z|) = P(|T| >= |t|)
 * @source see normalFromT
 * @checked through normalFromT
 */
export function normalFromInverse(t: number, inverse: number): number {
  const x = t * t * inverse;
  // The series is as exact as log1p below 1e-4, the plain logarithm above, and both take less time.
  const log = x < 1e-4 ? x * (1 - x * (1 / 2 - x * (1 / 3 - x / 4))) : Math.log(1 + x);
  const reach = log / inverse;
  if (!(reach <= REACH && inverse <= 0.25 && inverse >= 1e-9)) return normalFromP(tTwoSided(t, 1 / inverse), t);
  const fit = fitAt((reach > NEAR ? 2 : 0) + (inverse > 0.125 ? 1 : 0));
  const u = reach * fit.uScale - fit.uShift;
  const v = inverse * fit.vScale - fit.vShift;
  const z = fittedValue(fit, u, v) * Math.sqrt(reach);
  return t < 0 ? -z : z;
}

/**
 * The same for several statistics at once, where a call for each would cost more than the deviates.
 * @param z t statistics from place `at` on; replaced by their deviates (the one argument that is)
 * @param at first place
 * @param inverse 1 / df of each, from place 0 on; 0 = leave that place as it is
 * @param count how many
 * @source see normalFromT
 * @checked agrees with normalFromT, exactly
 */
export function replaceByNormal(z: Float64Array, at: number, inverse: Float64Array, count: number): void {
  const { uScale, uShift, vScale, vShift, powers } = fitAt(0);
  for (let i = 0; i < count; i++) {
    const own = inverse[i] as number;
    if (own === 0) continue;
    const t = z[at + i] as number;
    const x = t * t * own;
    const log = x < 1e-4 ? x * (1 - x * (1 / 2 - x * (1 / 3 - x / 4))) : Math.log(1 + x);
    const reach = log / own;
    if (reach <= NEAR && own <= 0.125 && own >= 1e-9) {
      const size = nearValue(powers, reach * uScale - uShift, own * vScale - vShift) * Math.sqrt(reach);
      z[at + i] = t < 0 ? -size : size;
    } else z[at + i] = normalFromInverse(t, own);
  }
}

/**
 * The normal deviate of a two-sided p with a sign.
 * @param p two-sided p, 0 to 1
 * @param sign any number: its sign is the result's, 0 gives 0
 * @returns z, at most about 37 in size: a p of 0 counts as the smallest double
 * @source Stouffer et al. (1949): z = sign Phi^-1(1 - p / 2)
 * @checked by hand: .05 gives 1.959964
 */
export function normalFromP(p: number, sign: number): number {
  return Math.sign(sign) * Math.max(0, normalQuantileUpper(Math.max(p, 1e-300) / 2));
}
