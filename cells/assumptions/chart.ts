import type { Checks } from '../../src/analysis/checks.ts';
import type { Settings } from '../kind.ts';
import { levelPercent } from '../numbers.ts';
import { quantityOf } from './words.ts';

type Channel = Readonly<Record<string, unknown>>;

/** Width and height of a figure with its axes, in px. */
export interface FigureSize {
  readonly width: number;
  readonly height: number;
}

/** Room for the axes and their titles. */
const LEFT = 52;
const RIGHT = 14;
const BOTTOM = 40;
const TOP = 30;

/** A figure of exactly this size, its title over the plot; a mark, since a title proper moves with the axis labels. */
function framed(title: string, { width, height }: FigureSize, layer: readonly Channel[], left = LEFT): Settings {
  const heading = {
    data: { values: [{ title }] },
    mark: { type: 'text', align: 'left', baseline: 'bottom', fontSize: 12.5, fontWeight: 600 },
    encoding: { x: { value: 4 - left }, y: { value: -10 }, text: { field: 'title' }, color: { value: 'var(--ink)' } },
  };
  return {
    width: Math.max(90, width - left - RIGHT),
    height: height - TOP - BOTTOM,
    padding: { left, right: RIGHT, top: TOP, bottom: BOTTOM },
    autosize: { type: 'none' },
    layer: [...layer, heading],
  } as unknown as Settings;
}

const axis = (field: string, title: string | null, more: Channel = {}): Channel => ({
  field,
  type: 'quantitative',
  scale: { zero: false, nice: true },
  axis: { title, tickCount: 5, grid: false },
  ...more,
});

/** Band, line and points that both plots against the normal curve share; what is outside is a diamond. */
function againstNormal(x: Channel, y: Channel, size: number): Channel[] {
  return [
    {
      data: { name: 'band' },
      mark: { type: 'area', opacity: 0.55, line: { strokeWidth: 0.8, color: 'var(--axis)' } },
      encoding: { x, y: { ...y, field: 'low' }, y2: { field: 'high' }, color: { value: 'var(--rule)' } },
    },
    {
      data: { name: 'band' },
      mark: { type: 'line', strokeWidth: 0.8 },
      encoding: { x, y: { ...y, field: 'high' }, color: { value: 'var(--axis)' } },
    },
    {
      data: { name: 'line' },
      mark: { type: 'line', strokeWidth: 1, strokeDash: [4, 3] },
      encoding: { x, y: { ...y, field: 'y' }, color: { value: 'var(--soft)' } },
    },
    ...[false, true].map((out) => ({
      data: { name: 'points' },
      transform: [{ filter: out ? 'datum.out' : '!datum.out' }],
      mark: { type: 'point', filled: true, opacity: out ? 1 : 0.8, shape: out ? 'diamond' : 'circle' },
      encoding: {
        x,
        y: { ...y, field: 'y' },
        size: { value: out ? 2.6 * size : size },
        color: { value: out ? 'var(--aside)' : 'var(--ink)' },
      },
    })),
  ];
}

/** Vega-Lite: ordered residuals against where normal ones would lie, with the simultaneous band. */
export function quantileChart(checks: Checks, size: FigureSize): Settings {
  const x = axis('x', 'expected of a normal population (SD)');
  const y = axis('y', `${quantityOf(checks)} (SD)`);
  return framed('Quantiles, simultaneous 95 % band', size, againstNormal(x, y, 26));
}

/** Vega-Lite: shares under the fitted curve against shares of the sample. */
export function shareChart(size: FigureSize): Settings {
  const scale = { scale: { domain: [0, 1], nice: false } };
  const ticks = (title: string) => ({ axis: { title, values: [0, 0.5, 1], grid: false, format: '.1f' } });
  const x = axis('x', '', { ...scale, ...ticks('share of the sample below') });
  const y = axis('y', '', { ...scale, ...ticks('share of the curve below') });
  return framed('Shares, same band', size, againstNormal(x, y, 12));
}

