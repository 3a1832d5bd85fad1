/** Running the combinations of a grid one after another, each different analysis once. */
import type { ClaimSpec } from './claim.ts';
import { verdictOf } from './claim.ts';
import { type CompareArgs, compareRow, fittingEstimators, type Result } from './compare.ts';
import type { Design } from './design.ts';
import type { Estimator } from './estimators.ts';
import { applyRules, withoutRules } from './exclusion.ts';
import type { Finding } from './finding.ts';
import {
  type AxisName,
  type Equivalence,
  type GridChoice,
  type GridOption,
  gridAxes,
  isMeasure,
  isScope,
  NO_CUTOFF,
  scoreOf,
  scoreValue,
} from './grid-options.ts';
import type { ExtremeRule, Rule } from './rules.ts';
import { samplesFor } from './samples.ts';
import { type ScoreSpec, scoreDesign } from './score.ts';
import { estimatorKey, extremeLabel, join, keptKey, type Specification, withExtreme } from './sweep.ts';
import { withholdsTextbook } from './withhold.ts';

/** One option on each axis; '' where the axis does not apply (a distance without a cutoff, a trim of a row without). */
export type Combination = { readonly [axis in AxisName]: string };

export interface GridEntry {
  specification: Specification;
  mark: 'E' | 'U';
  readonly score: ScoreSpec;
  readonly kept: string;
  readonly options: { readonly [axis in AxisName]: Set<string> };
}

/** The axes in the order of a combination. */
export const AXES: readonly AxisName[] = ['cutoff', 'measure', 'scope', 'trim', 'row', 'score'];

/** Scores of one rule and score, and the key of the rows it keeps. */
interface Prepared {
  readonly args: CompareArgs;
  readonly rules: readonly Rule[];
  readonly kept: string;
  readonly score: ScoreSpec;
}

export type Chosen = { readonly [axis in AxisName]: readonly GridOption[] };

/** Runs combinations one after another, each different analysis once. */
export class GridWork {
  readonly entries = new Map<string, GridEntry>();
  readonly chosen: Chosen;
  readonly #result: Result;
  readonly #claim: ClaimSpec;
  readonly #choice: GridChoice;
  readonly #base: Design;
  readonly #prepared = new Map<string, Prepared>();
  readonly #known = new Map<string, string | null>();
  readonly #refused = new Map<string, { example: string; count: number }>();

  constructor(result: Result, claim: ClaimSpec, choice: GridChoice) {
    this.#result = result;
    this.#claim = claim;
    this.#choice = choice;
    this.#base = withoutRules(result.scores.design);
    const axes = gridAxes(result);
    const own: GridOption = { value: scoreValue(result.scores.score), label: '', mark: 'E', why: '' };
    const chosen = AXES.map((axis) => {
      const offered = axes.find((each) => each.axis === axis)?.options ?? [own];
      return [axis, offered.filter((option) => choice[axis].includes(option.value))] as const;
    });
    this.chosen = Object.fromEntries(chosen) as unknown as Chosen;
  }

  /** The worksheet's own settings: the planned row of the comparison itself. */
  addOwn(): void {
    const result = this.#result;
    const finding = result.findings[result.planned];
    if (finding === undefined || result.scope === 'omnibus') return;
    const estimator = fittingEstimators(result.scope).find((each) => each.id === finding.estimator);
    if (estimator === undefined) return;
    const { rules } = result.scores.design;
    const prepared = this.#prepare(rules, result.scores.score);
    const extreme = rules.find((rule) => rule.rule === 'extreme' && rule.cutoff !== null);
    const combination = {
      ...(extreme?.rule === 'extreme'
        ? { cutoff: String(extreme.cutoff), measure: extreme.measure, scope: extreme.scope }
        : { cutoff: NO_CUTOFF, measure: '', scope: '' }),
      trim: estimator.trims ? String(result.comparison.trim) : '',
      row: estimator.id,
      score: scoreValue(result.scores.score),
    };
    this.#enter(prepared, estimator, finding, combination, 'E', true);
  }

  /** The key of the analysis a combination leads to; null where it is left out, with the reason kept. */
  add(combination: Combination): string | null {
    const { scope } = this.#result;
    const fitting = scope === 'omnibus' ? [] : fittingEstimators(scope);
    const estimator = fitting.find((each) => each.id === combination.row);
    const mark = this.#markOf(combination);
    const score = scoreOf(combination.score);
    if (typeof mark !== 'string' || estimator === undefined || score === undefined) {
      this.#refuse(typeof mark === 'string' ? 'no such option' : mark.why, combination);
      return null;
    }
    const plain = applying(combination, estimator);
    const known = this.#known.get(JSON.stringify(plain));
    if (known !== undefined && known !== null) return known;
    const prepared = this.#prepare(withExtreme(this.#result.scores.design.rules, this.#ruleOf(plain)), score);
    const finding = compareRow(estimator, prepared.args, Number(plain.trim));
    if (finding.estimate === null) {
      this.#refuse(finding.reason ?? 'no estimate', combination);
      return null;
    }
    const key = this.#enter(prepared, estimator, finding, plain, mark, false);
    this.#known.set(JSON.stringify(plain), key);
    return key;
  }

