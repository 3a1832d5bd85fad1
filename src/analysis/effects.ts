/** Effect sizes as rows report them, with their intervals; bootstrap where no closed form holds (methods 3.4). */
import { winsorizedNormalSd } from '../numerics/effect-size/akp-robust-d.ts';
import { hedgesG, smallSampleFactor } from '../numerics/effect-size/hedges-g.ts';
import { pairedD } from '../numerics/effect-size/paired-d.ts';
import { noSpread } from '../numerics/inference.ts';
import { sorted } from '../numerics/order.ts';
import { resample } from '../numerics/resample.ts';
import { trimCount } from '../numerics/scores.ts';
import { trimmedMeanSorted } from '../numerics/trimmed-mean.ts';
import type { EffectSize, Limits } from './finding.ts';

export interface EffectContext {
  readonly level: number;
  /** Resamples of a bootstrap interval; 0 = no interval (the strip's specifications need none). */
  readonly resamples: number;
  readonly seed: number;
}

/** Streams of the seed, one an effect size: an effect never shares its draws with a row's own bootstrap. */
const STREAM = { dAverage: 101, robustPaired: 102, welchG: 103, robustTwoGroups: 104 } as const;

/** Standardized mean difference of pairs by the average SD, with its bootstrap interval, and d_z with the noncentral t. */
export function pairedEffects(x: Float64Array, y: Float64Array, context: EffectContext): EffectSize[] {
  const d = pairedD(x, y, { level: context.level });
  const n = x.length;
  const draws = new Float64Array(context.resamples);
  if (n >= 2 && d.dAverage !== null && context.resamples > 0) {
    resample(
      [n],
      context.resamples,
      context.seed,
      ([counts], index) => {
        draws[index] = averageD(x, y, counts as Int32Array);
      },
      STREAM.dAverage,
    );
  }
  return [
    bootstrapped('d_av (average SD)', d.dAverage, draws, context, d.reason),
    {
      name: 'd_z (SD of the differences)',
      value: d.dZ,
      interval: d.interval,
      how: 'noncentral t',
      ...(d.reason === undefined ? {} : { reason: d.reason }),
    },
  ];
}

/** Robust d of pairs: trimmed mean of the differences over their rescaled winsorized SD (Algina et al. 2005). */
export function robustPairedEffect(differences: Float64Array, trim: number, context: EffectContext): EffectSize {
  const s = sorted(differences);
  const constant = winsorizedNormalSd(trim);
  const g = trimCount(s.length, trim);
  const value = robustOne(s, g, constant);
  const draws = new Float64Array(context.resamples);
  const buffer = new Float64Array(s.length);
  if (value !== null && s.length >= 2 && context.resamples > 0) {
    resample(
      [s.length],
      context.resamples,
      context.seed,
      ([counts], index) => {
        expand(s, counts as Int32Array, buffer);
        draws[index] = robustOne(buffer, g, constant) ?? NaN;
      },
      STREAM.robustPaired,
    );
  }
  return bootstrapped(
    `robust d (${trim} % trimmed, of the differences)`,
    value,
    draws,
    context,
    'winsorized SD is zero',
  );
}

/** Hedges' g by the pooled SD with the noncentral-t interval: the effect size of Student's row. */
export function studentEffect(x: Float64Array, y: Float64Array, context: EffectContext): EffectSize {
  const g = hedgesG(x, y, { level: context.level });
  return {
    name: "Hedges' g (pooled SD)",
    value: g.value,
    interval: g.interval,
    how: 'noncentral t',
    ...(g.reason === undefined ? {} : { reason: g.reason }),
  };
}

/** g by the root of the average variance with its bootstrap interval: the effect size of Welch's row. */
export function welchEffect(x: Float64Array, y: Float64Array, context: EffectContext): EffectSize {
  const [a, b] = [sorted(x), sorted(y)];
  const value = averageG(a, b);
  const draws = twoGroupDraws(a, b, context, STREAM.welchG, averageG, value !== null);
  return bootstrapped('g (average variance)', value, draws, context, 'both groups have no spread');
}

/** Robust d of two groups over the pooled winsorized SD with its bootstrap interval (Algina et al. 2005). */
export function robustEffect(x: Float64Array, y: Float64Array, trim: number, context: EffectContext): EffectSize {
  const constant = winsorizedNormalSd(trim);
  const [a, b] = [sorted(x), sorted(y)];
  const robust = (first: Float64Array, second: Float64Array) => robustTwo(first, second, trim, constant);
  const value = robust(a, b);
  const draws = twoGroupDraws(a, b, context, STREAM.robustTwoGroups, robust, value !== null);
  return bootstrapped(`robust d (${trim} % trimmed)`, value, draws, context, 'pooled winsorized SD is zero');
}

