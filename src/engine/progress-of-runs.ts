/**
 * One share done for a computation that runs several jobs: the mean over the jobs it has begun, or what the computation
 * says itself; it never falls.
 */
export class ProgressOfRuns {
  readonly #shares: number[] = [];
  readonly #told: (share: number) => void;
  #highest = 0;

  constructor(told: (share: number) => void) {
    this.#told = told;
  }

  /** @param share done, 0 to 1; outside that it is moved to the nearer end */
  tell(share: number): void {
    const within = Math.min(1, Math.max(0, share));
    if (!(within > this.#highest)) return;
    this.#highest = within;
    this.#told(within);
  }

  /** Starts a job and counts its progress among the others. */
  async follow<T>(start: (progress: (share: number) => void) => Promise<T>): Promise<T> {
    const index = this.#shares.push(0) - 1;
    const progress = (share: number) => {
      this.#shares[index] = share;
      this.tell(this.#shares.reduce((sum, each) => sum + each, 0) / this.#shares.length);
    };
    return start(progress);
  }
}
