import { askedFactors } from './asked.ts';
import { type ClaimSpec, type Verdict, verdictOf } from './claim.ts';
import { type CompareArgs, type ComparisonSpec, compareRow, fittingEstimators, type Result } from './compare.ts';
import type { Design } from './design.ts';
import type { Estimator } from './estimators.ts';
import { applyRules, withoutRules } from './exclusion.ts';
import type { Finding } from './finding.ts';
import { type ExtremeRule, onParticipants, type Rule, ruleLabel } from './rules.ts';
import { type Samples, samplesFor } from './samples.ts';
import { scoreDesign } from './score.ts';
import { withholdsTextbook } from './withhold.ts';

/** One analysis of the grid, and what it came to. */
export interface Specification {
  /** Short words: "beyond 3 MAD within participant", "no cutoff". */
  readonly ruleLabel: string;
  /** The rules it applied, in order. */
  readonly rules: readonly Rule[];
  readonly finding: Finding;
  readonly verdict: Verdict | null;
  /** Whether it has the worksheet's own settings. */
  readonly planned: boolean;
  /** Whether its rule sets nobody aside for being extreme. */
  readonly everyoneIn: boolean;
  /** Other settings that keep the same rows and trim the same count: counted once, here. */
  readonly also: readonly string[];
}

export interface SweepGroup {
  /** Quantity: "means", "trimmed means". */
  readonly group: string;
  /** Indices into `specifications`, sorted by estimate. */
  readonly order: readonly number[];
}

/** Every defensible analysis of the strip's grid, once each. */
export interface Sweep {
  readonly specifications: readonly Specification[];
  readonly groups: readonly SweepGroup[];
  readonly planned: number;
  readonly supported: number;
  readonly undecided: number;
  readonly contradicted: number;
  /** Specifications without an interval (too few kept, zero spread): counted in none of the three. */
  readonly refused: number;
  readonly unit: string;
}

/** Trims of the strip's grid, percent at each end. */
export const GRID_TRIMS: readonly number[] = [0, 10, 20, 25];

/**
 * Runs every specification of the strip's grid: rule {none; 2, 2.5, 3 MAD; 2, 2.5, 3 SD} x trim {0, 10, 20, 25} x the
 * closed-form rows in the outcome's unit that fit the design, and the worksheet's own settings. A grid rule stands where
 * the worksheet's own extremity rule stands; documented faults and fixed limits stay. Specifications that keep the same
 * rows and trim the same count by the same estimator are merged and counted once.
 *
 * @param result the worksheet's comparison with its chain
 * @param claim what is claimed
 * @returns specifications with their verdicts, grouped by quantity and sorted by estimate
 * @source Steegen, Tuerlinckx, Gelman & Vanpaemel 2016; merging of copies: methods 2.2 (a)
 */
export function sweepClaim(result: Result, claim: ClaimSpec): Sweep {
  const base = withoutRules(result.scores.design);
  const own = result.scores.design.rules;
  const merged = new Map<string, Specification>();
  for (const rules of [own, ...gridRules(result.scores.design).map((rule) => withExtreme(own, rule))]) {
    for (const { key, specification } of specificationsOf(base, rules, rules === own, result, claim)) {
      const before = merged.get(key);
      merged.set(key, before ? join(before, specification) : specification);
    }
  }
  return summarise([...merged.values()], result.scores.design.roles.unit);
}

interface Keyed {
  readonly key: string;
  readonly specification: Specification;
}

/** The rules of the grid's axis: nobody, then MAD and SD cutoffs, on trials within participant or on scores pooled. */
export function gridRules(design: Design): (ExtremeRule | null)[] {
  const scope = design.roles.rows === 'one score' ? 'pooled' : 'participant';
  const rules: (ExtremeRule | null)[] = [null];
  for (const measure of ['MAD', 'SD'] as const) {
    for (const cutoff of [2, 2.5, 3]) {
      rules.push({ rule: 'extreme', on: 'trial', column: design.roles.outcome, measure, cutoff, scope, sides: 'both' });
    }
  }
  return rules;
}

/** The worksheet's rules with its extremity rules replaced by one of the grid's (null = none). */
export function withExtreme(own: readonly Rule[], rule: ExtremeRule | null): Rule[] {
  const first = own.findIndex((each) => each.rule === 'extreme');
  const wholeParticipants = own.findIndex(onParticipants);
  const at = first >= 0 ? first : wholeParticipants >= 0 ? wholeParticipants : own.length;
  const before = own.slice(0, at).filter((each) => each.rule !== 'extreme');
  const after = own.slice(at).filter((each) => each.rule !== 'extreme');
  return [...before, ...(rule ? [rule] : []), ...after];
}

