/** p and limits from bootstrap values: percentile, BCa, bootstrap-t. */
import { type Alternative, type Limits, limits, outside } from './inference.ts';
import { selectKth } from './selection.ts';
import { normalLower, normalQuantile } from './tails/normal.ts';

/** p and interval; null with a reason where they do not exist. */
export interface BootstrapInference {
  readonly p: number | null;
  readonly interval: Limits | null;
  readonly reason?: string;
}

const tooFew = 'too few resamples for this level';

/** Number of values outside a limit: floor of the share of B + 1, safe against (B+1) .025 falling just short. */
function ranksOutside(share: number, B: number): number {
  return Math.floor(share * (B + 1) + 1e-9);
}

/** (b + 1) / (B + 1) with b the values at or beyond, ties as half. */
function tailShare(values: Float64Array, at: number, grain: number): { lower: number; upper: number } {
  let below = 0;
  let equal = 0;
  for (let i = 0; i < values.length; i++) {
    const value = values[i] as number;
    if (value < at - grain) below++;
    else if (value <= at + grain) equal++;
  }
  const B = values.length;
  const low = below + equal / 2;
  return { lower: Math.min(1, (low + 1) / (B + 1)), upper: Math.min(1, (B - low + 1) / (B + 1)) };
}

function directed(lower: number, upper: number, alternative: Alternative): number {
  if (alternative === 'greater') return lower;
  return alternative === 'less' ? upper : Math.min(1, 2 * Math.min(lower, upper));
}

function pick(values: Float64Array, below: number, above: number, alternative: Alternative): Limits | null {
  const B = values.length;
  const low = alternative === 'less' ? 1 : ranksOutside(below, B);
  const high = alternative === 'greater' ? 1 : ranksOutside(above, B);
  if (low < 1 || high < 1) return null;
  const copy = values.slice();
  return limits(selectKth(copy, low), selectKth(copy, B - high + 1), alternative);
}

/**
 * Percentile bootstrap.
 * @param values B bootstrap values, any order
 * @param nullValue value under the null hypothesis, same unit
 * @param level confidence level
 * @param alternative direction
 * @param grain values this close to the null count as equal to it (default 0)
 * @returns p = 2 min(p1, p2) from (b + 1)/(B + 1), values equal to the null counted as half; limits: the k-th smallest and
 *   k-th largest value, k = floor((B + 1) alpha / 2), so that p <= alpha exactly when the null lies outside
 * @throws RangeError when the level is out of range
 * @source Efron (1979); p: Wilcox (2012), section 4.4
 * @checked by hand
 */
export function percentileInference(
  values: Float64Array,
  nullValue: number,
  level: number,
  alternative: Alternative,
  grain = 0,
): BootstrapInference {
  const { lower, upper } = tailShare(values, nullValue, grain);
  const tail = outside(level, alternative);
  const interval = pick(values, tail, tail, alternative);
  const p = directed(lower, upper, alternative);
  return interval === null ? { p, interval, reason: tooFew } : { p, interval };
}

/**
 * Acceleration of the BCa interval.
 * @param influences one value per score: mean of the leave-one-out values minus each of them, scaled per group
 * @returns sum l^3 / (6 (sum l^2)^1.5); 0 without spread
 * @source Efron (1987)
 * @checked by hand
 */
export function acceleration(influences: Float64Array): number {
  let squares = 0;
  let cubes = 0;
  let size = 0;
  for (const l of influences) size = Math.max(size, Math.abs(l));
  if (size === 0) return 0;
  for (const l of influences) {
    const unit = l / size;
    squares += unit * unit;
    cubes += unit * unit * unit;
  }
  return cubes / (6 * squares * Math.sqrt(squares));
}

/** u / (1 + a u), without limit where the denominator is used up. */
function pulled(u: number, a: number): number {
  const rest = 1 + a * u;
  return rest > 0 ? u / rest : Math.sign(u) * 40;
}