/** Vega-Lite: counts, and the normal curve with the same mean and SD. */
export function histogramChart(checks: Checks, size: FigureSize): Settings {
  const { layout } = checks;
  const unit = layout.unit === '' ? '' : ` (${layout.unit})`;
  const x = axis('from', `${quantityOf(checks)}${unit}`, { scale: { zero: false, nice: false, padding: 4 } });
  const y = axis('count', 'how many', {
    scale: { zero: true },
    axis: { title: 'how many', tickCount: 4, tickMinStep: 1 },
  });
  return framed('Histogram, fitted normal curve', size, [
    {
      data: { name: 'bins' },
      mark: { type: 'rect', stroke: 'var(--paper)', strokeWidth: 1 },
      encoding: {
        x,
        x2: { field: 'to' },
        y,
        y2: { datum: 0 },
        color: { value: 'var(--axis)' },
      },
    },
    {
      data: { name: 'curve' },
      mark: { type: 'line', strokeWidth: 1.8 },
      encoding: { x: { ...x, field: 'x' }, y, color: { value: 'var(--hold)' } },
    },
  ]);
}

/** Room left of a plot whose rows are named. */
const namesOf = ({ width }: FigureSize): number => Math.min(160, Math.floor(width * 0.36));

const named = (field: string, order: readonly string[], room: number): Channel => ({
  field,
  type: 'nominal',
  scale: { domain: order },
  axis: { title: null, domain: false, ticks: false, labelLimit: room - 12, labelPadding: 6 },
});

/** Vega-Lite: distances from each group's own mean, a bar one SD to either side. */
export function groupChart(checks: Checks, size: FigureSize): Settings {
  const { layout, design } = checks;
  const unit = layout.unit === '' ? '' : ` (${layout.unit})`;
  const y = named('group', layout.groups, namesOf(size));
  const x = axis('off', `${design === 'groups' ? 'score' : 'difference'} less its group\u2019s mean${unit}`);
  const layer = [
    {
      data: { name: 'bars' },
      mark: { type: 'rule', strokeWidth: 9, opacity: 0.4 },
      encoding: { y, x: { ...x, field: 'low' }, x2: { field: 'high' }, color: { value: 'var(--axis)' } },
    },
    {
      data: { name: 'points' },
      mark: { type: 'point', filled: true, size: 20, opacity: 0.6 },
      encoding: { y, x, color: { value: 'var(--ink)' } },
    },
  ];
  return framed('Spread in each group; bar: 1 SD to either side', size, layer, namesOf(size));
}

/** Vega-Lite: differences at the level of each participant; the line is their mean. */
export function levelChart(checks: Checks, size: FigureSize): Settings {
  const { layout } = checks;
  const unit = layout.unit === '' ? '' : ` (${layout.unit})`;
  const y = axis('y', `difference${unit}`);
  return framed('Change against level', size, [
    {
      data: { name: 'middle' },
      mark: { type: 'rule', strokeWidth: 1.6 },
      encoding: { y, color: { value: 'var(--hold)' } },
    },
    {
      data: { name: 'points' },
      mark: { type: 'point', filled: true, size: 24, opacity: 0.75 },
      encoding: {
        x: axis('x', `the ${layout.noun}\u2019s mean of both levels${unit}`),
        y,
        color: { value: 'var(--ink)' },
      },
    },
  ]);
}

/** Vega-Lite: SDs of the differences between two levels, with their intervals; alike would be sphericity. */
export function pairChart(checks: Checks, pairs: readonly string[], size: FigureSize): Settings {
  const { layout } = checks;
  const unit = layout.unit === '' ? '' : ` (${layout.unit})`;
  const y = named('pair', pairs, namesOf(size));
  const x = axis('sd', `SD of the difference${unit}`, { scale: { zero: true, nice: true } });
  const layer = [
    {
      data: { name: 'pairs' },
      mark: { type: 'rule', strokeWidth: 2 },
      encoding: { y, x: { ...x, field: 'low' }, x2: { field: 'high' }, color: { value: 'var(--soft)' } },
    },
    {
      data: { name: 'pairs' },
      mark: { type: 'point', filled: true, size: 60 },
      encoding: { y, x, color: { value: 'var(--ink)' } },
    },
  ];
  return framed(
    `Spread of the differences, ${levelPercent(1 - checks.options.alpha)} intervals`,
    size,
    layer,
    namesOf(size),
  );
}

/** Vega-Lite: scores in the order of the file. */
export function orderChart(checks: Checks, size: FigureSize): Settings {
  const { layout } = checks;
  const unit = layout.unit === '' ? '' : ` (${layout.unit})`;
  return framed('Scores in the order of the file', size, [
    {
      data: { name: 'points' },
      mark: { type: 'point', filled: true, size: 20, opacity: 0.75 },
      encoding: {
        x: axis('x', `place of the ${layout.noun}`),
        y: axis('y', `${layout.outcome}${unit}`),
        color: { value: 'var(--ink)' },
      },
    },
  ]);
}
