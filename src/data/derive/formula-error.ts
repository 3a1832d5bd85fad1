import { Refusal } from '../refusal.ts';

/** Something wrong at one place of a formula. */
export class FormulaError extends Refusal {
  /** Index into the formula's text, counted from 0. */
  readonly at: number;

  /**
   * @param what the sentence without its end
   * @param at where, counted from 0
   */
  constructor(what: string, at: number) {
    super(`${what} (character ${at + 1} of the formula).`);
    this.at = at;
  }
}
