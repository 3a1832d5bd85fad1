import { type AssociationSpec, type Pairs, takePairs } from '../../src/analysis/association.ts';
import type { Finding } from '../../src/analysis/finding.ts';
import { columnIn, referenceColumns } from './reference-columns.ts';
import { tableOf } from './tables.ts';

export const spec: AssociationSpec = {
  x: 'x',
  y: 'y',
  participant: null,
  estimator: 'percentage-bend',
  trim: 20,
  alternative: 'two-sided',
  alpha: 0.05,
  resamples: 99,
  seed: 7,
};

/** Pairs of plain numbers. */
export function pairsOf(x: ArrayLike<number>, y: ArrayLike<number>): Pairs {
  return takePairs(tableOf({ x: Array.from(x), y: Array.from(y) }), spec);
}

/** Pairs of two columns of a data set of test/reference/cases. */
export function referencePairs(name: string, x: string, y: string): Pairs {
  const columns = referenceColumns(name);
  return pairsOf(columnIn(columns, x), columnIn(columns, y));
}

/** The finding of a row that must be there. */
export function findingOf(findings: readonly Finding[], estimator: string): Finding {
  const found = findings.find((each) => each.estimator === estimator);
  if (found === undefined) throw new Error(`no row ${estimator}`);
  return found;
}
