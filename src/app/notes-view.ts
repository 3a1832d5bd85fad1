import { html, type TemplateResult } from 'lit';
import type { Note } from '../../cells/kind.ts';

function noteView(note: Note): TemplateResult {
  const lead = note.lead ?? (note.type === 'caution' ? 'Caution.' : null);
  return html`<p class=${note.type === 'caution' ? 'caution' : ''}>${
    lead === null ? null : html`<b>${lead}</b> `
  }${note.text}</p>`;
}

/** The margin beside a cell; on a narrow page cautions stand under the cell and plain notes fold. */
export function notesView(notes: readonly Note[], narrow: boolean): TemplateResult {
  if (notes.length === 0) return html`<div class="side"></div>`;
  if (!narrow) return html`<div class="side" data-part="notes">${notes.map(noteView)}</div>`;
  const cautions = notes.filter((note) => note.type === 'caution');
  const plain = notes.filter((note) => note.type !== 'caution');
  return html`<div class="side" data-part="notes">
    ${cautions.map(noteView)}
    ${
      plain.length === 0
        ? null
        : html`<details>
            <summary>${plain.length === 1 ? 'a note' : `${plain.length} notes`}</summary>
            ${plain.map(noteView)}
          </details>`
    }
  </div>`;
}
