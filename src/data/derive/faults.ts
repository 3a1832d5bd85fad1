/** Where a formula is not defined: one for each part that met such a row. */
export interface Fault {
  /** The part, as written. */
  readonly part: string;
  /** When it is not defined: "its argument is zero or negative". */
  readonly why: string;
  /** Rows, and the first of them, counted from 0. */
  readonly count: number;
  readonly row: number;
}

/** Notes the rows in which one part of a formula is not defined. */
export class FaultNote {
  readonly part: string;
  private readonly found = new Map<string, { count: number; row: number }>();

  /**
   * @param part the part, as written
   */
  constructor(part: string) {
    this.part = part;
  }

  /** Notes a row and gives NaN for its value. */
  add(why: string, row: number): number {
    const seen = this.found.get(why);
    if (seen === undefined) this.found.set(why, { count: 1, row });
    else seen.count++;
    return Number.NaN;
  }

  /** What was noted. */
  faults(): Fault[] {
    return [...this.found].map(([why, { count, row }]) => ({ part: this.part, why, count, row }));
  }
}
