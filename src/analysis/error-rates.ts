/** Error rates of one chain: how often it would reject if the labels meant nothing, and how rates are written down. */
import { Refusal } from '../data/refusal.ts';
import { medianSorted, sorted } from '../numerics/order.ts';
import { rng } from '../numerics/rng.ts';
import { type CompareArgs, compareRow, type Result } from './compare.ts';
import { type Design, fullCondition } from './design.ts';
import { applyRules, withoutRules } from './exclusion.ts';
import type { LongWork } from './flip-set.ts';
import { chainOf } from './influence-chain.ts';
import { type Labels, relabelDesign } from './relabel-design.ts';
import { type Measure, onParticipants, type Rule, ruleLabel } from './rules.ts';
import { samplesFor } from './samples.ts';
import { scoreDesign } from './score.ts';

/** Counts of one line: how often it rejected, and how often its interval held the truth. */
export interface RateRow {
  /** Method, or rule. */
  readonly label: string;
  /** What was done to the scores before: "nobody set aside", "across conditions"; empty for relabelled data. */
  readonly cleaning: string;
  readonly judged: number;
  readonly rejected: number;
  readonly intervals: number;
  readonly covered: number;
}

/** What the error-rates cell gives. */
export interface Rates {
  readonly mode: 'relabel' | 'simulate';
  readonly runs: number;
  readonly alpha: number;
  /** True difference of the simulated experiments, 0 for relabelled data: the rates are levels, else power. */
  readonly difference: number;
  readonly rows: readonly RateRow[];
  /** Share of the simulated scores the rule set aside: across, within; null without a rule. */
  readonly aside: readonly [number, number] | null;
  /** Exact level of Student's and Welch's test, where the experiments are of normal scores without a difference. */
  readonly exact: { readonly student: number; readonly welch: number } | null;
}

/** A rate with its Monte Carlo interval. */
export interface Rate {
  readonly rate: number;
  readonly low: number;
  readonly high: number;
  /** Decimals worth writing. */
  readonly decimals: number;
}

/**
 * A simulated rate with its interval.
 *
 * @param count how often it happened, 0 to runs
 * @param runs how many runs there were
 * @returns rate, limits of about two standard errors, and the decimals these allow; null without runs
 * @source Wilson 1927, with z = 2: the interval is sensible at 0 and 1, too; decimals: the first figure of two SE
 */
export function rateOf(count: number, runs: number): Rate | null {
  if (runs === 0) return null;
  const z2 = 4;
  const rate = count / runs;
  const middle = (count + z2 / 2) / (runs + z2);
  const half = (2 / (runs + z2)) * Math.sqrt((count * (runs - count)) / runs + z2 / 4);
  const decimals = Math.min(5, Math.max(1, Math.ceil(-Math.log10(half))));
  return { rate, low: Math.max(0, middle - half), high: Math.min(1, middle + half), decimals };
}

export interface RelabelSpec {
  readonly measure: Measure;
  readonly cutoff: number;
}

/** One way to set scores aside, tried in every relabelling. */
export interface RuleChoice {
  readonly label: string;
  readonly rules: readonly Rule[];
  /** Whether it is among those the best is taken of. */
  readonly inBest: boolean;
}

export interface RelabelCounts {
  readonly relabellings: number;
  readonly rejected: readonly number[];
  readonly judged: readonly number[];
  /** Relabellings in which at least one of the choices rejected that the best is taken of. */
  readonly best: number;
}

/** Cutoffs the best is taken of, beside none. */
const CUTOFFS = [2, 2.5, 3];

/**
 * The rules tried in every relabelling: nobody, across conditions, within conditions, the worksheet's own, and the
 * cutoffs among which the best might be looked for.
 *
 * @param result the comparison with its chain
 * @param spec measure and cutoff of the rule across and within
 * @returns the choices; one that another repeats is left out
 * @source choosing the best of several rules: methods 5.4 (chasing)
 */
export function ruleChoices(result: Result, { measure, cutoff }: RelabelSpec): RuleChoice[] {
  const { design } = result.scores;
  const trials = design.roles.rows === 'several trials';
  const own = design.rules;
  const extreme = (scope: 'pooled' | 'participant' | 'condition' | 'participant-condition', k: number): Rule => {
    return { rule: 'extreme', on: 'trial', column: design.roles.outcome, measure, cutoff: k, scope, sides: 'both' };
  };
  const across = trials ? 'participant' : 'pooled';
  const within = trials ? 'participant-condition' : 'condition';
  const choice = (rule: Rule | null, inBest: boolean): RuleChoice => ({
    label: rule === null ? 'nobody set aside for being extreme' : ruleLabel(rule, design.roles.unit),
    rules: replaceExtreme(own, rule),
    inBest,
  });
  const all = [
    choice(null, true),
    ...CUTOFFS.map((k) => choice(extreme(across, k), true)),
    choice(extreme(across, cutoff), false),
    choice(extreme(within, cutoff), false),
    { label: 'the worksheet\u2019s own rules', rules: own, inBest: false },
  ];
  const key = (each: RuleChoice) => JSON.stringify(each.rules);
  return all.filter((each, i) => all.findIndex((other) => key(other) === key(each)) === i);
}

