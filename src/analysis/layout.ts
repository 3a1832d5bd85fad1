import { Refusal } from '../data/refusal.ts';
import { type AskedOmnibus, askedFactors, refusalOf } from './asked.ts';
import type { Scores } from './score.ts';

/** One factor as a layout has it, and whether the question is about it. */
export interface LayoutFactor {
  readonly factor: string;
  readonly levels: readonly string[];
  readonly inEffect: boolean;
}

/** Participants of one combination of the between factors' levels. */
export interface LayoutGroup {
  /** One code a between factor, in the layout's order; empty where there is none. */
  readonly levels: readonly number[];
  /** One vector a column, one score a participant. */
  readonly scores: readonly Float64Array[];
}

/** The scores of a question about several levels: groups of participants, and columns of scores within participants. */
export interface Layout {
  /** Every between factor of the design; groups are their combinations, the last one varying fastest. */
  readonly between: readonly LayoutFactor[];
  /** The within factors the question is about; columns are their combinations, the last one varying fastest. */
  readonly within: readonly LayoutFactor[];
  readonly groups: readonly LayoutGroup[];
  /** Participants with a score who could not enter, and why. */
  readonly left: readonly { readonly participant: string; readonly why: string }[];
}

/**
 * Takes the scores a question about several levels needs.
 *
 * Within factors that are not asked about are averaged over, unweighted; every between factor forms groups. A
 * participant who lacks one of the scores needed does not enter (complete cases), and is listed.
 *
 * @throws Refusal where the design does not allow the question
 * @source complete cases and their listing: methods 3.8
 */
export function takeLayout(scores: Scores, asked: AskedOmnibus): Layout {
  const refused = refusalOf(scores.design.factors, asked);
  if (refused !== null) throw new Refusal(refused);
  const wanted = askedFactors(scores.design.factors, asked);
  const within = wanted
    .filter((factor) => factor.scope === 'within')
    .map((factor) => part(factor.name, factor.levels, true));
  const between = scores.groups.map((group) =>
    part(
      group.factor,
      group.levels,
      wanted.some((factor) => factor.name === group.factor),
    ),
  );
  const columns = columnConditions(scores, within);
  const cells = combinations(between.map((each) => each.levels.length));
  const gathered = cells.map(() => columns.map((): number[] => []));
  const left: { participant: string; why: string }[] = [];
  scores.participants.forEach((participant, who) => {
    const own = columns.map((conditions) => meanOver(scores, who, conditions));
    if (own.some(Number.isNaN)) {
      left.push({ participant, why: 'no kept score under one of the conditions' });
      return;
    }
    const cell = scores.groups.reduce((code, group) => code * group.levels.length + (group.codes[who] as number), 0);
    own.forEach((value, column) => {
      gathered[cell]?.[column]?.push(value);
    });
  });
  const groups = cells.map((levels, cell) => ({
    levels,
    scores: (gathered[cell] ?? []).map((values) => Float64Array.from(values)),
  }));
  return { between, within, groups, left };
}

function part(factor: string, levels: readonly string[], inEffect: boolean): LayoutFactor {
  return { factor, levels, inEffect };
}

/** For each combination of the levels asked about, the conditions of the scores that it averages over. */
function columnConditions(scores: Scores, within: readonly LayoutFactor[]): number[][] {
  const names = scores.design.factors.filter((factor) => factor.scope === 'within').map((factor) => factor.name);
  const places = within.map((each) => names.indexOf(each.factor));
  return combinations(within.map((each) => each.levels.length)).map((codes) =>
    scores.conditions.flatMap((condition, index) =>
      places.every((place, i) => condition.levels[place] === codes[i]) ? [index] : [],
    ),
  );
}

function meanOver(scores: Scores, who: number, conditions: readonly number[]): number {
  let sum = 0;
  for (const condition of conditions) sum += scores.values[who * scores.conditions.length + condition] as number;
  return sum / conditions.length;
}

/** Every combination of codes, the last varying fastest; one empty combination of none. */
export function combinations(levels: readonly number[]): number[][] {
  return levels.reduce<number[][]>(
    (all, k) => all.flatMap((codes) => Array.from({ length: k }, (_, code) => [...codes, code])),
    [[]],
  );
}

/** Scores of each level of the one between factor asked about, over the other between factors; one column. */
export function groupsOfLevels(layout: Layout): Float64Array[] {
  const place = layout.between.findIndex((each) => each.inEffect);
  return (layout.between[place]?.levels ?? []).map((_, code) =>
    joined(
      layout.groups.filter((group) => group.levels[place] === code).map((group) => group.scores[0] as Float64Array),
    ),
  );
}

/** Scores of each column, all groups together; participants keep one order over the columns. */
export function columnsOfAll(layout: Layout): Float64Array[] {
  const columns = layout.groups[0]?.scores.length ?? 0;
  return Array.from({ length: columns }, (_, column) =>
    joined(layout.groups.map((group) => group.scores[column] as Float64Array)),
  );
}

function joined(parts: readonly Float64Array[]): Float64Array {
  const out = new Float64Array(parts.reduce((n, each) => n + each.length, 0));
  let at = 0;
  for (const each of parts) {
    out.set(each, at);
    at += each.length;
  }
  return out;
}

/** One level, or one combination of levels, of what is asked about. */
export interface LayoutCell {
  readonly label: string;
  readonly scores: Float64Array;
}

/** Every level (or combination of levels) that the question is about, with its scores, other groups together. */
export function cellsOf(layout: Layout): LayoutCell[] {
  const groupPlaces = layout.between.flatMap((each, place) => (each.inEffect ? [place] : []));
  const groupCodes = combinations(groupPlaces.map((place) => layout.between[place]?.levels.length ?? 0));
  const columnCodes = combinations(layout.within.map((each) => each.levels.length));
  return columnCodes.flatMap((columns, column) =>
    groupCodes.map((codes) => ({
      label: [
        ...columns.map((code, i) => layout.within[i]?.levels[code] ?? ''),
        ...codes.map((code, i) => layout.between[groupPlaces[i] as number]?.levels[code] ?? ''),
      ].join(', '),
      scores: joined(
        layout.groups
          .filter((group) => groupPlaces.every((place, i) => group.levels[place] === codes[i]))
          .map((group) => group.scores[column] as Float64Array),
      ),
    })),
  );
}

/** Participants in all. */
export function peopleIn(layout: Layout): number {
  return layout.groups.reduce((n, group) => n + (group.scores[0]?.length ?? 0), 0);
}
