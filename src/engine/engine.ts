import { type Module, Runtime, type Variable } from '@observablehq/runtime';
import type { Context, Registry, Settings } from '../../cells/kind.ts';
import type { Runner } from '../workers/runner.ts';
import type { Worksheet } from '../worksheet/format.ts';
import { CellRun, contextOf, type Host } from './cell-run.ts';
import type { CellState, Outcome } from './cell-state.ts';
import { Gate } from './gate.ts';
import { nearestDesign } from './nearest-design.ts';
import { type CellPlan, planCells, samePlan } from './plan.ts';
import { resolveShared, sharedIdsIn } from './shared-references.ts';
import { type Changed, changeOf, onlyNumbersDiffer } from './worksheet-difference.ts';

export interface EngineOptions {
  readonly registry: Registry;
  readonly runner: Runner;
  /** Told after every change of a cell's state. */
  readonly onState?: (cellId: string) => void;
  /** When the next pass runs; a microtask by default, so that it never waits for a hidden tab. */
  readonly schedule?: (pass: () => void) => void;
}

interface Entry {
  readonly run: CellRun;
  readonly variable: Variable;
}

/**
 * Computes a worksheet and keeps it computed. Every edit, and every undo, is one call of `show` with the new record:
 * what did not change is not computed again.
 */
export class Engine {
  readonly #options: EngineOptions;
  readonly #runtime: Runtime;
  readonly #module: Module;
  readonly #entries = new Map<string, Entry>();
  readonly #numbers = new Map<string, { readonly variable: Variable; readonly value: number | null }>();
  /** Cells the runtime is at, or will be at, in the present pass. */
  readonly #settling = new Set<string>();
  readonly #gate: Gate;
  readonly #host: Host;
  /** The newest record shown, and the one being computed: they differ while short computations are let finish. */
  #latest: Worksheet | null = null;
  #applied: Worksheet | null = null;
  #scheduled = false;
  #cancelled = 0;
  #disposed = false;
  #idle: (() => void)[] = [];

