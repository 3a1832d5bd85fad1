import { type Matrix, trace } from '../matrix.ts';

/** Factors by which both degrees of freedom of a repeated-measures F shrink; 1 where sphericity holds. */
export interface SphericityFactors {
  /** Greenhouse and Geisser's. */
  readonly gg: number;
  /** Huynh and Feldt's as computed: it may exceed 1; null when there are too few participants. */
  readonly hf: number | null;
  /** Lower bound, 1 / (number of comparisons). */
  readonly lowerBound: number;
}

/**
 * Sphericity factors from the covariances of orthonormal comparisons.
 * @param products p by p sums of squares and products (or covariances) of orthonormal comparisons, trace > 0
 * @param dfError participants minus groups, at least 1
 * @returns the three factors
 * @throws RangeError when the matrix is not square, has no variance, or dfError is below 1
 * @source Greenhouse & Geisser (1959): gg = tr(S)^2 / (p tr(S S)); Huynh & Feldt (1976) as corrected by Lecoutre (1991):
 *   ((N-g+1) p gg - 2) / (p (N - g - p gg)); Box (1954) lower bound 1/p
 * @checked cases `repeated_measures_anova`, `mixed_anova`, rtol 1e-9
 */
export function sphericityFactors(products: Matrix, dfError: number): SphericityFactors {
  if (!(dfError >= 1)) throw new RangeError(`*dfError* must be at least 1; got ${dfError}`);
  const total = trace(products);
  if (!(total > 0)) throw new RangeError(`*products* must have a positive trace; got ${total}`);
  const p = products.rows;
  if (p === 1) return { gg: 1, hf: 1, lowerBound: 1 };
  // Entries as shares of the trace, so that squares stay in range for any unit.
  const squares = products.data.reduce((sum, value) => sum + (value / total) ** 2, 0);
  const gg = Math.min(1, 1 / (p * squares));
  const rest = dfError - p * gg;
  // With p or fewer degrees of freedom the rest may be an exact 0 lost to rounding.
  const hf = rest > 1e-9 ? ((dfError + 1) * p * gg - 2) / (p * rest) : null;
  return { gg, hf, lowerBound: 1 / p };
}
