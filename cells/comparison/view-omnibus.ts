import { html, type TemplateResult } from 'lit';
import type { Result } from '../../src/analysis/compare.ts';
import type { ViewContext } from '../kind.ts';
import { levelPercent, pValue } from '../numbers.ts';
import { levelChart, levelRows, pairChart, pairRows } from './chart-levels.ts';
import { statisticText } from './words.ts';
import { sayOmnibus, shareText } from './words-omnibus.ts';

/** Each level on one axis, below it every row as a line, then all pairs where they were asked for. */
export function omnibusView(result: Result, context: ViewContext): TemplateResult {
  const { pairs } = result;
  return html`
    <sf-chart
      .spec=${levelChart(result, context)}
      .data=${{ rows: levelRows(result), ghost: [] }}
      label=${`Each level by itself with its interval. ${sayOmnibus(result)}`}
      name="levels"
    ></sf-chart>
    <div class="others">
      <p class="quiet">${result.comparison.first}: what each row says</p>
      <dl>
        ${result.findings.map((finding, index) => {
          const planned = index === result.planned;
          const share = shareText(finding);
          return html`<div class=${planned ? 'planned' : ''}>
            <dt>${planned ? html`<span aria-hidden="true">\u25a0 </span>` : null}${finding.label}${planned ? ' (planned)' : ''}</dt>
            <dd>${statisticText(finding) || (finding.reason ?? 'not given')}</dd>
            <dd>${finding.p === null ? '' : pValue(finding.p)}</dd>
            ${share === '' ? null : html`<dd class="size">${share}</dd>`}
          </div>`;
        })}
      </dl>
    </div>
    ${
      pairs
        ? html`<p class="quiet">
              all pairs by ${pairs.label}: ${levelPercent(pairs.level)} intervals and p that hold for all of them together${
                pairs.reason === undefined ? '' : ` (${pairs.reason})`
              }
            </p>
            <sf-chart
              .spec=${pairChart(result, context)}
              .data=${{ rows: pairRows(result), ghost: [] }}
              label=${`All pairs by ${pairs.label}, first minus second, with their simultaneous intervals`}
              name="pairs"
            ></sf-chart>`
        : null
    }
  `;
}
