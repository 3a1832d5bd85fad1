/**
 * Relabellings as the design randomised: within a factor every participant met, the levels change places inside the
 * participant and whole blocks of trials go with them; between participants, group labels are dealt out anew.
 */
import { type Rng, rng } from '../numerics/rng.ts';
import { askedFactors } from './asked.ts';
import type { ComparisonSpec } from './compare.ts';
import type { Design, Factor } from './design.ts';

/** How labels may be exchanged, and how many relabellings are run. */
export interface RelabelPlan {
  readonly scope: 'within' | 'between';
  /** Name of the factor whose labels change. */
  readonly factor: string;
  /** Codes of its levels that change places. */
  readonly levels: Int32Array;
  /** Participants whose labels change, as codes of the design, in order of their first rows. */
  readonly units: Int32Array;
  /** Labels a unit has: 1 between participants; within, as many as levels change places. */
  readonly blocks: number;
  /** Labels as they are: units x blocks, each a position in `levels`. Within, a unit's blocks follow its first rows. */
  readonly observed: Uint8Array;
  /** Places among the labels that are shuffled together. */
  readonly pools: readonly Int32Array[];
  /** Each pool's labels in ascending order, place after place: the same whatever the labels are. */
  readonly canonical: Uint8Array;
  /** Different relabellings there are; Infinity beyond the largest double. */
  readonly ways: number;
  /** Whether all of them are run, once each. */
  readonly enumerated: boolean;
  /** Relabellings that are run. */
  readonly total: number;
  readonly seed: number;
}

/** Relabellings that are all run: 2^16 within participants, this many between. */
const MOST_WITHIN = 65_536;
const MOST_BETWEEN = 20_000;
/** Relabellings drawn from one stream of random numbers. */
export const RELABEL_BLOCK = 64;
/** The stream of relabellings among those of the worksheet's seed. */
const STREAM = 13;
/** A within place without a block. */
const NONE = 255;

/**
 * How the labels of a comparison may be exchanged under the hypothesis that nothing is going on.
 *
 * Within a factor: each participant's blocks of trials under the levels compared. Between: labels of all participants of
 * the groups compared, within the groups of every other factor between participants. Everything but `observed` is the
 * same for any labels the design could have had.
 *
 * @param design before any rule: who was assigned, not who was kept
 * @param comparison factor and levels compared
 * @param relabellings how many are drawn where there are too many to run all, 1 or more; and the seed, 0 to 2^32 - 1
 * @returns the plan, or a sentence that says why there is nothing to relabel
 * @source randomisation inference: Fisher 1935, Pitman 1937; permuting as randomised: methods 2.2
 */
export function relabelPlan(
  design: Design,
  comparison: Pick<ComparisonSpec, 'factor' | 'effect' | 'first' | 'second'>,
  { relabellings, seed }: { readonly relabellings: number; readonly seed: number },
): RelabelPlan | string {
  if (!Number.isInteger(relabellings) || relabellings < 1)
    throw new RangeError(`*relabellings* must be a whole number of 1 or more; got ${relabellings}`);
  const factor = factorOf(design, comparison);
  if (typeof factor === 'string') return factor;
  const { effect, first, second } = comparison;
  const names = effect?.type === 'contrast' ? [...effect.first, ...effect.second] : [first, second];
  const levels = Int32Array.from(names, (name) => factor.levels.indexOf(name)).sort();
  const parts = factor.scope === 'within' ? withinParts(design, factor, levels) : betweenParts(design, factor, levels);
  const canonical = parts.observed.slice();
  let ways = 1;
  for (const pool of parts.pools) {
    const own = Uint8Array.from(pool, (place) => parts.observed[place] as number).sort();
    own.forEach((label, i) => {
      canonical[pool[i] as number] = label;
    });
    ways *= arrangements(countsOf(own));
  }
  if (ways < 2) return 'No participant could have had other labels, so there is nothing to relabel.';
  const enumerated = ways <= (factor.scope === 'within' ? MOST_WITHIN : MOST_BETWEEN);
  const total = enumerated ? Math.round(ways) : relabellings;
  return { scope: factor.scope, factor: factor.name, levels, ...parts, canonical, ways, enumerated, total, seed };
}

function factorOf(design: Design, { factor, effect }: Pick<ComparisonSpec, 'factor' | 'effect'>): Factor | string {
  if (effect?.type === 'value') return 'Scores held against a value were not assigned, so there is nothing to relabel.';
  if (effect !== undefined && effect.type !== 'contrast')
    return 'A question about several levels at once has no grid of rows to relabel.';
  const [found] =
    effect === undefined ? design.factors.filter((each) => each.name === factor) : askedFactors(design.factors, effect);
  return found ?? `There is no condition called "${factor}" in the design above.`;
}

type Parts = Pick<RelabelPlan, 'units' | 'blocks' | 'observed' | 'pools'>;

/** Blocks of each participant in the order of their first rows; who has fewer than two is left as they are. */
function withinParts(design: Design, factor: Factor, levels: Int32Array): Parts {
  const blocks = levels.length;
  const found = design.participants.map((): number[] => []);
  const { participant, kept } = design;
  for (let row = 0; row < kept.length; row++) {
    const label = levels.indexOf(factor.codes[row] as number);
    const own = found[participant[row] as number];
    if (kept[row] === 1 && label >= 0 && own && !own.includes(label)) own.push(label);
  }
  const units = Int32Array.from(found.keys()).filter((who) => (found[who]?.length ?? 0) > 1);
  const observed = new Uint8Array(units.length * blocks).fill(NONE);
  const pools = Array.from(units, (who, unit) => {
    observed.set(found[who] ?? [], unit * blocks);
    return Int32Array.from(found[who] ?? [], (_, block) => unit * blocks + block);
  });
  return { units, blocks, observed, pools };
}

