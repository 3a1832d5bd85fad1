import { html, nothing, type TemplateResult } from 'lit';
import type { Worksheet } from '../worksheet/format.ts';
import { demoWorksheets } from './demos.ts';
import { retitle } from './edits.ts';
import { LightElement } from './light-element.ts';
import { timeWords } from './log-words.ts';
import { openDemo, openFile, openNew, openSaved } from './open-worksheet.ts';
import type { Page } from './page.ts';
import type { Saved } from './storage.ts';

/** Worksheets kept in this browser, demo worksheets, and the ways to begin another. */
export class WorksheetsSheet extends LightElement {
  static override properties = {
    page: { attribute: false },
    saved: { state: true },
    problem: { state: true },
    asking: { state: true },
    renaming: { state: true },
    removed: { state: true },
  };
  declare page: Page;
  declare saved: readonly Saved[];
  declare problem: string | null;
  declare asking: string | null;
  declare renaming: string | null;
  /** Removed while the page is open: they can be put back. */
  declare removed: ReadonlyMap<string, Worksheet>;

  constructor() {
    super();
    this.saved = [];
    this.problem = null;
    this.asking = null;
    this.renaming = null;
    this.removed = removedHere;
  }

  override connectedCallback(): void {
    super.connectedCallback();
    void this.#list();
  }

  protected override render(): TemplateResult {
    const { page } = this;
    const pick = (event: Event): void => {
      const file = (event.target as HTMLInputElement).files?.[0];
      if (file !== undefined) void openFile(page, file);
    };
    return html`<h3>Begin</h3>
      <div class="words column">
        <label class="file-choice"
          ><span class="word" data-part="new-from-file">open a worksheet file, or a new worksheet from a data file</span>
          <input type="file" data-part="open-file" accept=".json,.html,.csv,.tsv,.txt" @change=${pick}
        /></label>
        <button type="button" class="word" data-part="new-empty" @click=${() => openNew(page, null)}>
          a new worksheet
        </button>
      </div>
      <h3>Kept in this browser</h3>
      ${this.problem === null ? nothing : html`<p class="problem" role="alert">${this.problem}</p>`}
      ${this.saved.length === 0 && this.removed.size === 0 ? html`<p class="hint">None yet. A worksheet is kept from its first edit on.</p>` : nothing}
      <ul class="kept" data-part="saved-list">
        ${this.saved.map((saved) => this.#row(saved))}
        ${[...this.removed.values()].map(
          (worksheet) =>
            html`<li>
              <span class="hint">${worksheet.title}: removed.</span>
              <button type="button" class="word" data-part="put-back" @click=${() => void this.#putBack(worksheet)}>
                put it back
              </button>
            </li>`,
        )}
      </ul>
      ${this.#demos()}`;
  }

  #demos(): TemplateResult {
    const { page } = this;
    return html`<h3>Demo worksheets <span class="hint">(invented data)</span></h3>
      <ul class="kept" data-part="demo-list">
        ${demoWorksheets().map(
          (demo) =>
            html`<li>
              <button type="button" class="word" data-demo=${demo.name} @click=${() => void openDemo(page, demo)}>
                ${demo.title}
              </button>
            </li>`,
        )}
      </ul>`;
  }

  #row(saved: Saved): TemplateResult {
    const here = saved.id === this.page.worksheet.id;
    if (this.asking === saved.id) return this.#question(saved);
    if (this.renaming === saved.id) return this.#renameField(saved);
    return html`<li data-saved=${saved.id}>
      <button type="button" class="word title-word" ?disabled=${here} @click=${() => void openSaved(this.page, saved.id)}>
        ${saved.title}
      </button>
      <span class="hint">${here ? 'open now' : timeWords(saved.when)}</span>
      <button
        type="button"
        class="word quiet"
        aria-label="rename ${saved.title}"
        @click=${() => {
          this.renaming = saved.id;
        }}
      >
        rename
      </button>
      ${
        here
          ? nothing
          : html`<button
              type="button"
              class="word quiet"
              aria-label="remove ${saved.title}"
              @click=${() => {
                this.asking = saved.id;
              }}
            >
              remove
            </button>`
      }
    </li>`;
  }

  #question(saved: Saved): TemplateResult {
    return html`<li data-saved=${saved.id}>
      <span>Remove \u201c${saved.title}\u201d from this browser?</span>
      <button type="button" class="word" data-part="remove-yes" @click=${() => void this.#remove(saved.id)}>remove</button>
      <button
        type="button"
        class="word"
        @click=${() => {
          this.asking = null;
        }}
      >
        keep
      </button>
    </li>`;
  }

  #renameField(saved: Saved): TemplateResult {
    const take = (event: Event): void => void this.#rename(saved.id, (event.target as HTMLInputElement).value.trim());
    return html`<li data-saved=${saved.id}>
      <label class="naming">title <input type="text" maxlength="200" .value=${saved.title} @change=${take} /></label>
    </li>`;
  }

  async #list(): Promise<void> {
    try {
      this.saved = await this.page.parts.store.list();
      this.problem = null;
    } catch {
      this.problem = 'The browser does not let this page read what it kept.';
    }
  }

  async #rename(id: string, title: string): Promise<void> {
    this.renaming = null;
    const { store, document: open } = this.page.parts;
    if (title !== '' && id === this.page.worksheet.id) {
      open.edit(`titled \u201c${title}\u201d`, (worksheet) => retitle(worksheet, title));
      await this.page.parts.autosave.flush();
    } else if (title !== '') {
      const worksheet = await store.get(id);
      if (worksheet !== null) await store.put(retitle(worksheet, title), new Date().toISOString());
    }
    await this.#list();
  }

  async #remove(id: string): Promise<void> {
    this.asking = null;
    const { store } = this.page.parts;
    const worksheet = await store.get(id);
    if (worksheet !== null) removedHere.set(id, worksheet);
    await store.remove(id);
    this.removed = new Map(removedHere);
    await this.#list();
  }

  async #putBack(worksheet: Worksheet): Promise<void> {
    await this.page.parts.store.put(worksheet, new Date().toISOString());
    removedHere.delete(worksheet.id);
    this.removed = new Map(removedHere);
    await this.#list();
  }
}

const removedHere = new Map<string, Worksheet>();

customElements.define('sf-worksheets', WorksheetsSheet);
