/** Experiments like the one at hand, simulated: how often each method rejects, and how often its interval holds the truth. */
import { rng } from '../numerics/rng.ts';
import { fenceLimits } from '../numerics/rules/iqr-fences.ts';
import { madLimits } from '../numerics/rules/mad.ts';
import { zScoreLimits } from '../numerics/rules/z-score.ts';
import { OUTCOME, sortInPlace } from '../numerics/simulation/outcome.ts';
import { pairDecider } from '../numerics/simulation/pairs.ts';
import { populationTrimmedMean, type ShapeId, shapeOf } from '../numerics/simulation/shapes.ts';
import { type Truth, twoGroupDecider } from '../numerics/simulation/two-groups.ts';
import { bootstrapDecider, permutationDecider } from '../numerics/simulation/two-groups-resampled.ts';
import type { LongWork } from './flip-set.ts';
import type { Measure } from './rules.ts';

export interface SimulationSpec {
  readonly scope: 'between' | 'within';
  readonly shape: ShapeId;
  /** Participants under the first and the second condition; within, both are the number of pairs. */
  readonly n: readonly [number, number];
  /** Spreads under the two conditions, in the shape's unit. */
  readonly spread: readonly [number, number];
  /** True difference, first minus second, in the shape's unit. */
  readonly difference: number;
  /** What the difference is of, and what is equal where it is 0. */
  readonly equal: 'means' | 'trimmed means';
  /** Within only: share of a score's variance that is the participant's own, 0 to below 1. */
  readonly own: number;
  /** Rule applied in the second and third part of the result; null = none. */
  readonly rule: { readonly measure: Measure; readonly cutoff: number } | null;
  readonly alpha: number;
  /** Integer percentage trimmed at each end. */
  readonly trim: number;
  /** Resamples and relabellings of each experiment; 0 = closed-form tests only. */
  readonly resamples: number;
  readonly seed: number;
}

/** How a simulated experiment was cleaned before its tests. */
export type Cleaning = 'none' | 'across' | 'within';

/** Counts over experiments of one method after one cleaning. */
export interface MethodCount {
  readonly cleaning: Cleaning;
  readonly method: string;
  judged: number;
  rejected: number;
  intervals: number;
  covered: number;
}

export interface SimulationCounts {
  readonly experiments: number;
  readonly methods: readonly MethodCount[];
  /** Scores set aside by the rule, and scores in all: across, within. */
  readonly aside: readonly [number, number];
  readonly scores: number;
}

/** Methods in the order shown: word in saved files -> its name. */
export const METHODS: Readonly<Record<'between' | 'within', readonly (readonly [string, string])[]>> = {
  between: [
    ['student', 'Student\u2019s t'],
    ['welch', 'Welch\u2019s t'],
    ['yuen', 'Yuen\u2013Welch'],
    ['mannWhitney', 'Mann\u2013Whitney'],
    ['percentile', 'percentile bootstrap, trimmed means'],
    ['bootstrapT', 'bootstrap-t, trimmed means'],
    ['permutation', 'relabelled difference of means'],
    ['permutationT', 'relabelled Welch t'],
  ],
  within: [
    ['pairedT', 'paired t'],
    ['trimmed', 'trimmed mean of differences'],
    ['signedRank', 'signed-rank'],
    ['percentile', 'percentile bootstrap, trimmed differences'],
    ['signFlip', 'signs changed, mean of differences'],
  ],
};

/** Stream of the scores among those of the seed. */
const STREAM = 40;

type Decide = (x: Float64Array, y: Float64Array, experiment: number, marks: Float64Array) => void;

/**
 * Runs some of the experiments; each has random numbers of its own, so that any cut into parts gives the same.
 *
 * @param spec the experiments
 * @param from first experiment
 * @param to the one after the last
 * @param work pauses and progress
 * @returns counts that add up over parts
 * @throws RangeError when the spec is out of range
 * @source error rates by simulation: methods 5; rules with the limits of the exclusion cell
 */
