import { html, nothing, type TemplateResult } from 'lit';
import type { Computed, Kind } from '../../cells/kind.ts';
import './table-out.ts';
import { type CellModel, computedOf } from './cell-model.ts';
import type { Page } from './page.ts';
import { saidOf } from './said.ts';
import { veilBound } from './veil-bound.ts';

/**
 * What stands under a cell's sentence: its result, or in words why there is none. The result keeps its place in the
 * tree while it is worked out again, so that figures are given new rows instead of being made anew.
 */
export function outputView(page: Page, model: CellModel): TemplateResult {
  const { state, kind } = model;
  const computed = computedOf(state);
  const old = state.status === 'failed' || state.status === 'waiting';
  return html`${message(page, model)}${
    computed === undefined || kind === undefined
      ? nothing
      : html`<div class=${old ? 'was' : state.status === 'computing' ? 'becoming' : ''} ?inert=${old}>
          ${result(page, model, kind, computed)}
        </div>`
  }${nothingToHide(page, model)}`;
}

/** Under data whose rows are hidden: what opens them where there is no condition at all. */
function nothingToHide(page: Page, model: CellModel): TemplateResult | typeof nothing {
  const isData = model.kind?.gives === 'table' && Object.keys(model.kind.takes).length === 0;
  if (model.opening !== 'blind' || model.state.status !== 'fresh' || !isData) return nothing;
  return html`<p class="plainly" data-part="no-condition">
    The rows are hidden with the conditions. If these data have none,
    <button
      type="button"
      class="word small"
      @click=${() => page.show({ sheet: 'open', openReason: 'there is no condition to hide' })}
    >
      say that there is no condition to hide
    </button>.
  </p>`;
}

function message(page: Page, model: CellModel): TemplateResult | typeof nothing {
  const { state, kind } = model;
  if (state.status === 'unknown-kind' || kind === undefined) {
    return html`<p class="plainly" data-part="unknown">
      This program knows no kind of cell called \u201c${model.cell.kind}\u201d. The cell is kept as it is in the file.
    </p>`;
  }
  switch (state.status) {
    case 'veiled':
      return veil(page, model);
    case 'left-out':
      return html`<p class="plainly" data-part="left-out">Left out for now.</p>`;
    case 'failed':
      return html`<p class="failed" data-part="failed">${state.sentence}</p>`;
    case 'waiting':
      return html`<p class="plainly" data-part="waiting">Waiting for ${model.waitingFor}.</p>`;
    case 'computing':
      return state.last === undefined
        ? html`<p class="plainly late" data-part="computing">Being worked out \u2026</p>`
        : nothing;
    case 'fresh':
      return nothing;
  }
}

function veil(page: Page, model: CellModel): TemplateResult {
  const bound = model.kind?.gives === 'result' ? veilBound(page, model.cell.id) : null;
  const means = bound === null || bound.means === null ? '' : ` (means: ${bound.means})`;
  return html`<div class="veil" data-part="veil">
    <b>Hidden while the conditions are hidden.</b>
    ${
      bound === null
        ? nothing
        : html`With what is kept now the interval will reach at most about <b>${bound.width}</b> to either side${means}.
            The bound does not use the ${bound.factor}, so it tells nothing about direction.`
    }
    Settle the rules first. When they stand,
    <button type="button" class="word" @click=${() => page.show({ sheet: 'open', openReason: '' })}>open the conditions</button>
    and say why; the decision log keeps the reason.
  </div>`;
}

/** Share worked out, beside the cell's name; it shows only where the work takes a while. */
export function progressView(model: CellModel): TemplateResult | typeof nothing {
  const { state } = model;
  if (state.status !== 'computing') return nothing;
  return html`<span class="progress late" data-part="progress">
    <progress max="1" .value=${state.progress} aria-label="share worked out"></progress>
    ${state.progress > 0 ? `${Math.round(100 * state.progress)} % worked out` : 'being worked out'}
  </span>`;
}

function result(page: Page, model: CellModel, kind: Kind, computed: Computed<unknown>): TemplateResult {
  const view = page.parts.views[model.cell.kind];
  const { tables } = saidOf(kind, computed, model.resolved);
  const context = {
    cellId: model.cell.id,
    settings: model.resolved,
    shared: model.context.shared,
    theme: model.theme,
    width: model.width,
    reference: model.reference,
    sweep: model.sweep,
  };
  return html`<div class="out" data-part="output">${view?.(computed as Computed<never, never>, context)}</div>
    ${
      tables.length === 0
        ? nothing
        : html`<div class="tables">${tables.map((table) => html`<sf-table .table=${table}></sf-table>`)}</div>`
    }`;
}
