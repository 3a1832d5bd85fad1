import type { Association, Line } from '../../src/analysis/association.ts';
import { leveragePairs } from '../../src/analysis/association-diagnostics.ts';
import type { Settings, ViewContext } from '../kind.ts';
import { pValue } from '../numbers.ts';
import { decimalsOf, estimateText } from './words.ts';

/** Widths in px of the label, estimate and p columns beside the plot; on narrow pages they stand above it. */
const LABEL = 248;
const NUMBERS = 236;
const P = 68;
const NARROW = 560;
const AXIS = 42;

/** One drawn row. */
export interface DrawnRow {
  readonly y: number;
  readonly label: string;
  readonly estimate: number | null;
  readonly low: number | null;
  readonly high: number | null;
  readonly text: string;
  readonly p: string;
  readonly numbers: string;
  readonly planned: boolean;
}

/** The rows of one group; those that could not be estimated have text only. */
export function rowsOf(value: Association, group: 'correlations' | 'slopes'): DrawnRow[] {
  const own = value.findings.flatMap((finding, index) => (finding.group === group ? [{ finding, index }] : []));
  const given = own.filter(({ finding }) => finding.interval !== null).map(({ finding }) => decimalsOf(finding));
  // One very wide interval must not round the others away.
  const decimals = given.sort((a, b) => a - b)[given.length >> 1] ?? 2;
  const edges = own
    .flatMap(({ finding }) => [finding.estimate, ...(finding.interval ?? [])])
    .filter((each) => each !== null);
  const [least, most] = group === 'correlations' ? [-1, 1] : [Math.min(0, ...edges), Math.max(0, ...edges)];
  return own.map(({ finding, index }, y) => {
    const text = finding.estimate === null ? (finding.reason ?? 'not given') : estimateText(finding, decimals);
    const p = finding.p === null ? '' : pValue(finding.p);
    return {
      y,
      label: finding.label,
      estimate: finding.estimate,
      // A one-sided interval runs to the edge of the axis.
      low: finding.interval ? (finding.interval[0] ?? least) : null,
      high: finding.interval ? (finding.interval[1] ?? most) : null,
      text,
      p,
      numbers: [text, p].filter((each) => each !== '').join('  '),
      planned: index === value.planned,
    };
  });
}

/** Points of the scatter: who lies far out on x is told by shape and name. */
export function pointsOf({ pairs, diagnostics }: Association) {
  const far = new Set(leveragePairs(diagnostics));
  return Array.from(pairs.x, (x, i) => ({
    x,
    y: pairs.y[i] as number,
    far: far.has(i),
    name: far.has(i) ? (pairs.participants[i] as string) : '',
  }));
}

/** Both ends of each line over the range of x. */
export function lineEnds({ pairs, lines }: Association) {
  const [low, high] = [Math.min(...pairs.x), Math.max(...pairs.x)];
  const ends = (line: Line | null, which: string) =>
    line === null ? [] : [low, high].map((x) => ({ which, x, y: line.intercept + line.slope * x }));
  return [...ends(lines.ols, 'ols'), ...ends(lines.theilSen, 'theil-sen')];
}

/** Vega-Lite: the scatter with the least-squares line (solid) and the Theil-Sen line (dashed). */
export function scatterChart(value: Association, context: ViewContext): Settings {
  const axis = (field: string, title: string) => ({
    field,
    type: 'quantitative',
    scale: { zero: false, nice: true },
    axis: { title, tickCount: 6, grid: false },
  });
  const place = { x: axis('x', value.spec.x), y: axis('y', value.spec.y) };
  const line = (which: string, dash: readonly number[], colour: string) => ({
    data: { name: 'lines' },
    transform: [{ filter: `datum.which === '${which}'` }],
    mark: { type: 'line', strokeDash: dash, strokeWidth: 2 },
    encoding: { ...place, color: { value: colour } },
  });
  const points = (far: boolean, mark: object) => ({
    data: { name: 'points' },
    transform: [{ filter: far ? 'datum.far' : '!datum.far' }],
    mark: { type: 'point', opacity: 1, ...mark },
    encoding: { ...place, color: { value: far ? 'var(--aside)' : 'var(--ink)' } },
  });
  return {
    width: Math.max(160, Math.min(520, context.width - 70)),
    height: 260,
    layer: [
      line('ols', [1, 0], 'var(--ink)'),
      line('theil-sen', [6, 4], 'var(--hold)'),
      points(false, { shape: 'circle', filled: true, size: 34, opacity: 0.7 }),
      points(true, { shape: 'diamond', filled: false, size: 150, strokeWidth: 2 }),
      {
        data: { name: 'points' },
        transform: [{ filter: 'datum.far' }],
        mark: { type: 'text', dy: -15, fontSize: 12 },
        encoding: { ...place, text: { field: 'name', type: 'nominal' }, color: { value: 'var(--aside)' } },
      },
    ],
  } as unknown as Settings;
}

