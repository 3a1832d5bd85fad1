import { html, nothing, type TemplateResult } from 'lit';
import { type Blank, currentNumber, type Part, type SharedNumber } from '../../cells/kind.ts';
import { setShared } from './cell-actions.ts';
import { stepByKey } from './number-step.ts';
import type { Page } from './page.ts';

/** Longest value that is kept on one line. */
const UNBROKEN = 30;

/** A cell's sentence: its words, and its blanks as buttons that are filled in place. */
export function sentenceView(page: Page, cellId: string, parts: readonly Part[], open: string | null): TemplateResult {
  return html`${parts.map((part) => (typeof part === 'string' ? part : blankView(page, cellId, part, open)))}`;
}

function blankView(page: Page, cellId: string, blank: Blank, open: string | null): TemplateResult {
  const number = blank.editor.type === 'number';
  const shared = sharedOf(blank);
  const classes = ['slot'];
  if (shared !== null) classes.push('dial');
  if (!blank.filled) classes.push('open');
  if (blank.shown.length > UNBROKEN) classes.push('long');
  const toggle = (): void => page.show({ blank: open === blank.key ? null : { cellId, key: blank.key }, panel: null });
  return html`<span
    class=${classes.join(' ')}
    role="button"
    tabindex="0"
    data-blank=${blank.key}
    data-shared=${shared ?? nothing}
    aria-haspopup="dialog"
    aria-expanded=${open === blank.key}
    aria-label=${`${blank.label}: ${blank.filled ? blank.shown : `not filled, ${blank.shown}`}`}
    aria-describedby=${number ? 'hint-number' : 'hint-blank'}
    @click=${toggle}
    @keydown=${(event: KeyboardEvent) => blankKey(page, cellId, blank, event)}
    >${blank.shown}</span
  >`;
}

function sharedOf(blank: Blank): string | null {
  if (blank.editor.type !== 'number') return null;
  const { value } = blank.editor;
  return value !== null && typeof value === 'object' ? value.shared : null;
}

function blankKey(page: Page, cellId: string, blank: Blank, event: KeyboardEvent): void {
  if (event.altKey || event.ctrlKey || event.metaKey) return;
  if (event.key === 'Enter' || event.key === ' ') {
    event.preventDefault();
    (event.currentTarget as HTMLElement).click();
    return;
  }
  if (!['ArrowUp', 'ArrowDown', 'PageUp', 'PageDown'].includes(event.key)) return;
  if (stepBlank(page, cellId, blank, event.key)) event.preventDefault();
}

/** Steps the number of a blank that has the focus; false where it is no number. */
function stepBlank(page: Page, cellId: string, blank: Blank, key: string): boolean {
  const { editor } = blank;
  if (editor.type !== 'number') return false;
  const sharedNumbers: readonly SharedNumber[] = page.worksheet.shared;
  const now = currentNumber(editor.value, sharedNumbers);
  const tied = sharedNumbers.find((each) => each.id === sharedOf(blank));
  const range = tied ?? { min: editor.min, max: editor.max, step: editor.step, none: editor.none !== null };
  const next = now === null && !range.none ? range.min : stepByKey(key, now, range);
  if (next === undefined) return false;
  if (tied !== undefined) setShared(page, tied.id, next);
  else page.fill(cellId, blank.key, editor.set(next));
  return true;
}