export async function simulate(
  spec: SimulationSpec,
  from: number,
  to: number,
  work: LongWork,
): Promise<SimulationCounts> {
  requireSpec(spec);
  const draw = drawer(spec);
  const decide = spec.scope === 'between' ? betweenDecide(spec) : withinDecide(spec);
  const names = METHODS[spec.scope].map(([id]) => id);
  const cleanings: readonly Cleaning[] = spec.rule === null ? ['none'] : ['none', 'across', 'within'];
  const counts = cleanings.map((cleaning) => names.map((method) => emptyCount(cleaning, method)));
  const marks = new Float64Array(names.length);
  const aside: [number, number] = [0, 0];
  let scores = 0;
  for (let experiment = from; experiment < to; experiment++) {
    const [x, y] = draw(experiment);
    scores += x.length + y.length;
    cleanings.forEach((cleaning, which) => {
      const [a, b] = cleaned(x, y, cleaning, spec);
      if (cleaning !== 'none')
        aside[which - 1] = (aside[which - 1] as number) + x.length + y.length - a.length - b.length;
      marks.fill(0);
      decide(a, b, experiment, marks);
      for (const [i, count] of (counts[which] ?? []).entries()) add(count, marks[i] as number);
    });
    if (experiment % 16 === 15) {
      await work.pause();
      work.progress((experiment + 1 - from) / (to - from));
    }
  }
  return { experiments: to - from, methods: counts.flat(), aside, scores };
}

function requireSpec({ n, spread, own, resamples }: SimulationSpec): void {
  if (!n.every((each) => Number.isInteger(each) && each >= 3)) throw new RangeError(`*n* must be at least 3; got ${n}`);
  if (!spread.every((each) => each > 0)) throw new RangeError(`*spread* must be above 0; got ${spread}`);
  if (!(own >= 0 && own < 1)) throw new RangeError(`*own* must be from 0 to below 1; got ${own}`);
  if (!Number.isInteger(resamples) || resamples < 0)
    throw new RangeError(`*resamples* must be 0 or more; got ${resamples}`);
}

function emptyCount(cleaning: Cleaning, method: string): MethodCount {
  return { cleaning, method, judged: 0, rejected: 0, intervals: 0, covered: 0 };
}

function add(count: MethodCount, marks: number): void {
  if ((marks & OUTCOME.judged) !== 0) count.judged++;
  if ((marks & OUTCOME.rejected) !== 0) count.rejected++;
  if ((marks & OUTCOME.hasInterval) !== 0) count.intervals++;
  if ((marks & OUTCOME.covered) !== 0) count.covered++;
}

/** Scores of one experiment, in the order of participants. */
function drawer(spec: SimulationSpec): (experiment: number) => [Float64Array, Float64Array] {
  const shape = shapeOf(spec.shape);
  const center = spec.equal === 'means' ? shape.mean : populationTrimmedMean(shape, spec.trim);
  const random = rng(spec.seed, STREAM);
  const [s1, s2] = spec.spread;
  const [n1, n2] = spec.n;
  const all = new Float64Array(n1 + n2);
  const person = new Float64Array(n1);
  return (experiment) => {
    const stream = random.fork(experiment);
    shape.fill(all, stream);
    const [x, y] = [all.slice(0, n1), all.slice(n1)];
    for (let i = 0; i < n1; i++) x[i] = (x[i] as number) - center;
    for (let i = 0; i < n2; i++) y[i] = (y[i] as number) - center;
    if (spec.scope === 'within' && spec.own > 0) {
      shape.fill(person, stream);
      const [own, rest] = [Math.sqrt(spec.own), Math.sqrt(1 - spec.own)];
      for (let i = 0; i < n1; i++) {
        const level = own * ((person[i] as number) - center);
        x[i] = level + rest * (x[i] as number);
        y[i] = level + rest * (y[i] as number);
      }
    }
    for (let i = 0; i < n1; i++) x[i] = spec.difference + s1 * (x[i] as number);
    for (let i = 0; i < n2; i++) y[i] = s2 * (y[i] as number);
    return [x, y];
  };
}

/** True differences of means and of trimmed means of two groups. */
export function truthOf(spec: SimulationSpec): Truth {
  const shape = shapeOf(spec.shape);
  const trimmed = populationTrimmedMean(shape, spec.trim);
  const center = spec.equal === 'means' ? shape.mean : trimmed;
  const gap = spec.spread[0] - spec.spread[1];
  return {
    means: spec.difference + gap * (shape.mean - center),
    trimmedMeans: spec.difference + gap * (trimmed - center),
  };
}

