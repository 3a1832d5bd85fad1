/** The planned row re-run from the rules on: in every relabelling for its p, in every resample for its interval. */
import { standardDeviation } from '../numerics/moments.ts';
import { sorted } from '../numerics/order.ts';
import { rng } from '../numerics/rng.ts';
import { isOmnibus } from './asked.ts';
import { type ComparisonSpec, compareRow } from './compare.ts';
import type { Design } from './design.ts';
import { estimatorOf } from './estimators.ts';
import { applyRules, withoutRules } from './exclusion.ts';
import type { Finding, Limits } from './finding.ts';
import { peopleIn, takeLayout } from './layout.ts';
import { compareOmnibusRow, omnibusRowOf } from './omnibus.ts';
import { type Labels, relabelDesign, resampleDesign } from './relabel-design.ts';
import { samplesFor } from './samples.ts';
import { type ScoreSpec, type Scores, scoreDesign } from './score.ts';

const STREAM = { relabel: 131, resample: 132 } as const;

/** Most relabellings, and most resamples, of a whole chain. */
const MOST_RERUNS = 1999;

/** How often a comparison's chain is run again, for each of p and interval. */
export function rerunsOf(comparison: Pick<ComparisonSpec, 'resamples'>): number {
  return Math.min(MOST_RERUNS, comparison.resamples);
}

/** Which of the relabellings or resamples a job runs; each has its own stream, so that any cut gives the same. */
export interface PipelineArgs {
  readonly scores: Scores;
  readonly comparison: ComparisonSpec;
  readonly purpose: 'relabel' | 'resample';
  readonly from: number;
  readonly to: number;
}

/** The labels a comparison is about, or null where no relabelling can be made for it (interactions, a value). */
export function labelsOf(design: Design, comparison: ComparisonSpec): Labels | null {
  const { effect, factor, first, second } = comparison;
  if (effect === undefined) return { factor, levels: [first, second] };
  if (effect.type === 'contrast') return { factor: effect.factor, levels: [...effect.first, ...effect.second] };
  if (effect.type !== 'levels') return null;
  return { factor: effect.factor, levels: design.factors.find((each) => each.name === effect.factor)?.levels ?? [] };
}

/**
 * Re-applies the rules and re-runs the planned row, once an index.
 *
 * @param args the chain, and which relabellings (or resamples) of it
 * @returns relabel: the row's statistic, larger for a larger first side (F, H as they are); resample: its estimate; NaN
 *   where the row cannot be computed
 * @throws RangeError where the comparison has no labels to exchange
 * @source pipeline permutation and pipeline bootstrap: methods 0.3 and 5.4
 */
export function runPipeline(args: PipelineArgs): Float64Array {
  const { scores, comparison, purpose, from, to } = args;
  const base = withoutRules(scores.design);
  const { rules } = scores.design;
  const labels = labelsOf(base, comparison);
  if (labels === null) throw new RangeError('*comparison* must have labels that can be exchanged');
  return Float64Array.from({ length: to - from }, (_, i) => {
    const random = rng(comparison.seed, STREAM[purpose]).fork(from + i);
    if (purpose === 'relabel') {
      return statisticOf(plannedRow(applyRules(relabelDesign(base, labels, random), rules), scores.score, comparison));
    }
    const drawn = resampleDesign(base, rules, random);
    return plannedRow(applyRules(drawn.design, drawn.rules), scores.score, comparison)?.estimate ?? NaN;
  });
}

/** The planned row of a design after its rules, with as little resampling of its own as it can do with. */
function plannedRow(design: Design, score: ScoreSpec, comparison: ComparisonSpec): Finding | null {
  const scores = scoreDesign(design, score);
  const { effect } = comparison;
  if (isOmnibus(effect)) {
    const row = omnibusRowOf(comparison.estimator);
    const layout = takeLayout(scores, effect);
    if (!row || peopleIn(layout) === 0) return null;
    return compareOmnibusRow(row, { layout, comparison: { ...comparison, resamples: 0 }, withheld: false });
  }
  const estimator = estimatorOf(comparison.estimator);
  const samples = samplesFor(scores, comparison);
  if (!estimator || samples.x.length === 0 || samples.y.length === 0) return null;
  const { unit, direction } = design.roles;
  const own = { ...comparison, resamples: estimator.closedForm ? 0 : 1 };
  return compareRow(estimator, { samples, comparison: own, unit, direction, withheld: false });
}

