import { html, type TemplateResult } from 'lit';
import type { Computed, Kind, TableOut } from '../../cells/kind.ts';
import './table-out.ts';
import { type CellModel, computedOf } from './cell-model.ts';
import type { Page } from './page.ts';

/** What stands under a cell's sentence: its result, or in words why there is none. */
export function outputView(page: Page, model: CellModel): TemplateResult {
  const { state, kind } = model;
  if (state.status === 'unknown-kind' || kind === undefined) {
    return html`<p class="plainly" data-part="unknown">
      This program knows no kind of cell called \u201c${model.cell.kind}\u201d. The cell is kept as it is in the file.
    </p>`;
  }
  switch (state.status) {
    case 'veiled':
      return veil(page);
    case 'left-out':
      return html`<p class="plainly" data-part="left-out">Left out for now.</p>`;
    case 'failed':
      return html`<p class="failed" data-part="failed">${state.sentence}</p>
        ${last(page, model, kind)}`;
    case 'waiting':
      return html`<p class="plainly" data-part="waiting">Waiting for ${model.waitingFor}.</p>
        ${last(page, model, kind)}`;
    case 'computing':
      return html`${progress(state.progress)}${last(page, model, kind)}`;
    case 'fresh':
      return result(page, model, kind, state.computed);
  }
}

function veil(page: Page): TemplateResult {
  return html`<div class="veil" data-part="veil">
    <b>Hidden while the conditions are hidden.</b> Settle the rules first. When they stand,
    <button type="button" class="word" @click=${() => page.show({ sheet: 'open' })}>open the conditions</button>
    and say why; the decision log keeps the reason.
  </div>`;
}

function progress(share: number): TemplateResult {
  return html`<p class="progress" data-part="progress">
    <progress max="1" .value=${share} aria-label="share worked out"></progress>
    <span>${share > 0 ? `${Math.round(100 * share)} % worked out` : 'being worked out'}</span>
  </p>`;
}

/** What it came to before, faded, so that the page does not jump. */
function last(page: Page, model: CellModel, kind: Kind): TemplateResult | null {
  const computed = computedOf(model.state);
  if (computed === undefined) return null;
  return html`<div class="was" aria-hidden="true" inert>${result(page, model, kind, computed)}</div>`;
}

function result(page: Page, model: CellModel, kind: Kind, computed: Computed<unknown>): TemplateResult {
  const view = page.parts.views[model.cell.kind];
  const tables: readonly TableOut[] = kind.tables?.(computed, model.resolved) ?? [];
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
        ? null
        : html`<div class="tables">${tables.map((table) => html`<sf-table .table=${table}></sf-table>`)}</div>`
    }`;
}
