/** What a comparison asks for when it is not one pair of conditions: kept in its settings as `effect`. */
import type { Factor } from './design.ts';

/** How all pairs below several levels are compared. */
export type PairProcedure = 'none' | 'tukey' | 'games-howell' | 'dunn' | 'holm' | 'hochberg';

export type Asked =
  /** Whether the levels of one factor differ at all. */
  | { readonly type: 'levels'; readonly factor: string; readonly pairs: PairProcedure }
  /** Whether the differences between the levels of one factor depend on the level of the other. */
  | { readonly type: 'interaction'; readonly factors: readonly [string, string] }
  /** The mean of some levels of a factor against the mean of others. */
  | {
      readonly type: 'contrast';
      readonly factor: string;
      readonly first: readonly string[];
      readonly second: readonly string[];
    }
  /** Every participant's score against a value in the outcome's unit. */
  | { readonly type: 'value'; readonly value: number | null };

/** A question about several levels at once, answered by an F or a rank statistic. */
export type AskedOmnibus = Extract<Asked, { readonly type: 'levels' | 'interaction' }>;

/** The parts of a factor that decide what can be asked. */
export type FactorShape = Pick<Factor, 'name' | 'scope' | 'levels'>;

/** Whether the question is about several levels at once. */
export function isOmnibus(asked: Asked | undefined): asked is AskedOmnibus {
  return asked !== undefined && (asked.type === 'levels' || asked.type === 'interaction');
}

/** The factors a question is about, those of the design that it names; empty for a single value. */
export function askedFactors<F extends FactorShape>(factors: readonly F[], asked: Asked): F[] {
  const names = asked.type === 'value' ? [] : asked.type === 'interaction' ? asked.factors : [asked.factor];
  return names.flatMap((name) => factors.filter((factor) => factor.name === name));
}

/**
 * Why a question cannot be asked of a design.
 *
 * @param factors the design's factors
 * @param asked the question
 * @returns a sentence that says what to do, or null where it can be asked
 */
export function refusalOf(factors: readonly FactorShape[], asked: Asked): string | null {
  const missing = missingFactor(factors, asked);
  if (missing !== null) return missing;
  const [factor, other] = askedFactors(factors, asked);
  switch (asked.type) {
    case 'levels':
      return factor && factor.levels.length < 3 && factors.length < 2
        ? `${factor.name} has two levels only: compare ${factor.levels.join(' with ')} directly.`
        : refusedProcedure(factor, asked.pairs);
    case 'interaction':
      return factor && factor.name === other?.name ? 'An interaction needs two different conditions.' : null;
    case 'contrast':
      return factor ? refusedSets(factor, asked.first, asked.second) : null;
    case 'value':
      return asked.value === null ? 'Say which value the scores are compared with.' : null;
  }
}

function missingFactor(factors: readonly FactorShape[], asked: Asked): string | null {
  const wanted = asked.type === 'value' ? [] : asked.type === 'interaction' ? asked.factors : [asked.factor];
  const lost = wanted.find((name) => !factors.some((factor) => factor.name === name));
  if (lost === undefined) return null;
  const names = factors.map((factor) => factor.name);
  return `There is no condition called "${lost}" in the design above.${names.length > 0 ? ` Choose one of: ${names.join(', ')}.` : ' State one in the design.'}`;
}

function refusedProcedure(factor: FactorShape | undefined, pairs: PairProcedure): string | null {
  if (!factor || pairs === 'none' || proceduresFor(factor.scope).includes(pairs)) return null;
  return `The procedure chosen for all pairs is for groups of different participants, but every participant met every ${factor.name}. Choose Holm or Hochberg.`;
}

function refusedSets(factor: FactorShape, first: readonly string[], second: readonly string[]): string | null {
  if (first.length === 0 || second.length === 0) return `Say which levels of ${factor.name} stand on each side.`;
  const lost = [...first, ...second].find((level) => !factor.levels.includes(level));
  if (lost !== undefined) {
    return `"${lost}" is not a level of ${factor.name}. Its levels are: ${factor.levels.join(', ')}.`;
  }
  const both = first.find((level) => second.includes(level));
  return both === undefined ? null : `"${both}" stands on both sides of the comparison. Take it out of one.`;
}

/** The procedures for all pairs that suit a factor's scope, in the order offered. */
export function proceduresFor(scope: FactorShape['scope']): PairProcedure[] {
  return scope === 'between'
    ? ['none', 'games-howell', 'tukey', 'dunn', 'holm', 'hochberg']
    : ['none', 'holm', 'hochberg'];
}

/** The two sides of a contrast or of a comparison with a value, as they stand in sentences. */
export function sidesOf(
  asked: Extract<Asked, { type: 'contrast' | 'value' }>,
  unit: string,
): readonly [string, string] {
  if (asked.type === 'contrast') return [setWords(asked.first), setWords(asked.second)];
  const value = String(asked.value).replace('-', '\u2212');
  return ['every score', unit === '' ? value : `${value} ${unit}`];
}

/** "voice", or "the mean of tone and seat pulse". */
export function setWords(levels: readonly string[]): string {
  if (levels.length < 2) return levels[0] ?? '';
  return `the mean of ${levels.slice(0, -1).join(', ')} and ${levels.at(-1)}`;
}
