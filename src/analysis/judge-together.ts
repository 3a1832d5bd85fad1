import { mcdDistances } from '../numerics/rules/mcd.ts';
import type { ScopeLimits } from './flagging.ts';
import type { ExtremeRule } from './rules.ts';

/** Marks, distances, and the distance beyond which one is set aside. */
export interface JudgedTogether {
  readonly limits: ScopeLimits;
  readonly flags: Uint8Array;
  /** Robust Mahalanobis distances; NaN where there are none. */
  readonly distances: Float64Array;
}

/**
 * Judges participants by several columns at once: robust distance from the middle, by the MCD.
 *
 * @param columns one vector a column, one mean a participant (no NaN), not modified
 * @param rule cutoff = percent of normal participants within the limit (97.5), null = nobody is set aside
 * @returns marks, distances, and the limit sqrt(chi-square quantile); nobody is marked and a reason given where the MCD is not
 *   defined
 * @source Rousseeuw & Van Driessen 1999; Leys, Delacre, Mora, Lakens & Ley 2019: three quarters of the rows in the subset
 * @checked outside check cases mcd_mahalanobis: the same rows
 */
export function judgeTogether(columns: readonly Float64Array[], rule: Pick<ExtremeRule, 'cutoff'>): JudgedTogether {
  const n = columns[0]?.length ?? 0;
  const none = { scope: 0, lower: null, upper: null, n };
  const nobody = (reason?: string): JudgedTogether => ({
    limits: reason === undefined ? none : { ...none, reason },
    flags: new Uint8Array(n),
    distances: new Float64Array(n).fill(NaN),
  });
  if (n === 0) return nobody('nobody has a value in every column');
  const found = mcdDistances(columns, rule.cutoff === null ? {} : { quantile: rule.cutoff / 100 });
  if (found.distance2 === null || found.cutoff === null) return nobody(found.reason ?? 'no robust distances');
  const distances = found.distance2.map(Math.sqrt);
  if (rule.cutoff === null) return { ...nobody(), distances };
  return { limits: { ...none, upper: Math.sqrt(found.cutoff) }, flags: found.flags, distances };
}
