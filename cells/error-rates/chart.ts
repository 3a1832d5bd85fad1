import { type Rates, rateOf } from '../../src/analysis/error-rates.ts';
import type { Settings, ViewContext } from '../kind.ts';
import { rateName, rowLabel } from './words.ts';

const CLEANINGS = ['', 'nobody set aside', 'set aside across conditions', 'set aside within conditions'];

/** One rate with its interval. */
export function rateRows(value: Rates) {
  return {
    rates: value.rows.flatMap((row, order) => {
      const rate = rateOf(row.rejected, row.judged);
      if (rate === null) return [];
      return [
        {
          order,
          label: rowLabel(row),
          method: row.label,
          cleaning: row.cleaning,
          rate: rate.rate,
          low: rate.low,
          high: rate.high,
        },
      ];
    }),
    nominal: value.difference === 0 ? [{ rate: value.alpha }] : [],
  };
}

/** Vega-Lite: every rate with its Monte Carlo interval; the nominal level as a line; what was set aside by shape and colour. */
export function rateChart(value: Rates, context: ViewContext): Settings {
  const narrow = context.width < 560;
  const cleaned = value.rows.some((row) => row.cleaning !== '');
  const methods = [...new Set(value.rows.map((row) => row.label))];
  const perMethod = new Set(value.rows.map((row) => row.cleaning)).size;
  const x = {
    type: 'quantitative',
    scale: { zero: true, nice: true },
    axis: { title: rateName(value), tickCount: narrow ? 4 : 6, grid: false },
  };
  const y = {
    field: 'method',
    type: 'nominal',
    scale: { domain: methods },
    axis: { title: null, domain: false, ticks: false, labelLimit: narrow ? 130 : 300, labelPadding: 8 },
  };
  const offset = cleaned
    ? { yOffset: { field: 'cleaning', type: 'nominal', scale: { domain: CLEANINGS.slice(1) } } }
    : {};
  const range = ['var(--ink)', 'var(--ink)', 'var(--hold)', 'var(--aside)'];
  const by = { field: 'cleaning', type: 'nominal', legend: null };
  const colour = { ...by, scale: { domain: CLEANINGS, range } };
  const spec = {
    width: Math.max(120, context.width - (narrow ? 150 : 320)),
    height: methods.length * (perMethod > 1 ? 34 : 24),
    layer: [
      {
        data: { name: 'nominal' },
        mark: { type: 'rule', strokeDash: [3, 3] },
        encoding: { x: { ...x, field: 'rate' }, color: { value: 'var(--soft)' } },
      },
      {
        data: { name: 'rates' },
        mark: { type: 'rule', strokeWidth: 1.6 },
        encoding: { x: { ...x, field: 'low' }, x2: { field: 'high' }, y, ...offset, color: colour },
      },
      {
        data: { name: 'rates' },
        mark: { type: 'point', filled: true, size: 34, opacity: 1 },
        encoding: {
          x: { ...x, field: 'rate' },
          y,
          ...offset,
          color: colour,
          shape: { ...by, scale: { domain: CLEANINGS, range: ['circle', 'circle', 'square', 'triangle-up'] } },
        },
      },
    ],
  };
  return spec as unknown as Settings;
}
