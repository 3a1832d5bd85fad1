import type { Result } from '../../src/analysis/compare.ts';
import type { Finding } from '../../src/analysis/finding.ts';
import type { Settings, ViewContext } from '../kind.ts';
import { pValue } from '../numbers.ts';
import { decimalsOf, estimateText } from './words.ts';

/** Widths in px of the label, estimate and p columns beside the plot; on narrow pages they stand above it. */
const LABEL = 296;
const NUMBERS = 212;
const P = 68;
const NARROW = 560;
/** Room under the plot for the axis and its title. */
const AXIS = 42;

/** One drawn row. */
export interface DrawnRow {
  readonly y: number;
  readonly label: string;
  readonly estimate: number;
  readonly low: number | null;
  readonly high: number | null;
  readonly text: string;
  readonly p: string;
  readonly planned: boolean;
}

/** The rows in the outcome's unit, which share one axis; rows that could not be estimated have text only. */
export function sameUnitRows(result: Result): DrawnRow[] {
  const findings = result.findings
    .map((finding, index) => ({ finding, index }))
    .filter(({ finding }) => finding.sameUnit);
  const decimals = commonDecimals(findings.map(({ finding }) => finding));
  const edges = findings.flatMap(({ finding }) => [finding.estimate, ...(finding.interval ?? [])]);
  const numbers = edges.filter((each): each is number => each !== null);
  const [least, most] = [Math.min(0, ...numbers), Math.max(0, ...numbers)];
  return findings.map(({ finding, index }, y) => ({
    y,
    label: finding.label,
    estimate: finding.estimate ?? NaN,
    // A one-sided interval runs to the edge of the axis.
    low: finding.interval ? (finding.interval[0] ?? least) : null,
    high: finding.interval ? (finding.interval[1] ?? most) : null,
    text: finding.estimate === null ? (finding.reason ?? 'not given') : estimateText(finding, decimals),
    p: finding.p === null ? '' : pValue(finding.p),
    planned: index === result.planned,
  }));
}

/** Rows of one axis are written to the same decimals: the coarsest that any of them needs. */
function commonDecimals(findings: readonly Finding[]): number {
  const given = findings.filter((finding) => finding.interval !== null).map((finding) => decimalsOf(finding));
  return given.length > 0 ? Math.min(...given) : 1;
}

/** The held reference as a ghost behind the planned row. */
export function ghostRows(
  result: Result,
  context: ViewContext,
): { y: number; low: number; high: number; estimate: number }[] {
  const held = context.reference?.finding as
    | { estimate?: number; interval?: [number | null, number | null]; unit?: string }
    | null
    | undefined;
  const planned = sameUnitRows(result).find((row) => row.planned);
  if (!held || !planned || typeof held.estimate !== 'number' || !held.interval) return [];
  if (held.unit !== result.scores.design.roles.unit) return [];
  const [low, high] = held.interval;
  return [{ y: planned.y, low: low ?? held.estimate, high: high ?? held.estimate, estimate: held.estimate }];
}

/** Vega-Lite: estimates with intervals on one axis, labels left, numbers right; the planned row by a filled square. */
export function comparisonChart(result: Result, context: ViewContext): Settings {
  const { first, second } = result.comparison;
  return intervalChart({
    rows: sameUnitRows(result).length,
    title: `${first} minus ${second}${unitWords(result)}`,
    zero: true,
    width: context.width,
  });
}

/** The unit after an axis title: " (ms)". */
export function unitWords(result: Result): string {
  const { unit } = result.scores.design.roles;
  return unit === '' ? '' : ` (${unit})`;
}

/** What an interval chart is made of; its rows come as data, so that it stays while their numbers turn. */
export interface IntervalChart {
  readonly rows: number;
  readonly title: string;
  /** Whether the axis holds zero, with a line at it: for differences. */
  readonly zero: boolean;
  readonly width: number;
}

