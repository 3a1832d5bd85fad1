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

/** Estimate with its interval along one number, and p below on its own scale. */
export function ribbonSpec({ along, points }: Ribbon, width: number, unit: string, alpha: number): Settings {
  const trim = along === 'trim';
  const domain = trim ? [0, 25] : [1.4, 4.7];
  const values = trim ? [0, 5, 10, 15, 20, 25] : [1.5, 2, 2.5, 3, 3.5, 4, 4.5];
  const labelExpr = trim ? 'datum.label + " %"' : 'datum.value === 4.5 ? "none" : datum.label';
  const scale = { domain, nice: false };
  const axis = { values, labelExpr, title: trim ? 'trim at each end' : 'cutoff', grid: false };
  const x = { field: 'x', type: 'quantitative', scale, axis: null };
  const y = { type: 'quantitative', scale: { zero: true, nice: false, padding: 6 } };
  const yAxis = { title: unit === '' ? 'estimate' : `estimate (${unit})`, tickCount: 4, grid: false };
  const place = { bounds: 'flush', width: Math.max(120, width - LEFT - 8) };
  const upper = {
    ...place,
    height: HEIGHT,
    layer: [
      {
        data: { values: [{ zero: 0 }] },
        mark: { type: 'rule', strokeDash: [3, 3] },
        encoding: { y: { ...y, field: 'zero', axis: yAxis }, color: { value: 'var(--soft)' } },
      },
      {
        data: { name: 'band' },
        mark: { type: 'area', opacity: 0.18 },
        encoding: { x, y: { ...y, field: 'low' }, y2: { field: 'high' }, color: { value: 'var(--hold)' } },
      },
      {
        data: { name: 'band' },
        mark: { type: 'line', strokeWidth: 1.8 },
        encoding: { x, y: { ...y, field: 'estimate' }, color: { value: 'var(--ink)' } },
      },
      {
        data: { name: 'points' },
        transform: [{ filter: 'datum.none' }],
        mark: { type: 'rule', strokeWidth: 2 },
        encoding: { x, y: { ...y, field: 'low' }, y2: { field: 'high' }, color: { value: 'var(--hold)' } },
      },
      {
        data: { name: 'points' },
        mark: { type: 'point', filled: true, opacity: 1 },
        encoding: {
          x,
          y: { ...y, field: 'estimate' },
          shape: { condition: { test: 'datum.now', value: 'square' }, value: 'triangle-up' },
          size: { value: 72 },
          color: { value: 'var(--ink)' },
        },
      },
    ],
  };
  const most = Math.max(2 * alpha, ...points.flatMap((point) => point.p ?? []));
  const p = { type: 'quantitative', scale: { domain: [0, Math.min(1, 1.15 * most)], nice: false } };
  const labels = `datum.value === 0 ? "0" : "${String(alpha).replace(/^0/, '')}"`;
  const pAxis = { title: 'p', values: [0, alpha], labelExpr: labels, grid: false };
  const lower = {
    ...place,
    height: P_HEIGHT,
    layer: [
      {
        data: { values: [{ p: alpha }] },
        mark: { type: 'rule', strokeDash: [3, 3] },
        encoding: { y: { ...p, field: 'p', axis: pAxis }, color: { value: 'var(--soft)' } },
      },
      {
        data: { name: 'band' },
        mark: { type: 'line', strokeWidth: 1.4 },
        encoding: { x: { ...x, axis }, y: { ...p, field: 'p' }, color: { value: 'var(--ink)' } },
      },
      {
        data: { name: 'points' },
        mark: { type: 'point', filled: true, size: 36, opacity: 1 },
        encoding: { x: { ...x, axis }, y: { ...p, field: 'p' }, color: { value: 'var(--ink)' } },
      },
    ],
  };
  const spec = { padding: { left: 4, right: 8, top: 4, bottom: 4 }, spacing: 8, vconcat: [upper, lower] };
  return spec as unknown as Settings;
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
