/** Estimate, interval and p along one shared number at a time, everything else as the worksheet has it. */
import type { ClaimSpec } from './claim.ts';
import { verdictOf } from './claim.ts';
import { compareRow, fittingEstimators, type Result } from './compare.ts';
import { type Estimator, estimatorOf } from './estimators.ts';
import { applyRules, withoutRules } from './exclusion.ts';
import type { ExtremeRule, Rule } from './rules.ts';
import { samplesFor } from './samples.ts';
import { scoreDesign } from './score.ts';
import { gridRules, withExtreme } from './sweep.ts';
import { withholdsTextbook } from './withhold.ts';

export interface RibbonPoint {
  /** Trim in percent, or cutoff; null = no cutoff. */
  readonly at: number | null;
  readonly estimate: number | null;
  readonly low: number | null;
  readonly high: number | null;
  readonly p: number | null;
  readonly verdict: string | null;
  /** Rows kept. */
  readonly kept: number;
}

export interface Ribbon {
  readonly along: 'trim' | 'cutoff';
  /** "difference of trimmed means", or "MAD within participant". */
  readonly what: string;
  /** Where the worksheet stands; null = no cutoff. */
  readonly now: number | null;
  readonly points: readonly RibbonPoint[];
}

const MOST_TRIM = 25;
/** Cutoffs from 1.5 to 4 in quarters. */
const CUTOFFS: readonly number[] = Array.from({ length: 11 }, (_, i) => 1.5 + i / 4);

/**
 * The planned row along every trim from 0 to 25 %, and along the cutoff.
 *
 * @param result the worksheet's comparison with its chain
 * @param claim what is claimed
 * @returns a ribbon along the trim where a row with a trim fits, and one along the cutoff
 * @source one row, one result: the very functions of the single cells
 */
export function gridRibbons(result: Result, claim: ClaimSpec): Ribbon[] {
  if (result.scope === 'omnibus') return [];
  const planned = estimatorOf(result.comparison.estimator);
  if (planned === undefined) return [];
  const fitting = fittingEstimators(result.scope);
  const trimmed = planned.trims && planned.closedForm ? planned : fitting.find((each) => each.trims && each.closedForm);
  const along = planned.closedForm ? planned : trimmed;
  return [
    ...(trimmed === undefined ? [] : [alongTrim(result, claim, trimmed)]),
    ...(along === undefined ? [] : [alongCutoff(result, claim, along)]),
  ];
}

function alongTrim(result: Result, claim: ClaimSpec, estimator: Estimator): Ribbon {
  const point = pointsWith(result, claim, result.scores.design.rules, estimator);
  return {
    along: 'trim',
    what: estimator.name,
    now: estimatorOf(result.comparison.estimator)?.trims === true ? result.comparison.trim : 0,
    points: Array.from({ length: MOST_TRIM + 1 }, (_, trim) => ({ at: trim, ...point(trim) })),
  };
}

function alongCutoff(result: Result, claim: ClaimSpec, estimator: Estimator): Ribbon {
  const { rules } = result.scores.design;
  const own = rules.find((rule): rule is ExtremeRule => rule.rule === 'extreme');
  const [usual] = gridRules(result.scores.design).flatMap((rule) => (rule === null ? [] : [rule]));
  const base = own ?? (usual as ExtremeRule);
  const at = (cutoff: number | null) => {
    const changed = withExtreme(rules, cutoff === null ? null : { ...base, cutoff });
    return { at: cutoff, ...pointsWith(result, claim, changed, estimator)(result.comparison.trim) };
  };
  const scope = base.scope === 'participant' ? 'within participant' : base.scope;
  return {
    along: 'cutoff',
    what: `${base.measure}, ${scope}`,
    now: own?.cutoff ?? null,
    points: [...CUTOFFS.map(at), at(null)],
  };
}

/** The row under some rules, for any trim. */
function pointsWith(result: Result, claim: ClaimSpec, rules: readonly Rule[], estimator: Estimator) {
  const { comparison, scores } = result;
  const design = applyRules(withoutRules(scores.design), rules);
  const { unit, direction, rows } = design.roles;
  const samples = samplesFor(scoreDesign(design, scores.score), comparison);
  const withheld = comparison.effect?.type !== 'value' && withholdsTextbook(rules, rows);
  const args = { samples, comparison: { ...comparison, resamples: 0 }, unit, direction, withheld };
  const kept = design.kept.reduce((sum, mark) => sum + mark, 0);
  return (trim: number): Omit<RibbonPoint, 'at'> => {
    const finding = compareRow(estimator, args, trim);
    const [low, high] = finding.interval ?? [null, null];
    const verdict = verdictOf(finding, claim, comparison.first);
    return { estimate: finding.estimate, low, high, p: finding.p, verdict, kept };
  };
}
