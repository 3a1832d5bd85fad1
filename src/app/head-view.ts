import { html, nothing, type TemplateResult } from 'lit';
import type { Opening, Worksheet } from '../worksheet/format.ts';
import { focusOn } from './cell-actions.ts';
import { retitle } from './edits.ts';
import { holdReference } from './hold-reference.ts';
import { LightElement } from './light-element.ts';
import type { Page, PageView } from './page.ts';
import { applyTheme } from './theme.ts';

/** The head of the page: wordmark, title, one line of state, and what can be done, as words. */
export class HeadView extends LightElement {
  static override properties = {
    page: { attribute: false },
    worksheet: { attribute: false },
    view: { attribute: false },
    undoLabel: { attribute: false },
    redoLabel: { attribute: false },
    mayHold: { type: Boolean },
    more: { state: true },
  };
  declare page: Page;
  declare worksheet: Worksheet;
  declare view: PageView;
  declare undoLabel: string | null;
  declare redoLabel: string | null;
  declare mayHold: boolean;
  declare more: boolean;

  constructor() {
    super();
    this.more = false;
    this.mayHold = false;
  }

  protected override render(): TemplateResult {
    const { worksheet, view } = this;
    return html`<header class="page-head" @keydown=${this.#key}>
      <b class="wordmark serif">Standfast</b>
      <h1 class="title-line">
        <input
          class="title serif"
          data-part="title"
          aria-label="title of the worksheet"
          maxlength="200"
          size=${Math.max(12, Math.min(60, worksheet.title.length + 1))}
          .value=${worksheet.title}
          @change=${this.#titled}
          @keydown=${(event: KeyboardEvent) => event.key === 'Enter' && (event.target as HTMLElement).blur()}
        />
      </h1>
      <p class="state">${lamp(worksheet.opening)}${this.#saving(view)}</p>
      <button
        type="button"
        class="word more"
        aria-expanded=${this.more}
        aria-controls="head-actions"
        @click=${() => {
          this.more = !this.more;
        }}
      >
        More
      </button>
      <nav id="head-actions" class=${this.more ? 'actions open' : 'actions'} aria-label="what can be done">
        ${this.#actions()}
      </nav>
    </header>`;
  }

  #actions(): TemplateResult {
    const { page, worksheet, view } = this;
    const open = page.parts.document;
    const dark = view.theme === 'dark';
    const word = (part: string, text: string, run: () => void, off = false, title = ''): TemplateResult =>
      html`<button
        type="button"
        class="word"
        data-part=${part}
        ?disabled=${off}
        title=${title}
        @click=${() => {
          this.more = false;
          run();
        }}
      >
        ${text}
      </button>`;
    const sheet = (name: PageView['sheet']) => (): void => page.show({ sheet: name });
    return html`${word('undo', 'Undo', () => open.undo(), this.undoLabel === null, this.undoLabel ?? '')}
    ${word('redo', 'Redo', () => open.redo(), this.redoLabel === null, this.redoLabel ?? '')}
    ${word('log', `Decision log \u00b7 ${worksheet.log.length}`, sheet('log'))}
    ${
      worksheet.opening.state === 'blind'
        ? word('open-conditions', 'Open the conditions', () => page.show({ sheet: 'open', openReason: '' }))
        : word('hold', 'Hold as reference', () => holdReference(page), !this.mayHold)
    }
    ${word('worksheets', 'Worksheets', sheet('worksheets'))} ${word('save', 'Save a copy', sheet('save'))}
    ${word('keys', 'Keys', sheet('keys'))}
    ${word('theme', dark ? 'Light' : 'Dark', () => {
      applyTheme(dark ? 'light' : 'dark', true);
      page.show({ theme: dark ? 'light' : 'dark' });
    })}`;
  }

  #saving(view: PageView): TemplateResult | typeof nothing {
    if (view.save.state !== 'failed') return nothing;
    return html`<span class="not-saved" role="alert">${view.save.sentence}</span>`;
  }

  #titled(event: Event): void {
    const title = (event.target as HTMLInputElement).value.trim();
    if (title === '') this.requestUpdate();
    else this.page.parts.document.edit(`titled \u201c${title}\u201d`, (worksheet) => retitle(worksheet, title));
  }

  #key(event: KeyboardEvent): void {
    if (event.key !== 'Escape' || !this.more) return;
    this.more = false;
    focusOn('.page-head .more');
  }
}

/** The line of state, a mark beside its words. */
function lamp(opening: Opening): TemplateResult {
  if (opening.state === 'blind') {
    return html`<span class="lamp"><i aria-hidden="true"></i>conditions hidden</span>`;
  }
  if (opening.state === 'sealed') {
    const code = `${opening.hash.slice(0, 4)} ${opening.hash.slice(4, 8)}`;
    return html`<span class="lamp open">plan sealed ${code} on ${day(opening.when)}, conditions open since</span>`;
  }
  return html`<span class="lamp open" title=${opening.reason}>opened early: ${opening.reason}</span>`;
}

function day(when: string): string {
  const date = new Date(when);
  return Number.isNaN(date.getTime()) ? when : date.toLocaleDateString('en-GB', { day: 'numeric', month: 'short' });
}

customElements.define('sf-head', HeadView);
