/** What joint inference over a grid needs, as plain data that can be sent to workers. */
import type { ClaimSpec } from './claim.ts';
import { type ComparisonSpec, compareRow, type Result } from './compare.ts';
import type { Design } from './design.ts';
import { estimatorOf } from './estimators.ts';
import { applyRules, withoutRules } from './exclusion.ts';
import { type GridRow, isPair, type SetShape } from './joint-rows.ts';
import { type RelabelPlan, relabelPlan } from './relabel.ts';
import { type Rule, readsCondition } from './rules.ts';
import { samplesFor } from './samples.ts';
import { type ScoreSpec, scoreDesign } from './score.ts';

/** One analysis of the grid as settings. */
export interface GridPoint extends GridRow {
  readonly rules: readonly Rule[];
  readonly score: ScoreSpec;
}

/** Rows asked of one set of kept scores; `places` are their specifications. */
interface Asked {
  readonly rows: readonly GridRow[];
  readonly places: readonly number[];
}

/** A blind rule's scores: one for each unit under any labels. */
export interface JointSet extends Asked {
  /** Within: each unit's score in its earlier block; between: each unit's score; NaN = it does not enter. */
  readonly a: Float64Array;
  /** Within: the score in the later block; between: empty. */
  readonly b: Float64Array;
}

/** Rules and score that are applied anew to the relabelled rows. */
export interface JointChain extends Asked {
  readonly rules: readonly Rule[];
  readonly score: ScoreSpec;
  /** Whether a rule reads the condition; else the rows it keeps are known and only the labels change. */
  readonly reads: boolean;
}

export interface JointPlan {
  readonly relabel: RelabelPlan;
  readonly specifications: number;
  readonly alternative: ComparisonSpec['alternative'];
  readonly alpha: number;
  readonly shape: SetShape;
  /** Position of the first condition among the labels of a pair. */
  readonly firstLabel: number;
  /** 1 = the estimate is in the outcome's unit. */
  readonly sameUnit: Uint8Array;
  /** 1 = the specification gives a test of the data as they are. */
  readonly tested: Uint8Array;
  readonly sets: readonly JointSet[];
  readonly chains: readonly JointChain[];
  /** Design before any rule, the outcome less the margin; null where no chain is run. */
  readonly design: Design | null;
  readonly comparison: Pick<ComparisonSpec, 'factor' | 'effect' | 'first' | 'second'>;
}

export interface JointRequest {
  readonly result: Result;
  readonly claim: ClaimSpec;
  readonly points: readonly GridPoint[];
  /** Relabellings drawn where there are too many to run all. */
  readonly relabellings: number;
  readonly seed: number;
}

/**
 * Prepares joint inference: applies each rule once, and keeps what does not depend on the labels.
 *
 * A blind rule takes no condition, so the rows it keeps are the same under any labels: its scores are kept, and a
 * relabelling only deals them out anew. A rule that reads the condition is applied again in every relabelling. A margin
 * is taken off the outcome first, so that "no difference beyond the margin" becomes "no difference".
 *
 * @param request the worksheet's result, its claim, and the grid as settings
 * @returns the plan, or a sentence that says why there is no joint inference
 * @source Simonsohn, Simmons & Nelson 2020: permute as randomised, re-run every specification with its rule; methods 2.2
 */
export function planJoint(request: JointRequest): JointPlan | string {
  const { result, claim, relabellings, seed } = request;
  const { comparison } = result;
  if (request.points.length === 0) return 'There is no analysis in the grid.';
  const margin = marginOf(claim, comparison);
  if (typeof margin === 'string') return margin;
  const design = shifted(withoutRules(result.scores.design), comparison, margin);
  const relabel = relabelPlan(design, comparison, { relabellings, seed });
  if (typeof relabel === 'string') return relabel;
  const points = request.points;
  const sameUnit = Uint8Array.from(points, ({ estimator }) => (estimatorOf(estimator)?.sameUnit === true ? 1 : 0));
  const { unit, direction } = design.roles;
  const { factor, first, second, effect } = comparison;
  const shape = { scope: relabel.scope, first, second, factor, unit, direction };
  const firstCode = design.factors.find((each) => each.name === relabel.factor)?.levels.indexOf(first) ?? -1;
  const firstLabel = Math.max(0, relabel.levels.indexOf(firstCode));
  const { sets, chains } = gathered(points, design, comparison, relabel);
  return {
    relabel,
    specifications: points.length,
    alternative: comparison.alternative,
    alpha: comparison.alpha,
    shape,
    firstLabel,
    sameUnit,
    tested: testedOf(points, design, comparison),
    sets,
    chains,
    design: chains.length > 0 ? design : null,
    comparison: { factor, first, second, ...(effect === undefined ? {} : { effect }) },
  };
}

