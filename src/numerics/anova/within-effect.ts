import { type FTest, noFTest } from '../groups.ts';
import { noSpread } from '../inference.ts';
import { type Matrix, trace } from '../matrix.ts';
import { fUpper } from '../tails/f.ts';
import { sphericityFactors } from './sphericity.ts';

/** An effect tested within participants, with both sphericity corrections. */
export interface WithinEffect extends FTest {
  /** Squared units of the scores. */
  readonly ssEffect: number | null;
  readonly ssError: number | null;
  readonly ggEpsilon: number | null;
  /** As computed; it may exceed 1. */
  readonly hfEpsilon: number | null;
  readonly lbEpsilon: number | null;
  readonly pGg: number | null;
  /** With min(1, hfEpsilon); null when hfEpsilon is null or not above 0. */
  readonly pHf: number | null;
  readonly pLb: number | null;
  /** ssEffect / (ssEffect + ssError). */
  readonly partialEta2: number | null;
}

/** What an effect's error term is made of. */
export interface WithinError {
  /** p by p sums of squares and products of the orthonormal comparisons, within groups. */
  readonly products: Matrix;
  /** Participants minus groups. */
  readonly dfError: number;
  /** Largest |score|, to tell spread from rounding. */
  readonly size: number;
}

/**
 * A within-participant effect that cannot be tested.
 * @param reason a short clause
 * @returns the fields of a within effect, null, with the reason
 * @source common practice
 * @checked by hand
 */
export function noWithinEffect(reason: string): WithinEffect {
  const none = { ssEffect: null, ssError: null, ggEpsilon: null, hfEpsilon: null, lbEpsilon: null };
  return { ...noFTest(reason), ...none, pGg: null, pHf: null, pLb: null, partialEta2: null };
}

/**
 * F of an effect against its own interaction with participants, with corrected p values.
 * @param ssEffect sum of squares of the effect on the orthonormal comparisons, >= 0
 * @param groupsFactor 1 for an effect of the levels alone, groups - 1 for its interaction with groups
 * @param error the error term
 * @returns F on p * groupsFactor and p * dfError df, its p, factors and corrected p values; null with a reason when
 *   dfError is below 1 or the comparisons do not vary between participants
 * @source Greenhouse & Geisser (1959), Huynh & Feldt (1976): both df times the factor
 * @checked cases `repeated_measures_anova`, `mixed_anova`, `within_within_anova`, rtol 1e-9
 */
export function withinEffect(ssEffect: number, groupsFactor: number, error: WithinError): WithinEffect {
  const { products, dfError, size } = error;
  if (dfError < 1) return noWithinEffect('fewer participants than the test needs');
  const p = products.rows;
  const ssError = trace(products);
  const df1 = p * groupsFactor;
  const df2 = p * dfError;
  if (noSpread(Math.sqrt(ssError / df2), size)) {
    return { ...noWithinEffect('differences between levels do not vary between participants'), ssEffect, ssError };
  }
  const { gg, hf, lowerBound } = sphericityFactors(products, dfError);
  const F = ssEffect / df1 / (ssError / df2);
  const pAt = (factor: number) => fUpper(F, df1 * factor, df2 * factor);
  return {
    F,
    df1,
    df2,
    p: pAt(1),
    ssEffect,
    ssError,
    ggEpsilon: gg,
    hfEpsilon: hf,
    lbEpsilon: lowerBound,
    pGg: pAt(gg),
    // Very few participants can make the factor negative: there is no F distribution for it then.
    pHf: hf === null || hf <= 0 ? null : pAt(Math.min(1, hf)),
    pLb: pAt(lowerBound),
    partialEta2: ssEffect / (ssEffect + ssError),
  };
}
