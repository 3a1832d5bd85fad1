import { normalQuantileUpper } from './tails/normal.ts';
import { tTwoSided } from './tails/t.ts';

/** Largest df log(1 + t^2 / df) of the fits: beyond it (p below about 6e-5) the tails themselves are asked. */
const REACH = 16;
/** Degrees of the fits in that quantity and in 1 / df. */
const ROWS = 10;
const COLUMNS = 9;

/** Powers of (u, v) in [-1, 1] x [-1, 1], all powers of u for one of v; the highest power last. */
interface Fit {
  readonly low: number;
  readonly high: number;
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

function fitBetween(low: number, high: number): Fit {
  const along = Array.from({ length: ROWS }, (_, i) => {
    const reach = (REACH / 2) * (1 + node(i, ROWS));
    return powersOf(
      Float64Array.from({ length: COLUMNS }, (_, j) =>
        ratio(reach, (low + high) / 2 + ((high - low) / 2) * node(j, COLUMNS)),
      ),
    );
  });
  const powers = new Float64Array(ROWS * COLUMNS);
  for (let j = 0; j < COLUMNS; j++) {
    powers.set(powersOf(Float64Array.from(along, (row) => row[j] as number)), j * ROWS);
  }
  return { low, high, powers };
}

const inner = new Float64Array(ROWS);

/** Fits for 1 / df up to 1/8 and from there to 1/4, made when first wanted. */
const fits: (Fit | null)[] = [null, null];

function fitFor(inverse: number): Fit {
  const which = inverse > 0.125 ? 1 : 0;
  fits[which] ??= which === 0 ? fitBetween(1e-9, 0.125) : fitBetween(0.125, 0.25);
  return fits[which] as Fit;
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
  const reach = df * Math.log1p((t * t) / df);
  const inverse = 1 / df;
  if (!(reach <= REACH && inverse <= 0.25 && inverse >= 1e-9)) return fromTails(t, df);
  const { low, high, powers } = fitFor(inverse);
  const u = reach * (2 / REACH) - 1;
  const v = (2 * inverse - low - high) / (high - low);
  // All powers of u side by side: each step of one waits for the step before it, those of the others do not.
  const last = (COLUMNS - 1) * ROWS;
  for (let i = 0; i < ROWS; i++) inner[i] = powers[last + i] as number;
  for (let at = last - ROWS; at >= 0; at -= ROWS) {
    for (let i = 0; i < ROWS; i++) inner[i] = (inner[i] as number) * v + (powers[at + i] as number);
  }
  let sum = 0;
  for (let i = ROWS - 1; i >= 0; i--) sum = sum * u + (inner[i] as number);
  const z = sum * Math.sqrt(reach);
  return t < 0 ? -z : z;
}

function fromTails(t: number, df: number): number {
  return normalFromP(tTwoSided(t, df), t);
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
