import { type CellRun, SHORT } from './cell-run.ts';

/**
 * Decides whether a newer record may be taken up at once. If every step of a moving number stopped the step before it,
 * nothing would show until the hand rests; so a computation that is young and not known to be long is let finish, with
 * the short ones below it, and the newest record is taken up then. Long computations are stopped.
 */
export class Gate {
  holding = false;
  #timer: ReturnType<typeof setTimeout> | null = null;
  readonly #settling: ReadonlySet<string>;
  readonly #runOf: (cellId: string) => CellRun | undefined;
  readonly #open: () => void;

  /**
   * @param settling cells of the present pass that have not settled
   * @param open called once when a held record may be taken up
   */
  constructor(settling: ReadonlySet<string>, runOf: (cellId: string) => CellRun | undefined, open: () => void) {
    this.#settling = settling;
    this.#runOf = runOf;
    this.#open = open;
  }

  /** @returns whether the newest record must wait; `open` is called when it need not any more */
  hold(): boolean {
    if (!this.holding) {
      if (!this.#busy()) return false;
      this.holding = true;
      this.#wakeLater();
    }
    return true;
  }

  /** To be called whenever a computation begins or a cell settles. */
  reconsider(): void {
    if (!this.holding) return;
    if (this.#busy()) this.#wakeLater();
    else this.#open();
  }

  release(): void {
    this.holding = false;
    if (this.#timer !== null) clearTimeout(this.#timer);
    this.#timer = null;
  }

  #busy(): boolean {
    for (const id of this.#settling) {
      const run = this.#runOf(id);
      if (run === undefined || run.long) continue;
      const { age } = run;
      if (age === null ? this.#isNext(run) : age < SHORT) return true;
    }
    return false;
  }

  /** Whether nothing above it is still being computed, so that it will begin in a moment. */
  #isNext(run: CellRun): boolean {
    return !run.plan.ports.some(({ from }) => this.#settling.has(from));
  }

  #wakeLater(): void {
    if (this.#timer !== null) return;
    let oldest = 0;
    for (const id of this.#settling) oldest = Math.max(oldest, this.#runOf(id)?.age ?? 0);
    const wait = oldest < SHORT ? SHORT - oldest : SHORT;
    this.#timer = setTimeout(() => {
      this.#timer = null;
      this.reconsider();
    }, Math.ceil(wait));
  }
}
