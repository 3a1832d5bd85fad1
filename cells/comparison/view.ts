import { html, type TemplateResult } from 'lit';
import type { Result } from '../../src/analysis/compare.ts';
import type { Computed, ViewContext } from '../kind.ts';
import { pValue } from '../numbers.ts';
import { comparisonChart, ghostRows, sameUnitRows } from './chart.ts';
import { omnibusView } from './view-omnibus.ts';
import { estimateText, sayFinding } from './words.ts';

/** Rows in the outcome's unit on one axis; other quantities below, each on its own scale. */
export function comparisonView({ value }: Computed<Result, null>, context: ViewContext): TemplateResult {
  if (value.scope === 'omnibus') return omnibusView(value, context);
  const rows = sameUnitRows(value).map((row) => ({
    ...row,
    estimate: Number.isNaN(row.estimate) ? null : row.estimate,
    numbers: [row.text, row.p].filter((each) => each !== '').join('  '),
  }));
  const others = value.findings.filter((finding) => !finding.sameUnit);
  const plannedElsewhere = value.findings[value.planned]?.sameUnit === false;
  return html`
    <sf-chart
      .spec=${comparisonChart(value, context)}
      .data=${{ rows, ghost: ghostRows(value, context) }}
      label=${`Estimates with intervals. ${sayFinding(value)}`}
      name="comparison"
    ></sf-chart>
    ${context.reference?.finding ? html`<p class="quiet">Broad grey line: the reference analysis (${context.reference.label}).</p>` : null}
    ${
      others.length === 0
        ? null
        : html`<div class="others">
            <p class="quiet">other quantities, each on its own scale</p>
            <dl>
              ${others.map((finding) => {
                const planned = plannedElsewhere && finding === value.findings[value.planned];
                return html`<div class=${planned ? 'planned' : ''}>
                  <dt>${finding.label}${planned ? ' (planned)' : ''}</dt>
                  <dd>${finding.estimate === null ? (finding.reason ?? 'not given') : estimateText(finding)}</dd>
                  <dd>${finding.p === null ? '' : pValue(finding.p)}</dd>
                </div>`;
              })}
            </dl>
          </div>`
    }
  `;
}
