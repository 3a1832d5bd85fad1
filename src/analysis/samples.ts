import { Refusal } from '../data/refusal.ts';
import { type Asked, refusalOf } from './asked.ts';
import type { ComparisonSpec } from './compare.ts';
import type { Scores } from './score.ts';

/** Which rows fit two samples: pairs, two groups, several weighted groups, or scores against a value. */
export type SampleScope = 'within' | 'between' | 'contrast' | 'value';

/** One group of a contrast between participants. */
export interface SamplePart {
  readonly level: string;
  readonly side: 'first' | 'second';
  readonly scores: Float64Array;
}

/** The two samples of a comparison, in the outcome's unit. */
export interface Samples {
  readonly scope: SampleScope;
  readonly factor: string;
  readonly first: string;
  readonly second: string;
  /** Scores under the first condition; within: x[i] and y[i] are of the same participant; value: y is that value. */
  readonly x: Float64Array;
  readonly y: Float64Array;
  /** Participants behind x (within: behind x and y). */
  readonly xParticipants: readonly string[];
  readonly yParticipants: readonly string[];
  /** Participants with a score who could not enter, and why. */
  readonly left: readonly { readonly participant: string; readonly why: string }[];
  /** A contrast between participants only: its groups, of which x and y are put together. */
  readonly parts?: readonly SamplePart[];
}

/**
 * Takes the samples of a comparison that is not about several levels at once.
 *
 * @throws Refusal where the design does not allow what is asked
 */
export function samplesFor(
  scores: Scores,
  comparison: Pick<ComparisonSpec, 'factor' | 'effect' | 'first' | 'second'>,
): Samples {
  const { factor, effect, first, second } = comparison;
  if (effect === undefined) return takeSamples(scores, factor, first, second);
  const refused = refusalOf(scores.design.factors, effect);
  if (refused !== null) throw new Refusal(refused);
  if (effect.type === 'value') return valueSamples(scores, { factor: '', first, second }, effect.value ?? 0);
  if (effect.type !== 'contrast') throw new RangeError(`*effect* must have two sides; got ${effect.type}`);
  return contrastSamples(scores, { factor, first, second }, effect);
}

function valueSamples(scores: Scores, names: Named, value: number): Samples {
  const all = scores.conditions.map((_, index) => index);
  const own = scores.participants.map((_, who) => meanOver(scores, who, all));
  const entered = own.flatMap((score, who) => (Number.isNaN(score) ? [] : [who]));
  const people = entered.map((who) => scores.participants[who] as string);
  return {
    scope: 'value',
    ...names,
    x: Float64Array.from(entered, (who) => own[who] as number),
    y: new Float64Array(entered.length).fill(value),
    xParticipants: people,
    yParticipants: people,
    left: scores.participants
      .filter((_, who) => Number.isNaN(own[who]))
      .map((participant) => ({ participant, why: 'no kept score under one of the conditions' })),
  };
}

function contrastSamples(scores: Scores, names: Named, asked: Extract<Asked, { type: 'contrast' }>): Samples {
  const factor = scores.design.factors.find((each) => each.name === asked.factor);
  const codesOf = (levels: readonly string[]) => levels.map((level) => factor?.levels.indexOf(level) ?? -1);
  if (factor?.scope === 'within') return withinSamples(scores, names, [codesOf(asked.first), codesOf(asked.second)]);
  const both = [
    ...asked.first.map((level) => ({ level, side: 'first' as const })),
    ...asked.second.map((level) => ({ level, side: 'second' as const })),
  ];
  const groups = both.map(({ level, side }) => ({ level, side, own: oneGroup(scores, asked.factor, level) }));
  const join = (side: 'first' | 'second') => groups.filter((each) => each.side === side).map(({ own }) => own);
  const scoresOf = (side: 'first' | 'second') => Float64Array.from(join(side).flatMap((own) => own.values));
  const peopleOf = (side: 'first' | 'second') => join(side).flatMap((own) => own.who);
  return {
    scope: 'contrast',
    ...names,
    x: scoresOf('first'),
    y: scoresOf('second'),
    xParticipants: peopleOf('first'),
    yParticipants: peopleOf('second'),
    left: groups.flatMap(({ own }) => own.left),
    parts: groups.map(({ level, side, own }) => ({ level, side, scores: Float64Array.from(own.values) })),
  };
}