/**
 * BCa bootstrap.
 * @param values B bootstrap values, any order
 * @param estimate the estimate itself
 * @param a acceleration
 * @param nullValue value under the null hypothesis, same unit
 * @param level confidence level
 * @param alternative direction
 * @param grain values this close to the null count as equal to it (default 0)
 * @returns limits at the levels Phi(z0 + (z0 + z)/(1 - a (z0 + z))); p: the level at which a limit meets the null value;
 *   null with a reason when all values lie on one side of the estimate
 * @throws RangeError when the level is out of range
 * @source Efron (1987): z0 = Phi^-1(share of values below the estimate)
 * @checked by hand; with z0 = a = 0 it is the percentile interval
 */
export function bcaInference(
  values: Float64Array,
  estimate: number,
  a: number,
  nullValue: number,
  level: number,
  alternative: Alternative,
  grain = 0,
): BootstrapInference {
  const B = values.length;
  let below = 0;
  for (const value of values) if (value < estimate) below++;
  if (below === 0 || below === B) {
    return { p: null, interval: null, reason: 'all resamples lie on one side of the estimate' };
  }
  const z0 = normalQuantile(below / B);
  const tail = outside(level, alternative);
  const moved = (z: number) => z0 + pulled(z0 + z, -a);
  const z = normalQuantile(tail);
  const interval = pick(values, normalLower(moved(z)), normalLower(-moved(-z)), alternative);
  // The level at which a limit meets the null value; never below what B values can tell.
  const least = 1 / (B + 1);
  const met = (share: number, sign: number) => {
    const u = sign * normalQuantile(Math.min(share, 1 - least)) - z0;
    return Math.min(1, Math.max(least, normalLower(sign * (pulled(u, a) - z0))));
  };
  const { lower, upper } = tailShare(values, nullValue, grain);
  const lowerP = met(lower, 1);
  const upperP = met(upper, -1);
  const p = directed(lowerP, upperP, alternative);
  return interval === null ? { p, interval, reason: tooFew } : { p, interval };
}

/**
 * Bootstrap-t.
 * @param ts B studentized bootstrap values (value - estimate) / its own se, any order; infinite where that se is 0
 * @param estimate the estimate
 * @param se its standard error, > 0
 * @param nullValue value under the null hypothesis, same unit
 * @param level confidence level
 * @param alternative direction
 * @param form 'symmetric' (two-sided: |T|) or 'equal-tailed'
 * @returns p = (b + 1)/(B + 1) and estimate minus critical T times se; interval null with a reason when a critical value
 *   is infinite or B is too small
 * @throws RangeError when the level is out of range
 * @source Efron (1979), Hall (1988); symmetric critical value: the ceil((1 - alpha)(B + 1))-th |T|
 * @checked by hand
 */
export function bootstrapTInference(
  ts: Float64Array,
  estimate: number,
  se: number,
  nullValue: number,
  level: number,
  alternative: Alternative,
  form: 'symmetric' | 'equal-tailed',
): BootstrapInference {
  const B = ts.length;
  const t = (estimate - nullValue) / se;
  if (alternative === 'two-sided' && form === 'symmetric') {
    const sizes = ts.map(Math.abs);
    let beyond = 0;
    for (const size of sizes) if (size >= Math.abs(t)) beyond++;
    const rank = Math.ceil(level * (B + 1) - 1e-9);
    const reach = rank > B ? Infinity : selectKth(sizes, rank) * se;
    return finite((beyond + 1) / (B + 1), [estimate - reach, estimate + reach], rank > B);
  }
  let atMost = 0;
  let atLeast = 0;
  for (const value of ts) {
    if (value <= t) atMost++;
    if (value >= t) atLeast++;
  }
  const p = directed((atLeast + 1) / (B + 1), (atMost + 1) / (B + 1), alternative);
  const rank = ranksOutside(outside(level, alternative), B);
  if (rank < 1) return { p, interval: null, reason: tooFew };
  const copy = ts.slice();
  const low = estimate - selectKth(copy, B - rank + 1) * se;
  return finite(p, limits(low, estimate - selectKth(copy, rank) * se, alternative), false);
}

function finite(p: number, interval: Limits, few: boolean): BootstrapInference {
  if (few) return { p, interval: null, reason: tooFew };
  const ends = interval.filter((end) => end !== null);
  if (ends.every(Number.isFinite)) return { p, interval };
  return { p, interval: null, reason: 'too many resamples have no spread' };
}
