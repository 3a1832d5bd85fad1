/** What a removal does: read off running sums where the planned row allows it, else by running the row or the chain. */
import { type Remainder, remainder, type SortedSums, sortedSums } from '../numerics/removals.ts';
import { criticalT } from '../numerics/simulation/critical-t.ts';
import type { ClaimSpec } from './claim.ts';
import type { Finding } from './finding.ts';
import type { RemovalJudge } from './flip-set.ts';
import { type FlipTarget, pullOf, sideOf } from './flip-set-target.ts';
import { type Chain, peopleOf, plannedRow, rulesStandAlone, samplesWithout } from './influence-chain.ts';
import type { Samples } from './samples.ts';

/** A judge and who its candidates are. */
export interface NamedJudge extends RemovalJudge {
  readonly names: readonly string[];
}

export interface JudgeSpec {
  readonly target: FlipTarget;
  readonly claim: ClaimSpec;
  readonly smallest: number;
  /** Oriented estimate of everyone. */
  readonly full: number;
}

/** Sets of one size that may all be tried, by what one costs. */
const MOST_SETS = 2_000_000;
const MOST_ROWS = 50_000;
const MOST_CHAINS = 3000;

/** Rows whose estimate, standard error and degrees of freedom follow from running sums. */
type Form = 'differences' | 'pooled' | 'separate';

const FROM_SUMS: Readonly<Record<string, Form>> = {
  'paired-t': 'differences',
  'trimmed-differences': 'differences',
  student: 'pooled',
  welch: 'separate',
  'yuen-welch': 'separate',
};

/**
 * The judge of a chain's removals.
 *
 * @param chain the chain
 * @param samples its samples with everyone
 * @param spec what counts as a change
 * @returns the cheapest judge that gives the chain's own answer
 * @source deletion of scores in closed form: methods 2.5; otherwise exact refits
 */
export function judgeOf(chain: Chain, samples: Samples, spec: JudgeSpec): NamedJudge {
  if (!rulesStandAlone(chain.result.scores.design.rules)) return chainJudge(chain, samples, spec);
  return sumsJudge(chain, samples, spec) ?? rowJudge(chain, samples, spec);
}

function chainJudge(chain: Chain, samples: Samples, spec: JudgeSpec): NamedJudge {
  const names = chain.people;
  const { first } = chain.result.comparison;
  return {
    names,
    ...bounds(samples, spec, MOST_CHAINS, 5 * MOST_CHAINS),
    candidates: names.length,
    pull(removed) {
      const gone = new Set(Array.from(removed, (place) => names[place] as string));
      const left = samplesWithout(chain, gone);
      if (tooFew(left, spec)) return null;
      return pullOf(plannedRow(chain, left), spec.target, spec.claim, first, spec.full, spec.smallest);
    },
  };
}

/** Samples without some of their participants, where no score depends on who else is in. */
export function samplesLess(samples: Samples, gone: ReadonlySet<string>): Samples {
  const keep = (scores: Float64Array, people: readonly string[]) => scores.filter((_, i) => !gone.has(people[i] ?? ''));
  const xParticipants = samples.xParticipants.filter((name) => !gone.has(name));
  const paired = samples.xParticipants === samples.yParticipants;
  let from = { first: 0, second: 0 };
  const parts = samples.parts?.map((part) => {
    const people = part.side === 'first' ? samples.xParticipants : samples.yParticipants;
    const start = from[part.side];
    from = { ...from, [part.side]: start + part.scores.length };
    return { ...part, scores: keep(part.scores, people.slice(start, start + part.scores.length)) };
  });
  return {
    ...samples,
    x: keep(samples.x, samples.xParticipants),
    y: keep(samples.y, samples.yParticipants),
    xParticipants,
    yParticipants: paired ? xParticipants : samples.yParticipants.filter((name) => !gone.has(name)),
    ...(parts === undefined ? {} : { parts }),
  };
}

function rowJudge(chain: Chain, samples: Samples, spec: JudgeSpec): NamedJudge {
  const names = peopleOf(samples);
  const { first } = chain.result.comparison;
  const most = chain.estimator.closedForm ? MOST_ROWS : MOST_CHAINS;
  return {
    names,
    ...bounds(samples, spec, most, 5 * MOST_CHAINS),
    candidates: names.length,
    pull(removed) {
      const left = samplesLess(samples, new Set(Array.from(removed, (place) => names[place] as string)));
      if (tooFew(left, spec)) return null;
      return pullOf(plannedRow(chain, left), spec.target, spec.claim, first, spec.full, spec.smallest);
    },
  };
}

/** An estimate needs one score on each side, a verdict two. */
function leastLeft({ target }: JudgeSpec): number {
  return target === 'changes sign' || target === 'falls below' ? 1 : 2;
}

function tooFew({ x, y }: Samples, spec: JudgeSpec): boolean {
  return Math.min(x.length, y.length) < leastLeft(spec);
}

function bounds(samples: Samples, spec: JudgeSpec, mostSets: number, mostTries: number) {
  const paired = samples.xParticipants === samples.yParticipants;
  const all = paired ? samples.x.length : samples.x.length + samples.y.length;
  return { mostSets, mostTries, largest: Math.max(0, all - (paired ? 1 : 2) * leastLeft(spec)) };
}