function betweenDecide(spec: SimulationSpec): Decide {
  const { alpha, trim, resamples: B, seed } = spec;
  const truth = truthOf(spec);
  const closed = twoGroupDecider({ alpha, trim, most: spec.n[0] + spec.n[1] });
  const bootstrap = bootstrapDecider({ alpha, trim, B: Math.max(1, B), seed });
  const relabel = permutationDecider({ alpha, B: Math.max(1, B), seed });
  const out = { student: 0, welch: 0, yuen: 0, mannWhitney: 0 };
  const drawn = { percentile: 0, studentized: 0 };
  const relabelled = { means: 0, studentized: 0 };
  return (x, y, experiment, marks) => {
    const [a, b] = [sortInPlace(x.slice()), sortInPlace(y.slice())];
    closed(a, b, truth, out);
    marks.set([out.student, out.welch, out.yuen, out.mannWhitney]);
    if (B === 0) return;
    bootstrap(a, b, truth.trimmedMeans, experiment, drawn);
    relabel(a, b, experiment, relabelled);
    marks.set([drawn.percentile, drawn.studentized, relabelled.means, relabelled.studentized], 4);
  };
}

/**
 * Pairs: the true trimmed mean of the differences is known where their distribution is symmetric about the difference,
 * which equal spreads, or a symmetric shape, make it.
 */
function withinDecide(spec: SimulationSpec): Decide {
  const { alpha, trim, resamples: B, seed } = spec;
  const known = spec.spread[0] === spec.spread[1] || shapeOf(spec.shape).symmetric;
  const { means } = truthOf(spec);
  const truth = { means, trimmedMeans: known ? means : NaN };
  const decide = pairDecider({ alpha, trim, B, seed }, spec.n[0]);
  const out = { pairedT: 0, trimmed: 0, signedRank: 0, percentile: 0, signFlip: 0 };
  const shown = (marks: number) => (known ? marks : marks & ~(OUTCOME.hasInterval | OUTCOME.covered));
  return (x, y, experiment, marks) => {
    decide(sortInPlace(x.map((score, i) => score - (y[i] as number))), truth, experiment, out);
    marks.set([out.pairedT, shown(out.trimmed), out.signedRank, shown(out.percentile), out.signFlip]);
  };
}

/** The scores a rule keeps; pairs leave together. */
function cleaned(
  x: Float64Array,
  y: Float64Array,
  cleaning: Cleaning,
  spec: SimulationSpec,
): [Float64Array, Float64Array] {
  const { rule } = spec;
  if (cleaning === 'none' || rule === null) return [x, y];
  const pooled = new Float64Array(x.length + y.length);
  pooled.set(x);
  pooled.set(y, x.length);
  const [ofX, ofY] = cleaning === 'across' ? [pooled, pooled] : [x, y];
  const inX = insideOf(ofX, rule);
  const inY = cleaning === 'across' ? inX : insideOf(ofY, rule);
  if (spec.scope === 'between') return [x.filter(inX), y.filter(inY)];
  const both = x.map((score, i) => (inX(score) && inY(y[i] as number) ? 1 : 0));
  return [x.filter((_, i) => both[i] === 1), y.filter((_, i) => both[i] === 1)];
}

function insideOf(scores: Float64Array, { measure, cutoff }: { measure: Measure; cutoff: number }) {
  const { lower, upper } =
    measure === 'MAD'
      ? madLimits(scores, { cutoff })
      : measure === 'SD'
        ? zScoreLimits(scores, { cutoff })
        : fenceLimits(scores, { k: cutoff, quartiles: 'type7' });
  return (score: number) => (lower === null || score >= lower) && (upper === null || score <= upper);
}

/** Counts of several parts together, in the order given. */
export function addCounts(parts: readonly SimulationCounts[]): SimulationCounts {
  const [first, ...rest] = parts;
  if (first === undefined) throw new RangeError('*parts* must hold at least 1 part; got 0');
  const methods = first.methods.map((method) => ({ ...method }));
  const aside: [number, number] = [first.aside[0], first.aside[1]];
  let { experiments, scores } = first;
  for (const part of rest) {
    part.methods.forEach((count, i) => {
      const own = methods[i] as MethodCount;
      own.judged += count.judged;
      own.rejected += count.rejected;
      own.intervals += count.intervals;
      own.covered += count.covered;
    });
    aside[0] += part.aside[0];
    aside[1] += part.aside[1];
    experiments += part.experiments;
    scores += part.scores;
  }
  return { experiments, methods, aside, scores };
}
