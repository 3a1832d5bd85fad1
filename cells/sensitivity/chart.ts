import type { GridSpecification, GridSweep } from '../../src/analysis/grid.ts';
import type { AxisName, GridAxis } from '../../src/analysis/grid-options.ts';
import type { Settings } from '../kind.ts';
import { decimalsFor, fixed } from '../numbers.ts';
import { AXIS_WORDS } from './words.ts';

/** Heights in px: the estimates, one option of the matrix, the name of a choice, room between the two. */
const PLOT = 190;
const OPTION = 17;
const HEAD = 19;
const GAP = 12;
/** Width of the words on the left, on wide and narrow pages. */
const WORDS = 204;
const NARROW_WORDS = 122;
const NARROW = 560;

export interface Picture {
  readonly spec: Settings;
  readonly data: { readonly [name: string]: readonly object[] };
  /** Analyses from left to right, as places in the sweep. */
  readonly order: readonly number[];
  /** Where the first analysis begins, and how wide each is, in px. */
  readonly left: number;
  readonly step: number;
}

/** Analyses in the outcome's unit, by their estimates. */
export function drawnOrder(sweep: GridSweep): number[] {
  const estimate = (place: number) => sweep.specifications[place]?.finding.estimate ?? 0;
  return sweep.specifications
    .flatMap(({ finding }, place) => (finding.sameUnit && finding.estimate !== null ? [place] : []))
    .sort((a, b) => estimate(a) - estimate(b) || a - b);
}

/** Sorted estimates with intervals over the matrix of the choices that lead to each. */
export function pictureOf(sweep: GridSweep, axes: readonly GridAxis[], width: number): Picture {
  const order = drawnOrder(sweep);
  const left = width < NARROW ? NARROW_WORDS : WORDS;
  const plot = Math.max(120, width - left - 8);
  const step = plot / Math.max(1, order.length);
  const specifications = order.map((place) => sweep.specifications[place] as GridSpecification);
  const scale = scaleOf(specifications);
  const matrix = matrixOf(specifications, axes, width < NARROW);
  return {
    spec: pictureSpec({ plot, left, height: PLOT + GAP + matrix.height, count: order.length, step, unit: sweep.unit }),
    data: {
      lines: specifications.map((each, x) => lineOf(each, x, scale.y)),
      ticks: scale.ticks,
      cells: matrix.cells,
      words: matrix.words,
    },
    order,
    left,
    step,
  };
}

function lineOf({ finding, verdict, planned, everyoneIn }: GridSpecification, x: number, y: (value: number) => number) {
  const [low, high] = finding.interval ?? [null, null];
  return {
    x,
    y: y(finding.estimate as number),
    // A one-sided interval runs to the edge.
    low: finding.interval === null ? null : low === null ? PLOT : y(low),
    high: finding.interval === null ? null : high === null ? 0 : y(high),
    verdict: verdict ?? 'not judged',
    mark: planned ? 'own' : everyoneIn ? 'everyone' : 'other',
  };
}

/** Pixels of the estimates, and ticks at round numbers. */
function scaleOf(specifications: readonly GridSpecification[]) {
  const numbers = specifications
    .flatMap(({ finding }) => [finding.estimate, ...(finding.interval ?? [])])
    .filter((each): each is number => each !== null);
  const least = Math.min(0, ...numbers);
  const most = Math.max(0, ...numbers);
  const span = most - least || 1;
  const y = (value: number) => 8 + ((most - value) / span) * (PLOT - 16);
  const size = 10 ** Math.floor(Math.log10(span / 3));
  const by = size * ([1, 2, 5].find((each) => span / (each * size) <= 5) ?? 10);
  const ticks: { y: number; label: string; zero: boolean }[] = [];
  for (let k = Math.ceil(least / by); k <= Math.floor(most / by); k++) {
    const decimals = by >= 1 ? 0 : decimalsFor(by * 10);
    ticks.push({ y: y(k * by), label: fixed(k * by, decimals), zero: k === 0 });
  }
  return { y, ticks };
}

/** One line an option; a mark where an analysis has it. Choices with one option say nothing and are left out. */
function matrixOf(specifications: readonly GridSpecification[], axes: readonly GridAxis[], narrow: boolean) {
  const words: { y: number; label: string; head: boolean }[] = [];
  const cells: { x: number; y: number; mark: string }[] = [];
  let y = PLOT + GAP;
  for (const { axis, options } of axes) {
    const shown = optionsShown(axis, options, specifications);
    if (shown.length < 2) continue;
    words.push({ y: y + HEAD / 2, label: AXIS_WORDS[axis], head: true });
    y += HEAD;
    for (const { value, label } of shown) {
      words.push({ y: y + OPTION / 2, label: clipped(label, narrow ? 15 : 28), head: false });
      specifications.forEach((each, x) => {
        if (each.options[axis].includes(value))
          cells.push({ x, y: y + OPTION / 2, mark: each.planned ? 'own' : 'other' });
      });
      y += OPTION;
    }
  }
  return { words, cells, height: y - PLOT - GAP };
}

