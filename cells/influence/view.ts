import { html, type TemplateResult } from 'lit';
import type { Influence } from '../../src/analysis/influence.ts';
import type { Computed, ViewContext } from '../kind.ts';
import { count } from '../numbers.ts';
import { influenceChart, influenceRows } from './chart.ts';
import { sayFlip, sayRemoval, saySingle } from './words.ts';

/** The size of the set, then what one participant can do; who they are stands in the folded tables. */
export function influenceView({ value }: Computed<Influence, null>, context: ViewContext): TemplateResult {
  const { removal, flip, n, setAside, changed, single } = value;
  const size =
    removal === null
      ? 'none found'
      : `${flip.exact ? '' : '\u2264 '}${count(removal.participants.length)} of ${count(n)}`;
  return html`<div class="tally">
      <div><b>${size}</b>would have to go</div>
      <div><b>${count(setAside)}</b>set aside by the rules</div>
      <div><b>${count(changed)} of ${count(single.length)}</b>change the verdict alone</div>
    </div>
    <p>${sayFlip(value)} ${sayRemoval(value)}</p>
    <sf-chart
      .spec=${influenceChart(value, context)}
      .data=${influenceRows(value)}
      label=${saySingle(value)}
      name="influence"
    ></sf-chart>
    <p class="quiet">
      Line: the estimate with everyone. Dots: without one participant each, by size${changed > 0 ? '; other shapes change the verdict' : ''}.
    </p>
    <p>${saySingle(value)}</p>`;
}
