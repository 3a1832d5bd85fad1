import { html, nothing, type TemplateResult } from 'lit';
import { addCell, focusOn } from './cell-actions.ts';
import type { Page } from './page.ts';
import { offersAt } from './wiring.ts';

/**
 * The unfinished line after a cell: opens the list of sentences that fit what is above. After the last cell it always
 * stands; after the others it appears when pointed at or focused.
 */
export function thenView(page: Page, after: string | null, open: boolean, last: boolean): TemplateResult {
  const id = after ?? '';
  const toggle = (): void => {
    page.show({ panel: open ? null : { cellId: id, part: 'then' }, blank: null });
    if (open) return;
    focusOn('.offers button');
    showWhole();
  };
  return html`<div class=${last ? 'then last' : 'then'}>
    <button
      type="button"
      class="then-line serif"
      data-part="then"
      data-after=${id}
      aria-expanded=${open}
      aria-label=${last ? 'Then: add a cell at the end' : 'Then: add a cell here'}
      @click=${toggle}
    >
      Then \u2026
    </button>
    ${open ? list(page, after) : nothing}
  </div>`;
}

/** Brings the whole list above the foot, once it is drawn. */
function showWhole(): void {
  requestAnimationFrame(() =>
    requestAnimationFrame(() => document.querySelector('.offers')?.scrollIntoView({ block: 'nearest' })),
  );
}

function list(page: Page, after: string | null): TemplateResult {
  const { cells } = page.worksheet;
  const at = after === null ? cells.length : cells.findIndex((cell) => cell.id === after) + 1;
  const offers = offersAt(page.worksheet, page.parts.registry, at);
  const key = (event: KeyboardEvent): void => {
    const items = [...(event.currentTarget as HTMLElement).querySelectorAll<HTMLElement>('button')];
    const now = items.indexOf(event.target as HTMLElement);
    if (event.key === 'Escape') {
      event.stopPropagation();
      page.show({ panel: null });
      focusOn(`[data-part="then"][data-after="${after ?? ''}"]`);
    } else if (event.key === 'ArrowDown' || event.key === 'ArrowUp') {
      event.preventDefault();
      items[(now + (event.key === 'ArrowDown' ? 1 : items.length - 1)) % items.length]?.focus();
    }
  };
  return html`<ul class="offers" aria-label="sentences that fit here" @keydown=${key}>
    ${offers.map(
      (kind) =>
        html`<li>
          <button type="button" class="offer serif" data-kind=${kind.name} @click=${() => addCell(page, after, kind)}>
            ${kind.offer} <small>${kind.name.replace(/-/g, ' ')}</small>
          </button>
        </li>`,
    )}
  </ul>`;
}
