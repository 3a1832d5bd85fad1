/**
 * Joint inference over a grid of specifications: how often relabelled data, with every rule re-applied, look as far from
 * "nothing is going on" as the data do.
 */
import { middleOf } from '../numerics/relabel-groups.ts';
import { normalQuantileUpper } from '../numerics/tails/normal.ts';
import type { JointPlan } from './joint-plan.ts';
import { JointRunner } from './joint-runner.ts';
import { RELABEL_BLOCK, Relabeller } from './relabel.ts';

/** The joint statistics, in the order of the results. */
export const JOINT_STATISTICS = ['average Z', 'median estimate', 'share significant'] as const;
export type JointStatistic = (typeof JOINT_STATISTICS)[number];

/** How often some relabellings lay as far out as the data; sums of these are the whole's. */
export interface JointCounts {
  readonly relabellings: number;
  /** One count a joint statistic. */
  readonly joint: Int32Array;
  /** For each specification: relabellings in which it lies as far out, and in which any specification does. */
  readonly own: Int32Array;
  readonly any: Int32Array;
}

export interface Joint {
  /** Relabellings run; all there are where `enumerated`. */
  readonly relabellings: number;
  readonly enumerated: boolean;
  /** Different relabellings there are; null beyond 2^53. */
  readonly ways: number | null;
  readonly scope: 'within' | 'between';
  /** Factor whose labels were exchanged. */
  readonly factor: string;
  readonly alternative: JointPlan['alternative'];
  readonly statistics: readonly {
    readonly name: JointStatistic;
    /** Estimates in the outcome's unit (less the margin); a share 0 to 1; null where there is nothing to take it of. */
    readonly observed: number | null;
    readonly p: number | null;
  }[];
  /** One a specification, in the order asked for; null where it gives no test. */
  readonly rows: readonly {
    readonly z: number;
    /** p of this specification alone, its rule re-applied in each relabelling. */
    readonly p: number | null;
    /** The same allowing for every other specification: familywise, from the largest |Z| of each relabelling. */
    readonly adjusted: number | null;
  }[];
}

/** Least and most shards a joint inference is cut into, by its own number of relabellings only. */
const LEAST_SHARD = 256;
const MOST_SHARDS = 16;

/** Statistics computed in two orders of additions may differ by this share, and count as equal. */
const GRAIN = 1e-10;

/**
 * How the relabellings are cut into shards; depends on their number only, so that results are the same with any number
 * of workers.
 *
 * @returns numbers of the first relabelling of each shard and of the one after its last
 */
export function jointShards({ relabel }: Pick<JointPlan, 'relabel'>): { readonly from: number; readonly to: number }[] {
  const { total } = relabel;
  const size = Math.max(LEAST_SHARD, RELABEL_BLOCK * Math.ceil(total / (MOST_SHARDS * RELABEL_BLOCK)));
  return Array.from({ length: Math.ceil(total / size) }, (_, i) => {
    return { from: i * size, to: Math.min(total, (i + 1) * size) };
  });
}

/** The joint statistics of one labelling, each so turned that larger is further out where it is one-sided. */
class Statistics {
  readonly values = new Float64Array(JOINT_STATISTICS.length);
  /** Largest Z in the direction that counts. */
  extreme = 0;
  readonly #plan: JointPlan;
  readonly #estimates: Float64Array;
  readonly #critical: number;

  constructor(plan: JointPlan) {
    this.#plan = plan;
    this.#estimates = new Float64Array(plan.specifications);
    const tail = plan.alternative === 'two-sided' ? plan.alpha / 2 : plan.alpha;
    this.#critical = normalQuantileUpper(tail) * (1 - GRAIN);
  }