/** The options some analysis has, in the order offered; the worksheet's own value last where it is not among them. */
function optionsShown(axis: AxisName, options: GridAxis['options'], specifications: readonly GridSpecification[]) {
  const used = new Set(specifications.flatMap((each) => each.options[axis]));
  const known = options.filter((option) => used.has(option.value)).map(({ value, label }) => ({ value, label }));
  const others = [...used].filter((value) => !options.some((option) => option.value === value));
  return [...known, ...others.map((value) => ({ value, label: axis === 'trim' ? `${value} %` : value }))];
}

function clipped(label: string, most: number): string {
  return label.length <= most ? label : `${label.slice(0, most - 1)}\u2026`;
}

interface Frame {
  readonly plot: number;
  readonly left: number;
  readonly height: number;
  readonly count: number;
  readonly step: number;
  readonly unit: string;
}

type Channel = Readonly<Record<string, unknown>>;

function pictureSpec(frame: Frame): Settings {
  const { plot, left, height, count } = frame;
  const x = { field: 'x', type: 'quantitative', scale: { domain: [-0.5, Math.max(0.5, count - 0.5)] }, axis: null };
  const y = { field: 'y', type: 'quantitative', scale: { domain: [0, height], reverse: true }, axis: null };
  const spec = {
    width: plot,
    height,
    padding: { left, right: 8, top: 6, bottom: 4 },
    autosize: { type: 'none' },
    layer: [
      {
        data: { name: 'active' },
        mark: { type: 'rule', strokeWidth: Math.max(4, frame.step), opacity: 0.16 },
        encoding: { x, color: { value: 'var(--ink)' } },
      },
      ...scaleLayers(y, frame),
      ...estimateLayers(x, y, frame),
      ...matrixLayers(x, y, frame),
    ],
  };
  return spec as unknown as Settings;
}

/** Words at a place of the margin; `at` counts from where the first analysis begins. */
function words(
  name: string,
  y: Channel,
  at: number,
  style: { align: string; fontSize: number; colour: string },
): Channel {
  return {
    data: { name },
    mark: { type: 'text', baseline: 'middle', align: style.align, fontSize: style.fontSize },
    encoding: { y, x: { value: at }, text: { field: 'label', type: 'nominal' }, color: { value: style.colour } },
  };
}

/** The line of no difference, round numbers, and the unit. */
function scaleLayers(y: Channel, { left, unit }: Frame): Channel[] {
  const right = { align: 'right', fontSize: 11.5, colour: 'var(--soft)' };
  return [
    {
      data: { name: 'ticks' },
      mark: { type: 'rule', strokeDash: [3, 3] },
      transform: [{ filter: 'datum.zero' }],
      encoding: { y, color: { value: 'var(--soft)' } },
    },
    words('ticks', y, -8, right),
    {
      ...words('unit', y, 4 - left, { ...right, align: 'left', fontSize: 12 }),
      data: { values: [{ label: unit, y: 8 }] },
    },
  ];
}

/** Intervals in the colour of their verdict, estimates by shape. */
function estimateLayers(x: Channel, y: Channel, { step }: Frame): Channel[] {
  const thin = Math.max(0.8, Math.min(3, step * 0.45));
  const dot = Math.max(5, Math.min(46, step * step * 0.5));
  const verdicts = ['supported', 'undecided', 'contradicted', 'not judged'];
  const range = ['var(--hold)', 'var(--loose)', 'var(--aside)', 'var(--soft)'];
  const colour = { field: 'verdict', type: 'nominal', legend: null, scale: { domain: verdicts, range } };
  const shapes = { domain: ['own', 'everyone', 'other'], range: ['square', 'triangle-up', 'circle'] };
  return [
    {
      data: { name: 'lines' },
      transform: [{ filter: 'datum.low !== null' }],
      mark: { type: 'rule', strokeWidth: thin, opacity: 0.8 },
      encoding: { x, y: { ...y, field: 'low' }, y2: { field: 'high' }, color: colour },
    },
    {
      data: { name: 'lines' },
      mark: { type: 'point', filled: true, opacity: 1 },
      encoding: {
        x,
        y,
        shape: { field: 'mark', type: 'nominal', legend: null, scale: shapes },
        size: { condition: { test: 'datum.mark === "other"', value: dot }, value: Math.max(60, dot * 1.6) },
        color: { value: 'var(--ink)' },
      },
    },
  ];
}

/** A mark for each option an analysis has, and the names of options and choices. */
function matrixLayers(x: Channel, y: Channel, { step, left }: Frame): Channel[] {
  const heads = words('words', y, 4 - left, { align: 'left', fontSize: 12, colour: 'var(--soft)' });
  const options = words('words', y, -8, { align: 'right', fontSize: 12, colour: 'var(--ink)' });
  return [
    {
      data: { name: 'cells' },
      mark: { type: 'point', shape: 'square', filled: true, opacity: 1 },
      encoding: {
        x,
        y,
        size: { value: Math.max(5, Math.min(64, step * step * 0.55)) },
        color: { condition: { test: 'datum.mark === "own"', value: 'var(--hold)' }, value: 'var(--soft)' },
      },
    },
    { ...options, transform: [{ filter: '!datum.head' }] },
    { ...heads, transform: [{ filter: 'datum.head' }] },
  ];
}
