import { adjustedFences } from '../numerics/rules/adjusted-fences.ts';
import { carlingLimits } from '../numerics/rules/carling.ts';
import { doubleMadLimits } from '../numerics/rules/double-mad.ts';
import { fenceLimits } from '../numerics/rules/iqr-fences.ts';
import { flagOutside } from '../numerics/rules/limits.ts';
import { madLimits } from '../numerics/rules/mad.ts';
import { movingCriterion } from '../numerics/rules/moving-criterion.ts';
import { zScoreLimits } from '../numerics/rules/z-score.ts';
import type { ScopeLimits } from './flagging.ts';
import type { ExtremeRule, Measure } from './rules.ts';

/** The limits of one scope and which of its scores lie outside. */
export interface Judged {
  readonly limits: ScopeLimits;
  /** One mark a score, in the order given; 1 = set aside. */
  readonly flags: Uint8Array;
}

interface Pair {
  readonly lower: number | null;
  readonly upper: number | null;
}

/** Fewest scores a scope must have before limits are made from them. */
export const LEAST_IN_SCOPE = 3;
/** The same for the moving criteria, whose table begins at 4 scores. */
export const LEAST_FOR_MOVING = 4;

type Once = (values: Float64Array, cutoff: number) => Pair;

/** How each measure makes its limits in one pass; what is not here has a procedure of its own. */
const ONCE: Readonly<Partial<Record<Measure, Once>>> = {
  MAD: (values, cutoff) => madLimits(values, { cutoff }),
  'double MAD': (values, cutoff) => doubleMadLimits(values, { cutoff }),
  SD: (values, cutoff) => zScoreLimits(values, { cutoff }),
  fences: (values, k) => fenceLimits(values, { k, quartiles: 'type7' }),
  'hinge fences': (values, k) => fenceLimits(values, { k, quartiles: 'tukey_hinges' }),
  'adjusted fences': (values, coef) => adjustedFences(values, { coef }),
  Carling: (values) => carlingLimits(values),
};

const FLAT = 'more than half of the scores are equal';
const FLAT_SIDE = 'more than half of the scores on one side of the median are equal to it';

/**
 * Judges the scores of one scope by an extremity rule; it takes scores only, so that no condition can reach it.
 *
 * @param values scores of the scope (any unit, no NaN), not modified
 * @param scope code of the scope, handed on
 * @param rule measure, cutoff (null = nobody), sides, and whether it is repeated
 * @returns limits (of the last pass) and marks; a score exactly on a limit is kept; nobody is marked and a reason given where
 *   the scope is too small or has no spread
 * @throws RangeError for the recursive procedure on one side only, and for the measure MCD
 * @source methods 1.6 and 3.10; each measure's own source in src/numerics/rules
 * @checked outside check cases z_score_rule, iqr_fences, double_mad_rule, carling_boxplot, adjusted_boxplot: the same rows
 */
export function judgeScope(values: Float64Array, scope: number, rule: ExtremeRule): Judged {
  const none = { scope, lower: null, upper: null, n: values.length };
  const nobody = (reason?: string): Judged => ({
    limits: reason === undefined ? none : { ...none, reason },
    flags: new Uint8Array(values.length),
  });
  if (rule.cutoff === null) return nobody();
  const moving = rule.measure === 'moving' || rule.measure === 'recursive';
  const least = moving ? LEAST_FOR_MOVING : LEAST_IN_SCOPE;
  if (values.length < least) return nobody(`fewer than ${least} scores`);
  if (moving) return judgeMoving(values, none, rule);
  const found = limitsOnce(values, rule);
  if (found.lower === null && found.upper === null) return nobody(found.reason ?? FLAT);
  if (rule.repeated === true) return judgeAgain(values, none, rule);
  return { limits: { ...none, ...found }, flags: flagOutside(values, found) };
}

/** One pass: limits on the sides the rule looks at. */
function limitsOnce(values: Float64Array, rule: ExtremeRule): Pair & { reason?: string } {
  const once = ONCE[rule.measure];
  if (once === undefined) throw new RangeError(`*measure* must judge one column; got ${rule.measure}`);
  const made = once(values, rule.cutoff as number);
  const lower = rule.sides === 'above' ? null : made.lower;
  const upper = rule.sides === 'below' ? null : made.upper;
  if (rule.measure !== 'double MAD')
    return made.lower === null ? { lower: null, upper: null, reason: FLAT } : { lower, upper };
  const flat = (rule.sides !== 'above' && made.lower === null) || (rule.sides !== 'below' && made.upper === null);
  return flat ? { lower, upper, reason: FLAT_SIDE } : { lower, upper };
}

/** Pass after pass over who is left, until nobody more is outside or the rest has no limits. */
function judgeAgain(values: Float64Array, none: ScopeLimits, rule: ExtremeRule): Judged {
  const flags = new Uint8Array(values.length);
  let left = Int32Array.from(values.keys());
  let last: Pair = { lower: null, upper: null };
  const taken: number[] = [];
  while (left.length >= LEAST_IN_SCOPE) {
    const rest = Float64Array.from(left, (i) => values[i] as number);
    const found = limitsOnce(rest, rule);
    if (found.lower === null && found.upper === null) break;
    last = { lower: found.lower, upper: found.upper };
    const marks = flagOutside(rest, last);
    taken.push(marks.reduce((sum, mark) => sum + mark, 0));
    for (let i = 0; i < left.length; i++) if (marks[i] === 1) flags[left[i] as number] = 1;
    left = left.filter((_, i) => marks[i] === 0);
    if (taken.at(-1) === 0) break;
  }
  const total = taken.reduce((sum, each) => sum + each, 0);
  return { limits: { ...none, ...last, passes: { count: taken.length, first: taken[0] ?? 0, total } }, flags };
}

/** Van Selst & Jolicoeur's procedures. */
function judgeMoving(values: Float64Array, none: ScopeLimits, rule: ExtremeRule): Judged {
  const recursive = rule.measure === 'recursive';
  if (recursive && rule.sides !== 'both') throw new RangeError(`*sides* must be both; got ${rule.sides}`);
  const found = movingCriterion(values, { procedure: recursive ? 'modified-recursive' : 'non-recursive' });
  if (found.lower === null) return { limits: { ...none, reason: FLAT }, flags: new Uint8Array(values.length) };
  const lower = rule.sides === 'above' ? null : found.lower;
  const upper = rule.sides === 'below' ? null : found.upper;
  const flags = recursive ? found.flags : flagOutside(values, { lower, upper });
  return { limits: { ...none, lower, upper }, flags };
}
