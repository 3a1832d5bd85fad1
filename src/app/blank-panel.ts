import { html, type PropertyValues, type TemplateResult } from 'lit';
import './choice-editor.ts';
import './choices-editor.ts';
import './file-editor.ts';
import './number-editor.ts';
import './text-editor.ts';
import type { Blank, Editor, Num, Settings } from '../../cells/kind.ts';
import { setShared } from './cell-actions.ts';
import { fileActions } from './data-actions.ts';
import { demoFiles } from './demos.ts';
import { LightElement } from './light-element.ts';
import type { Page } from './page.ts';
import { shareBlank } from './share-blank.ts';

type EditorOf<T extends Editor['type']> = Extract<Editor, { type: T }>;

/** The small panel under a blank in which it is filled; Escape closes it and the focus goes back to the blank. */
export class BlankPanel extends LightElement {
  static override properties = { blank: { attribute: false }, cellId: {}, page: { attribute: false } };
  declare blank: Blank;
  declare cellId: string;
  declare page: Page;
  /** Closed by Escape: what was typed and not yet taken stays untaken. */
  #givenUp = false;

  override connectedCallback(): void {
    super.connectedCallback();
    document.addEventListener('pointerdown', this.#outside, true);
  }

  override disconnectedCallback(): void {
    super.disconnectedCallback();
    document.removeEventListener('pointerdown', this.#outside, true);
  }

  protected override render(): TemplateResult {
    return html`<div
      class="panel"
      role="dialog"
      aria-label=${this.blank.label}
      data-part="editor"
      @keydown=${this.#key}
      @focusout=${this.#left}
      @sf-done=${() => this.#close(true)}
    >
      <p class="panel-name">${this.blank.label}</p>
      ${this.#editor()}
    </div>`;
  }

  protected override async firstUpdated(_changed: PropertyValues): Promise<void> {
    this.#place();
    // the editor inside draws a moment later
    await new Promise((resolve) => requestAnimationFrame(resolve));
    this.#place();
    const wanted = '[role=option][tabindex="0"], textarea, input:not(:disabled), button:not(:disabled)';
    const first = this.querySelector<HTMLElement>('.filter') ?? this.querySelector<HTMLElement>(wanted);
    first?.focus({ preventScroll: true });
    if (first instanceof HTMLInputElement && first.type === 'text') first.select();
    this.querySelector('.panel')?.scrollIntoView({ block: 'nearest' });
  }

  #fill(settings: Settings): void {
    if (!this.#givenUp) this.page.fill(this.cellId, this.blank.key, settings);
  }

  #editor(): TemplateResult {
    const { blank, page, cellId } = this;
    const { editor, label } = blank;
    const close = (): void => this.#close(true);
    switch (editor.type) {
      case 'choice': {
        const choose = (value: string): void => {
          this.#fill(editor.set(value));
          close();
        };
        const { options, value } = editor;
        return html`<sf-choice .options=${options} .value=${value} .label=${label} .choose=${choose}></sf-choice>`;
      }
      case 'choices':
        return this.#choices(editor);
      case 'number':
        return this.#number(editor);
      case 'text':
        return this.#text(editor);
      case 'file':
        return html`<sf-file
          .value=${editor.value}
          .blocks=${page.worksheet.data}
          .demos=${demoFiles()}
          .actions=${fileActions(page, cellId, blank.key, editor, close)}
        ></sf-file>`;
    }
  }

  #choices(editor: EditorOf<'choices'>): TemplateResult {
    return html`<sf-choices
      .options=${editor.options}
      .values=${editor.values}
      .atLeast=${editor.atLeast}
      .label=${this.blank.label}
      .choose=${(values: readonly string[]) => this.#fill(editor.set(values))}
    ></sf-choices>`;
  }

  #number(editor: EditorOf<'number'>): TemplateResult {
    const { page, cellId, blank } = this;
    const actions = {
      set: (value: Num) => this.#fill(editor.set(value)),
      setShared: (id: string, value: number | null) => {
        if (!this.#givenUp) setShared(page, id, value);
      },
      share: (name: string) => shareBlank(page, cellId, blank, name),
    };
    return html`<sf-number
      .editor=${editor}
      .shared=${page.worksheet.shared}
      .label=${blank.label}
      .actions=${actions}
    ></sf-number>`;
  }

  #text(editor: EditorOf<'text'>): TemplateResult {
    return html`<sf-text
      .value=${editor.value}
      .long=${editor.long}
      .label=${this.blank.label}
      .check=${editor.check}
      .set=${(value: string) => this.#fill(editor.set(value))}
    ></sf-text>`;
  }

  #blankElement(): HTMLElement | null {
    return document.querySelector(`[data-cell="${this.cellId}"] [data-blank="${this.blank.key}"]`);
  }

  /** Under its blank, inside the column of sentences. */
  #place(): void {
    const blank = this.#blankElement();
    const column = this.parentElement;
    const panel = this.querySelector<HTMLElement>('.panel');
    if (blank === null || column === null || panel === null) return;
    const lines = blank.getClientRects();
    const line = lines[lines.length - 1] ?? blank.getBoundingClientRect();
    const box = column.getBoundingClientRect();
    const room = Math.max(0, box.width - panel.offsetWidth);
    panel.style.left = `${Math.min(room, Math.max(0, line.left - box.left))}px`;
    panel.style.top = `${line.bottom - box.top + 6}px`;
  }

  #key(event: KeyboardEvent): void {
    if (event.key !== 'Escape') return;
    event.preventDefault();
    event.stopPropagation();
    this.#givenUp = true;
    this.#close(true);
  }

  #left(event: FocusEvent): void {
    const to = event.relatedTarget;
    if (to instanceof Node && !this.contains(to)) this.#close(false);
  }

  #outside = (event: PointerEvent): void => {
    const target = event.target as Node;
    if (this.contains(target) || this.#blankElement()?.contains(target) === true) return;
    // what was typed is taken before the panel goes
    if (document.activeElement instanceof HTMLElement && this.contains(document.activeElement)) {
      document.activeElement.blur();
    }
    this.#close(false);
  };

  #close(back: boolean): void {
    const open = this.page.view.blank;
    if (open === null || open.cellId !== this.cellId || open.key !== this.blank.key) return;
    this.page.parts.document.settle();
    this.page.show({ blank: null });
    if (back) (this.#blankElement() ?? document.querySelector<HTMLElement>(`[data-cell="${this.cellId}"]`))?.focus();
  }
}

customElements.define('sf-blank-panel', BlankPanel);