function specificationsOf(
  base: Design,
  rules: readonly Rule[],
  own: boolean,
  result: Result,
  claim: ClaimSpec,
): Keyed[] {
  const { comparison, scores } = result;
  const design = applyRules(base, rules);
  const { first } = comparison;
  const samples = samplesFor(scoreDesign(design, scores.score), comparison);
  const { unit, direction, rows } = base.roles;
  // Effect sizes of the strip's lines are not shown, so that no line but the planned one resamples.
  const settings = own ? comparison : { ...comparison, resamples: 0 };
  const args: CompareArgs = {
    samples,
    comparison: settings,
    unit,
    direction,
    withheld: comparison.effect?.type !== 'value' && withholdsTextbook(rules, rows),
  };
  const kept = keptKey(design, comparison);
  return choices(result, own).map(({ estimator, trim }) => {
    // Where a rule reads the condition, p and interval of the planned row come from re-runs of the whole chain.
    const rerun = own && args.withheld ? result.findings[result.planned] : undefined;
    const finding = rerun ?? compareRow(estimator, args, trim);
    const specification: Specification = {
      ruleLabel: extremeLabel(rules, unit),
      rules,
      finding,
      verdict: verdictOf(finding, claim, first),
      planned: own,
      everyoneIn: !rules.some((rule) => rule.rule === 'extreme' && rule.cutoff !== null),
      also: [],
    };
    return { key: `${kept}|${estimatorKey(estimator, trim, samples)}`, specification };
  });
}

/** The rows to run: the planned one for the worksheet's own rules, else every closed-form row at every trim. */
function choices(result: Result, own: boolean): { estimator: Estimator; trim: number }[] {
  const { estimator: planned, trim } = result.comparison;
  const fitting = result.scope === 'omnibus' ? [] : fittingEstimators(result.scope);
  if (own) return fitting.filter((each) => each.id === planned).map((estimator) => ({ estimator, trim }));
  return fitting
    .filter((each) => each.sameUnit && each.closedForm)
    .flatMap((estimator) => (estimator.trims ? GRID_TRIMS : [0]).map((each) => ({ estimator, trim: each })));
}

/** A trimmed row that trims nobody is the mean's row. */
export function estimatorKey(estimator: Estimator, trim: number, { x, y, parts }: Samples): string {
  if (!estimator.trims) return estimator.id;
  const g = (parts?.map((part) => part.scores) ?? [x, y]).map((each) => Math.floor((trim * each.length) / 100));
  return g.every((each) => each === 0) ? estimator.untrimmed : `${estimator.id} ${g.join(' ')}`;
}

/** The kept rows under the conditions compared, packed 15 to a character. */
export function keptKey(design: Design, comparison: ComparisonSpec): string {
  const { effect, factor: pairFactor, first, second } = comparison;
  const [factor] =
    effect === undefined
      ? design.factors.filter((each) => each.name === pairFactor)
      : askedFactors(design.factors, effect);
  const levels = effect?.type === 'contrast' ? [...effect.first, ...effect.second] : [first, second];
  const wanted = factor && new Set(levels.map((level) => factor.levels.indexOf(level)));
  let key = '';
  let word = 0;
  let bits = 0;
  for (let row = 0; row < design.kept.length; row++) {
    if (wanted && !wanted.has(factor?.codes[row] as number)) continue;
    word = word * 2 + (design.kept[row] as number);
    if (++bits === 15) {
      key += String.fromCharCode(word);
      word = 0;
      bits = 0;
    }
  }
  return key + String.fromCharCode(word);
}

export function extremeLabel(rules: readonly Rule[], unit: string): string {
  const extreme = rules.filter((rule) => rule.rule === 'extreme' && rule.cutoff !== null);
  return extreme.length === 0
    ? 'nobody set aside for being extreme'
    : extreme.map((rule) => ruleLabel(rule, unit)).join('; ');
}

export function join(a: Specification, b: Specification): Specification {
  const words = `${b.ruleLabel}, ${b.finding.label}`;
  const same = words === `${a.ruleLabel}, ${a.finding.label}`;
  return {
    ...a,
    planned: a.planned || b.planned,
    everyoneIn: a.everyoneIn || b.everyoneIn,
    also: same ? a.also : [...a.also, words, ...b.also],
  };
}

export function summarise(specifications: Specification[], unit: string): Sweep {
  const groups = new Map<string, number[]>();
  specifications.forEach((each, index) => {
    if (each.finding.estimate === null) return;
    const group = each.finding.group;
    groups.set(group, [...(groups.get(group) ?? []), index]);
  });
  const estimate = (index: number) => specifications[index]?.finding.estimate ?? 0;
  const tally = (verdict: Verdict | null) => specifications.filter((each) => each.verdict === verdict).length;
  return {
    specifications,
    groups: [...groups].map(([group, members]) => ({
      group,
      order: members.sort((a, b) => estimate(a) - estimate(b) || a - b),
    })),
    planned: specifications.findIndex((each) => each.planned),
    supported: tally('supported'),
    undecided: tally('undecided'),
    contradicted: tally('contradicted'),
    refused: tally(null),
    unit,
  };
}