  refusedCount(): number {
    return [...this.#refused.values()].reduce((sum, each) => sum + each.count, 0);
  }

  refusals(): { readonly why: string; readonly example: string; readonly count: number }[] {
    return [...this.#refused].map(([why, { example, count }]) => ({ why, example, count }));
  }

  #refuse(why: string, combination: Combination): void {
    const before = this.#refused.get(why);
    const example = AXES.map((axis) => this.#labelOf(axis, combination[axis]))
      .filter((each) => each !== '')
      .join(', ');
    this.#refused.set(why, { example: before?.example ?? example, count: (before?.count ?? 0) + 1 });
  }

  #labelOf(axis: AxisName, value: string): string {
    return this.chosen[axis].find((option) => option.value === value)?.label ?? '';
  }

  #markOf(combination: Combination): 'E' | 'U' | { readonly why: string } {
    let mark: Equivalence = 'E';
    for (const axis of AXES) {
      const option = this.chosen[axis].find((each) => each.value === combination[axis]);
      // Without a cutoff there is no distance and no scope that could differ.
      if (option === undefined || (combination.cutoff === NO_CUTOFF && (axis === 'measure' || axis === 'scope')))
        continue;
      if (option.refused !== undefined) return { why: option.refused };
      const reason = this.#choice.reasons[`${axis}:${option.value}`]?.trim() ?? '';
      if (option.mark === 'N' && reason === '')
        return { why: `"${option.label}" ${option.why}, and no reason for it is written.` };
      if (option.mark !== 'E') mark = 'U';
    }
    return mark;
  }

  #ruleOf({ cutoff, measure, scope }: Combination): ExtremeRule | null {
    if (cutoff === NO_CUTOFF || !isMeasure(measure) || !isScope(scope)) return null;
    const column = this.#base.roles.outcome;
    return { rule: 'extreme', on: 'trial', column, measure, cutoff: Number(cutoff), scope, sides: 'both' };
  }

  #prepare(rules: readonly Rule[], score: ScoreSpec): Prepared {
    const key = JSON.stringify([rules, score]);
    const known = this.#prepared.get(key);
    if (known !== undefined) return known;
    const { comparison } = this.#result;
    const design = applyRules(this.#base, rules);
    const { unit, direction, rows } = design.roles;
    const withheld = comparison.effect?.type !== 'value' && withholdsTextbook(rules, rows);
    const samples = samplesFor(scoreDesign(design, score), comparison);
    // Effect sizes of the grid's rows are not shown, so that none of them resamples.
    const args = { samples, comparison: { ...comparison, resamples: 0 }, unit, direction, withheld };
    const prepared = { args, rules, score, kept: `${scoreValue(score)}|${keptKey(design, comparison)}` };
    this.#prepared.set(key, prepared);
    return prepared;
  }

  #enter(
    { args, rules, kept, score }: Prepared,
    estimator: Estimator,
    finding: Finding,
    combination: Combination,
    mark: 'E' | 'U',
    planned: boolean,
  ): string {
    const key = `${kept}|${estimatorKey(estimator, Number(combination.trim), args.samples)}`;
    const specification: Specification = {
      ruleLabel: extremeLabel(rules, args.unit),
      rules,
      finding,
      verdict: verdictOf(finding, this.#claim, this.#result.comparison.first),
      planned,
      everyoneIn: !rules.some((rule) => rule.rule === 'extreme' && rule.cutoff !== null),
      also: [],
    };
    const before = this.entries.get(key);
    if (before === undefined) {
      const options = Object.fromEntries(
        AXES.map((axis) => [axis, new Set<string>()]),
      ) as unknown as GridEntry['options'];
      this.entries.set(key, { specification, mark, score, kept, options });
    } else {
      before.specification = join(before.specification, specification);
      if (mark === 'E') before.mark = 'E';
    }
    for (const axis of AXES) if (combination[axis] !== '') this.entries.get(key)?.options[axis].add(combination[axis]);
    return key;
  }
}

/** The combination with '' on the axes that do not apply. */
function applying(combination: Combination, estimator: Estimator): Combination {
  return {
    ...combination,
    ...(combination.cutoff === NO_CUTOFF ? { measure: '', scope: '' } : {}),
    ...(estimator.trims ? {} : { trim: '' }),
  };
}
