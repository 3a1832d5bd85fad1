import type { Worksheet } from '../worksheet/format.ts';

/** A saved worksheet as the list shows it. */
export interface Saved {
  readonly id: string;
  readonly title: string;
  /** ISO 8601 time of the last save. */
  readonly when: string;
}

/** Where worksheets are kept between visits. */
export interface Store {
  put(worksheet: Worksheet, when: string): Promise<void>;
  get(id: string): Promise<Worksheet | null>;
  /** Latest first. */
  list(): Promise<readonly Saved[]>;
  remove(id: string): Promise<void>;
}

export interface Timers {
  set(run: () => void, ms: number): number;
  clear(timer: number): void;
  now(): string;
}

export type SaveState =
  | { readonly state: 'saved' | 'pending' }
  | { readonly state: 'failed'; readonly sentence: string };

const WAIT_MS = 300;
const RETRY_MS = 5000;

/** What a reader is told when the browser's store refuses. */
export function storeSentence(error: unknown): string {
  const name = error instanceof Error ? error.name : '';
  if (name === 'QuotaExceededError') {
    return 'Not saved here: the browser\u2019s store is full. Remove a saved worksheet, or save a copy to a file.';
  }
  return 'Not saved here: the browser does not let this page keep anything. Save a copy to a file before you leave.';
}

/** Keeps the store a moment behind the open worksheet; a failed save is told and tried again. */
export class Autosave {
  #waiting: Worksheet | null = null;
  #timer: number | null = null;
  #writing: Promise<void> | null = null;
  #state: SaveState = { state: 'saved' };
  readonly #store: Store;
  readonly #timers: Timers;
  readonly #tell: (state: SaveState) => void;

  constructor(store: Store, timers: Timers, tell: (state: SaveState) => void) {
    this.#store = store;
    this.#timers = timers;
    this.#tell = tell;
  }

  get state(): SaveState {
    return this.#state;
  }

  /** The worksheet as it is now; written after a short wait. */
  changed(worksheet: Worksheet): void {
    this.#waiting = worksheet;
    if (this.#state.state !== 'failed') this.#become({ state: 'pending' });
    this.#later(WAIT_MS);
  }

  /** Writes at once what waits; the page is being left. */
  async flush(): Promise<void> {
    while (this.#writing !== null) await this.#writing;
    if (this.#timer !== null) this.#timers.clear(this.#timer);
    this.#timer = null;
    if (this.#waiting === null) return;
    this.#writing = this.#write(this.#waiting);
    await this.#writing;
  }

  #later(ms: number): void {
    if (this.#timer !== null) this.#timers.clear(this.#timer);
    this.#timer = this.#timers.set(() => {
      this.#timer = null;
      void this.flush();
    }, ms);
  }

  async #write(worksheet: Worksheet): Promise<void> {
    this.#waiting = null;
    try {
      await this.#store.put(worksheet, this.#timers.now());
      this.#become({ state: this.#waiting === null ? 'saved' : 'pending' });
    } catch (error) {
      this.#waiting ??= worksheet;
      this.#become({ state: 'failed', sentence: storeSentence(error) });
      this.#later(RETRY_MS);
    } finally {
      this.#writing = null;
    }
    if (this.#waiting !== null && this.#timer === null) this.#later(WAIT_MS);
  }

  #become(state: SaveState): void {
    const same = state.state === this.#state.state && state.state !== 'failed';
    this.#state = state;
    if (!same) this.#tell(state);
  }
}

/** Keeps worksheets only as long as the page is open: for browsers that refuse a store, and for tests. */
export class MemoryStore implements Store {
  readonly #kept = new Map<string, { worksheet: Worksheet; when: string }>();

  async put(worksheet: Worksheet, when: string): Promise<void> {
    this.#kept.set(worksheet.id, { worksheet, when });
  }

  async get(id: string): Promise<Worksheet | null> {
    return this.#kept.get(id)?.worksheet ?? null;
  }

  async list(): Promise<readonly Saved[]> {
    const saved = [...this.#kept.values()].map(({ worksheet, when }) => ({
      id: worksheet.id,
      title: worksheet.title,
      when,
    }));
    return saved.sort((a, b) => (a.when < b.when ? 1 : -1));
  }

  async remove(id: string): Promise<void> {
    this.#kept.delete(id);
  }
}