/** One axis of estimates with intervals, for DrawnRows. */
export function intervalChart({ rows, title, zero, width }: IntervalChart): Settings {
  const narrow = width < NARROW;
  const step = narrow ? 62 : 27;
  const plot = narrow ? width - 12 : width - LABEL - NUMBERS;
  const y = {
    field: 'y',
    type: 'quantitative',
    scale: { domain: [-0.5, rows - 0.5], reverse: true, nice: false },
    axis: null,
  };
  const x = {
    type: 'quantitative',
    scale: { zero, nice: false, padding: 8 },
    axis: { title, tickCount: narrow ? 4 : 5, grid: false, ticks: true, domain: true },
  };
  return {
    width: Math.max(120, plot),
    height: rows * step,
    padding: { left: narrow ? 6 : LABEL, right: narrow ? 6 : NUMBERS, top: 2, bottom: AXIS },
    autosize: { type: 'none' },
    layer: [...(zero ? [zeroLine(x)] : []), ...marks(x, y, narrow ? 18 : 0), ...texts(y, { narrow, plot })],
  } as unknown as Settings;
}

type Channel = Readonly<Record<string, unknown>>;

function zeroLine(x: Channel): Channel {
  return {
    // A layer of its own needs rows of its own: without any it would draw nothing.
    data: { values: [{ zero: 0 }] },
    mark: { type: 'rule', strokeDash: [3, 3] },
    encoding: { x: { ...x, field: 'zero' }, color: { value: 'var(--soft)' } },
  };
}

function marks(x: Channel, y: Channel, yOffset: number): Channel[] {
  const planned = 'datum.planned';
  const hold = { condition: { test: planned, value: 'var(--hold)' }, value: 'var(--soft)' };
  return [
    {
      data: { name: 'ghost' },
      mark: { type: 'rule', strokeWidth: 9, opacity: 0.55, yOffset },
      encoding: { y, x: { ...x, field: 'low' }, x2: { field: 'high' }, color: { value: 'var(--axis)' } },
    },
    {
      data: { name: 'rows' },
      transform: [{ filter: 'datum.low !== null' }],
      mark: { type: 'rule', yOffset },
      encoding: {
        y,
        x: { ...x, field: 'low' },
        x2: { field: 'high' },
        color: hold,
        strokeWidth: { condition: { test: planned, value: 3 }, value: 2 },
      },
    },
    {
      data: { name: 'rows' },
      transform: [{ filter: 'isValid(datum.estimate)' }],
      mark: { type: 'point', filled: true, opacity: 1, yOffset },
      encoding: {
        y,
        x: { ...x, field: 'estimate' },
        shape: { condition: { test: planned, value: 'square' }, value: 'circle' },
        size: { condition: { test: planned, value: 130 }, value: 62 },
        fill: { condition: { test: planned, value: 'var(--hold)' }, value: 'var(--paper)' },
        stroke: { condition: { test: planned, value: 'var(--hold)' }, value: 'var(--ink)' },
        strokeWidth: { value: 1.6 },
      },
    },
  ];
}

/** Row labels, estimates and p: beside the plot, or above each row on a narrow page. */
function texts(y: Channel, place: { narrow: boolean; plot: number }): Channel[] {
  const { narrow, plot } = place;
  const text = (field: string, px: number, align: string, dy: number) => ({
    data: { name: 'rows' },
    mark: { type: 'text', align, baseline: 'middle', fontSize: narrow ? 12 : 12.5, dy },
    encoding: {
      y,
      x: { value: px },
      text: { field, type: 'nominal' },
      color: { condition: { test: 'datum.planned', value: 'var(--hold)' }, value: 'var(--ink)' },
      opacity: { value: 1 },
    },
  });
  const bold = (channel: ReturnType<typeof text>) => [
    { ...channel, transform: [{ filter: '!datum.planned' }] },
    { ...channel, transform: [{ filter: 'datum.planned' }], mark: { ...channel.mark, fontWeight: 'bold' } },
  ];
  if (narrow) {
    return [...bold(text('label', 0, 'left', -18)), ...bold(text('numbers', 0, 'left', 0))];
  }
  return [
    ...bold(text('label', -LABEL, 'left', 0)),
    ...bold(text('text', plot + NUMBERS - P - 8, 'right', 0)),
    ...bold(text('p', plot + NUMBERS, 'right', 0)),
  ];
}