/** The worksheet's rules with those on extremity replaced by one (null = none), which stands before those on participants. */
function replaceExtreme(own: readonly Rule[], rule: Rule | null): Rule[] {
  const others = own.filter((each) => each.rule !== 'extreme');
  if (rule === null) return others;
  const at = others.findIndex(onParticipants);
  return at < 0 ? [...others, rule] : [...others.slice(0, at), rule, ...others.slice(at)];
}

/**
 * Scores without any difference between conditions: each minus the median of its condition, about the common median.
 *
 * @param design before any rule; not modified
 * @returns the design with other outcomes
 * @source residuals are relabelled, so that a real difference does not widen them: methods 5
 */
export function residualDesign(design: Design): Design {
  const condition = fullCondition(design);
  const groups = new Map<number, number[]>();
  const all: number[] = [];
  for (let row = 0; row < condition.length; row++) {
    if (design.kept[row] !== 1) continue;
    const value = design.outcome[row] as number;
    const code = condition[row] as number;
    groups.set(code, [...(groups.get(code) ?? []), value]);
    all.push(value);
  }
  const middle = all.length === 0 ? 0 : medianSorted(sorted(Float64Array.from(all)));
  const medians = new Map([...groups].map(([code, values]) => [code, medianSorted(sorted(Float64Array.from(values)))]));
  const outcome = design.outcome.map((value, row) => value - (medians.get(condition[row] as number) ?? value) + middle);
  return { ...design, outcome };
}

/** Stream of the relabellings among those of the seed. */
const STREAM = 45;

/**
 * Relabels the residuals as the design randomised, and re-runs rules and planned row by every choice of rules.
 *
 * @param args the comparison with its chain, the rule, first relabelling and the one after the last
 * @param work pauses and progress
 * @returns counts that add up over parts; a row without p counts as not rejecting
 * @throws Refusal where the comparison has no labels that could be exchanged
 * @source the error rate of the declared pipeline on these data: methods 5.4, 7.1
 */
export async function relabelRates(
  args: { readonly result: Result; readonly spec: RelabelSpec; readonly from: number; readonly to: number },
  work: LongWork,
): Promise<RelabelCounts> {
  const { result, spec, from, to } = args;
  const { comparison } = result;
  const chain = chainOf(result);
  const labels = chain === null ? null : labelsUnderTest(result);
  if (chain === null || labels === null) {
    throw new Refusal(
      'This comparison has no two sets of labels that could be exchanged. Simulate experiments instead.',
    );
  }
  const base = residualDesign(withoutRules(result.scores.design));
  const choices = ruleChoices(result, spec);
  const rejected = choices.map(() => 0);
  const judged = choices.map(() => 0);
  let best = 0;
  const random = rng(comparison.seed, STREAM);
  for (let index = from; index < to; index++) {
    const relabelled = relabelDesign(base, labels, random.fork(index));
    let any = false;
    choices.forEach(({ rules, inBest }, which) => {
      const p = pOf(applyRules(relabelled, rules), result);
      if (p === null) return;
      judged[which] = (judged[which] as number) + 1;
      if (p > comparison.alpha) return;
      rejected[which] = (rejected[which] as number) + 1;
      if (inBest) any = true;
    });
    if (any) best++;
    await work.pause();
    work.progress((index + 1 - from) / (to - from));
  }
  return { relabellings: to - from, rejected, judged, best };

  function pOf(design: Design, { scores }: Result): number | null {
    const samples = samplesFor(scoreDesign(design, scores.score), comparison);
    if (samples.x.length < 2 || samples.y.length < 2 || chain === null) return null;
    const { unit, direction } = design.roles;
    const own = { ...comparison, resamples: chain.estimator.closedForm ? 0 : Math.min(199, comparison.resamples) };
    const row: CompareArgs = { samples, comparison: own, unit, direction, withheld: false };
    return compareRow(chain.estimator, row).p;
  }
}

function labelsUnderTest({ comparison }: Result): Labels | null {
  const { effect, factor, first, second } = comparison;
  if (effect === undefined) return { factor, levels: [first, second] };
  return effect.type === 'contrast' ? { factor: effect.factor, levels: [...effect.first, ...effect.second] } : null;
}

/** Counts of several parts together, in the order given. */
export function addRelabelCounts(parts: readonly RelabelCounts[]): RelabelCounts {
  const [first] = parts;
  if (first === undefined) throw new RangeError('*parts* must hold at least 1 part; got 0');
  const sum = (read: (part: RelabelCounts) => number) => parts.reduce((all, part) => all + read(part), 0);
  return {
    relabellings: sum((part) => part.relabellings),
    rejected: first.rejected.map((_, i) => sum((part) => part.rejected[i] as number)),
    judged: first.judged.map((_, i) => sum((part) => part.judged[i] as number)),
    best: sum((part) => part.best),
  };
}
