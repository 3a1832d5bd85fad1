import { html, nothing, type TemplateResult } from 'lit';
import type { Option } from '../../cells/kind.ts';
import { LightElement } from './light-element.ts';

const LONG = 8;

/** One of a list: arrow keys walk it, Enter takes it, a long one can be filtered by typing. */
export class ChoiceEditor extends LightElement {
  static override properties = {
    options: { attribute: false },
    value: { attribute: false },
    label: {},
    choose: { attribute: false },
    filter: { state: true },
  };
  declare options: readonly Option[];
  declare value: string | null;
  declare label: string;
  declare choose: (value: string) => void;
  declare filter: string;

  constructor() {
    super();
    this.options = [];
    this.value = null;
    this.label = '';
    this.choose = () => undefined;
    this.filter = '';
  }

  protected override render(): TemplateResult {
    const shown = this.#shown();
    const current = shown.findIndex((option) => option.value === this.value);
    const stop = Math.max(0, current);
    const filter = html`<input
      class="filter"
      type="text"
      placeholder="type to narrow the list"
      aria-label="narrow the list"
      .value=${this.filter}
      @input=${(event: Event) => {
        this.filter = (event.target as HTMLInputElement).value;
      }}
      @keydown=${this.#filterKey}
    />`;
    return html`${this.options.length > LONG ? filter : nothing}
      <ul class="options" role="listbox" aria-label=${this.label} @keydown=${this.#key}>
        ${shown.map((option, at) => this.#option(option, at === stop))}
      </ul>
      ${shown.length === 0 ? html`<p class="hint">Nothing in the list has these letters.</p>` : nothing}`;
  }

  #shown(): readonly Option[] {
    const letters = this.filter.trim().toLowerCase();
    if (letters === '') return this.options;
    return this.options.filter((option) => option.label.toLowerCase().includes(letters));
  }

  #option(option: Option, stop: boolean): TemplateResult {
    const refused = option.refused !== undefined;
    const second = option.refused ?? option.hint;
    return html`<li
      class="option"
      role="option"
      tabindex=${stop ? 0 : -1}
      data-value=${option.value}
      aria-selected=${option.value === this.value}
      aria-disabled=${refused}
      @click=${() => refused || this.choose(option.value)}
    >
      <span>${option.label}</span>${second === undefined ? nothing : html`<small>${second}</small>`}
    </li>`;
  }

  #key(event: KeyboardEvent): void {
    const items = [...this.querySelectorAll<HTMLElement>('[role=option]')];
    const at = items.indexOf(event.target as HTMLElement);
    const moves: { readonly [key: string]: number } = {
      ArrowDown: at + 1,
      ArrowUp: at - 1,
      Home: 0,
      End: items.length - 1,
    };
    const to = moves[event.key];
    if (to !== undefined) {
      event.preventDefault();
      event.stopPropagation();
      if (to < 0) this.querySelector<HTMLElement>('.filter')?.focus();
      else items[Math.min(to, items.length - 1)]?.focus();
      return;
    }
    if (event.key !== 'Enter' && event.key !== ' ') {
      this.#letter(event, items, at);
      return;
    }
    event.preventDefault();
    event.stopPropagation();
    (event.target as HTMLElement).click();
  }

  /** Typing a letter goes to the next option that begins with it. */
  #letter(event: KeyboardEvent, items: readonly HTMLElement[], at: number): void {
    if (event.key.length !== 1 || event.ctrlKey || event.metaKey || event.altKey) return;
    const begins = (item: HTMLElement): boolean =>
      (item.textContent ?? '').trim().toLowerCase().startsWith(event.key.toLowerCase());
    const next = [...items.slice(at + 1), ...items.slice(0, at + 1)].find(begins);
    next?.focus();
  }

  #filterKey(event: KeyboardEvent): void {
    const items = [...this.querySelectorAll<HTMLElement>('[role=option]')];
    if (event.key === 'ArrowDown') {
      event.preventDefault();
      items[0]?.focus();
    } else if (event.key === 'Enter' && items.length > 0) {
      event.preventDefault();
      items.find((item) => item.getAttribute('aria-disabled') !== 'true')?.click();
    }
  }
}

customElements.define('sf-choice', ChoiceEditor);
