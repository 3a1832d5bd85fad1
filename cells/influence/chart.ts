import type { Influence } from '../../src/analysis/influence.ts';
import type { Settings, ViewContext } from '../kind.ts';

/** One estimate without one participant, in order of size; no name is drawn. */
export function influenceRows(value: Influence) {
  const drawn = value.single.filter((each) => each.estimate !== null);
  const dots = drawn
    .map((each) => ({
      estimate: each.estimate as number,
      claim: each.verdict !== null && each.verdict !== value.verdict ? `claim ${each.verdict}` : 'same verdict',
    }))
    .sort((a, b) => a.estimate - b.estimate)
    .map((each, place) => ({ ...each, place }));
  return { dots, full: value.full.estimate === null ? [] : [{ estimate: value.full.estimate }] };
}

/** Vega-Lite: estimates without each participant as dots, the estimate with everyone as a line. */
export function influenceChart(value: Influence, context: ViewContext): Settings {
  const unit = value.full.unit === '' ? '' : ` (${value.full.unit})`;
  const x = {
    field: 'estimate',
    type: 'quantitative',
    scale: { zero: false, nice: false, padding: 10 },
    axis: { title: `${value.full.label} without one participant${unit}`, tickCount: 6, grid: false },
  };
  const y = { field: 'place', type: 'quantitative', axis: null, scale: { zero: true, nice: false, padding: 6 } };
  const verdicts = ['same verdict', 'claim supported', 'claim undecided', 'claim contradicted'];
  const verdict = { field: 'claim', type: 'nominal', legend: null };
  const spec = {
    width: Math.max(160, context.width - 20),
    height: Math.min(180, Math.max(64, 5 * value.single.length)),
    layer: [
      {
        data: { name: 'full' },
        mark: { type: 'rule', strokeWidth: 2 },
        encoding: { x, color: { value: 'var(--hold)' } },
      },
      {
        data: { name: 'dots' },
        mark: { type: 'point', filled: true, size: 30, opacity: 0.8 },
        encoding: {
          x,
          y,
          color: {
            ...verdict,
            scale: { domain: verdicts, range: ['var(--ink)', 'var(--hold)', 'var(--loose)', 'var(--aside)'] },
          },
          shape: { ...verdict, scale: { domain: verdicts, range: ['circle', 'square', 'diamond', 'triangle-up'] } },
        },
      },
    ],
  };
  return spec as unknown as Settings;
}
