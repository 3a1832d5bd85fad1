import { html, type TemplateResult } from 'lit';
import type { Sweep } from '../../src/analysis/sweep.ts';
import './walk.ts';
import type { GridSpecification } from '../../src/analysis/grid.ts';
import type { Computed, ViewContext } from '../kind.ts';
import { count, fixed, limits } from '../numbers.ts';
import { sayJoint } from '../run-joint.ts';
import { pictureOf } from './chart.ts';
import type { JointSweep, SensitivityDetail } from './kind.ts';
import { ribbonRows, ribbonSpec, sayRibbon } from './ribbon-chart.ts';
import type { SensitivitySettings } from './sentence.ts';
import type { WalkRow } from './walk.ts';
import { decimalsOf, sayAnalysis, sayCounts, saySpread } from './words.ts';

/** Counts and joint p, the picture with its list, and the ribbons along trim and cutoff. */
export function sensitivityView(
  { value, detail }: Computed<Sweep, SensitivityDetail>,
  context: ViewContext,
): TemplateResult {
  const sweep = value as JointSweep;
  const picture = pictureOf(sweep, detail.axes, context.width);
  const { statistic } = context.settings as unknown as SensitivitySettings;
  const { result } = detail.claim;
  const rows = picture.order.map((place) => rowOf(sweep.specifications[place] as GridSpecification, detail));
  const spread = saySpread(detail, sweep.unit);
  const ribbonWidth = context.width < 624 ? context.width : Math.floor((context.width - 24) / 2);
  return html`<div class="tally">
      <div><b class="supported">${count(sweep.supported)} of ${count(sweep.specifications.length)}</b>support the claim</div>
      <div><b class="undecided">${count(sweep.undecided)}</b>leave it undecided</div>
      <div><b class="contradicted">${count(sweep.contradicted)}</b>contradict it</div>
    </div>
    <p data-part="joint">${sayJoint(sweep.joint, detail.reason, statistic)}${spread === '' ? '' : `; ${spread}`}.</p>
    ${
      rows.length === 0
        ? html`<p class="quiet">No analysis of the grid is in the outcome’s unit.</p>`
        : html`<sf-sensitivity-walk
              id=${`walk-${context.cellId}`}
              .picture=${picture}
              .rows=${rows}
              label=${`Every analysis sorted by its estimate, above the choices that lead to it: ${sayCounts(sweep)}.`}
            ></sf-sensitivity-walk>
            <p class="quiet">
              Square: as the worksheet stands. Triangle: nobody set aside for being extreme. Green supports the claim,
              ochre leaves it undecided, purple contradicts it.
            </p>`
    }
    <div class="ribbons">
      ${detail.ribbons.map(
        (ribbon) => html`<div>
          <sf-chart
            .spec=${ribbonSpec(ribbon, ribbonWidth, sweep.unit, result.comparison.alpha)}
            .data=${ribbonRows(ribbon)}
            label=${sayRibbon(ribbon, sweep.unit)}
            name=${`along-${ribbon.along}`}
          ></sf-chart>
          <p class="quiet">${sayRibbon(ribbon, sweep.unit)}</p>
        </div>`,
      )}
    </div>`;
}

function rowOf(specification: GridSpecification, { claim }: SensitivityDetail): WalkRow {
  const { finding, rules, score, ruleLabel, planned } = specification;
  const write = (value: number) => fixed(value, decimalsOf(specification));
  const unit = finding.unit === '' ? '' : ` ${finding.unit}`;
  const interval = finding.interval === null ? '' : ` ${limits(finding.interval, write)}`;
  return {
    line: `${write(finding.estimate ?? 0)}${unit}${interval} \u00b7 ${finding.label} \u00b7 ${ruleLabel}`,
    sentence: sayAnalysis(specification, claim.result),
    own: planned,
    adopted: { rules, trim: finding.trim, estimator: finding.estimator, score },
  };
}
