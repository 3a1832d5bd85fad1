/** A design with its labels exchanged as the randomisation could have, and one with participants drawn again. */
import { type Column, type Table, takeRows } from '../data/table.ts';
import type { Rng } from '../numerics/rng.ts';
import type { Design, Factor } from './design.ts';
import { columnsRead, type Rule } from './rules.ts';

/** The labels a comparison is about. */
export interface Labels {
  readonly factor: string;
  readonly levels: readonly string[];
}

/**
 * Exchanges the labels under test: within a factor the levels inside every participant, between participants the levels
 * over participants (inside each combination of the other between factors), as often as before.
 *
 * @param design a design before its rules; not modified
 * @param labels factor and the levels that may change places
 * @param random stream of this relabelling
 * @returns the design with other codes of that factor
 * @source relabelling as the design randomised: methods 2.2
 */
export function relabelDesign(design: Design, labels: Labels, random: Rng): Design {
  const factor = design.factors.find((each) => each.name === labels.factor);
  if (!factor) throw new RangeError(`*labels* must name a factor of the design; got "${labels.factor}"`);
  const involved = labels.levels.map((level) => factor.levels.indexOf(level));
  const codes =
    factor.scope === 'within'
      ? exchangedWithin(design, factor, involved, random)
      : exchangedBetween(design, factor, involved, random);
  return { ...design, factors: design.factors.map((each) => (each === factor ? { ...each, codes } : each)) };
}

function exchangedWithin(design: Design, factor: Factor, involved: readonly number[], random: Rng): Int32Array {
  const to = design.participants.map(() => {
    const order = shuffled([...involved], random);
    return new Map(involved.map((code, i) => [code, order[i] as number]));
  });
  return factor.codes.map((code, row) => to[design.participant[row] as number]?.get(code) ?? code);
}

function exchangedBetween(design: Design, factor: Factor, involved: readonly number[], random: Rng): Int32Array {
  const others = design.factors.filter((each) => each.scope === 'between' && each !== factor);
  const levelOf = participantLevels(design, factor);
  const strata = new Map<string, number[]>();
  design.participants.forEach((_, who) => {
    if (!involved.includes(levelOf[who] as number)) return;
    const key = others.map((other) => participantLevels(design, other)[who]).join(',');
    strata.set(key, [...(strata.get(key) ?? []), who]);
  });
  const next = levelOf.slice();
  for (const people of strata.values()) {
    const levels = shuffled(
      people.map((who) => levelOf[who] as number),
      random,
    );
    people.forEach((who, i) => {
      next[who] = levels[i] as number;
    });
  }
  return factor.codes.map((code, row) => {
    const who = design.participant[row] as number;
    return code < 0 || who < 0 ? code : (next[who] as number);
  });
}

/** One level a participant; -1 where none of their rows has one. */
function participantLevels(design: Design, factor: Factor): Int32Array {
  const levels = new Int32Array(design.participants.length).fill(-1);
  factor.codes.forEach((code, row) => {
    const who = design.participant[row] as number;
    if (who >= 0 && code >= 0) levels[who] = code;
  });
  return levels;
}

function shuffled(values: number[], random: Rng): number[] {
  for (let i = values.length - 1; i > 0; i--) {
    const j = random.below(i + 1);
    [values[i], values[j]] = [values[j] as number, values[i] as number];
  }
  return values;
}

/** A design made of participants drawn again, and its rules with their participants renamed. */
export interface Resampled {
  readonly design: Design;
  readonly rules: readonly Rule[];
}

/**
 * Draws participants again with all their rows, as many from every combination of groups as there are.
 *
 * @param design a design before its rules; not modified
 * @param rules the rules to be applied to it; a rule by name follows every copy of its participants
 * @param random stream of this resample
 * @returns the resampled design, copies of a participant being participants of their own
 * @source Efron & Tibshirani 1993; participants are the unit: methods 3.2
 */
export function resampleDesign(design: Design, rules: readonly Rule[], random: Rng): Resampled {
  const rowsOf: number[][] = design.participants.map(() => []);
  design.participant.forEach((who, row) => {
    if (who >= 0 && design.kept[row] === 1) rowsOf[who]?.push(row);
  });
  const drawn = drawnParticipants(design, rowsOf, random);
  const rows = drawn.flatMap((who) => rowsOf[who] as number[]);
  const participants = drawn.map((who, copy) => `${design.participants[who]} ${copy}`);
  const participant = Int32Array.from(drawn.flatMap((who, copy) => (rowsOf[who] as number[]).map(() => copy)));
  const made: Design = {
    ...design,
    table: takeRows(narrowTable(design.table, rules), rows),
    participants,
    participant,
    factors: design.factors.map((factor) => ({
      ...factor,
      codes: Int32Array.from(rows, (row) => factor.codes[row] as number),
    })),
    outcome: Float64Array.from(rows, (row) => design.outcome[row] as number),
    kept: new Uint8Array(rows.length).fill(1),
    missingRows: 0,
    missingCells: [],
  };
  return { design: made, rules: rules.flatMap((rule) => renamed(rule, design, drawn, participants)) };
}

function drawnParticipants(design: Design, rowsOf: readonly (readonly number[])[], random: Rng): number[] {
  const between = design.factors
    .filter((factor) => factor.scope === 'between')
    .map((factor) => participantLevels(design, factor));
  const groups = new Map<string, number[]>();
  design.participants.forEach((_, who) => {
    if ((rowsOf[who] ?? []).length === 0) return;
    const key = between.map((levels) => levels[who]).join(',');
    groups.set(key, [...(groups.get(key) ?? []), who]);
  });
  return [...groups.values()].flatMap((people) => people.map(() => people[random.below(people.length)] as number));
}

/** The columns the rules read beside the outcome. */
function narrowTable(table: Table, rules: readonly Rule[]): Table {
  const wanted = new Set(rules.flatMap(columnsRead));
  const columns = table.columns.filter((column: Column) => wanted.has(column.name));
  return { ...table, columns };
}

function renamed(rule: Rule, design: Design, drawn: readonly number[], participants: readonly string[]): Rule[] {
  if (rule.rule !== 'named') return [rule];
  const copies = participants.filter((_, copy) =>
    rule.participants.includes(design.participants[drawn[copy] as number] as string),
  );
  return copies.length === 0 ? [] : [{ ...rule, participants: copies }];
}
