import { html, type TemplateResult } from 'lit';
import type { Scores } from '../../src/analysis/score.ts';
import type { Computed, Settings, ViewContext } from '../kind.ts';

/** Most participants whose scores are drawn one by one. */
const MOST = 400;

/** Every participant's scores under each condition, joined by a line where they met several. */
export function scoreView({ value }: Computed<Scores, null>, context: ViewContext): TemplateResult {
  const rows = pointsOf(value);
  const { outcome } = value.design.roles;
  return html`<sf-chart
    .spec=${scoreChart(value, context)}
    .data=${{ rows: rows.slice(0, MOST * value.conditions.length) }}
    label=${`Scores on ${outcome} of ${value.participants.length} participants by condition`}
    name="scores"
  ></sf-chart>`;
}

function pointsOf(scores: Scores): { who: number; condition: string; group: string; score: number }[] {
  const width = scores.conditions.length;
  const [group] = scores.groups;
  return scores.participants.flatMap((_, who) =>
    scores.conditions.flatMap((condition, column) => {
      const score = scores.values[who * width + column] as number;
      const level = group?.levels[group.codes[who] as number] ?? '';
      return Number.isNaN(score) ? [] : [{ who, condition: condition.label, group: level, score }];
    }),
  );
}

function scoreChart(scores: Scores, context: ViewContext): Settings {
  const within = scores.conditions.length > 1;
  const { outcome, unit } = scores.design.roles;
  const field = within ? 'condition' : 'group';
  const levels = within ? scores.conditions.map((each) => each.label) : (scores.groups[0]?.levels ?? []);
  const x = {
    field: 'score',
    type: 'quantitative',
    scale: { zero: false, nice: true },
    axis: { title: `${outcome}${unit === '' ? '' : ` (${unit})`}`, tickCount: 6, grid: false },
  };
  const y = {
    field,
    type: 'nominal',
    scale: { domain: levels },
    axis: { title: null, domain: false, ticks: false, labelLimit: 150, labelPadding: 8 },
  };
  const line = {
    mark: { type: 'line', strokeWidth: 0.7, opacity: 0.28, orient: 'vertical' },
    encoding: {
      x,
      y,
      detail: { field: 'who', type: 'nominal' },
      order: { field: 'condition', type: 'nominal', sort: levels },
      color: { value: 'var(--ink)' },
    },
  };
  const points = {
    mark: { type: 'point', filled: true, size: 20, opacity: 0.55 },
    encoding: { x, y, color: { value: 'var(--ink)' } },
  };
  const middle = {
    mark: { type: 'tick', thickness: 2.5, size: 20 },
    encoding: { x: { ...x, aggregate: 'median' }, y, color: { value: 'var(--hold)' } },
  };
  const spec = {
    data: { name: 'rows' },
    width: Math.max(160, context.width - 130),
    height: Math.max(2, levels.length) * 34,
    layer: within ? [line, points, middle] : [points, middle],
  };
  return spec as unknown as Settings;
}
