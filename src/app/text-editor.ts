import { html, nothing, type TemplateResult } from 'lit';
import { LightElement } from './light-element.ts';

/** Free text; a wrong one is said and not taken. Enter takes it, in a long one Ctrl+Enter. */
export class TextEditor extends LightElement {
  static override properties = {
    value: {},
    long: { type: Boolean },
    label: {},
    check: { attribute: false },
    set: { attribute: false },
    problem: { state: true },
  };
  declare value: string;
  declare long: boolean;
  declare label: string;
  declare check: ((value: string) => string | null) | undefined;
  declare set: (value: string) => void;
  declare problem: string | null;

  constructor() {
    super();
    this.value = '';
    this.long = false;
    this.label = '';
    this.check = undefined;
    this.set = () => undefined;
    this.problem = null;
  }

  protected override render(): TemplateResult {
    const field = this.long
      ? html`<textarea
          rows="6"
          aria-label=${this.label}
          aria-invalid=${this.problem !== null}
          .value=${this.value}
          @keydown=${this.#key}
          @change=${this.#take}
        ></textarea>`
      : html`<input
          type="text"
          class="wide"
          aria-label=${this.label}
          aria-invalid=${this.problem !== null}
          .value=${this.value}
          @keydown=${this.#key}
          @change=${this.#take}
        />`;
    return html`${field}${this.problem === null ? nothing : html`<p class="problem" role="alert">${this.problem}</p>`}
      <div class="words">
        <button type="button" class="word" @click=${this.#finish}>done</button>
        <span class="hint">${this.long ? 'Ctrl+Enter' : 'Enter'}</span>
      </div>`;
  }

  #key(event: KeyboardEvent): void {
    if (event.key !== 'Enter' || (this.long && !event.ctrlKey && !event.metaKey)) return;
    event.preventDefault();
    this.#finish();
  }

  #finish(): void {
    if (this.#take()) this.dispatchEvent(new CustomEvent('sf-done', { bubbles: true }));
  }

  #take(): boolean {
    const text = this.querySelector<HTMLInputElement | HTMLTextAreaElement>('input, textarea')?.value ?? this.value;
    this.problem = this.check?.(text) ?? null;
    if (this.problem !== null) return false;
    if (text !== this.value) this.set(text);
    return true;
  }
}

customElements.define('sf-text', TextEditor);
