import type { Result } from '../../src/analysis/compare.ts';
import type { Settings, ViewContext } from '../kind.ts';
import { pValue } from '../numbers.ts';
import { type DrawnRow, intervalChart, unitWords } from './chart.ts';
import { intervalText, sharedDecimals } from './words-omnibus.ts';

/** A row as the chart element gets it: labels beside on a wide page, above on a narrow one. */
export type GivenRow = Omit<DrawnRow, 'estimate'> & { readonly estimate: number | null; readonly numbers: string };

/** Each level by itself. */
export function levelRows(result: Result): GivenRow[] {
  const levels = result.levels ?? [];
  const decimals = sharedDecimals(levels);
  return levels.map((level, y) => {
    const text = intervalText(level, decimals);
    return { ...drawn(y, level), label: level.label, text, p: '', numbers: text };
  });
}

/** Every pair, first minus second. */
export function pairRows(result: Result): GivenRow[] {
  const rows = result.pairs?.rows ?? [];
  const decimals = sharedDecimals(rows);
  return rows.map((row, y) => {
    const text = intervalText(row, decimals);
    const p = row.p === null ? '' : pValue(row.p);
    return { ...drawn(y, row), label: `${row.first} minus ${row.second}`, text, p, numbers: `${text}  ${p}`.trim() };
  });
}

function drawn(
  y: number,
  {
    estimate,
    interval,
  }: { readonly estimate: number | null; readonly interval: readonly [number | null, number | null] | null },
) {
  return { y, estimate, low: interval?.[0] ?? null, high: interval?.[1] ?? null, planned: false };
}

/** The axis of the levels: in the outcome's unit, not from zero. */
export function levelChart(result: Result, context: ViewContext): Settings {
  const { outcome } = result.scores.design.roles;
  return intervalChart({
    rows: result.levels?.length ?? 0,
    title: `${outcome}${unitWords(result)}`,
    zero: false,
    width: context.width,
  });
}

/** The axis of the pairs: differences around zero. */
export function pairChart(result: Result, context: ViewContext): Settings {
  return intervalChart({
    rows: result.pairs?.rows.length ?? 0,
    title: result.pairs?.sameUnit === false ? 'difference of mean ranks' : `difference${unitWords(result)}`,
    zero: true,
    width: context.width,
  });
}
