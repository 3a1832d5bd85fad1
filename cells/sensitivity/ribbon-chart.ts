import type { Ribbon, RibbonPoint } from '../../src/analysis/grid-ribbons.ts';
import type { Settings } from '../kind.ts';
import { fixed, pValue } from '../numbers.ts';

const HEIGHT = 120;
const P_HEIGHT = 44;
/** Room for the axis: its title, its labels and its ticks. */
const LEFT = 84;

/** Rows of a ribbon; without a cutoff it stands apart on the right. */
export function ribbonRows({ along, points, now }: Ribbon) {
  const numbered = points.filter((point) => point.at !== null);
  const last = numbered.at(-1)?.at ?? 0;
  const placed = points.map((point) => ({
    ...point,
    x: point.at ?? last + (along === 'cutoff' ? 0.5 : 1),
    none: point.at === null,
    now: point.at === now,
  }));
  return { band: placed.filter((point) => !point.none), points: placed.filter((point) => point.none || point.now) };
}

type Channel = Readonly<Record<string, unknown>>;

/** Estimate with its interval along one number, and p below on its own scale. */
export function ribbonSpec({ along, points }: Ribbon, width: number, unit: string, alpha: number): Settings {
  const trim = along === 'trim';
  const domain = trim ? [0, 25] : [1.4, 4.7];
  const values = trim ? [0, 5, 10, 15, 20, 25] : [1.5, 2, 2.5, 3, 3.5, 4, 4.5];
  const labelExpr = trim ? 'datum.label + " %"' : 'datum.value === 4.5 ? "none" : datum.label';
  const axis = { values, labelExpr, title: trim ? 'trim at each end' : 'cutoff', grid: false };
  const x = { field: 'x', type: 'quantitative', scale: { domain, nice: false }, axis: null };
  const place = { bounds: 'flush', width: Math.max(120, width - LEFT - 8) };
  const most = Math.max(2 * alpha, ...points.flatMap((point) => point.p ?? []));
  const spec = {
    padding: { left: 4, right: 8, top: 4, bottom: 4 },
    spacing: 8,
    vconcat: [
      { ...place, height: HEIGHT, layer: estimateLayers(x, unit) },
      { ...place, height: P_HEIGHT, layer: pLayers({ ...x, axis }, alpha, Math.min(1, 1.15 * most)) },
    ],
  };
  return spec as unknown as Settings;
}

function drawn(name: string, mark: Channel, encoding: Channel, colour: string): Channel {
  return { data: { name }, mark, encoding: { ...encoding, color: { value: colour } } };
}

function level(value: number, mark: string, y: Channel): Channel {
  const line = drawn('', { type: 'rule', strokeDash: [3, 3] }, { y: { ...y, field: mark } }, 'var(--soft)');
  return { ...line, data: { values: [{ [mark]: value }] } };
}

function estimateLayers(x: Channel, unit: string): Channel[] {
  const y = { type: 'quantitative', scale: { zero: true, nice: false, padding: 6 } };
  const axis = { title: unit === '' ? 'estimate' : `estimate (${unit})`, tickCount: 4, grid: false };
  const limits = { x, y: { ...y, field: 'low' }, y2: { field: 'high' } };
  const estimate = { x, y: { ...y, field: 'estimate' } };
  const none = drawn('points', { type: 'rule', strokeWidth: 2 }, limits, 'var(--hold)');
  const shape = { condition: { test: 'datum.now', value: 'square' }, value: 'triangle-up' };
  return [
    level(0, 'zero', { ...y, axis }),
    drawn('band', { type: 'area', opacity: 0.18 }, limits, 'var(--hold)'),
    drawn('band', { type: 'line', strokeWidth: 1.8 }, estimate, 'var(--ink)'),
    { ...none, transform: [{ filter: 'datum.none' }] },
    drawn(
      'points',
      { type: 'point', filled: true, opacity: 1 },
      { ...estimate, shape, size: { value: 72 } },
      'var(--ink)',
    ),
  ];
}

function pLayers(x: Channel, alpha: number, most: number): Channel[] {
  const p = { type: 'quantitative', scale: { domain: [0, most], nice: false } };
  const labelExpr = `datum.value === 0 ? "0" : "${String(alpha).replace(/^0/, '')}"`;
  const axis = { title: 'p', values: [0, alpha], labelExpr, grid: false };
  const at = { x, y: { ...p, field: 'p' } };
  return [
    level(alpha, 'p', { ...p, axis }),
    drawn('band', { type: 'line', strokeWidth: 1.4 }, at, 'var(--ink)'),
    drawn('points', { type: 'point', filled: true, size: 36, opacity: 1 }, at, 'var(--ink)'),
  ];
}

/** "Along the trim from 0 to 25 %: estimates from -96 to -80 ms, p from < .001 to .019." */
export function sayRibbon({ along, what, points }: Ribbon, unit: string): string {
  const given = points.filter((point): point is RibbonPoint & { estimate: number } => point.estimate !== null);
  if (given.length === 0) return `Along the ${along}: no estimate.`;
  const estimates = given.map((point) => point.estimate);
  const ps = given.flatMap((point) => (point.p === null ? [] : [point.p]));
  const decimals = Math.abs(Math.max(...estimates)) < 10 ? 2 : 0;
  const range = `${fixed(Math.min(...estimates), decimals)} to ${fixed(Math.max(...estimates), decimals)}${unit === '' ? '' : ` ${unit}`}`;
  const p =
    ps.length === 0 ? '' : `, ${pValue(Math.min(...ps))} at the least and ${pValue(Math.max(...ps))} at the most`;
  const way = along === 'trim' ? 'trim from 0 to 25 % at each end' : 'cutoff from 1.5 to 4 and without one';
  return `Along the ${way} (${what}): estimates from ${range}${p}.`;
}
