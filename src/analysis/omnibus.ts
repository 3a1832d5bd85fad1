import { type AskedOmnibus, askedFactors, type FactorShape } from './asked.ts';
import type { ComparisonSpec } from './compare.ts';
import type { Finding } from './finding.ts';
import type { Layout } from './layout.ts';
import { type Level, type LevelMeasure, levelsOf } from './levels.ts';
import type { LayoutShape, OmnibusRow } from './omnibus-row.ts';
import { comparePairs, type Pairs } from './pairs.ts';
import { FACTORIAL_ROWS } from './rows-factorial.ts';
import { MIXED_ROWS } from './rows-mixed.ts';
import { OMNIBUS_BETWEEN_ROWS } from './rows-omnibus-between.ts';
import { OMNIBUS_WITHIN_ROWS } from './rows-omnibus-within.ts';
import { withheldFinding } from './withhold.ts';

/** THE LIST of rows about several levels, in the order shown; a new one is a line in one of the four files. */
export const OMNIBUS_ROWS: readonly OmnibusRow[] = [
  ...OMNIBUS_BETWEEN_ROWS,
  ...OMNIBUS_WITHIN_ROWS,
  ...MIXED_ROWS,
  ...FACTORIAL_ROWS,
];

/** The row of that id, or undefined. */
export function omnibusRowOf(id: string): OmnibusRow | undefined {
  return OMNIBUS_ROWS.find((row) => row.id === id);
}

/** What decides which rows fit a question: levels asked about, and between factors beside them. */
export function shapeOf(factors: readonly FactorShape[], asked: AskedOmnibus): LayoutShape {
  const wanted = askedFactors(factors, asked);
  const levels = (scope: 'within' | 'between') =>
    wanted.filter((factor) => factor.scope === scope).map((factor) => factor.levels.length);
  const between = levels('between');
  const allBetween = factors.filter((factor) => factor.scope === 'between').length;
  return { between, within: levels('within'), otherBetween: allBetween - between.length };
}

/** The rows offered for a question about several levels, in order. */
export function fittingOmnibusRows(factors: readonly FactorShape[], asked: AskedOmnibus): OmnibusRow[] {
  const shape = shapeOf(factors, asked);
  return OMNIBUS_ROWS.filter((row) => row.fits(shape));
}

/** The row a new question plans: on trimmed means wherever one fits. */
export function defaultOmnibusRow(factors: readonly FactorShape[], asked: AskedOmnibus): string {
  const fitting = fittingOmnibusRows(factors, asked);
  return (fitting.find((row) => row.trims) ?? fitting[0])?.id ?? '';
}

/** What a comparison of several levels needs; no design, so that little is cloned. */
export interface OmnibusArgs {
  readonly layout: Layout;
  readonly asked: AskedOmnibus;
  readonly comparison: ComparisonSpec;
  /** Ids of the rows that fit the design. */
  readonly rows: readonly string[];
  readonly withheld: boolean;
}

export interface OmnibusResult {
  readonly findings: readonly Finding[];
  readonly levels: readonly Level[];
  readonly pairs: Pairs | null;
}

/**
 * Every row that fits a question about several levels, the levels themselves, and all pairs where they are wanted.
 *
 * @param args layout in the outcome's unit, and how it is compared
 * @returns one Finding a row, in the order of the list; undefined quantities are null with a reason
 * @source the rows and their quantities: OMNIBUS_ROWS
 */
export function compareLevels(args: OmnibusArgs): OmnibusResult {
  const { layout, asked, comparison } = args;
  const rows = OMNIBUS_ROWS.filter((row) => args.rows.includes(row.id));
  const planned = omnibusRowOf(comparison.estimator);
  const { trim, alpha } = comparison;
  const findings = rows.map((row) => compareOmnibusRow(row, args));
  const pairs = comparePairs(layout, asked.type === 'levels' ? asked.pairs : 'none', {
    alpha,
    trim: planned?.trims ? trim : 0,
  });
  return {
    findings,
    levels: levelsOf(layout, measureFor(planned), { trim, alpha }),
    pairs: pairs !== null && args.withheld ? withheldPairs(pairs) : pairs,
  };
}

/** One row; what a re-run calls too. */
export function compareOmnibusRow(
  row: OmnibusRow,
  args: Pick<OmnibusArgs, 'layout' | 'comparison' | 'withheld'>,
): Finding {
  const { trim, alpha, resamples, seed } = args.comparison;
  const finding = row.run(args.layout, { trim: row.trims ? trim : 0, alpha, resamples, seed });
  return args.withheld ? withheldFinding(finding) : finding;
}

function measureFor(planned: OmnibusRow | undefined): LevelMeasure {
  if (planned?.trims) return 'trimmed mean';
  return ['kruskal-wallis', 'friedman', 'quade'].includes(planned?.id ?? '') ? 'median' : 'mean';
}

function withheldPairs(pairs: Pairs): Pairs {
  const rows = pairs.rows.map((row) => ({ ...row, se: null, df: null, statistic: null, p: null, interval: null }));
  return {
    ...pairs,
    rows,
    reason: 'p and intervals withheld: an exclusion rule above looks at each condition separately',
  };
}