  take(estimates: Float64Array, z: Float64Array): void {
    const { sameUnit, alternative, specifications } = this.#plan;
    const turn = alternative === 'less' ? -1 : 1;
    let sum = 0;
    let above = 0;
    let below = 0;
    let most = 0;
    let least = 0;
    let count = 0;
    for (let s = 0; s < specifications; s++) {
      const own = turn * (z[s] as number);
      sum += own;
      if (own >= this.#critical) above++;
      else if (own <= -this.#critical) below++;
      if (own > most) most = own;
      else if (own < least) least = own;
      const estimate = estimates[s] as number;
      if (sameUnit[s] === 1 && !Number.isNaN(estimate)) this.#estimates[count++] = turn * estimate;
    }
    const twoSided = alternative === 'two-sided';
    this.values[0] = sum / specifications;
    this.values[1] = count === 0 ? Number.NaN : middleOf(this.#estimates.subarray(0, count));
    this.values[2] = (twoSided ? Math.max(above, below) : above) / specifications;
    this.extreme = twoSided ? Math.max(most, -least) : most;
  }
}

/** Whether a relabelled value lies at least as far out as the observed. */
function reaches(value: number, observed: number, twoSided: boolean): boolean {
  if (twoSided) return Math.abs(value) >= Math.abs(observed) * (1 - GRAIN);
  return value >= observed - GRAIN * Math.abs(observed);
}

/** How a long computation lets messages through, and tells how far it is. */
interface Pace {
  /** Rejects when the work is to stop. */
  pause(): Promise<void>;
  progress(share: number): void;
}

/** Relabellings between two pauses where kept scores are dealt out anew. */
const STRIDE = 8;

/**
 * Runs the relabellings of one shard.
 *
 * @param shard plan from planJoint, and the numbers of the first relabelling and of the one after the last
 * @returns counts of those relabellings; the data themselves are not among them unless all relabellings are run
 * @throws whatever `pace.pause` rejects with
 * @source statistics of Simonsohn, Simmons & Nelson 2020; single-step largest |Z|: Westfall & Young 1993
 */
export async function countJoint(
  { plan, from, to }: { readonly plan: JointPlan; readonly from: number; readonly to: number },
  pace: Pace,
): Promise<JointCounts> {
  const runner = new JointRunner(plan);
  const relabeller = new Relabeller(plan.relabel);
  const observed = observe(plan, runner);
  const statistics = new Statistics(plan);
  const room = () => new Int32Array(plan.specifications);
  const counts = {
    relabellings: to - from,
    joint: new Int32Array(JOINT_STATISTICS.length),
    own: room(),
    any: room(),
  };
  const stride = plan.chains.length > 0 ? 1 : STRIDE;
  for (let index = from; index < to; index++) {
    if ((index - from) % stride === 0) {
      await pace.pause();
      pace.progress((index - from) / (to - from));
    }
    runner.run(relabeller.labels(index));
    statistics.take(runner.estimates, runner.z);
    count(counts, plan, runner, statistics, observed);
  }
  return counts;
}

function count(
  { joint, own, any }: JointCounts,
  plan: JointPlan,
  runner: JointRunner,
  { values, extreme }: Statistics,
  observed: Observed,
): void {
  const twoSided = plan.alternative === 'two-sided';
  const turn = plan.alternative === 'less' ? -1 : 1;
  for (let i = 0; i < joint.length; i++) {
    // The share is a count, turned towards one side already.
    if (reaches(values[i] as number, observed.values[i] as number, twoSided && i < 2)) joint[i]!++;
  }
  for (let s = 0; s < own.length; s++) {
    const value = runner.z[s] as number;
    const least = observed.reach[s] as number;
    if ((twoSided ? Math.abs(value) : turn * value) >= least) own[s]!++;
    if (extreme >= least) any[s]!++;
  }
}

interface Observed {
  readonly values: Float64Array;
  readonly z: Float64Array;
  /** How far out each specification lies, less a grain. */
  readonly reach: Float64Array;
}

/** The data as they are, computed the way the relabellings are. */
function observe(plan: JointPlan, runner: JointRunner): Observed {
  const statistics = new Statistics(plan);
  runner.run(plan.relabel.observed);
  statistics.take(runner.estimates, runner.z);
  const turn = plan.alternative === 'less' ? -1 : 1;
  const reach = runner.z.map((value) => {
    const out = plan.alternative === 'two-sided' ? Math.abs(value) : turn * value;
    return out - GRAIN * Math.abs(out);
  });
  return { values: statistics.values, z: runner.z.slice(), reach };
}

/**
 * Puts the shards together.
 *
 * @param plan from planJoint
 * @param parts counts of every shard, in any order: they are whole numbers
 * @returns p = (1 + #) / (B + 1) of drawn relabellings, # / B where all are run
 * @source Phipson & Smyth 2010 (the data count as one relabelling); methods 2.2
 */
export function finishJoint(plan: JointPlan, parts: readonly JointCounts[]): Joint {
  const { relabel, specifications, alternative } = plan;
  const relabellings = parts.reduce((sum, part) => sum + part.relabellings, 0);
  if (relabellings !== relabel.total)
    throw new RangeError(`*parts* must hold ${relabel.total} relabellings; got ${relabellings}`);
  const total = (of: (part: JointCounts) => number) => parts.reduce((sum, part) => sum + of(part), 0);
  const p = (count: number) => (relabel.enumerated ? count / relabellings : (1 + count) / (1 + relabellings));
  const observed = observe(plan, new JointRunner(plan));
  const turn = alternative === 'less' ? -1 : 1;
  const statistics = JOINT_STATISTICS.map((name, i) => {
    const value = observed.values[i] as number;
    if (Number.isNaN(value)) return { name, observed: null, p: null };
    return { name, observed: i < 2 ? turn * value + 0 : value, p: p(total((part) => part.joint[i] as number)) };
  });
  const rows = Array.from({ length: specifications }, (_, s) => {
    const z = observed.z[s] as number;
    if (plan.tested[s] === 0) return { z, p: null, adjusted: null };
    return { z, p: p(total((part) => part.own[s] as number)), adjusted: p(total((part) => part.any[s] as number)) };
  });
  const ways = relabel.ways < 2 ** 53 ? relabel.ways : null;
  const { enumerated, scope, factor } = relabel;
  return { relabellings, enumerated, ways, scope, factor, alternative, statistics, rows };
}
