import type { Result } from '../../src/analysis/compare.ts';
import type { EffectSize, Finding } from '../../src/analysis/finding.ts';
import type { Note, TableOut } from '../kind.ts';
import { bounded, count, decimalsFor, degrees, fixed, levelPercent, limits, pValue } from '../numbers.ts';

/** Decimals for a row: by its own interval, and never finer than the planned row's unit needs. */
export function decimalsOf(finding: Finding): number {
  if (finding.nullValue === 1 || finding.nullValue === 0.5) return 2;
  const [low, high] = finding.interval ?? [null, null];
  if (low !== null && high !== null) return decimalsFor(high - low);
  if (finding.se !== null) return decimalsFor(4 * finding.se);
  return finding.estimate === null ? 0 : decimalsFor(Math.abs(finding.estimate) / 10);
}

/** How a row writes its estimate and limits. */
export function writer(finding: Finding, decimals = decimalsOf(finding)): (value: number) => string {
  return finding.nullValue === 0.5 ? (value) => bounded(value, decimals) : (value) => fixed(value, decimals);
}

/** "−84 [−131, −38]", or the estimate alone, or "not given". */
export function estimateText(finding: Finding, decimals = decimalsOf(finding)): string {
  const write = writer(finding, decimals);
  if (finding.estimate === null) return 'not given';
  return finding.interval === null
    ? write(finding.estimate)
    : `${write(finding.estimate)} ${limits(finding.interval, write)}`;
}

/** "t(21) = −3.77", "V = 96", "F(2, 27) = 4.85". */
export function statisticText(finding: Finding): string {
  if (!finding.statistic) return '';
  const { name, value } = finding.statistic;
  const second = finding.df2 === undefined || finding.df2 === null ? '' : `, ${degrees(finding.df2)}`;
  const df = finding.df === null ? '' : `(${degrees(finding.df)}${second})`;
  return `${name}${df} = ${fixed(value, Number.isInteger(value) ? 0 : 2)}`;
}

/** The planned row in one plain sentence. */
export function sayFinding(result: Result): string {
  const finding = result.findings[result.planned];
  const { first, second } = result.comparison;
  if (!finding || finding.estimate === null) {
    return `${first} against ${second}: no estimate (${finding?.reason ?? 'nothing to compare'}).`;
  }
  const write = writer(finding);
  const unit = finding.unit === '' ? '' : ` ${finding.unit}`;
  const interval =
    finding.interval === null ? '' : `, ${levelPercent(finding.level)} interval ${limits(finding.interval, write)}`;
  const test = [statisticText(finding), finding.p === null ? '' : pValue(finding.p)].filter((each) => each !== '');
  const effect = finding.effects[0];
  const sized = effect && effect.value !== null ? `; ${effectText(effect)}` : '';
  const order = finding.sameUnit ? `${first} minus ${second}` : `${first} against ${second}`;
  return `${order}, ${finding.label}: ${write(finding.estimate)}${unit}${interval}${test.length > 0 ? `, ${test.join(', ')}` : ''}${sized}; n = ${count(finding.n)}${finding.reason ? ` (${finding.reason})` : ''}.`;
}

/** Effect sizes that cannot exceed one. */
const SHARES = /^P\(|\u00b2$|share of variance$|agreement$|Kendall W$/;

/** "d_av (average SD) = −0.41 [−0.72, −0.12]". */
export function effectText(effect: EffectSize): string {
  if (effect.value === null) return `${effect.name}: not given (${effect.reason ?? ''})`;
  const write = SHARES.test(effect.name) ? (value: number) => bounded(value, 2) : (value: number) => fixed(value, 2);
  return `${effect.name} = ${write(effect.value)}${effect.interval ? ` ${limits(effect.interval, write)}` : ''}`;
}

/** Every row with every number. */
export function findingTable(result: Result): TableOut {
  const unit = result.scores.design.roles.unit;
  const kept = (result.findings[0]?.counts ?? []).map((each) => `${each.condition} averaged`);
  const names = [
    'row',
    'planned',
    'quantity',
    'estimate',
    'unit',
    'SE',
    'df',
    'statistic',
    'p',
    'p from',
    'lower',
    'upper',
    'n',
    ...kept,
    'remark',
  ];
  const numeric = new Set(['estimate', 'SE', 'df', 'lower', 'upper', 'n', ...kept]);
  return {
    title: 'every row',
    columns: names.map((name) => ({ name, numeric: numeric.has(name) })),
    rows: result.findings.map((finding, index) => shownRow(finding, index === result.planned, unit)),
    raw: result.findings.map((finding, index) => rawRow(finding, index === result.planned)),
  };
}

function shownRow(finding: Finding, planned: boolean, unit: string): string[] {
  const write = writer(finding);
  const number = (value: number | null | undefined) => (value === null || value === undefined ? '' : write(value));
  return [
    finding.label,
    planned ? 'planned' : '',
    finding.quantity,
    number(finding.estimate),
    finding.sameUnit ? unit : finding.group,
    finding.se === null ? '' : fixed(finding.se, decimalsOf(finding) + 1),
    finding.df === null ? '' : degrees(finding.df),
    statisticText(finding),
    finding.p === null ? '' : pValue(finding.p),
    finding.p === null ? '' : finding.pHow,
    number(finding.interval?.[0]),
    number(finding.interval?.[1]),
    count(finding.n),
    ...keptCounts(finding).map(count),
    finding.reason ?? '',
  ];
}

function rawRow(finding: Finding, planned: boolean): (string | number | null)[] {
  return [
    finding.label,
    planned ? 'planned' : '',
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
    ...keptCounts(finding),
    finding.reason ?? '',
  ];
}

function keptCounts(finding: Finding): number[] {
  return finding.counts.map((each) => each.h);
}

/** Every effect size with its interval, and how each row is computed. */
export function effectTable(result: Result): TableOut {
  const rows = result.findings.flatMap((finding) => {
    const effects: (EffectSize | null)[] = finding.effects.length > 0 ? [...finding.effects] : [null];
    return effects.map((effect) => [
      finding.label,
      effect ? effectText(effect) : finding.sameUnit ? '' : 'the estimate itself',
      effect?.how ?? '',
      finding.method,
    ]);
  });
  return {
    title: 'effect sizes, and how each row is computed',
    columns: ['row', 'effect size', 'interval by', 'how this is computed'].map((name) => ({ name, numeric: false })),
    rows,
  };
}

/** Participants with a score who could not enter, and why: the first three by name. */
export function leftNotes(result: Result, noun: string): Note[] {
  if (result.left.length === 0) return [];
  const named = result.left.slice(0, 3).map((each) => `${noun} ${each.participant} (${each.why})`);
  const more = result.left.length - named.length;
  return [{ type: 'note', text: `Not compared: ${named.join('; ')}${more > 0 ? `; and ${more} more` : ''}.` }];
}
