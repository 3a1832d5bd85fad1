/** Adapters of the section "Outlier rules" of test/reference/cases/README.md. */
import { adjustedFences } from '../../../src/numerics/rules/adjusted-fences.ts';
import { carlingLimits } from '../../../src/numerics/rules/carling.ts';
import { doubleMadLimits } from '../../../src/numerics/rules/double-mad.ts';
import { generalizedEsd } from '../../../src/numerics/rules/generalized-esd.ts';
import { grubbsTest } from '../../../src/numerics/rules/grubbs.ts';
import { fenceLimits, type Quartiles } from '../../../src/numerics/rules/iqr-fences.ts';
import { flagOutside } from '../../../src/numerics/rules/limits.ts';
import { madLimits } from '../../../src/numerics/rules/mad.ts';
import { mahalanobisDistances } from '../../../src/numerics/rules/mahalanobis.ts';
import { mcdDistances } from '../../../src/numerics/rules/mcd.ts';
import { zScoreLimits } from '../../../src/numerics/rules/z-score.ts';
import {
  type CaseArgs,
  type CaseData,
  type CaseMethod,
  type CaseMethods,
  type CaseRow,
  cellsBy,
  numberArg,
  numbersOf,
  outcomeValues,
  stringArg,
  stringsArg,
  undefinedResult,
  usedRows,
} from './case-data.ts';

interface Found {
  readonly lower: number | null;
  readonly upper: number | null;
  readonly center: number | null;
  readonly spread?: number | null;
}

/** In the cases a limit with a spread of 0 behind it stands at the middle itself; without any spread there is none. */
function limitOrCenter(limit: number | null, found: Found): number | null {
  return limit ?? (found.spread === null ? null : found.center);
}

function flaggedRows(rows: readonly CaseRow[], flags: Uint8Array): number[] {
  return rows.filter((_, i) => flags[i] === 1).map((row) => row.number);
}

/** A rule of limits, within each cell of `by` or over all rows. */
function limitRule(find: (x: Float64Array, args: CaseArgs) => Found): CaseMethod {
  return (data, args) => {
    const outcome = stringArg(args, 'outcome');
    const cells = cellsBy(usedRows(data, args), stringsArg(args, 'by')).map((cell) => {
      const x = numbersOf(cell.rows, outcome);
      const found = find(x, args);
      const limits = { lower: limitOrCenter(found.lower, found), upper: limitOrCenter(found.upper, found) };
      return { cell: cell.key, ...found, ...limits, rows: flaggedRows(cell.rows, flagOutside(x, limits)) };
    });
    const rows = cells.flatMap((cell) => cell.rows).sort((a, b) => a - b);
    return args.by === undefined ? { ...cells[0], rows } : { cells, rows };
  };
}

function grubbs(data: CaseData, args: CaseArgs): Record<string, unknown> {
  const rows = usedRows(data, args);
  const found = grubbsTest(outcomeValues(data, args), { alpha: numberArg(args, 'alpha', 0.05) });
  if (found.g === null || found.index === null) return { ...undefinedResult };
  return { G: found.g, critical: found.critical, p: found.p, row: rows[found.index]?.number };
}

function esd(data: CaseData, args: CaseArgs): Record<string, unknown> {
  const found = generalizedEsd(outcomeValues(data, args), {
    most: numberArg(args, 'max_outliers'),
    alpha: numberArg(args, 'alpha', 0.05),
  });
  if (found.r === null) return { ...undefinedResult };
  const rows = flaggedRows(usedRows(data, args), found.flags);
  return { R: found.r, critical: found.critical, n_outliers: found.count, rows };
}

function columnsOf(data: CaseData, args: CaseArgs): { rows: CaseRow[]; columns: Float64Array[] } {
  const names = stringsArg(args, 'columns');
  const rows = usedRows(data, args, names);
  return { rows, columns: names.map((name) => numbersOf(rows, name)) };
}

function classical(data: CaseData, args: CaseArgs): Record<string, unknown> {
  const { rows, columns } = columnsOf(data, args);
  const found = mahalanobisDistances(columns, { quantile: numberArg(args, 'quantile', 0.975) });
  if (found.distance2 === null) return { ...undefinedResult };
  return { distance2: found.distance2, cutoff: found.cutoff, rows: flaggedRows(rows, found.flags) };
}

function mcd(data: CaseData, args: CaseArgs): Record<string, unknown> {
  const { rows, columns } = columnsOf(data, args);
  const options = { alpha: numberArg(args, 'alpha', 0.75), quantile: numberArg(args, 'quantile', 0.975) };
  const found = mcdDistances(columns, options);
  if (found.distance2 === null || found.subset === null || found.covariance === null) return { ...undefinedResult };
  const { data: values, cols } = found.covariance;
  return {
    h: found.h,
    best_subset: Array.from(found.subset, (i) => rows[i]?.number),
    raw_log_determinant: found.rawLogDeterminant,
    raw_center: found.rawCenter,
    center: found.center,
    covariance: columns.map((_, i) => values.slice(i * cols, (i + 1) * cols)),
    distance2: found.distance2,
    cutoff: found.cutoff,
    rows: flaggedRows(rows, found.flags),
  };
}

export const outlierRuleMethods: CaseMethods = {
  iqr_fences: limitRule((x, args) =>
    fenceLimits(x, { k: numberArg(args, 'k'), quartiles: stringArg(args, 'quartiles') as Quartiles }),
  ),
  z_score_rule: limitRule((x, args) => zScoreLimits(x, { cutoff: numberArg(args, 'cutoff') })),
  mad_median_rule: limitRule((x, args) =>
    madLimits(x, { cutoff: numberArg(args, 'cutoff'), constant: numberArg(args, 'mad_constant', 1.4826) }),
  ),
  double_mad_rule: limitRule((x, args) =>
    doubleMadLimits(x, { cutoff: numberArg(args, 'cutoff'), constant: numberArg(args, 'mad_constant', 1.4826) }),
  ),
  adjusted_boxplot: limitRule((x, args) =>
    adjustedFences(x, {
      coef: numberArg(args, 'coef', 1.5),
      shortExponent: numberArg(args, 'a_exp', -4),
      longExponent: numberArg(args, 'b_exp', 3),
    }),
  ),
  carling_boxplot: limitRule((x) => carlingLimits(x)),
  grubbs_test: grubbs,
  generalized_esd: esd,
  mahalanobis_classical: classical,
  mcd_mahalanobis: mcd,
};
