import { Refusal } from '../data/refusal.ts';
import { type Factor, participantNoun } from './design.ts';
import type { Scores } from './score.ts';

/** What is looked at: some levels of one factor, the participants taken together or apart by another factor. */
export interface CheckTarget {
  /** Name of the factor; empty for the scores of one sample. */
  readonly factor: string;
  /** Two levels, the first minus the second; empty for every level. */
  readonly levels: readonly string[];
  /** A between factor whose groups stay apart; empty for none. */
  readonly by: string;
}

/** Participants in file order, each with a score in every column, in the outcome's unit. */
export interface CheckLayout {
  readonly target: CheckTarget;
  /** The outcome, its unit ("" for none), and the word for one participant. */
  readonly outcome: string;
  readonly unit: string;
  readonly noun: string;
  readonly participants: readonly string[];
  /** Levels within participants, two or more; one column with an empty name where nothing varies within. */
  readonly columns: readonly string[];
  /** Groups of participants, two or more; one with an empty name where nobody is apart. */
  readonly groups: readonly string[];
  /** One code into `groups` a participant. */
  readonly group: Int32Array;
  /** Participants x columns, row by row. */
  readonly values: Float64Array;
  /** Participants with a score who could not enter, and why. */
  readonly left: readonly { readonly participant: string; readonly why: string }[];
}

/**
 * Takes the scores that an assumption is about: never the pooled raw scores of several groups or conditions.
 *
 * Within factors that are not asked about are averaged over, unweighted. A participant who lacks a score needed does
 * not enter (complete cases), and is listed; groups nobody is left in are dropped.
 *
 * @param scores participants x conditions
 * @param target which levels, and whether groups stay apart
 * @returns participants in file order with their columns
 * @throws Refusal where the factor or a level is not in the design, or too few participants are left to have a spread
 * @source the quantity by design: methods 4.1; complete cases and their listing: methods 3.8
 */
export function takeCheckLayout(scores: Scores, target: CheckTarget): CheckLayout {
  const factor = target.factor === '' ? null : needFactor(scores, target.factor);
  const levels = factor === null ? [] : needLevels(factor, target.levels);
  const columns = columnsOf(scores, factor?.scope === 'within' ? factor : null, levels);
  const sides = [
    ...(factor?.scope === 'between' ? [{ factor, levels }] : []),
    ...(target.by === '' ? [] : [bySide(scores, target)]),
  ];
  const entered: { who: number; code: number; own: number[] }[] = [];
  const left: { participant: string; why: string }[] = [];
  scores.participants.forEach((participant, who) => {
    const code = groupCode(scores, sides, who);
    if (code < 0) return;
    const own = columns.map(({ conditions }) => meanOver(scores, who, conditions));
    if (own.some(Number.isNaN)) left.push({ participant, why: 'no kept score under one of the conditions' });
    else entered.push({ who, code, own });
  });
  const layout = { ...named(scores, target), ...gather(scores, columns, groupNames(sides), entered), left };
  refuseFew(layout);
  return layout;
}

interface Side {
  readonly factor: Factor;
  readonly levels: readonly string[];
}

function named({ design }: Scores, target: CheckTarget) {
  const { roles } = design;
  return { target, outcome: roles.outcome, unit: roles.unit, noun: participantNoun(roles) };
}

function gather(
  scores: Scores,
  columns: readonly { readonly name: string }[],
  names: readonly string[],
  entered: readonly { who: number; code: number; own: number[] }[],
) {
  const present = names.map((_, code) => code).filter((code) => entered.some((each) => each.code === code));
  return {
    participants: entered.map(({ who }) => scores.participants[who] as string),
    columns: columns.map(({ name }) => name),
    groups: present.map((code) => names[code] as string),
    group: Int32Array.from(entered, ({ code }) => present.indexOf(code)),
    values: Float64Array.from(entered.flatMap(({ own }) => own)),
  };
}

function needFactor(scores: Scores, name: string): Factor {
  const found = scores.design.factors.find((each) => each.name === name);
  if (found) return found;
  const names = scores.design.factors.map((each) => each.name);
  throw new Refusal(
    `There is no condition called "${name}" in the design above.${names.length > 0 ? ` Choose one of: ${names.join(', ')}.` : ' State one in the design.'}`,
  );
}

function needLevels(factor: Factor, levels: readonly string[]): readonly string[] {
  if (levels.length === 0) return factor.levels;
  const unknown = levels.find((level) => !factor.levels.includes(level));
  if (unknown !== undefined) {
    throw new Refusal(`"${unknown}" is not a level of ${factor.name}. Its levels are: ${factor.levels.join(', ')}.`);
  }
  if (levels.length < 2 || new Set(levels).size < levels.length) {
    throw new Refusal(`What is checked is the comparison of two different levels of ${factor.name}. Choose two.`);
  }
  return levels;
}

function bySide(scores: Scores, target: CheckTarget): Side {
  const factor = needFactor(scores, target.by);
  if (factor.scope === 'within' || factor.name === target.factor) {
    throw new Refusal(
      `Participants can be kept apart only by a condition that differs between them, and not by the one that is compared: ${factor.name} is not such a condition.`,
    );
  }
  return { factor, levels: factor.levels };
}

/** Each column's name and the conditions of the scores it averages over. */
function columnsOf(scores: Scores, factor: Factor | null, levels: readonly string[]) {
  const all = scores.conditions.map((_, index) => index);
  if (factor === null) return [{ name: '', conditions: all }];
  const place = scores.design.factors.filter((each) => each.scope === 'within').indexOf(factor);
  return levels.map((level) => {
    const code = factor.levels.indexOf(level);
    return { name: level, conditions: all.filter((index) => scores.conditions[index]?.levels[place] === code) };
  });
}

function groupNames(sides: readonly Side[]): string[] {
  return sides.reduce<string[]>(
    (names, { levels }) => names.flatMap((name) => levels.map((level) => (name === '' ? level : `${name}, ${level}`))),
    [''],
  );
}

/** Place of a participant's group among `groupNames`; -1 where one of the levels is not looked at. */
function groupCode(scores: Scores, sides: readonly Side[], who: number): number {
  return sides.reduce((code, { factor, levels }) => {
    const group = scores.groups.find((each) => each.factor === factor.name);
    const level = levels.indexOf(factor.levels[group?.codes[who] ?? -1] ?? '');
    return code < 0 || level < 0 ? -1 : code * levels.length + level;
  }, 0);
}

/** Unweighted mean of a participant's scores over some conditions; NaN as soon as one is missing. */
function meanOver(scores: Scores, who: number, conditions: readonly number[]): number {
  let sum = 0;
  for (const condition of conditions) sum += scores.values[who * scores.conditions.length + condition] as number;
  return sum / conditions.length;
}

function refuseFew(layout: CheckLayout): void {
  const n = layout.participants.length;
  if (n - layout.groups.length >= 2) return;
  throw new Refusal(
    `Only ${n} participant${n === 1 ? ' is' : 's are'} left with every score needed${layout.groups.length > 1 ? `, in ${layout.groups.length} groups` : ''}: too few to see any spread. Look at the rules above, or at the missing combinations.`,
  );
}
