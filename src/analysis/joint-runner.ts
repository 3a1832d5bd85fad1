import { applyRules } from './exclusion.ts';
import type { JointChain, JointPlan } from './joint-plan.ts';
import { isPair, plainRow, type SetRunner, setRunner } from './joint-rows.ts';
import { relabelDesign } from './relabel.ts';
import { samplesFor } from './samples.ts';
import { scoreDesign } from './score.ts';

/** Runs every specification of a plan under given labels. */
export class JointRunner {
  /** One a specification: first minus second, in the row's unit; NaN = none. */
  readonly estimates: Float64Array;
  /** One a specification: the signed normal deviate of the row's own two-sided p; 0 = no test. */
  readonly z: Float64Array;
  readonly #plan: JointPlan;
  readonly #sets: readonly { readonly runner: SetRunner; readonly places: Int32Array }[];
  /** Designs of the chains whose rows stay, with their rules applied. */
  readonly #kept: readonly (ReturnType<typeof applyRules> | null)[];
  readonly #pair: Uint8Array;
  readonly #ownEstimates: Float64Array;
  readonly #ownZ: Float64Array;

  constructor(plan: JointPlan) {
    this.#plan = plan;
    this.estimates = new Float64Array(plan.specifications);
    this.z = new Float64Array(plan.specifications);
    this.#ownEstimates = new Float64Array(plan.specifications);
    this.#ownZ = new Float64Array(plan.specifications);
    this.#pair = new Uint8Array(plan.relabel.units.length);
    this.#sets = plan.sets.map(({ a, b, rows, places }) => {
      return { runner: setRunner(a, b, rows, plan.shape), places: Int32Array.from(places) };
    });
    const { design } = plan;
    this.#kept = plan.chains.map(({ rules, reads }) => (design === null || reads ? null : applyRules(design, rules)));
  }

  /** @param labels units x blocks, as a Relabeller gives them or as observed */
  run(labels: Uint8Array): void {
    const { firstLabel, relabel } = this.#plan;
    if (this.#sets.length > 0) {
      for (let unit = 0; unit < this.#pair.length; unit++)
        this.#pair[unit] = labels[unit * relabel.blocks] === firstLabel ? 0 : 1;
    }
    for (const { runner, places } of this.#sets) {
      runner.run(this.#pair, this.#ownEstimates, this.#ownZ, 0);
      this.#put(places);
    }
    this.#plan.chains.forEach((chain, i) => {
      this.#runChain(chain, i, labels);
      this.#put(chain.places);
    });
  }

  #put(places: ArrayLike<number>): void {
    for (let i = 0; i < places.length; i++) {
      this.estimates[places[i] as number] = this.#ownEstimates[i] as number;
      this.z[places[i] as number] = this.#ownZ[i] as number;
    }
  }

  /** The whole chain on the relabelled rows: rules, score, samples, rows. */
  #runChain(chain: JointChain, index: number, labels: Uint8Array): void {
    const { design, relabel, comparison, shape } = this.#plan;
    if (design === null) throw new RangeError('*plan* must carry the design its chains run on; got null');
    const kept = this.#kept[index] ?? null;
    const relabelled =
      kept === null
        ? applyRules(relabelDesign(design, relabel, labels), chain.rules)
        : relabelDesign(kept, relabel, labels);
    const samples = samplesFor(scoreDesign(relabelled, chain.score), comparison);
    if (!isPair(comparison)) {
      chain.rows.forEach((row, i) => {
        const value = plainRow(row, samples, shape);
        this.#ownEstimates[i] = value.estimate;
        this.#ownZ[i] = value.z;
      });
      return;
    }
    const { x, y } = samples;
    const [a, b, own] =
      relabel.scope === 'within' ? [x, y, new Uint8Array(x.length)] : [joined(x, y), new Float64Array(0), halves(x, y)];
    setRunner(a, b, chain.rows, shape).run(own, this.#ownEstimates, this.#ownZ, 0);
  }
}

function joined(x: Float64Array, y: Float64Array): Float64Array {
  const all = new Float64Array(x.length + y.length);
  all.set(x);
  all.set(y, x.length);
  return all;
}

function halves(x: Float64Array, y: Float64Array): Uint8Array {
  return new Uint8Array(x.length + y.length).fill(1, x.length);
}
