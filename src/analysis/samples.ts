import { Refusal } from '../data/refusal.ts';
import type { Scores } from './score.ts';

/** The two samples of a comparison, in the outcome's unit. */
export interface Samples {
  readonly scope: 'within' | 'between';
  readonly factor: string;
  readonly first: string;
  readonly second: string;
  /** Scores under the first condition; within: x[i] and y[i] are of the same participant. */
  readonly x: Float64Array;
  readonly y: Float64Array;
  /** Participants behind x (within: behind x and y). */
  readonly xParticipants: readonly string[];
  readonly yParticipants: readonly string[];
  /** Participants with a score who could not enter, and why. */
  readonly left: readonly { readonly participant: string; readonly why: string }[];
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
    ? withinSamples(scores, { factor, first, second }, pair)
    : betweenSamples(scores, { factor, first, second }, pair);
}

interface Named {
  readonly factor: string;
  readonly first: string;
  readonly second: string;
}

function withinSamples(scores: Scores, names: Named, pair: [number, number]): Samples {
  const position = scores.design.factors.filter((f) => f.scope === 'within').findIndex((f) => f.name === names.factor);
  const columns = pair.map((code) => conditionsWith(scores, position, code));
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

function conditionsWith(scores: Scores, position: number, code: number): number[] {
  return scores.conditions.flatMap((condition, index) => (condition.levels[position] === code ? [index] : []));
}

/** Unweighted mean of a participant's scores over some conditions; NaN as soon as one is missing. */
function meanOver(scores: Scores, participant: number, conditions: readonly number[]): number {
  let sum = 0;
  for (const condition of conditions) {
    sum += scores.values[participant * scores.conditions.length + condition] as number;
  }
  return sum / conditions.length;
}
