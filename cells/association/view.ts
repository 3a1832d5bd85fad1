import { html, type TemplateResult } from 'lit';
import type { Association } from '../../src/analysis/association.ts';
import { leveragePairs } from '../../src/analysis/association-diagnostics.ts';
import type { Computed, ViewContext } from '../kind.ts';
import { lineEnds, pointsOf, rowChart, rowsOf, scatterChart } from './chart.ts';
import { sayAssociation } from './words.ts';

/** The scatter with its lines, then correlations on the axis from -1 to 1, then slopes in the outcome's unit. */
export function associationView({ value }: Computed<Association, null>, context: ViewContext): TemplateResult {
  const { x, y } = value.spec;
  const far = leveragePairs(value.diagnostics).length;
  const [correlations, slopes] = [rowsOf(value, 'correlations'), rowsOf(value, 'slopes')];
  return html`
    <sf-chart
      .spec=${scatterChart(value, context)}
      .data=${{ points: pointsOf(value), lines: lineEnds(value) }}
      label=${`Scatter of ${y} against ${x} with the least-squares and the Theil\u2013Sen line; ${far === 0 ? 'nobody lies' : far === 1 ? '1 participant lies' : `${far} participants lie`} far out on ${x}.`}
    ></sf-chart>
    <p class="quiet">
      Solid line: least squares. Dashed: Theil\u2013Sen.${far === 0 ? '' : ` Diamond: far out on ${x}, and able to carry the solid line.`}
    </p>
    <sf-chart
      .spec=${rowChart(correlations.length, context.width, { title: 'correlation', domain: [-1, 1] })}
      .data=${{ rows: correlations }}
      label=${`Correlations with intervals. ${sayAssociation(value)}`}
    ></sf-chart>
    <sf-chart
      .spec=${rowChart(slopes.length, context.width, { title: `slope (${y} per ${x})`, domain: null })}
      .data=${{ rows: slopes }}
      label=${`Slopes with intervals. ${slopes.map((row) => `${row.label}: ${row.text}`).join('; ')}.`}
    ></sf-chart>
  `;
}