/** A row's statistic where it grows with the first side, else its estimate's distance from no difference. */
function statisticOf(finding: Finding | null): number {
  if (finding === null) return NaN;
  const sign = finding.reversed ? -1 : 1;
  const { statistic, estimate, nullValue } = finding;
  if (statistic !== null && ['t', 'W', 'F', 'H', '\u03c7\u00b2'].includes(statistic.name))
    return sign * statistic.value;
  if (estimate === null) return NaN;
  return nullValue === 1 ? Math.log(estimate) : sign * (estimate - nullValue);
}

/** What the re-runs of a chain give its planned row. */
export interface PipelineNumbers {
  readonly p: number | null;
  readonly se: number | null;
  readonly interval: Limits | null;
  /** Relabellings and resamples in which the row could not be computed. */
  readonly lost: number;
}

/**
 * p and interval of the planned row from its re-runs.
 *
 * @param scores the chain as it is
 * @param comparison its comparison
 * @param relabelled statistics of B relabellings, NaN where not defined (counted as at least as large as the observed)
 * @param resampled estimates of B resamples, NaN where not defined (left out; no interval where they are more than 5 %)
 * @returns p = (b + 1) / (B + 1), SE = SD of the resampled estimates, percentile limits
 * @source methods 2.2 and 3.2
 */
export function pipelineNumbers(
  scores: Scores,
  comparison: ComparisonSpec,
  relabelled: Float64Array,
  resampled: Float64Array,
): PipelineNumbers {
  const observed = statisticOf(plannedRow(scores.design, scores.score, comparison));
  const upper = isOmnibus(comparison.effect);
  const { alternative, alpha } = comparison;
  const far = (value: number) =>
    upper || alternative === 'greater' ? value : alternative === 'less' ? -value : Math.abs(value);
  // Equal statistics of two relabellings differ by rounding only.
  const grain = 1e-9 * Math.abs(observed);
  const beyond = relabelled.filter((value) => Number.isNaN(value) || far(value) >= far(observed) - grain).length;
  const defined = sorted(resampled.filter((value) => !Number.isNaN(value)));
  const lost = relabelled.filter(Number.isNaN).length + resampled.length - defined.length;
  const p = Number.isNaN(observed) ? null : (beyond + 1) / (relabelled.length + 1);
  const tail = !upper && alternative !== 'two-sided' ? alpha : alpha / 2;
  const k = Math.floor(tail * (defined.length + 1) + 1e-9);
  if (k < 1 || defined.length < 0.95 * resampled.length) return { p, se: null, interval: null, lost };
  const low = !upper && alternative === 'less' ? null : (defined[k - 1] as number);
  const high = !upper && alternative === 'greater' ? null : (defined[defined.length - k] as number);
  return { p, se: upper ? null : standardDeviation(defined), interval: [low, high], lost };
}

/** The planned row with what its re-runs give; its textbook p and interval stay withheld. */
export function withPipeline(finding: Finding, numbers: PipelineNumbers, B: number, level: number): Finding {
  const { reason: _, ...rest } = finding;
  const lost = numbers.lost > 0 ? ` (${numbers.lost} could not be computed)` : '';
  const why = numbers.interval === null ? 'too few resamples give an estimate' : undefined;
  return {
    ...rest,
    ...(why === undefined ? {} : { reason: why }),
    se: numbers.se,
    p: numbers.p,
    pHow: `relabelling with the rules re-applied, B = ${B}: the rule sees the condition`,
    interval: numbers.interval,
    level,
    cautions: [...finding.cautions, 'R2P'],
    method: `${finding.method} The rule sees the condition: p from this row re-run in ${B} relabellings of the participants' conditions, rules re-applied in each; interval from ${B} resamples of participants, rules re-applied in each, percentile limits${lost}.`,
  };
}
