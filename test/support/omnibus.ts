import type { AskedOmnibus } from '../../src/analysis/asked.ts';
import type { ComparisonSpec } from '../../src/analysis/compare.ts';
import { takeLayout } from '../../src/analysis/layout.ts';
import { compareLevels, fittingOmnibusRows, type OmnibusResult } from '../../src/analysis/omnibus.ts';
import type { Scores } from '../../src/analysis/score.ts';

/** Runs every row that fits a question about several levels. */
export function compareAll(
  scores: Scores,
  asked: AskedOmnibus,
  comparison: Partial<ComparisonSpec> = {},
): OmnibusResult {
  const rows = fittingOmnibusRows(scores.design.factors, asked).map((row) => row.id);
  const spec: ComparisonSpec = {
    factor: '',
    effect: asked,
    first: '',
    second: '',
    estimator: rows[0] ?? '',
    trim: 20,
    alternative: 'two-sided',
    alpha: 0.05,
    resamples: 199,
    seed: 7,
    ...comparison,
  };
  return compareLevels({ layout: takeLayout(scores, asked), asked, comparison: spec, rows, withheld: false });
}

/** "Do the levels of this factor differ", with pairs by a procedure. */
export function everyLevel(factor: string, pairs: (AskedOmnibus & { type: 'levels' })['pairs'] = 'none'): AskedOmnibus {
  return { type: 'levels', factor, pairs };
}
