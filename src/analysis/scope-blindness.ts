import type { Design } from './design.ts';
import type { Rule } from './rules.ts';

type Factors = Design['factors'];

/** An effect as the factors it is about: one for a main effect, several for their interaction. */
export type Effect = readonly string[];

/**
 * The factors whose levels a rule's scopes set apart. A scope within participants cannot set groups of participants
 * apart: it is the same scope whatever group its participant is in.
 *
 * @param rule with its scope
 * @param factors of the design the rule is applied to
 * @returns names of factors; empty for a rule that looks at no condition
 * @source Andre 2022, four worked examples, extended: methods 1.5, table of scopes
 */
export function splitBy(rule: Rule, factors: Factors): readonly string[] {
  if (rule.rule !== 'extreme' || rule.scope === 'pooled' || rule.scope === 'participant') return [];
  const inside = rule.scope === 'participant-condition';
  return factors
    .filter((factor) => {
      if (inside) return factor.scope === 'within';
      return rule.on === 'trial' || factor.scope === 'between';
    })
    .map((factor) => factor.name);
}

/**
 * Whether a rule is blind to the tested effects: relabelling what an effect is about must leave every scope as it is
 * in at least one of the effect's factors.
 *
 * @param split factors whose levels the rule's scopes set apart
 * @param tested every effect under test
 * @returns false as soon as one tested effect lies wholly within the split
 * @source Andre 2022; methods 1.5: within the levels of A is allowed where only B and A x B are tested, never within cells
 */
export function isBlindTo(split: readonly string[], tested: readonly Effect[]): boolean {
  return tested.every((effect) => effect.some((factor) => !split.includes(factor)));
}

/**
 * What a rule uses of the conditions and for which effects it is blind, in one sentence for the margin.
 *
 * @param rule with its scope
 * @param factors of the design
 * @returns null for a rule by name, which no scope decides
 */
export function scopeWords(rule: Rule, factors: Factors): string | null {
  if (rule.rule === 'named' || factors.length === 0) return null;
  const split = splitBy(rule, factors);
  const all = listed(factors.map((factor) => factor.name));
  if (split.length === 0) return `It uses no condition, and is blind to every effect of ${all}.`;
  const free = factors.filter((factor) => !split.includes(factor.name)).map((factor) => factor.name);
  const rest = free.length === 0 ? '' : ` It is blind to effects of ${listed(free)} alone.`;
  const crossed =
    free.length === 0 ? '' : ` An interaction of ${listed(split)} with ${listed(free)} it does not see either.`;
  return `It looks at each ${split.join(' and ')} separately, and so is not blind to an effect of ${listed(split)}.${rest}${crossed}`;
}

function listed(names: readonly string[]): string {
  const last = names.at(-1) ?? '';
  return names.length < 2 ? last : `${names.slice(0, -1).join(', ')} or ${last}`;
}
