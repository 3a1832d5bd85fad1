import { html, type TemplateResult } from 'lit';
import { count } from '../../cells/numbers.ts';
import { CELL_KEYS } from './cell-keys.ts';
import { fileBlanks, giveTo } from './data-actions.ts';
import { openNew } from './open-worksheet.ts';
import type { Page } from './page.ts';

/** The keys, in words. */
export function keysSheet(): TemplateResult {
  const others = [
    ['Tab', 'go from blank to blank'],
    ['Enter', 'open the blank that has the focus; Escape closes it'],
    ['Up, Down, Page Up, Page Down', 'step the number in the blank, or on the ruler, that has the focus'],
    ['Home, End', 'the ends of a ruler'],
    ['Ctrl + Z', 'undo'],
    ['Ctrl + Shift + Z, Ctrl + Y', 'redo'],
    ['Ctrl + V', 'read pasted rows, or a pasted worksheet'],
  ];
  const rows = [...others, ...CELL_KEYS.map((key) => [key.shown, `${key.does} (with the focus in a cell)`])];
  return html`<table class="keys">
    <tbody>
      ${rows.map(
        ([keys, does]) =>
          html`<tr>
            <th scope="row">${keys}</th>
            <td>${does}</td>
          </tr>`,
      )}
    </tbody>
  </table>`;
}

/** Data that arrived by drop or paste and could go to more than one place. */
export function incomingSheet(page: Page): TemplateResult {
  const block = page.view.incoming;
  if (block === null) return html``;
  return html`<p>${block.name}: ${count(block.rows)} rows, ${count(block.columns.length)} columns. Where should they go?</p>
    <div class="words column">
      ${fileBlanks(page).map(
        ({ cellId, title }) =>
          html`<button type="button" class="word" data-part="give-to" @click=${() => giveTo(page, cellId, block)}>
            in place of ${title}
          </button>`,
      )}
      <button type="button" class="word" data-part="give-new" @click=${() => openNew(page, block)}>
        into a new worksheet
      </button>
    </div>`;
}