/** Each participant of a group with the unweighted mean over all within conditions. */
function oneGroup(scores: Scores, factor: string, level: string) {
  const group = scores.groups.find((each) => each.factor === factor);
  const code = group?.levels.indexOf(level) ?? -1;
  const all = scores.conditions.map((_, index) => index);
  const values: number[] = [];
  const who: string[] = [];
  const left: { participant: string; why: string }[] = [];
  scores.participants.forEach((participant, index) => {
    if (group?.codes[index] !== code) return;
    const value = meanOver(scores, index, all);
    if (Number.isNaN(value)) left.push({ participant, why: 'no kept score under one of the conditions' });
    else {
      values.push(value);
      who.push(participant);
    }
  });
  return { values, who, left };
}

/**
 * Takes the two samples a comparison needs out of the scores.
 *
 * Within a factor: each participant's score under the two levels; with further within factors, the unweighted mean over
 * their levels. Between: each participant's unweighted mean over all within conditions. A participant who lacks one of
 * the scores needed does not enter (complete cases), and is listed.
 *
 * @throws Refusal where the factor or a level is not in the design, or the two levels are the same
 * @source complete cases and their listing: methods 3.8
 */
export function takeSamples(scores: Scores, factor: string, first: string, second: string): Samples {
  const found = scores.design.factors.find((each) => each.name === factor);
  if (!found) {
    const names = scores.design.factors.map((each) => each.name);
    throw new Refusal(
      `There is no condition called "${factor}" in the design above.${names.length > 0 ? ` Choose one of: ${names.join(', ')}.` : ' State one in the design.'}`,
    );
  }
  const codes = [first, second].map((level) => {
    const code = found.levels.indexOf(level);
    if (code < 0) {
      throw new Refusal(`"${level}" is not a level of ${factor}. Its levels are: ${found.levels.join(', ')}.`);
    }
    return code;
  });
  if (codes[0] === codes[1]) throw new Refusal(`Both sides of the comparison are "${first}". Choose two levels.`);
  const pair: [number, number] = [codes[0] as number, codes[1] as number];
  return found.scope === 'within'
    ? withinSamples(scores, { factor, first, second }, [[pair[0]], [pair[1]]])
    : betweenSamples(scores, { factor, first, second }, pair);
}

interface Named {
  readonly factor: string;
  readonly first: string;
  readonly second: string;
}

/** Sides may hold several levels: a side's score is then the unweighted mean over them. */
function withinSamples(scores: Scores, names: Named, sides: readonly [readonly number[], readonly number[]]): Samples {
  const position = scores.design.factors.filter((f) => f.scope === 'within').findIndex((f) => f.name === names.factor);
  const columns = sides.map((codes) => conditionsWith(scores, position, codes));
  const x: number[] = [];
  const y: number[] = [];
  const who: string[] = [];
  const left: { participant: string; why: string }[] = [];
  scores.participants.forEach((participant, index) => {
    const a = meanOver(scores, index, columns[0] as number[]);
    const b = meanOver(scores, index, columns[1] as number[]);
    if (Number.isNaN(a) || Number.isNaN(b)) {
      const lacking = Number.isNaN(a) ? (Number.isNaN(b) ? 'both' : names.first) : names.second;
      left.push({ participant, why: `no kept score under ${lacking}` });
      return;
    }
    x.push(a);
    y.push(b);
    who.push(participant);
  });
  return {
    scope: 'within',
    ...names,
    x: Float64Array.from(x),
    y: Float64Array.from(y),
    xParticipants: who,
    yParticipants: who,
    left,
  };
}

function betweenSamples(scores: Scores, names: Named, pair: [number, number]): Samples {
  const group = scores.groups.find((each) => each.factor === names.factor);
  const all = scores.conditions.map((_, index) => index);
  const values: [number[], number[]] = [[], []];
  const who: [string[], string[]] = [[], []];
  const left: { participant: string; why: string }[] = [];
  scores.participants.forEach((participant, index) => {
    const side = pair.indexOf(group?.codes[index] as number);
    if (side < 0) return;
    const value = meanOver(scores, index, all);
    if (Number.isNaN(value)) {
      left.push({ participant, why: 'no kept score under one of the conditions' });
      return;
    }
    values[side]?.push(value);
    who[side]?.push(participant);
  });
  return {
    scope: 'between',
    ...names,
    x: Float64Array.from(values[0]),
    y: Float64Array.from(values[1]),
    xParticipants: who[0],
    yParticipants: who[1],
    left,
  };
}

function conditionsWith(scores: Scores, position: number, codes: readonly number[]): number[] {
  return scores.conditions.flatMap((condition, index) =>
    codes.includes(condition.levels[position] as number) ? [index] : [],
  );
}

/** Unweighted mean of a participant's scores over some conditions; NaN as soon as one is missing. */
function meanOver(scores: Scores, participant: number, conditions: readonly number[]): number {
  let sum = 0;
  for (const condition of conditions) {
    sum += scores.values[participant * scores.conditions.length + condition] as number;
  }
  return sum / conditions.length;
}
