import type { Held, LogEntry, Worksheet } from '../worksheet/format.ts';

/** A decision before it is chained into the log. */
export type Decision = Omit<LogEntry, 'before' | 'hash'>;

export interface DocumentOptions {
  readonly worksheet: Worksheet;
  /** ISO 8601 time of now. */
  readonly now: () => string;
  /** Milliseconds that only rise, for telling one burst of steps from the next. */
  readonly clock: () => number;
  readonly who: () => string;
  /** Chains a decision to the log. */
  readonly append: (log: readonly LogEntry[], decision: Decision) => readonly LogEntry[];
  /** Why a change would open the conditions, as a sentence; such a change waits for an answer. */
  readonly opens?: (before: Worksheet, after: Worksheet) => string | null;
  /** Called when a change waits. */
  readonly ask?: () => void;
}

export type ChangeType = 'edit' | 'undo' | 'redo' | 'open';

export interface DocumentChange {
  readonly type: ChangeType;
  readonly label: string;
  readonly record: Worksheet;
  readonly before: Worksheet;
  /** Whether it is a further step of the burst before it. */
  readonly continued: boolean;
}

/** A sentence for the decision log; null = nothing changed after all. */
export type Label = string | ((before: Worksheet, after: Worksheet) => string | null);

export interface EditOptions {
  /** Steps of one burst with the same key become one entry: the keys pressed on one number. */
  readonly merge?: string;
  readonly reason?: string;
}

interface Step {
  readonly label: string;
  /** The record on the other side of the step. */
  readonly record: Worksheet;
}

/** A change that would open the conditions, and waits for a reason. */
interface Waiting {
  /** What it would show. */
  readonly sentence: string;
  readonly apply: (reason: string) => void;
}

const BURST_MS = 1500;

/**
 * The open worksheet: one immutable record, its history and its listeners. The log only grows: taking an edit back is
 * an entry of its own. Undo never crosses the opening of the conditions, nor another worksheet's opening.
 */
export class WorksheetDocument {
  #record: Worksheet;
  #past: Step[] = [];
  #future: Step[] = [];
  #burst: { key: string; at: number } | null = null;
  #waiting: Waiting | null = null;
  readonly #options: DocumentOptions;
  readonly #listeners = new Set<(change: DocumentChange) => void>();

  constructor(options: DocumentOptions) {
    this.#options = options;
    this.#record = options.worksheet;
  }

  get record(): Worksheet {
    return this.#record;
  }

  /** The label of the edit that undo would take back, or null. */
  get undoLabel(): string | null {
    return this.#past.at(-1)?.label ?? null;
  }

  get redoLabel(): string | null {
    return this.#future.at(-1)?.label ?? null;
  }

  subscribe(listener: (change: DocumentChange) => void): () => void {
    this.#listeners.add(listener);
    return () => this.#listeners.delete(listener);
  }

