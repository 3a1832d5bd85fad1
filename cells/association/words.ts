import type { Association } from '../../src/analysis/association.ts';
import type { Finding } from '../../src/analysis/finding.ts';
import type { TableOut } from '../kind.ts';
import { bounded, count, decimalsFor, degrees, fixed, levelPercent, limits, pValue } from '../numbers.ts';

/** Decimals for a row: two for correlations, by its own interval for slopes. */
export function decimalsOf(finding: Finding): number {
  if (finding.group === 'correlations') return 2;
  const [low, high] = finding.interval ?? [null, null];
  if (low !== null && high !== null) return decimalsFor(high - low);
  if (finding.se !== null) return decimalsFor(4 * finding.se);
  return finding.estimate === null ? 0 : decimalsFor(Math.abs(finding.estimate) / 10);
}

/** How a row writes its estimate and limits. */
export function writer(finding: Finding, decimals = decimalsOf(finding)): (value: number) => string {
  return finding.group === 'correlations' ? (value) => bounded(value, decimals) : (value) => fixed(value, decimals);
}

/** "−.72 [−.87, −.45]", the estimate alone, or "not given". */
export function estimateText(finding: Finding, decimals = decimalsOf(finding)): string {
  if (finding.estimate === null) return 'not given';
  const write = writer(finding, decimals);
  return finding.interval === null
    ? write(finding.estimate)
    : `${write(finding.estimate)} ${limits(finding.interval, write)}`;
}

/** "t(23) = −5.12", "S = 48". */
export function statisticText(finding: Finding): string {
  if (!finding.statistic) return '';
  const { name, value } = finding.statistic;
  const df = finding.df === null || name !== 't' ? '' : `(${degrees(finding.df)})`;
  return `${name}${df} = ${fixed(value, Number.isInteger(value) ? 0 : 2)}`;
}

/** The planned row in one plain sentence. */
export function sayAssociation(value: Association): string {
  const { x, y } = value.spec;
  const finding = value.findings[value.planned];
  if (!finding || finding.estimate === null) {
    return `${x} and ${y}: no estimate (${finding?.reason ?? 'no such row'}).`;
  }
  const write = writer(finding);
  const unit = finding.unit === '' ? '' : ` ${finding.unit}`;
  const interval =
    finding.interval === null ? '' : `, ${levelPercent(finding.level)} interval ${limits(finding.interval, write)}`;
  const test = [statisticText(finding), finding.p === null ? '' : pValue(finding.p)].filter((each) => each !== '');
  const reason = finding.reason ? ` (${finding.reason})` : '';
  return `${x} and ${y}, ${finding.label}: ${write(finding.estimate)}${unit}${interval}${test.length > 0 ? `, ${test.join(', ')}` : ''}; n = ${count(finding.n)}${reason}.`;
}

/** Every row with every number. */
export function findingTable(value: Association): TableOut {
  const names = ['row', 'planned', 'quantity', 'estimate', 'unit', 'SE', 'df', 'statistic', 'p', 'p from', 'lower'];
  const columns = [...names, 'upper', 'n', 'pairs used', 'remark'];
  const numeric = new Set(['estimate', 'SE', 'df', 'lower', 'upper', 'n', 'pairs used']);
  const isPlanned = (index: number) => (index === value.planned ? 'planned' : '');
  return {
    title: 'every row',
    columns: columns.map((name) => ({ name, numeric: numeric.has(name) })),
    rows: value.findings.map((finding, index) => shownRow(finding, isPlanned(index))),
    raw: value.findings.map((finding, index) => rawRow(finding, isPlanned(index))),
  };
}

function shownRow(finding: Finding, planned: string): string[] {
  const write = writer(finding);
  const number = (value: number | null | undefined) => (value === null || value === undefined ? '' : write(value));
  return [
    finding.label,
    planned,
    finding.quantity,
    number(finding.estimate),
    finding.unit,
    finding.se === null ? '' : fixed(finding.se, decimalsOf(finding) + 1),
    finding.df === null ? '' : degrees(finding.df),
    statisticText(finding),
    finding.p === null ? '' : pValue(finding.p),
    finding.p === null ? '' : finding.pHow,
    number(finding.interval?.[0]),
    number(finding.interval?.[1]),
    count(finding.n),
    count(pairsUsed(finding)),
    finding.reason ?? '',
  ];
}

function rawRow(finding: Finding, planned: string): (string | number | null)[] {
  return [
    finding.label,
    planned,
    finding.quantity,
    finding.estimate,
    finding.unit,
    finding.se,
    finding.df,
    finding.statistic ? `${finding.statistic.name} = ${finding.statistic.value}` : '',
    finding.p,
    finding.pHow,
    finding.interval?.[0] ?? null,
    finding.interval?.[1] ?? null,
    finding.n,
    pairsUsed(finding),
    finding.reason ?? '',
  ];
}

/** Pairs an estimate is made from: fewer than n where a row leaves odd pairs out. */
export function pairsUsed(finding: Finding): number {
  return finding.counts[0]?.h ?? finding.n;
}

/** How each row is computed. */
export function methodTable(value: Association): TableOut {
  return {
    title: 'how each row is computed',
    columns: ['row', 'how this is computed'].map((name) => ({ name, numeric: false })),
    rows: value.findings.map((finding) => [finding.label, finding.method]),
  };
}

/** Leverage, Cook's distance and studentized residual of every participant. */
export function diagnosticTable({ spec, pairs, diagnostics }: Association): TableOut {
  const { limits: at } = diagnostics;
  const number = (value: number | null, decimals: number) => (value === null ? '' : fixed(value, decimals));
  const measures = [
    `leverage (limit ${number(at.hat, 2)})`,
    `Cook\u2019s distance (limit ${number(at.cook, 2)})`,
    `studentized residual (limit ${at.studentized})`,
  ];
  const names = [spec.participant ?? 'row', 'row in the file', spec.x, spec.y, ...measures];
  return {
    title: 'points of the least-squares line, with limits of common practice',
    columns: [...names, 'beyond'].map((name, i) => ({ name, numeric: i > 0 && i < names.length })),
    rows: diagnostics.pairs.map((each, i) => [
      pairs.participants[i] as string,
      count(pairs.rows[i] as number),
      String(pairs.x[i]),
      String(pairs.y[i]),
      number(each.hat, 3),
      number(each.cook, 3),
      number(each.studentized, 2),
      ['leverage', 'Cook', 'residual'].filter((_, k) => each.beyond[k]).join(', '),
    ]),
    raw: diagnostics.pairs.map((each, i) => [
      pairs.participants[i] as string,
      pairs.rows[i] as number,
      pairs.x[i] as number,
      pairs.y[i] as number,
      each.hat,
      each.cook,
      each.studentized,
      ['leverage', 'Cook', 'residual'].filter((_, k) => each.beyond[k]).join(', '),
    ]),
  };
}
