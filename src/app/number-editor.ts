import { html, nothing, type TemplateResult } from 'lit';
import './ruler.ts';
import type { Editor, Num } from '../../cells/kind.ts';
import { withUnit } from '../../cells/numbers.ts';
import type { SharedNumber } from '../worksheet/format.ts';
import { LightElement } from './light-element.ts';
import { readNumber, stepByKey } from './number-step.ts';
import { sharedText } from './shared-text.ts';

type NumberEditorSpec = Extract<Editor, { type: 'number' }>;

export interface NumberActions {
  /** The blank's own number, or a tie to a shared one. */
  set(value: Num): void;
  setShared(id: string, value: number | null): void;
  share(name: string): void;
}

/** A number: typed, stepped by keys, or set on a straight ruler; shared with other cells, or not. */
export class NumberEditor extends LightElement {
  static override properties = {
    editor: { attribute: false },
    shared: { attribute: false },
    label: {},
    actions: { attribute: false },
    problem: { state: true },
    naming: { state: true },
  };
  declare editor: NumberEditorSpec;
  declare shared: readonly SharedNumber[];
  declare label: string;
  declare actions: NumberActions;
  declare problem: string | null;
  declare naming: boolean;

  constructor() {
    super();
    this.shared = [];
    this.label = '';
    this.problem = null;
    this.naming = false;
  }

  get #tied(): SharedNumber | undefined {
    const { value } = this.editor;
    return value !== null && typeof value === 'object'
      ? this.shared.find((each) => each.id === value.shared)
      : undefined;
  }

  protected override render(): TemplateResult {
    const { editor } = this;
    const tied = this.#tied;
    const own = typeof editor.value === 'number' ? editor.value : null;
    const range = tied ?? { min: editor.min, max: editor.max, step: editor.step, none: editor.none !== null };
    const unit = tied?.unit ?? editor.unit;
    const value = tied === undefined ? own : tied.value;
    const text = value === null ? (editor.none ?? 'not set') : withUnit(value, unit);
    const set = (next: number | null): void => this.#become(next);
    return html`<div class="number">
        <input
          type="text"
          inputmode="decimal"
          class="figure"
          size="8"
          aria-label=${this.label}
          aria-invalid=${this.problem !== null}
          .value=${value === null ? (editor.none ?? '') : String(value)}
          @keydown=${(event: KeyboardEvent) => this.#key(event, value, range)}
          @change=${(event: Event) => this.#typed((event.target as HTMLInputElement).value)}
        /><span class="unit">${unit}</span>
        <sf-ruler .range=${range} .value=${value} .text=${text} .label=${`${this.label}, ruler`} .set=${set}></sf-ruler>
      </div>
      <p class="hint">${withUnit(range.min, '')} to ${withUnit(range.max, unit)}${
        range.none ? `, or ${editor.none ?? 'none'}` : ''
      }</p>
      ${this.problem === null ? nothing : html`<p class="problem" role="alert">${this.problem}</p>`}
      <div class="words">
        ${
          range.none && value !== null
            ? html`<button type="button" class="word" @click=${() => set(null)}>${editor.none ?? 'none'}</button>`
            : nothing
        }
        ${editor.mayShare ? this.#sharing(tied, own) : nothing}
      </div>`;
  }

  #sharing(tied: SharedNumber | undefined, own: number | null): TemplateResult {
    if (tied !== undefined) {
      return html`<span class="hint">shared as ${tied.name}</span>
        <button type="button" class="word" @click=${() => this.actions.set(tied.value)}>
          give it a number of its own
        </button>`;
    }
    if (this.naming) return this.#nameField();
    const fits = this.shared.filter(
      (each) => each.unit === this.editor.unit && (this.editor.none !== null || !each.none),
    );
    return html`${
      own === null && this.editor.none === null
        ? nothing
        : html`<button type="button" class="word" data-part="share" @click=${this.#name}>share this number</button>`
    }
    ${fits.map(
      (each) =>
        html`<button type="button" class="word" @click=${() => this.actions.set({ shared: each.id })}>
          use ${each.name} (${sharedText(each)})
        </button>`,
    )}`;
  }

  #nameField(): TemplateResult {
    const take = (): void => {
      const field = this.querySelector<HTMLInputElement>('.share-name');
      const name = field?.value.trim() ?? '';
      if (name === '') return;
      this.naming = false;
      this.actions.share(name);
    };
    return html`<label class="naming"
        >its name
        <input
          type="text"
          class="share-name"
          maxlength="40"
          .value=${this.label}
          @keydown=${(event: KeyboardEvent) => event.key === 'Enter' && take()}
      /></label>
      <button type="button" class="word" @click=${take}>share</button>`;
  }

  async #name(): Promise<void> {
    this.naming = true;
    await this.updateComplete;
    this.querySelector<HTMLInputElement>('.share-name')?.select();
  }

  #key(event: KeyboardEvent, value: number | null, range: NumberRange): void {
    if (event.key === 'Enter') {
      event.preventDefault();
      if (this.#typed((event.target as HTMLInputElement).value)) {
        this.dispatchEvent(new CustomEvent('sf-done', { bubbles: true }));
      }
      return;
    }
    // left, right, Home and End belong to the text being typed
    if (!['ArrowUp', 'ArrowDown', 'PageUp', 'PageDown'].includes(event.key)) return;
    const next = stepByKey(event.key, value, range);
    if (next === undefined) return;
    event.preventDefault();
    this.#become(next);
  }

  #typed(text: string): boolean {
    const { editor } = this;
    const range = this.#tied ?? { min: editor.min, max: editor.max, step: editor.step, none: editor.none !== null };
    const none = editor.none !== null && text.trim() === editor.none ? 'none' : text;
    const read = readNumber(none, range, this.#tied?.unit ?? editor.unit);
    if ('problem' in read) {
      this.problem = read.problem;
      return false;
    }
    this.#become(read.value);
    return true;
  }

  #become(value: number | null): void {
    this.problem = null;
    const tied = this.#tied;
    if (tied === undefined) this.actions.set(value);
    else this.actions.setShared(tied.id, value);
  }
}

type NumberRange = Parameters<typeof stepByKey>[2];

customElements.define('sf-number', NumberEditor);
