import { html, type TemplateResult } from 'lit';
import type { Checks } from '../../src/analysis/checks.ts';
import type { Computed, ViewContext } from '../kind.ts';
import { count } from '../numbers.ts';
import {
  type FigureSize,
  groupChart,
  histogramChart,
  levelChart,
  orderChart,
  pairChart,
  quantileChart,
  shareChart,
} from './chart.ts';
import { groupRows, histogramRows, levelPoints, orderPoints, pairRows, quantilePoints, sharePoints } from './points.ts';
import { NOT_CHOSEN, quantityAtLength, sentencesOf } from './words.ts';

/** Below this width figures stand under each other. */
const NARROW = 560;
const GAP = 16;
const HEIGHT = 270;
/** Height of a named row of a figure, and the room of its axis and title. */
const ROW = 24;
const FRAME = 66;

/** Pictures first, then the few sentences; nothing here is a verdict. */
export function assumptionsView({ value }: Computed<Checks, null>, context: ViewContext): TemplateResult {
  return html`
    <div style="display: flex; flex-wrap: wrap; gap: 10px ${GAP}px; margin-bottom: 10px">
      ${value.standard === null ? null : shapeFigures(value, context.width)} ${lastFigure(value, context.width)}
    </div>
    ${sentencesOf(value).map(
      ({ lead, text }) => html`<p style="margin: 0 0 6px" data-part="said"><b>${lead}.</b> ${text}</p>`,
    )}
    <p style="margin: 0 0 6px" data-part="said">${NOT_CHOSEN}</p>
  `;
}

/** Quantile plot large, histogram beside it, shares small. */
function shapeFigures(value: Checks, width: number): TemplateResult {
  const [wide, side, small] = widths(width);
  const quantiles = { width: wide, height: HEIGHT };
  const out = value.outside.length;
  return html`
    <sf-chart
      .spec=${quantileChart(value, quantiles)}
      .data=${quantilePoints(value)}
      label=${`Normal quantile plot of ${quantityAtLength(value)}: ${out === 0 ? 'no point' : `${count(out)} of ${count(value.shape.n)} points, drawn as diamonds,`} outside the simultaneous 95 % band.`}
      name="quantiles"
    ></sf-chart>
    <sf-chart
      .spec=${histogramChart(value, { width: side, height: HEIGHT })}
      .data=${histogramRows(value)}
      label=${`Histogram of ${quantityAtLength(value)} with the normal curve of the same mean and SD.`}
      name="histogram"
    ></sf-chart>
    <sf-chart
      .spec=${shareChart({ width: small, height: small > 240 ? 240 : 216 })}
      .data=${sharePoints(value)}
      label="The same points as shares below, with the same band."
      name="shares"
    ></sf-chart>
  `;
}

function lastFigure(value: Checks, width: number): TemplateResult {
  const own = width < NARROW ? width : width - widths(width)[2] - GAP;
  const { layout, design } = value;
  if (design === 'repeated') {
    const pairs = pairRows(value);
    return html`<sf-chart
      .spec=${pairChart(
        value,
        pairs.map(({ pair }) => pair),
        rowsSize(own, pairs.length),
      )}
      .data=${{ pairs }}
      label="SD of the differences between each two levels, with intervals."
      name="spreads"
    ></sf-chart>`;
  }
  if (layout.groups.length > 1) {
    return html`<sf-chart
      .spec=${groupChart(value, rowsSize(own, layout.groups.length))}
      .data=${groupRows(value)}
      label="Distances from each group's own mean, with a bar one SD to either side."
      name="spreads"
    ></sf-chart>`;
  }
  const size = { width: own, height: 216 };
  return design === 'differences'
    ? html`<sf-chart
        .spec=${levelChart(value, size)}
        .data=${levelPoints(value)}
        label="Each participant's difference against the participant's mean of both levels."
        name="change-against-level"
      ></sf-chart>`
    : html`<sf-chart
        .spec=${orderChart(value, size)}
        .data=${{ points: orderPoints(value) }}
        label="Scores in the order of the file."
        name="order"
      ></sf-chart>`;
}

function rowsSize(width: number, rows: number): FigureSize {
  return { width, height: Math.max(216, FRAME + ROW * rows) };
}

/** Widths of the quantile plot, the histogram and the small plot of shares. */
function widths(width: number): readonly [number, number, number] {
  if (width < NARROW) return [width, width, Math.min(width, 240)];
  const wide = Math.floor((width - GAP) * 0.54);
  return [wide, Math.floor(width - GAP - wide), 210];
}
