import { html, type TemplateResult } from 'lit';
import type { Sweep } from '../../src/analysis/sweep.ts';
import type { Computed, ViewContext } from '../kind.ts';
import { stripChart, stripRows } from './chart.ts';
import { sayCounts } from './kind.ts';

/** The standing strip's picture. */
export function standingView({ value }: Computed<Sweep, null>, context: ViewContext): TemplateResult {
  return html`<sf-chart
    .spec=${stripChart(context)}
    .data=${stripRows(value, context)}
    label=${`Every analysis of the grid, sorted within its quantity: ${sayCounts(value)}.`}
    name="standing-strip"
  ></sf-chart>`;
}
