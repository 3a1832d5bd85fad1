import { html, nothing, type TemplateResult } from 'lit';
import { LightElement } from './light-element.ts';

export interface FileActions {
  /** Reads a file that was chosen or dropped. */
  file(file: File): void;
  /** Reads pasted rows. */
  text(text: string): void;
  /** Takes a data block that the worksheet already has. */
  block(id: string): void;
  demo(name: string): void;
}

/** Where data come from: a file, a paste, what the worksheet already holds, or a demo file. */
export class FileEditor extends LightElement {
  static override properties = {
    value: { attribute: false },
    blocks: { attribute: false },
    demos: { attribute: false },
    actions: { attribute: false },
  };
  declare value: string | null;
  declare blocks: readonly { readonly id: string; readonly name: string }[];
  declare demos: readonly string[];
  declare actions: FileActions;

  constructor() {
    super();
    this.value = null;
    this.blocks = [];
    this.demos = [];
  }

  protected override render(): TemplateResult {
    const others = this.blocks.filter((block) => block.id !== this.value);
    return html`<label class="file-choice"
        ><span class="word">open a file of rows</span>
        <input type="file" accept=".csv,.tsv,.txt,text/csv,text/tab-separated-values,text/plain" @change=${this.#chosen} />
      </label>
      <label class="paste"
        >or paste rows here, names in the first row
        <textarea rows="3" @paste=${this.#paste} @keydown=${this.#key}></textarea>
      </label>
      <p class="hint">Comma, semicolon, tab or bar between values; or drop a file on the page.</p>
      ${others.length === 0 ? nothing : this.#list('already in this worksheet', others)}
      ${
        this.demos.length === 0
          ? nothing
          : html`<p class="hint">demo files (invented)</p>
              <div class="words">
                ${this.demos.map(
                  (name) =>
                    html`<button type="button" class="word" @click=${() => this.actions.demo(name)}>${name}</button>`,
                )}
              </div>`
      }`;
  }

  #list(words: string, blocks: readonly { readonly id: string; readonly name: string }[]): TemplateResult {
    return html`<p class="hint">${words}</p>
      <div class="words">
        ${blocks.map(
          (block) =>
            html`<button type="button" class="word" @click=${() => this.actions.block(block.id)}>${block.name}</button>`,
        )}
      </div>`;
  }

  #chosen(event: Event): void {
    const field = event.target as HTMLInputElement;
    const file = field.files?.[0];
    if (file !== undefined) this.actions.file(file);
    field.value = '';
  }

  #paste(event: ClipboardEvent): void {
    const text = event.clipboardData?.getData('text/plain') ?? '';
    if (text.trim() === '') return;
    event.preventDefault();
    event.stopPropagation();
    this.actions.text(text);
  }

  /** Typed rows are read with Ctrl+Enter. */
  #key(event: KeyboardEvent): void {
    if (event.key !== 'Enter' || !(event.ctrlKey || event.metaKey)) return;
    event.preventDefault();
    this.actions.text((event.target as HTMLTextAreaElement).value);
  }
}

customElements.define('sf-file', FileEditor);