/** Participants of the groups compared, in one pool for each combination of the other groups. */
function betweenParts(design: Design, factor: Factor, levels: Int32Array): Parts {
  const label = new Int32Array(design.participants.length).fill(-1);
  const stratum = new Int32Array(design.participants.length);
  const others = design.factors.filter((each) => each.scope === 'between' && each.name !== factor.name);
  for (let row = 0; row < design.kept.length; row++) {
    const who = design.participant[row] as number;
    if (design.kept[row] !== 1) continue;
    label[who] = levels.indexOf(factor.codes[row] as number);
    stratum[who] = others.reduce((sum, each) => sum * each.levels.length + (each.codes[row] as number), 0);
  }
  const units = Int32Array.from(label.keys()).filter((who) => (label[who] as number) >= 0);
  const pools = new Map<number, number[]>();
  units.forEach((who, unit) => {
    const own = pools.get(stratum[who] as number) ?? [];
    pools.set(stratum[who] as number, own);
    own.push(unit);
  });
  return {
    units,
    blocks: 1,
    observed: Uint8Array.from(units, (who) => label[who] as number),
    pools: [...pools.values()].map((places) => Int32Array.from(places)),
  };
}

function countsOf(labels: Uint8Array): number[] {
  const counts: number[] = [];
  for (const label of labels) counts[label] = (counts[label] ?? 0) + 1;
  return Array.from(counts, (count) => count ?? 0);
}

/** Different orders of labels of which so many are equal. */
function arrangements(counts: readonly number[]): number {
  let ways = 1;
  let placed = 0;
  for (const count of counts) for (let i = 1; i <= count; i++) ways = (ways * ++placed) / i;
  return ways < 2 ** 53 ? Math.round(ways) : ways;
}

/** Gives the labels of relabelling 0, 1, 2, ...; each depends on the plan and its number only. */
export class Relabeller {
  readonly #plan: RelabelPlan;
  readonly #labels: Uint8Array;
  #random: Rng | null = null;
  #next = -1;

  constructor(plan: RelabelPlan) {
    this.#plan = plan;
    this.#labels = plan.canonical.slice();
  }

  /** @returns labels of that relabelling, units x blocks; overwritten by the next call */
  labels(index: number): Uint8Array {
    if (!(Number.isInteger(index) && index >= 0 && index < this.#plan.total))
      throw new RangeError(`*index* must be a whole number from 0 to ${this.#plan.total - 1}; got ${index}`);
    if (this.#plan.enumerated) this.#unrank(index);
    else this.#draw(index);
    return this.#labels;
  }

  #draw(index: number): void {
    if (index !== this.#next || this.#random === null || index % RELABEL_BLOCK === 0) {
      const block = Math.floor(index / RELABEL_BLOCK);
      this.#random = rng(this.#plan.seed, STREAM).fork(block);
      for (let skipped = block * RELABEL_BLOCK; skipped < index; skipped++) this.#shuffle(this.#random);
    }
    this.#shuffle(this.#random);
    this.#next = index + 1;
  }

  /** Every pool from its canonical order, so that a relabelling does not depend on the one before. */
  #shuffle(random: Rng): void {
    const labels = this.#labels;
    labels.set(this.#plan.canonical);
    for (const pool of this.#plan.pools) {
      for (let i = pool.length - 1; i > 0; i--) {
        const from = pool[i] as number;
        const to = pool[random.below(i + 1)] as number;
        const held = labels[from] as number;
        labels[from] = labels[to] as number;
        labels[to] = held;
      }
    }
  }

  /** The index as digits, one for each pool, each digit the rank of an order of its labels. */
  #unrank(index: number): void {
    let left = index;
    for (const pool of this.#plan.pools) {
      const counts = countsOf(Uint8Array.from(pool, (place) => this.#plan.canonical[place] as number));
      const ways = arrangements(counts);
      let rank = left % ways;
      left = Math.floor(left / ways);
      for (const place of pool) {
        for (let label = 0; label < counts.length; label++) {
          if (counts[label] === 0) continue;
          counts[label]!--;
          const rest = arrangements(counts);
          if (rank < rest) {
            this.#labels[place] = label;
            break;
          }
          rank -= rest;
          counts[label]!++;
        }
      }
    }
  }
}

/**
 * The design with other labels: rows keep their participant and score, and take the level their block was given.
 *
 * @param design any design of the same rows as the plan's, not modified; rules and steps are kept as they are
 * @param plan from relabelPlan
 * @param labels units x blocks, as a Relabeller gives them
 */
export function relabelDesign(design: Design, plan: RelabelPlan, labels: Uint8Array): Design {
  const unitOf = new Int32Array(design.participants.length).fill(-1);
  plan.units.forEach((who, unit) => {
    unitOf[who] = unit;
  });
  const factors = design.factors.map((factor) => {
    if (factor.name !== plan.factor) return factor;
    const codes = factor.codes.slice();
    for (let row = 0; row < codes.length; row++) {
      const unit = unitOf[design.participant[row] as number] ?? -1;
      const was = plan.levels.indexOf(codes[row] as number);
      if (unit < 0 || was < 0) continue;
      const from = unit * plan.blocks;
      const place = plan.blocks === 1 ? from : plan.observed.indexOf(was, from);
      // A row that was never in may stand under a level its participant has no block of.
      if (place >= from && place < from + plan.blocks) codes[row] = plan.levels[labels[place] as number] as number;
    }
    return { ...factor, codes };
  });
  return { ...design, factors };
}