/** What "no difference beyond the margin" adds to the first condition, in the outcome's unit. */
function marginOf(claim: ClaimSpec, comparison: ComparisonSpec): number | string {
  if (claim.margin === 0) return 0;
  if (claim.relation === 'different')
    return 'A difference beyond a margin in either direction has two limits: claim one direction, or set the margin to 0.';
  const towards = claim.relation === 'higher' ? 1 : -1;
  return claim.first === comparison.first ? towards * claim.margin : -towards * claim.margin;
}

function shifted(design: Design, comparison: ComparisonSpec, margin: number): Design {
  if (margin === 0) return design;
  const { effect, factor: pair } = comparison;
  const name = effect?.type === 'contrast' ? effect.factor : pair;
  const names = effect?.type === 'contrast' ? effect.first : [comparison.first];
  const factor = design.factors.find((each) => each.name === name);
  const first = new Set(names.map((level) => factor?.levels.indexOf(level)));
  const outcome = design.outcome.map((score, row) => (first.has(factor?.codes[row]) ? score - margin : score));
  return { ...design, outcome };
}

interface Gathered {
  readonly rules: readonly Rule[];
  readonly score: ScoreSpec;
  readonly rows: GridRow[];
  readonly places: number[];
}

/** Specifications that share rules and score, one after the other as they first appear. */
function gathered(
  points: readonly GridPoint[],
  design: Design,
  comparison: ComparisonSpec,
  relabel: RelabelPlan,
): { sets: JointSet[]; chains: JointChain[] } {
  const groups = new Map<string, Gathered>();
  points.forEach(({ rules, score, estimator, trim }, place) => {
    const key = JSON.stringify([rules, score]);
    const group = groups.get(key) ?? { rules, score, rows: [], places: [] };
    groups.set(key, group);
    group.rows.push({ estimator, trim });
    group.places.push(place);
  });
  const sets: JointSet[] = [];
  const chains: JointChain[] = [];
  for (const { rules, score, rows, places } of groups.values()) {
    const reads = rules.some((rule) => readsCondition(rule) && rule.rule === 'extreme' && rule.cutoff !== null);
    if (reads || !isPair(comparison)) chains.push({ rules, score, rows, places, reads });
    else sets.push({ ...keptScores(applyRules(design, rules), score, comparison, relabel), rows, places });
  }
  return { sets, chains };
}

/** Scores of the units that enter a pair, by block or by group member. */
function keptScores(
  design: Design,
  score: ScoreSpec,
  comparison: ComparisonSpec,
  relabel: RelabelPlan,
): Pick<JointSet, 'a' | 'b'> {
  const samples = samplesFor(scoreDesign(design, score), comparison);
  const scoreOf = (names: readonly string[], scores: Float64Array) => {
    const byName = new Map(names.map((name, i) => [name, scores[i] as number]));
    return Float64Array.from(relabel.units, (who) => byName.get(design.participants[who] as string) ?? Number.NaN);
  };
  const x = scoreOf(samples.xParticipants, samples.x);
  const y = scoreOf(samples.yParticipants, samples.y);
  if (relabel.scope === 'between') {
    return { a: x.map((own, i) => (Number.isNaN(own) ? (y[i] as number) : own)), b: new Float64Array(0) };
  }
  const factor = design.factors.find((each) => each.name === relabel.factor);
  const firstCode = factor?.levels.indexOf(comparison.first);
  const isFirst = (unit: number) => relabel.levels[relabel.observed[unit * relabel.blocks] as number] === firstCode;
  return {
    a: x.map((own, unit) => (isFirst(unit) ? own : (y[unit] as number))),
    b: y.map((own, unit) => (isFirst(unit) ? own : (x[unit] as number))),
  };
}

/** Whether each specification gives a p of the data as they are, before anything is withheld. */
function testedOf(points: readonly GridPoint[], design: Design, comparison: ComparisonSpec): Uint8Array {
  const known = new Map<string, ReturnType<typeof samplesFor>>();
  const { unit, direction } = design.roles;
  return Uint8Array.from(points, ({ rules, score, estimator: id, trim }) => {
    const key = JSON.stringify([rules, score]);
    const samples = known.get(key) ?? samplesFor(scoreDesign(applyRules(design, rules), score), comparison);
    known.set(key, samples);
    const estimator = estimatorOf(id);
    if (estimator === undefined) throw new RangeError(`*points* must name rows of the list; got ${id}`);
    const settings = { ...comparison, resamples: 0 };
    const finding = compareRow(estimator, { samples, comparison: settings, unit, direction, withheld: false }, trim);
    return finding.p === null ? 0 : 1;
  });
}
