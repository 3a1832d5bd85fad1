import { html, nothing, type TemplateResult } from 'lit';
import * as actions from './cell-actions.ts';
import { type CellModel, titleOf } from './cell-model.ts';
import { sourcesOf } from './edits.ts';
import type { Page } from './page.ts';

/** The quiet disclosure of a cell: moving, copying, leaving out, removing, and what it reads. */
export function arrangeView(page: Page, model: CellModel): TemplateResult {
  const { cell } = model;
  const open = model.openPanel === 'arrange';
  const toggle = (): void => page.show({ panel: open ? null : { cellId: cell.id, part: 'arrange' }, blank: null });
  return html`${copyWord(page, model)}
    <button
      type="button"
      class="word quiet"
      data-part="arrange"
      aria-expanded=${open}
      aria-label=${`arrange: ${titleOf(page.parts.registry, cell)}`}
      @click=${toggle}
    >
      arrange
    </button>
    ${open ? panel(page, model) : nothing}`;
}

/** One action copies the result in one plain sentence. */
function copyWord(page: Page, { state, kind, cell, resolved }: CellModel): TemplateResult | typeof nothing {
  if (state.status !== 'fresh' || kind === undefined) return nothing;
  const copy = (): void => void actions.copyText(page, kind.say(state.computed, resolved), 'the result as a sentence');
  return html`<button
    type="button"
    class="word quiet"
    data-part="copy"
    aria-label=${`copy the result as a sentence: ${titleOf(page.parts.registry, cell)}`}
    @click=${copy}
  >
    copy
  </button>`;
}

function panel(page: Page, model: CellModel): TemplateResult {
  const { id } = model.cell;
  const close = (event: KeyboardEvent): void => {
    if (event.key !== 'Escape') return;
    event.stopPropagation();
    page.show({ panel: null });
    actions.focusOn(`[data-cell="${id}"] [data-part="arrange"]`);
  };
  const word = (part: string, text: string, run: () => void, off = false): TemplateResult =>
    html`<button type="button" class="word" data-part=${part} ?disabled=${off} @click=${run}>${text}</button>`;
  return html`<div class="panel arrange" role="group" aria-label="arrange this cell" @keydown=${close}>
    ${word('up', 'move up', () => actions.moveCell(page, id, -1), !actions.mayMove(page, id, -1))}
    ${word('down', 'move down', () => actions.moveCell(page, id, 1), !actions.mayMove(page, id, 1))}
    ${word('duplicate', 'duplicate', () => actions.duplicateCell(page, id))}
    ${word('leave-out', model.cell.leftOut === true ? 'put back' : 'leave out for now', () => actions.leaveOutCell(page, id))}
    ${word('remove', 'remove', () => actions.removeCell(page, id))}
    ${Object.entries(model.kind?.takes ?? {}).map(([port, type]) => source(page, model, port, type))}
  </div>`;
}

/** Which cell above a port reads; offered only where there is a choice. */
function source(
  page: Page,
  model: CellModel,
  port: string,
  type: Parameters<typeof sourcesOf>[3],
): TemplateResult | null {
  const { registry, engine } = page.parts;
  const sources = sourcesOf(page.worksheet, registry, model.cell.id, type);
  const now = model.cell.from[port];
  if (sources.length < 2 && sources[0]?.id === now) return null;
  return html`<label class="reads"
    >reads
    <select
      data-part="reads"
      @change=${(event: Event) =>
        actions.readFrom(page, model.cell.id, port, (event.target as HTMLSelectElement).value)}
    >
      ${now === undefined ? html`<option selected disabled>nothing yet</option>` : nothing}
      ${sources.map(
        (cell) =>
          html`<option value=${cell.id} ?selected=${cell.id === now}>
            ${
              registry[cell.kind] === undefined ? cell.kind : actions.cellWords(registry, cell, engine.context(cell.id))
            }
          </option>`,
      )}
    </select></label
  >`;
}
