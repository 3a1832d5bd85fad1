/** A comparison of several levels in words and tables. */
import type { Result } from '../../src/analysis/compare.ts';
import type { Finding } from '../../src/analysis/finding.ts';
import type { TableOut } from '../kind.ts';
import { count, decimalsFor, degrees, fixed, levelPercent, limits, pValue } from '../numbers.ts';
import { effectText, statisticText } from './words.ts';

/** The planned row in one plain sentence. */
export function sayOmnibus(result: Result): string {
  const finding = result.findings[result.planned];
  const about = result.comparison.first;
  if (!finding) return `${about}: nothing is planned.`;
  const test = [statisticText(finding), finding.p === null ? '' : pValue(finding.p)].filter((each) => each !== '');
  const share = shareText(finding);
  const parts = [...test, ...(share === '' ? [] : [share])];
  return `${about}, ${finding.label}: ${parts.length > 0 ? parts.join(', ') : 'no test'}; n = ${count(finding.n)}${finding.reason ? ` (${finding.reason})` : ''}.`;
}

/** "partial η² = .26 [.05, .41] (90 % interval)". */
export function shareText(finding: Finding): string {
  const [share] = finding.effects;
  if (!share || share.value === null) return '';
  return `${effectText(share)}${share.interval ? ` (${levelPercent(finding.level)} interval)` : ''}`;
}

/** Every row with every number. */
export function omnibusTable(result: Result): TableOut {
  const names = [
    'row',
    'planned',
    'statistic',
    'df',
    'df 2',
    'p',
    'p from',
    'effect size',
    'estimate',
    'lower',
    'upper',
    'level',
    'n',
    'remark',
  ];
  const numeric = new Set(['df', 'df 2', 'estimate', 'lower', 'upper', 'n']);
  const number = (value: number | null | undefined, write: (value: number) => string) =>
    value === null || value === undefined ? '' : write(value);
  const share = (value: number) => fixed(value, 3);
  return {
    title: 'every row',
    columns: names.map((name) => ({ name, numeric: numeric.has(name) })),
    rows: result.findings.map((finding, index) => [
      finding.label,
      index === result.planned ? 'planned' : '',
      statisticText(finding),
      number(finding.df, degrees),
      number(finding.df2, degrees),
      finding.p === null ? '' : pValue(finding.p),
      finding.p === null ? '' : finding.pHow,
      finding.quantity,
      number(finding.estimate, share),
      number(finding.interval?.[0], share),
      number(finding.interval?.[1], share),
      levelPercent(finding.level),
      count(finding.n),
      finding.reason ?? '',
    ]),
    raw: result.findings.map((finding, index) => [
      finding.label,
      index === result.planned ? 'planned' : '',
      finding.statistic?.value ?? null,
      finding.df,
      finding.df2 ?? null,
      finding.p,
      finding.pHow,
      finding.quantity,
      finding.estimate,
      finding.interval?.[0] ?? null,
      finding.interval?.[1] ?? null,
      finding.level,
      finding.n,
      finding.reason ?? '',
    ]),
  };
}

/** Decimals at which every level (or pair) of one list is written: the coarsest that any of them needs. */
export function sharedDecimals(
  rows: readonly { readonly interval: readonly [number | null, number | null] | null }[],
): number {
  const widths = rows.flatMap(({ interval }) =>
    interval === null || interval[0] === null || interval[1] === null ? [] : [interval[1] - interval[0]],
  );
  return widths.length === 0 ? 1 : Math.min(...widths.map(decimalsFor));
}

/** Each level with its own location and interval. */
export function levelTable(result: Result): TableOut {
  const levels = result.levels ?? [];
  const decimals = sharedDecimals(levels);
  const { unit } = result.scores.design.roles;
  const names = ['level', `estimate${unit === '' ? '' : ` (${unit})`}`, 'lower', 'upper', 'n', 'averaged'];
  return {
    title: `each level by itself, ${levelPercent(1 - result.comparison.alpha)} intervals`,
    columns: names.map((name, i) => ({ name, numeric: i > 0 })),
    rows: levels.map(({ label, estimate, interval, n, h }) => [
      label,
      estimate === null ? '' : fixed(estimate, decimals),
      ...[interval?.[0], interval?.[1]].map((limit) =>
        limit === null || limit === undefined ? '' : fixed(limit, decimals),
      ),
      count(n),
      count(h),
    ]),
    raw: levels.map(({ label, estimate, interval, n, h }) => [
      label,
      estimate,
      interval?.[0] ?? null,
      interval?.[1] ?? null,
      n,
      h,
    ]),
  };
}

/** All pairs, where they were asked for. */
export function pairTable(result: Result): TableOut[] {
  const { pairs } = result;
  if (!pairs) return [];
  const decimals = sharedDecimals(pairs.rows);
  const names = ['pair', 'difference', 'SE', 'df', 'statistic', 'p for all pairs', 'lower', 'upper'];
  const write = (value: number | null | undefined, places = decimals) =>
    value === null || value === undefined ? '' : fixed(value, places);
  return [
    {
      title: `all pairs: ${pairs.label}`,
      columns: names.map((name) => ({ name, numeric: !['pair', 'statistic', 'p for all pairs'].includes(name) })),
      rows: pairs.rows.map((row) => [
        `${row.first} minus ${row.second}`,
        write(row.estimate),
        write(row.se, decimals + 1),
        row.df === null ? '' : degrees(row.df),
        row.statistic === null ? '' : `${row.statistic.name} = ${fixed(row.statistic.value, 2)}`,
        row.p === null ? (pairs.reason ?? '') : pValue(row.p),
        write(row.interval?.[0]),
        write(row.interval?.[1]),
      ]),
      raw: pairs.rows.map((row) => [
        `${row.first} minus ${row.second}`,
        row.estimate,
        row.se,
        row.df,
        row.statistic?.value ?? null,
        row.p,
        row.interval?.[0] ?? null,
        row.interval?.[1] ?? null,
      ]),
    },
  ];
}

/** "−84 [−131, −38]" of a level or a pair. */
export function intervalText(
  row: { readonly estimate: number | null; readonly interval: readonly [number | null, number | null] | null },
  decimals: number,
): string {
  if (row.estimate === null) return 'not given';
  const write = (value: number) => fixed(value, decimals);
  return row.interval === null ? write(row.estimate) : `${write(row.estimate)} ${limits(row.interval, write)}`;
}