  /** Applies a pure edit; false where it changed nothing. */
  edit(label: Label, change: (worksheet: Worksheet) => Worksheet, options: EditOptions = {}): boolean {
    const before = this.#record;
    const after = change(before);
    if (after === before) return false;
    if (this.#waits(after, (reason) => this.#editOpening(label, change, reason))) return false;
    const step = this.#continues(options.merge) ? (this.#past.at(-1) ?? null) : null;
    const base = step?.record ?? before;
    const text = typeof label === 'string' ? label : label(base, after);
    if (step !== null) this.#past.pop();
    if (text === null) return this.#unchanged(before, base);
    this.#past.push({ label: text, record: base });
    this.#future = [];
    this.#burst = options.merge === undefined ? null : { key: options.merge, at: this.#options.clock() };
    const log = this.#log(base, after, text, options.reason);
    this.#become('edit', text, { ...after, log }, step !== null);
    if (after.opening.state !== base.opening.state) this.#past = [];
    return true;
  }

  /** Ends a burst: the next step of the same number is an entry of its own. */
  settle(): void {
    this.#burst = null;
  }

  undo(): string | null {
    return this.#step(this.#past, this.#future, 'undo', 'taken back: ');
  }

  redo(): string | null {
    return this.#step(this.#future, this.#past, 'redo', 'done again: ');
  }

  /** Remembers a state that later states are shown against; null lets it go. */
  hold(held: Held | null): void {
    const label = held === null ? 'reference let go' : `held as reference: ${held.label}`;
    this.edit(label, (worksheet) => ({ ...worksheet, reference: held }));
  }

  /** Opens the conditions without a sealed plan; cannot be taken back. */
  openConditions(reason: string): void {
    const when = this.#options.now();
    this.edit('conditions opened without a sealed plan', (worksheet) => opened(worksheet, reason, when), { reason });
  }

  /** Why the change that waits would open the conditions; null where none waits. */
  get asked(): string | null {
    return this.#waiting?.sentence ?? null;
  }

  /** Makes the change that waits and opens the conditions for this reason, or gives it up (null). */
  answer(reason: string | null): void {
    const waiting = this.#waiting;
    this.#waiting = null;
    if (reason !== null) waiting?.apply(reason);
  }

  /** Another worksheet takes this one's place; its history starts here. */
  replace(worksheet: Worksheet): void {
    this.#past = [];
    this.#future = [];
    this.#burst = null;
    this.#waiting = null;
    this.#become('open', worksheet.title, worksheet);
  }

  /** Whether this change must wait, because it would open the conditions. */
  #waits(after: Worksheet, apply: (reason: string) => void): boolean {
    const sentence = this.#options.opens?.(this.#record, after) ?? null;
    if (sentence === null) return false;
    this.#waiting = { sentence, apply };
    this.#options.ask?.();
    return true;
  }

  #editOpening(label: Label, change: (worksheet: Worksheet) => Worksheet, reason: string): void {
    const when = this.#options.now();
    const words = (before: Worksheet, after: Worksheet): string | null => {
      const text = typeof label === 'string' ? label : label(before, after);
      return `${text ?? 'changed'}, which opened the conditions without a sealed plan`;
    };
    this.edit(words, (worksheet) => opened(change(worksheet), reason, when), { reason });
  }

  #continues(key: string | undefined): boolean {
    if (key === undefined || this.#burst === null || this.#burst.key !== key) return false;
    return this.#options.clock() - this.#burst.at < BURST_MS;
  }

  #unchanged(before: Worksheet, base: Worksheet): boolean {
    this.#burst = null;
    if (base === before) return false;
    this.#become('edit', '', base);
    return true;
  }

  #log(base: Worksheet, after: Worksheet, what: string, reason: string | undefined): readonly LogEntry[] {
    const decision = { when: this.#options.now(), who: this.#options.who(), what, opening: after.opening.state };
    return this.#options.append(base.log, reason === undefined ? decision : { ...decision, reason });
  }

  #step(from: Step[], to: Step[], type: 'undo' | 'redo', words: string): string | null {
    const step = from.at(-1);
    if (step === undefined) return null;
    const open = (reason: string): void => this.#editOpening(`${words}${step.label}`, () => step.record, reason);
    if (this.#waits(step.record, open)) return null;
    from.pop();
    const before = this.#record;
    to.push({ label: step.label, record: before });
    this.#burst = null;
    const log = this.#log(before, step.record, `${words}${step.label}`, undefined);
    this.#become(type, step.label, { ...step.record, log });
    return step.label;
  }

  #become(type: ChangeType, label: string, record: Worksheet, continued = false): void {
    const before = this.#record;
    this.#record = record;
    for (const listener of this.#listeners) listener({ type, label, record, before, continued });
  }
}

function opened(worksheet: Worksheet, reason: string, when: string): Worksheet {
  if (worksheet.opening.state !== 'blind') return worksheet;
  return { ...worksheet, opening: { state: 'opened-early', reason, when } };
}
