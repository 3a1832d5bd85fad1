/** The whole chain of a comparison once more, without some of the participants. */
import { type CompareArgs, compareRow, type Result } from './compare.ts';
import { type Estimator, estimatorOf } from './estimators.ts';
import { applyRules, withoutRules } from './exclusion.ts';
import type { Finding } from './finding.ts';
import type { Rule } from './rules.ts';
import { type Samples, samplesFor } from './samples.ts';
import { scoreDesign } from './score.ts';
import { withholdsTextbook } from './withhold.ts';

/** A comparison's chain, ready to be run again. */
export interface Chain {
  readonly result: Result;
  readonly estimator: Estimator;
  /** Participants who could enter: those with a score before any rule but the documented faults. */
  readonly people: readonly string[];
}

/**
 * The chain of a result.
 *
 * @param result a comparison of two sides with its chain
 * @returns null where its planned row is about several levels at once
 * @source one road: the functions the single cells call
 */
export function chainOf(result: Result): Chain | null {
  const estimator = estimatorOf(result.comparison.estimator);
  if (result.scope === 'omnibus' || estimator === undefined) return null;
  const { design, score } = { design: result.scores.design, score: result.scores.score };
  const named = design.rules.filter((rule) => rule.rule === 'named');
  const samples = samplesFor(scoreDesign(applyRules(withoutRules(design), named), score), result.comparison);
  return { result, estimator, people: peopleOf(samples) };
}

/** Everyone behind two samples, each once. */
export function peopleOf(samples: Samples): string[] {
  return samples.xParticipants === samples.yParticipants
    ? [...samples.xParticipants]
    : [...new Set([...samples.xParticipants, ...samples.yParticipants])];
}

/**
 * The samples of the chain without some participants: every rule is applied again to who is left.
 *
 * @param chain the chain
 * @param gone participants left out, by name
 * @returns the two samples in the outcome's unit
 * @source the whole pipeline is refitted, so that a cutoff moves: methods 2.6
 */
export function samplesWithout(chain: Chain, gone: ReadonlySet<string>): Samples {
  const { comparison, scores } = chain.result;
  const base = withoutRules(scores.design);
  const out = base.participants.map((name) => gone.has(name));
  const kept = base.kept.map((mark, row) => (out[base.participant[row] as number] === true ? 0 : mark));
  return samplesFor(scoreDesign(applyRules({ ...base, kept }, scores.design.rules), scores.score), comparison);
}

/** The planned row of two samples, as the comparison cell makes it; effect sizes are left out where they resample. */
export function plannedRow(chain: Chain, samples: Samples): Finding {
  const { comparison, scores } = chain.result;
  const { unit, direction, rows } = scores.design.roles;
  const settings = chain.estimator.closedForm ? { ...comparison, resamples: 0 } : comparison;
  const withheld = comparison.effect?.type !== 'value' && withholdsTextbook(scores.design.rules, rows);
  const args: CompareArgs = { samples, comparison: settings, unit, direction, withheld };
  return compareRow(chain.estimator, args);
}

/** Whether leaving one participant out changes nobody else's score: no rule pools participants. */
export function rulesStandAlone(rules: readonly Rule[]): boolean {
  return rules.every(
    (rule) =>
      rule.rule !== 'extreme' ||
      rule.cutoff === null ||
      (rule.on === 'trial' && (rule.scope === 'participant' || rule.scope === 'participant-condition')),
  );
}
