import { html, nothing, type TemplateResult } from 'lit';
import type { Rates } from '../../src/analysis/error-rates.ts';
import type { Computed, ViewContext } from '../kind.ts';
import { alphaText } from '../numbers.ts';
import { rateChart, rateRows } from './chart.ts';
import { sayRates } from './words.ts';

/** Every rate on one axis, the nominal level as a line. */
export function ratesView({ value }: Computed<Rates, null>, context: ViewContext): TemplateResult {
  const cleaned = value.rows.some((row) => row.cleaning !== '' && row.cleaning !== 'nobody set aside');
  return html`<p>${sayRates(value)}</p>
    <sf-chart
      .spec=${rateChart(value, context)}
      .data=${rateRows(value)}
      label=${sayRates(value)}
      name="error-rates"
    ></sf-chart>
    <p class="quiet">
      ${value.difference === 0 ? `Dashed line: ${alphaText(value.alpha)}. ` : nothing}Lines: what the number of runs leaves
      open.${cleaned ? ' Circles: nobody set aside; squares: set aside across conditions; triangles: within them.' : ''}
    </p>`;
}