/** Vega-Lite: estimates with intervals on one axis, labels left, numbers right; the planned row by a filled square. */
export function rowChart(
  rows: number,
  width: number,
  axis: { readonly title: string; readonly domain: readonly [number, number] | null },
): Settings {
  const narrow = width < NARROW;
  const step = narrow ? 58 : 25;
  const plot = Math.max(120, narrow ? width - 12 : width - LABEL - NUMBERS);
  const y = {
    field: 'y',
    type: 'quantitative',
    scale: { domain: [-0.5, rows - 0.5], reverse: true, nice: false },
    axis: null,
  };
  const scale = axis.domain ? { domain: axis.domain, nice: false } : { zero: true, nice: false, padding: 8 };
  const x = {
    type: 'quantitative',
    scale,
    axis: { title: axis.title, tickCount: narrow ? 4 : 5, grid: false, ticks: true, domain: true },
  };
  return {
    width: plot,
    height: rows * step,
    padding: { left: narrow ? 6 : LABEL, right: narrow ? 6 : NUMBERS, top: 2, bottom: AXIS },
    autosize: { type: 'none' },
    layer: [...marks(x, y, narrow ? 18 : 0), ...texts(y, { narrow, plot })],
  } as unknown as Settings;
}

type Channel = Readonly<Record<string, unknown>>;

function marks(x: Channel, y: Channel, yOffset: number): Channel[] {
  const test = 'datum.planned';
  const hold = (otherwise: string) => ({ condition: { test, value: 'var(--hold)' }, value: otherwise });
  return [
    {
      data: { values: [{ zero: 0 }] },
      mark: { type: 'rule', strokeDash: [3, 3] },
      encoding: { x: { ...x, field: 'zero' }, color: { value: 'var(--soft)' } },
    },
    {
      data: { name: 'rows' },
      transform: [{ filter: 'datum.low !== null' }],
      mark: { type: 'rule', yOffset },
      encoding: {
        y,
        x: { ...x, field: 'low' },
        x2: { field: 'high' },
        color: hold('var(--soft)'),
        strokeWidth: { condition: { test, value: 3 }, value: 2 },
      },
    },
    {
      data: { name: 'rows' },
      transform: [{ filter: 'isValid(datum.estimate)' }],
      mark: { type: 'point', filled: true, opacity: 1, yOffset },
      encoding: {
        y,
        x: { ...x, field: 'estimate' },
        shape: { condition: { test, value: 'square' }, value: 'circle' },
        size: { condition: { test, value: 130 }, value: 62 },
        fill: hold('var(--paper)'),
        stroke: hold('var(--ink)'),
        strokeWidth: { value: 1.6 },
      },
    },
  ];
}

/** Row labels, estimates and p: beside the plot, or above each row on a narrow page. */
function texts(y: Channel, { narrow, plot }: { narrow: boolean; plot: number }): Channel[] {
  const text = (field: string, px: number, align: string, dy: number) =>
    [false, true].map((planned) => ({
      data: { name: 'rows' },
      transform: [{ filter: planned ? 'datum.planned' : '!datum.planned' }],
      mark: {
        type: 'text',
        align,
        baseline: 'middle',
        fontSize: narrow ? 12 : 12.5,
        dy,
        ...(planned ? { fontWeight: 'bold' } : {}),
      },
      encoding: {
        y,
        x: { value: px },
        text: { field, type: 'nominal' },
        color: { value: planned ? 'var(--hold)' : 'var(--ink)' },
      },
    }));
  if (narrow) return [...text('label', 0, 'left', -18), ...text('numbers', 0, 'left', 0)];
  return [
    ...text('label', -LABEL, 'left', 0),
    ...text('text', plot + NUMBERS - P - 8, 'right', 0),
    ...text('p', plot + NUMBERS, 'right', 0),
  ];
}
