import { requireScores } from '../scores.ts';
import { normalLower, normalUpper } from '../tails/normal.ts';
import { lillieforsTableP } from './lilliefors-table.ts';
import { standardScores } from './standard-scores.ts';

/** Largest gap between the sample and a normal distribution with its mean and SD; null with a reason. */
export interface Lilliefors {
  readonly d: number | null;
  /** From simulated tables between .001 and .99, from the formula below .001. */
  readonly p: number | null;
  /** Dallal and Wilkinson's formula; null above .1, where it does not hold. */
  readonly pFormula: number | null;
  /** Simulated tables, never below .001 or above .99. */
  readonly pTable: number | null;
  readonly reason?: string;
}

/**
 * Kolmogorov-type check of normal scores with estimated mean and SD.
 * @param x scores (n of 4 or more, any unit)
 * @returns D and p; null with a reason for fewer than 4 or equal scores
 * @throws RangeError when a score is not finite
 * @source Lilliefors 1967, J. Am. Stat. Assoc. 62, 399-402: D = max |F_n - F|; Dallal & Wilkinson 1986, Am. Stat. 40, 294-296
 * @checked outside check cases lilliefors_test, D and the formula relative 1e-9, table relative 1e-6
 */
export function lillieforsTest(x: Float64Array): Lilliefors {
  requireScores(x, 0);
  const n = x.length;
  const none = { d: null, p: null, pFormula: null, pTable: null };
  if (n < 4) return { ...none, reason: 'fewer than 4 scores' };
  const z = standardScores(x);
  if (z === null) return { ...none, reason: 'all scores are equal' };
  let d = 0;
  for (let i = 0; i < n; i++) {
    d = Math.max(d, (i + 1) / n - normalLower(z[i]!), (n - i) / n - normalUpper(z[i]!));
  }
  const formula = dallalWilkinson(d, n);
  const pFormula = formula <= 0.1 ? formula : null;
  const pTable = lillieforsTableP(d, n);
  const p = pTable <= 0.001 && pFormula !== null ? Math.min(0.001, pFormula) : pTable;
  return { d, p, pFormula, pTable };
}

function dallalWilkinson(d: number, n: number): number {
  const size = Math.min(n, 100);
  const scaled = n > 100 ? d * Math.exp(0.49 * Math.log(n / 100)) : d;
  const shifted = size + 2.78019;
  return Math.exp(
    -7.01256 * scaled * scaled * shifted +
      2.99587 * scaled * Math.sqrt(shifted) -
      0.122119 +
      0.974598 / Math.sqrt(size) +
      1.67997 / size,
  );
}
