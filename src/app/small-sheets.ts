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

/** Opening the conditions without a sealed plan asks for a reason. */
export function openConditionsSheet(page: Page): TemplateResult {
  const open = (event: SubmitEvent): void => {
    event.preventDefault();
    const field = (event.target as HTMLFormElement).elements.namedItem('reason') as HTMLTextAreaElement;
    const reason = field.value.trim();
    if (reason === '') return;
    page.show({ sheet: null });
    page.parts.document.openConditions(reason);
  };
  return html`<form @submit=${open}>
    <p>
      The conditions have been hidden while the rules were set. Opening them cannot be taken back, and undo will not
      cross it. The reason stands in the decision log and in the file.
    </p>
    <label class="block"
      >why they are opened without a sealed plan
      <textarea name="reason" rows="3" required data-part="reason" placeholder="reanalysis of published data"></textarea>
    </label>
    <div class="words"><button type="submit" class="word main" data-part="open-now">open the conditions</button></div>
  </form>`;
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
