/** One line of the benchmark table: ours beside one peer. Times are CPU medians in ms. */
export interface BenchRow {
  /** "B1"; the workloads are those of DEVELOPERS.md. */
  readonly id: string;
  /** "n=40 B=2000". */
  readonly case: string;
  readonly ours_ms: number | null;
  /** "scipy.stats.bootstrap", or what the goal is against. */
  readonly peer: string;
  readonly peer_ms: number | null;
  /** peer / ours. */
  readonly ratio: number | null;
  /** ">= 5": the ratio wanted; or "<= 100 ms" where the goal is a time of our own. */
  readonly goal: string;
  /** Why there is no number: "skipped: no Rscript here". */
  readonly note?: string;
}