function twoGroupDraws(
  a: Float64Array,
  b: Float64Array,
  context: EffectContext,
  stream: number,
  statistic: (a: Float64Array, b: Float64Array) => number | null,
  run: boolean,
): Float64Array {
  const draws = new Float64Array(context.resamples);
  const [first, second] = [new Float64Array(a.length), new Float64Array(b.length)];
  if (!run || context.resamples === 0) return draws;
  resample(
    [a.length, b.length],
    context.resamples,
    context.seed,
    ([countsA, countsB], index) => {
      expand(a, countsA as Int32Array, first);
      expand(b, countsB as Int32Array, second);
      draws[index] = statistic(first, second) ?? NaN;
    },
    stream,
  );
  return draws;
}

/** Writes a resample out in ascending order and clears the counts. */
function expand(s: Float64Array, counts: Int32Array, into: Float64Array): void {
  let at = 0;
  for (let i = 0; i < s.length; i++) {
    const times = counts[i] as number;
    counts[i] = 0;
    for (let k = 0; k < times; k++) into[at++] = s[i] as number;
  }
}

function averageD(x: Float64Array, y: Float64Array, counts: Int32Array): number {
  const n = counts.length;
  let [sx, sy] = [0, 0];
  for (let i = 0; i < n; i++) {
    sx += (counts[i] as number) * (x[i] as number);
    sy += (counts[i] as number) * (y[i] as number);
  }
  const [mx, my] = [sx / n, sy / n];
  let squares = 0;
  for (let i = 0; i < n; i++) {
    const [a, b] = [(x[i] as number) - mx, (y[i] as number) - my];
    squares += (counts[i] as number) * (a * a + b * b);
    counts[i] = 0;
  }
  return (mx - my) / Math.sqrt(squares / (n - 1) / 2);
}

function robustOne(s: Float64Array, g: number, constant: number): number | null {
  const sd = Math.sqrt(winsorizedSquares(s, g) / (s.length - 1));
  return noSpread(sd, sizeOf(s)) ? null : (constant * trimmedMeanSorted(s, g)) / sd;
}

function robustTwo(a: Float64Array, b: Float64Array, trim: number, constant: number): number | null {
  const [ga, gb] = [trimCount(a.length, trim), trimCount(b.length, trim)];
  const squares = winsorizedSquares(a, ga) + winsorizedSquares(b, gb);
  const sd = Math.sqrt(squares / (a.length + b.length - 2));
  const size = Math.max(sizeOf(a), sizeOf(b));
  return noSpread(sd, size) ? null : (constant * (trimmedMeanSorted(a, ga) - trimmedMeanSorted(b, gb))) / sd;
}

function averageG(a: Float64Array, b: Float64Array): number | null {
  if (a.length < 2 || b.length < 2) return null;
  const variance = (winsorizedSquares(a, 0) / (a.length - 1) + winsorizedSquares(b, 0) / (b.length - 1)) / 2;
  if (noSpread(Math.sqrt(variance), Math.max(sizeOf(a), sizeOf(b)))) return null;
  const factor = smallSampleFactor(a.length + b.length - 2);
  return (factor * (trimmedMeanSorted(a, 0) - trimmedMeanSorted(b, 0))) / Math.sqrt(variance);
}

/** Largest size of ascending scores: a spread that is nothing but their rounding is none. */
function sizeOf(s: Float64Array): number {
  return Math.max(Math.abs(s[0] as number), Math.abs(s[s.length - 1] as number));
}

/** Sum of squared distances of the winsorized scores from their mean; s ascending. */
function winsorizedSquares(s: Float64Array, g: number): number {
  const n = s.length;
  const [low, high] = [s[g] as number, s[n - 1 - g] as number];
  const at = (i: number) => (i < g ? low : i >= n - g ? high : (s[i] as number));
  let total = 0;
  for (let i = 0; i < n; i++) total += at(i);
  const centre = total / n;
  let squares = 0;
  for (let i = 0; i < n; i++) squares += (at(i) - centre) * (at(i) - centre);
  return squares;
}

function bootstrapped(
  name: string,
  value: number | null,
  draws: Float64Array,
  context: EffectContext,
  reason?: string,
): EffectSize {
  const how = `percentile bootstrap, B = ${context.resamples}`;
  if (value === null) return { name, value, interval: null, how, reason: reason ?? 'not defined for these scores' };
  if (context.resamples === 0) return { name, value, interval: null, how, reason: 'not resampled' };
  const interval = percentileLimits(draws, context.level);
  return interval
    ? { name, value, interval, how }
    : { name, value, interval, how, reason: 'too many resamples have no spread' };
}

/** The (B + 1) alpha / 2 smallest and largest of the draws; null where more than 5 % of them are not defined. */
function percentileLimits(draws: Float64Array, level: number): Limits | null {
  const defined = sorted(draws.filter((draw) => Number.isFinite(draw)));
  if (defined.length < 0.95 * draws.length || defined.length < 40) return null;
  const k = Math.max(1, Math.floor(((1 - level) / 2) * (defined.length + 1) + 1e-9));
  return [defined[k - 1] as number, defined[defined.length - k] as number];
}