  constructor(options: EngineOptions) {
    this.#options = options;
    this.#runtime = new Runtime(null, (name) => {
      throw new RangeError(`there is no cell called "${name}"`);
    });
    this.#module = this.#runtime.module();
    const schedule = options.schedule ?? queueMicrotask;
    this.#runtime._computeSoon = async () => {
      this.#scheduled = true;
      await new Promise<void>((resolve) => schedule(resolve));
      this.#scheduled = false;
      if (!this.#disposed) void this.#runtime._computeNow();
      this.#settled();
    };
    this.#gate = new Gate(
      this.#settling,
      (id) => this.#entries.get(id)?.run,
      () => {
        this.#applyLatest();
        this.#settled();
      },
    );
    this.#host = {
      runner: options.runner,
      worksheet: () => this.#record(this.#applied),
      tell: (cellId) => this.#options.onState?.(cellId),
      started: (cellId) => this.#expectBelow(cellId),
      stopped: () => this.#cancelled++,
    };
  }

  /** Makes `worksheet` the record to compute. Quick changes of numbers wait for computations that are about to finish. */
  show(worksheet: Worksheet): void {
    if (this.#disposed) throw new TypeError('*engine* must not be used after dispose()');
    this.#latest = worksheet;
    if (this.#applied !== null && onlyNumbersDiffer(this.#applied, worksheet) && this.#gate.hold()) return;
    this.#applyLatest();
  }

  /** @throws RangeError for a cell that does not exist */
  state(cellId: string): CellState {
    return this.#entry(cellId).run.state;
  }

  /** Completed computations of each cell since the start. */
  counts(): ReadonlyMap<string, number> {
    return new Map([...this.#entries].map(([id, { run }]) => [id, run.count]));
  }

  /** How many computations were stopped before they finished. */
  cancelled(): number {
    return this.#cancelled;
  }

  /** What the cell's sentence may look at: the newest record, and what the cell and those above it last came to. */
  context(cellId: string): Context {
    const { plan, last } = this.#entry(cellId).run;
    const context = this.contextOver(Object.fromEntries(plan.ports.map(({ port, from }) => [port, from])));
    return last === null ? context : { ...context, own: last };
  }

  /** What a cell that reads these cells (port -> id) may look at. */
  contextOver(from: { readonly [port: string]: string }): Context {
    const worksheet = this.#record(this.#latest);
    const given: Record<string, unknown> = {};
    const above: Record<string, Settings> = {};
    for (const [port, id] of Object.entries(from)) {
      given[port] = this.#valueOf(id);
      const cell = worksheet.cells.find((each) => each.id === id);
      if (cell !== undefined) above[port] = cell.settings;
    }
    const design = nearestDesign(worksheet, this.#options.registry, Object.values(from), (id) => this.#valueOf(id));
    return { ...contextOf(worksheet, given), above, ...(design === undefined ? {} : { design }) };
  }

  /** The cell's settings with every shared number replaced by its value now; one that does not exist counts as none. */
  settings(cellId: string): Settings {
    const worksheet = this.#record(this.#latest);
    const cell = worksheet.cells.find((each) => each.id === cellId) ?? this.#entry(cellId).run.plan.cell;
    const values = new Map<string, number | null>(sharedIdsIn(cell.settings).map((id) => [id, null]));
    for (const each of worksheet.shared) values.set(each.id, each.value);
    return resolveShared(cell.settings, values);
  }

  /** Resolves when nothing is being computed and nothing waits to be. */
  idle(): Promise<void> {
    return new Promise((resolve) => {
      this.#idle.push(resolve);
      this.#settled();
    });
  }

  /** Stops everything; the engine cannot be used afterwards. The runner stays open. */
  dispose(): void {
    this.#disposed = true;
    this.#gate.release();
    for (const { run } of this.#entries.values()) run.stop();
    this.#runtime.dispose();
    this.#settling.clear();
    this.#scheduled = false;
    this.#settled();
  }

  #entry(cellId: string): Entry {
    const entry = this.#entries.get(cellId);
    if (entry === undefined) throw new RangeError(`there is no cell called "${cellId}"`);
    return entry;
  }

  #record(worksheet: Worksheet | null): Worksheet {
    if (worksheet === null) throw new TypeError('*engine* must be shown a worksheet first; got none');
    return worksheet;
  }

  #applyLatest(): void {
    this.#gate.release();
    const before = this.#applied;
    const next = this.#record(this.#latest);
    if (before === next) return;
    this.#applied = next;
    if (before !== null && before.id !== next.id) this.#removeAll();
    this.#defineNumbers(next);
    const changed = changeOf(before?.id === next.id ? before : null, next);
    if (changed.hides) for (const { run } of this.#entries.values()) run.forget();
    if (before?.cells === next.cells && before.shared === next.shared && !changed.all && changed.data.size === 0)
      return;
    const plans = planCells(next, this.#options.registry);
    for (const id of this.#entries.keys()) if (!plans.has(id)) this.#remove(id);
    for (const [id, plan] of plans) this.#plan(id, plan, changed);
  }

  #plan(id: string, plan: CellPlan, changed: Changed): void {
    let entry = this.#entries.get(id);
    const before = entry?.run.plan;
    if (entry === undefined) {
      const run = new CellRun(plan, this.#host);
      entry = { run, variable: this.#module.variable(this.#observerOf(id, run)) };
      this.#entries.set(id, entry);
    }
    const { run } = entry;
    run.plan = plan;
    if (before !== undefined && before.kind !== plan.kind) run.forget();
    const again = changed.all || (changed.data.size > 0 && run.readsData(changed.data));
    if (before === undefined || again || !samePlan(before, plan)) this.#define(entry, plan);
  }

  #define({ run, variable }: Entry, plan: CellPlan): void {
    const open = plan.cell.leftOut !== true || plan.passes;
    const ports = open ? plan.ports : [];
    const shared = plan.cell.leftOut === true ? [] : plan.shared;
    const inputs = [...ports.map(({ from }) => cellVariable(from)), ...shared.map(numberVariable)];
    variable.define(cellVariable(plan.cell.id), inputs, (...values: (Outcome | number | null)[]) => {
      const numbers = new Map(shared.map((id, i) => [id, values[ports.length + i] as number | null]));
      return run.compute(values.slice(0, ports.length) as Outcome[], numbers);
    });
  }

  #observerOf(id: string, run: CellRun) {
    // A removed cell's variable is computed once more, and another cell may have its id by then.
    const isGone = () => this.#entries.get(id)?.run !== run;
    return {
      pending: () => {
        run.stop();
        if (!isGone()) this.#settling.add(id);
      },
      fulfilled: () => {
        if (!isGone()) this.#leave(id);
      },
      rejected: (error: unknown) => {
        if (isGone()) return;
        run.breakDown(error);
        this.#leave(id);
      },
    };
  }

  #leave(id: string): void {
    this.#settling.delete(id);
    this.#gate.reconsider();
    this.#settled();
  }

  #remove(id: string): void {
    const entry = this.#entries.get(id);
    if (entry === undefined) return;
    entry.run.stop();
    entry.variable.delete();
    this.#entries.delete(id);
    this.#settling.delete(id);
  }

  #removeAll(): void {
    for (const id of [...this.#entries.keys()]) this.#remove(id);
  }

  #defineNumbers(next: Worksheet): void {
    const ids = new Set(next.shared.map((each) => each.id));
    for (const [id, { variable }] of this.#numbers) {
      if (ids.has(id)) continue;
      variable.delete();
      this.#numbers.delete(id);
    }
    for (const { id, value } of next.shared) {
      const known = this.#numbers.get(id);
      if (known !== undefined && known.value === value) continue;
      const variable = known?.variable ?? this.#module.variable();
      variable.define(numberVariable(id), [], () => value);
      this.#numbers.set(id, { variable, value });
    }
  }

  /** A cell began a computation that takes a while: the cells below it that will follow say so too. */
  #expectBelow(cellId: string): void {
    this.#gate.reconsider();
    const reached = new Set([cellId]);
    for (let size = 0; size !== reached.size; ) {
      size = reached.size;
      for (const id of this.#settling) {
        const run = this.#entries.get(id)?.run;
        if (run === undefined || reached.has(id) || !run.plan.ports.some(({ from }) => reached.has(from))) continue;
        reached.add(id);
        run.expect();
      }
    }
  }

  #valueOf(cellId: string): unknown {
    const run = this.#entries.get(cellId)?.run;
    if (run === undefined || run.plan.cell.leftOut === true) {
      const above = run?.plan.passes === true ? run.plan.ports[0] : undefined;
      return above === undefined ? undefined : this.#valueOf(above.from);
    }
    return run.last?.value;
  }

  #settled(): void {
    const busy = this.#scheduled || this.#settling.size > 0 || (this.#gate.holding && !this.#disposed);
    if (busy) return;
    const waiting = this.#idle;
    this.#idle = [];
    for (const resolve of waiting) resolve();
  }
}

function cellVariable(id: string): string {
  return `cell ${id}`;
}

function numberVariable(id: string): string {
  return `shared ${id}`;
}
