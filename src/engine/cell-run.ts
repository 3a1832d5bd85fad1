import { type Computed, type Context, type Env, type Kind, Refusal, type Settings } from '../../cells/kind.ts';
import type { Runner } from '../workers/runner.ts';
import type { DataBlock, Worksheet } from '../worksheet/format.ts';
import type { CellState, Outcome, WaitingFor, Why } from './cell-state.ts';
import type { CellPlan } from './plan.ts';
import { ProgressOfRuns } from './progress-of-runs.ts';
import { sameValue } from './same-value.ts';
import { defectSentence } from './sentences.ts';
import { resolveShared } from './shared-references.ts';

/** Milliseconds: a computation younger than this is let finish before a newer edit is taken up. */
export const SHORT = 60;

/** What a cell's run needs from the engine. */
export interface Host {
  readonly runner: Runner;
  worksheet(): Worksheet;
  /** The state of the cell changed. */
  tell(cellId: string): void;
  /** A computation began and did not finish at once. */
  started(cellId: string): void;
  /** A computation was stopped before it finished. */
  stopped(): void;
}

/** Everything a computation depends on, beside its kind: when all of it is the same, so is the result. */
interface Key {
  readonly settings: Settings;
  readonly inputs: readonly unknown[];
  readonly seed: number;
  /** Blind, and of a kind whose output differs then. */
  readonly blind: boolean;
  /** Data blocks it asked for, filled while it runs. */
  readonly asked: Map<string, DataBlock | undefined>;
}

type Result = { readonly computed: Computed<unknown> } | { readonly refusal: string };

interface Running {
  readonly key: Key;
  readonly began: number;
  readonly controller: AbortController;
}

/** One cell: its state, what it last came to, and how it is computed when the runtime says so. */
export class CellRun {
  plan: CellPlan;
  state: CellState = { status: 'computing', progress: 0, count: 0 };
  count = 0;
  /** What flows on at present; null before anything has. */
  outcome: Outcome | null = null;
  /** Its last computation took longer than SHORT, or was stopped after that. */
  long = false;
  #running: Running | null = null;
  #last: Computed<unknown> | null = null;
  #known: { readonly key: Key; readonly result: Result } | null = null;
  readonly #host: Host;

  constructor(plan: CellPlan, host: Host) {
    this.plan = plan;
    this.#host = host;
  }

  get last(): Computed<unknown> | null {
    return this.#last;
  }

  /** Milliseconds the present computation has run, or null. */
  get age(): number | null {
    return this.#running === null ? null : performance.now() - this.#running.began;
  }

  /** Forgets every value, as when the conditions are hidden again. */
  forget(): void {
    this.#known = null;
    this.#last = null;
    this.outcome = null;
    this.long = false;
  }