function sumsJudge(chain: Chain, samples: Samples, spec: JudgeSpec): NamedJudge | null {
  const form = FROM_SUMS[chain.estimator.id];
  const { comparison } = chain.result;
  if (form === undefined || comparison.alternative !== 'two-sided') return null;
  const trim = chain.estimator.trims ? comparison.trim : 0;
  const paired = form === 'differences';
  const d = paired ? samples.x.map((score, i) => score - (samples.y[i] as number)) : samples.x;
  const groups = paired ? [d] : [samples.x, samples.y];
  const names = groups.flatMap((scores, side) =>
    namesInOrder(scores, side === 0 ? samples.xParticipants : samples.yParticipants),
  );
  const most = groups.reduce((all, scores) => all + scores.length, 0);
  const critical = criticalT(comparison.alpha / 2, most);
  const full = plannedRow(chain, samples);
  const side = sideOf(full, spec.claim, comparison.first);
  const leave = fitter(form, groups.map(sortedSums), trim, leastLeft(spec));
  return {
    names,
    ...bounds(samples, spec, MOST_SETS, MOST_SETS),
    candidates: names.length,
    ...(trim === 0 && isOfEstimate(spec)
      ? {
          strongestSets: endSets(
            groups.map((each) => each.length),
            full,
          ),
        }
      : {}),
    pull(removed) {
      const left = leave(removed);
      return left === null ? null : pullOfSums(left, spec, side, critical);
    },
  };
}

/** Targets that read the estimate alone, in one direction. */
function isOfEstimate({ target, claim }: JudgeSpec): boolean {
  return target === 'changes sign' || (target === 'falls below' && claim.relation !== 'different');
}

/**
 * A difference of means moves most by taking from the top of the higher group and the bottom of the lower one: for each
 * size, every split between the two.
 */
function endSets(sizes: readonly number[], full: Finding): (size: number) => Int32Array[] {
  const [first = 0, second = 0] = sizes;
  const positive = (full.estimate ?? 0) > 0;
  const ends = (from: number, length: number, taken: number, top: boolean) =>
    Array.from({ length: taken }, (_, i) => from + (top ? length - taken + i : i));
  return (size) => {
    const sets: Int32Array[] = [];
    for (let a = Math.max(0, size - Math.max(0, second - 1)); a <= Math.min(size, first - 1); a++) {
      sets.push(Int32Array.from([...ends(0, first, a, positive), ...ends(first, second, size - a, !positive)]));
    }
    return sets;
  };
}

interface Fit {
  readonly estimate: number;
  readonly se: number;
  readonly df: number;
}

function pullOfSums(
  { estimate, se, df }: Fit,
  spec: JudgeSpec,
  side: 1 | -1,
  critical: (df: number, t: number) => number,
) {
  const own = spec.claim.relation === 'different' ? Math.abs(estimate) : side * estimate;
  const edge = (pull: number) => (pull === 0 ? Number.MIN_VALUE : pull);
  if (spec.target === 'changes sign') return edge(Math.sign(spec.full) * side * estimate);
  if (spec.target === 'falls below') return edge(own - spec.smallest);
  const t = (own - spec.claim.margin) / se;
  const beyond = t - critical(df, t);
  return spec.target === 'loses support' ? beyond : edge(-beyond);
}

function namesInOrder(scores: Float64Array, people: readonly string[]): string[] {
  return Array.from(scores.keys())
    .sort((a, b) => (scores[a] as number) - (scores[b] as number))
    .map((i) => people[i] ?? '');
}

function fitter(form: Form, sums: readonly SortedSums[], trim: number, least: number) {
  const [a, b]: [Remainder, Remainder] = [
    { center: 0, squares: 0, n: 0, h: 0 },
    { center: 0, squares: 0, n: 0, h: 0 },
  ];
  const [first, second] = sums as [SortedSums, SortedSums | undefined];
  const offset = first.scores.length;
  return (removed: Int32Array): Fit | null => {
    if (second === undefined) {
      remainder(first, removed, 0, removed.length, 0, trim, a);
      // Tukey & McLaughlin: s_w / ((1 - 2 trim) sqrt n).
      const se = (100 * Math.sqrt(a.squares / (a.n - 1))) / ((100 - 2 * trim) * Math.sqrt(a.n));
      return a.h >= least && (least === 1 || se > 0) ? { estimate: a.center, se, df: a.h - 1 } : null;
    }
    let split = 0;
    while (split < removed.length && (removed[split] as number) < offset) split++;
    remainder(first, removed, 0, split, 0, trim, a);
    remainder(second, removed, split, removed.length, offset, trim, b);
    if (least === 1) return a.h > 0 && b.h > 0 ? { estimate: a.center - b.center, se: NaN, df: NaN } : null;
    return a.h > 1 && b.h > 1 ? twoGroups(form, a, b) : null;
  };
}

function twoGroups(form: Form, a: Remainder, b: Remainder): Fit | null {
  const estimate = a.center - b.center;
  if (form === 'pooled') {
    const df = a.n + b.n - 2;
    const se = Math.sqrt(((a.squares + b.squares) / df) * (1 / a.n + 1 / b.n));
    return se > 0 ? { estimate, se, df } : null;
  }
  const d1 = a.squares / (a.h * (a.h - 1));
  const d2 = b.squares / (b.h * (b.h - 1));
  const se = Math.sqrt(d1 + d2);
  const share = d1 / (d1 + d2);
  return se > 0 ? { estimate, se, df: 1 / (share ** 2 / (a.h - 1) + (1 - share) ** 2 / (b.h - 1)) } : null;
}
