import { html, type TemplateResult } from 'lit';
import type { ClaimValue } from '../../src/analysis/claim.ts';
import type { Computed, ViewContext } from '../kind.ts';

const MARKS = { supported: '\u25cf', undecided: '\u25cb', contradicted: '\u25b2' } as const;

/** What the planned row, and then every analysis of the strip, says of the claim. */
export function claimView({ value }: Computed<ClaimValue, null>, context: ViewContext): TemplateResult {
  const { verdict } = value;
  const { sweep } = context;
  return html`<div class="tally">
    <div>
      <b class=${verdict ?? ''}>${verdict === null ? 'not judged' : html`<span aria-hidden="true">${MARKS[verdict]}</span> ${verdict}`}</b>
      by the planned row
    </div>
    ${
      sweep
        ? html`<div><b>${sweep.supported} of ${sweep.specifications.length}</b>analyses of the grid support it</div>
            <div><b>${sweep.undecided}</b>leave it undecided</div>
            <div><b>${sweep.contradicted}</b>contradict it</div>`
        : null
    }
  </div>`;
}