  /** Whether a change of these data blocks may change what it comes to. */
  readsData(ids: ReadonlySet<string>): boolean {
    if (this.state.status === 'failed' || this.#known === null) return true;
    const asked = [...this.#known.key.asked.keys(), ...(this.#running?.key.asked.keys() ?? [])];
    return asked.some((id) => ids.has(id));
  }

  /** Stops the present computation; what it would have come to never lands. */
  stop(): void {
    if (this.#running === null) return;
    if ((this.age ?? 0) >= SHORT) this.long = true;
    const { controller } = this.#running;
    this.#running = null;
    this.#host.stopped();
    controller.abort(new DOMException('a newer edit made this computation needless', 'AbortError'));
  }

  /** Shows that it is about to be computed again: a cell above has begun. */
  expect(): void {
    if (this.#running !== null || this.plan.cell.leftOut === true || this.plan.kind === null) return;
    if (this.state.status !== 'veiled')
      this.#become({ status: 'computing', progress: 0, ...this.#lastOf(), count: this.count });
  }

  /** The runtime could not compute it for a reason of its own. */
  breakDown(error: unknown): void {
    this.#failBy(error);
  }

  /** The runtime's definition of the cell: gives what flows on. `inputs` follow plan.ports, `numbers` plan.shared. */
  compute(inputs: readonly Outcome[], numbers: ReadonlyMap<string, number | null>): Outcome | Promise<Outcome> {
    const { cell, kind, problem, passes } = this.plan;
    if (cell.leftOut === true) {
      this.#become({ status: 'left-out' });
      return this.#flow(passes && inputs[0] !== undefined ? inputs[0] : this.#waitFor('left-out'));
    }
    if (kind === null) return this.#halt({ status: 'unknown-kind', kind: cell.kind }, 'missing');
    if (this.#blind && kind.blind === 'veil') {
      this.forget();
      return this.#halt({ status: 'veiled' }, 'veiled');
    }
    if (problem !== null) return this.#fail(problem.sentence, problem.why);
    const waiting = inputs.flatMap((input) => ('waiting' in input ? input.waiting : []));
    if (waiting.length > 0) return this.#wait(waiting);
    try {
      return this.#computeWith(
        kind,
        inputs.map((input) => ('value' in input ? input.value : undefined)),
        numbers,
      );
    } catch (error) {
      return this.#failBy(error);
    }
  }

  #computeWith(kind: Kind, inputs: readonly unknown[], numbers: ReadonlyMap<string, number | null>) {
    const { cell, ports } = this.plan;
    const given = Object.fromEntries(ports.map(({ port }, i) => [port, inputs[i]]));
    const wrong = kind.check(cell.settings, contextOf(this.#host.worksheet(), given));
    if (wrong.length > 0) return this.#fail(wrong.join(' '), 'unset');
    const settings = resolveShared(cell.settings, numbers);
    const seed = this.#host.worksheet().seed;
    const key: Key = { settings, inputs, seed, blind: this.#blind && kind.blind !== 'same', asked: new Map() };
    if (this.#known !== null && this.#isKnown(this.#known.key, key)) return this.#land(this.#known.result);
    return this.#begin(kind, key, given);
  }

  #isKnown(known: Key, key: Key): boolean {
    if (known.seed !== key.seed || known.blind !== key.blind || known.inputs.length !== key.inputs.length) return false;
    if (known.inputs.some((input, i) => input !== key.inputs[i])) return false;
    for (const [id, block] of known.asked) if (!sameValue(this.#data(id), block)) return false;
    return sameValue(known.settings, key.settings);
  }

  #begin(kind: Kind, key: Key, given: { readonly [port: string]: unknown }): Outcome | Promise<Outcome> {
    const running: Running = { key, began: performance.now(), controller: new AbortController() };
    this.#running = running;
    const computed = kind.compute(key.settings, given, this.#envOf(running));
    if (!(computed instanceof Promise)) return this.#finish(kind, running, computed);
    this.#become({ status: 'computing', progress: 0, ...this.#lastOf(), count: this.count });
    this.#host.started(this.plan.cell.id);
    return this.#finishLater(kind, running, computed);
  }

  async #finishLater(kind: Kind, running: Running, computed: Promise<Computed<unknown>>): Promise<Outcome> {
    const { signal } = running.controller;
    try {
      return this.#finish(kind, running, await Promise.race([computed, rejectionOf(signal)]));
    } catch (error) {
      if (signal.aborted) throw error;
      return this.#failBy(error);
    }
  }

  #envOf(running: Running): Env {
    const { signal } = running.controller;
    const progress = new ProgressOfRuns((share) => {
      if (this.#running !== running || this.state.status !== 'computing') return;
      this.#become({ status: 'computing', progress: share, ...this.#lastOf(), count: this.count });
    });
    return {
      run: (name, args) => progress.follow((told) => this.#host.runner.run(name, args, { signal, progress: told })),
      signal,
      progress: (share) => progress.tell(share),
      data: (id) => {
        const block = this.#data(id);
        running.key.asked.set(id, block);
        return block;
      },
      seed: running.key.seed,
      ...(running.key.blind ? { blind: true } : {}),
    };
  }

  #finish(kind: Kind, running: Running, computed: Computed<unknown>): Outcome {
    running.controller.signal.throwIfAborted();
    let shown = computed;
    if (running.key.blind && typeof kind.blind === 'function') {
      shown = (kind.blind as unknown as (open: Computed<unknown>) => Computed<unknown>)(computed);
    }
    const same = kind.same ?? sameValue;
    if (this.#last !== null && same.call(kind, this.#last.value, shown.value)) {
      shown = { ...shown, value: this.#last.value };
    }
    this.long = performance.now() - running.began > SHORT;
    this.#running = null;
    this.#known = { key: running.key, result: { computed: shown } };
    this.count++;
    return this.#land({ computed: shown });
  }

  #failBy(error: unknown): Outcome {
    const running = this.#running;
    this.#running = null;
    if (!(error instanceof Refusal)) return this.#fail(defectSentence(error), 'failed');
    if (running !== null) this.#known = { key: running.key, result: { refusal: error.message } };
    return this.#fail(error.message, 'failed');
  }

  #land(result: Result): Outcome {
    if ('refusal' in result) return this.#fail(result.refusal, 'failed');
    this.#last = result.computed;
    this.#become({ status: 'fresh', computed: result.computed, count: this.count });
    return this.#flow({ value: result.computed.value });
  }

  #fail(sentence: string, why: Why): Outcome {
    return this.#halt({ status: 'failed', sentence, ...this.#lastOf() }, why);
  }

  #wait(waiting: readonly WaitingFor[]): Outcome {
    const each = new Map(waiting.map((one) => [`${one.cellId} ${one.why}`, one]));
    const all = [...each.values()];
    this.#become({ status: 'waiting', for: all, ...this.#lastOf() });
    return this.#flow({ waiting: all });
  }

  #halt(state: CellState, why: Why): Outcome {
    this.#become(state);
    return this.#flow(this.#waitFor(why));
  }

  #waitFor(why: Why): Outcome {
    return { waiting: [{ cellId: this.plan.cell.id, why }] };
  }

  #flow(outcome: Outcome): Outcome {
    this.outcome = outcome;
    return outcome;
  }

  #become(state: CellState): void {
    if (sameState(this.state, state)) return;
    this.state = state;
    this.#host.tell(this.plan.cell.id);
  }

  #lastOf(): { readonly last?: Computed<unknown> } {
    return this.#last === null ? {} : { last: this.#last };
  }

  get #blind(): boolean {
    return this.#host.worksheet().opening.state === 'blind';
  }

  #data(id: string): DataBlock | undefined {
    return this.#host.worksheet().data.find((block) => block.id === id);
  }
}

/** What a sentence and a check may look at. */
export function contextOf(worksheet: Worksheet, given: { readonly [port: string]: unknown }): Context {
  return {
    shared: worksheet.shared,
    given: given as Context['given'],
    data: worksheet.data.map(({ id, name }) => ({ id, name })),
    ...(worksheet.opening.state === 'blind' ? { blind: true } : {}),
  };
}

/** Fields are compared by identity: states are made anew with every change, the values in them are not. */
function sameState(a: CellState, b: CellState): boolean {
  const left = Object.entries(a);
  if (left.length !== Object.keys(b).length) return false;
  return left.every(([key, value]) => {
    const other = (b as unknown as Record<string, unknown>)[key];
    return key === 'for' ? sameValue(value, other) : value === other;
  });
}

function rejectionOf(signal: AbortSignal): Promise<never> {
  return new Promise((_, reject) => signal.addEventListener('abort', () => reject(signal.reason), { once: true }));
}
