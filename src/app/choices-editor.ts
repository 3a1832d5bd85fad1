import { html, nothing, type TemplateResult } from 'lit';
import type { Option } from '../../cells/kind.ts';
import { LightElement } from './light-element.ts';

/** Several of a list, each on or off at once; fewer than `atLeast` is said, not taken. */
export class ChoicesEditor extends LightElement {
  static override properties = {
    options: { attribute: false },
    values: { attribute: false },
    atLeast: { type: Number },
    label: {},
    choose: { attribute: false },
    filter: { state: true },
    draft: { state: true },
  };
  declare options: readonly Option[];
  declare values: readonly string[];
  declare atLeast: number;
  declare label: string;
  declare choose: (values: readonly string[]) => void;
  declare filter: string;
  /** Ticks that are too few to be taken yet. */
  declare draft: readonly string[] | null;

  constructor() {
    super();
    this.options = [];
    this.values = [];
    this.atLeast = 0;
    this.label = '';
    this.choose = () => undefined;
    this.filter = '';
    this.draft = null;
  }

  protected override render(): TemplateResult {
    const now = this.draft ?? this.values;
    const letters = this.filter.trim().toLowerCase();
    const shown = this.options.filter((option) => option.label.toLowerCase().includes(letters));
    return html`${this.options.length > 10 ? this.#filterField() : nothing}
      <fieldset class="options">
        <legend class="unseen">${this.label}</legend>
        ${shown.map((option) => this.#option(option, now))}
      </fieldset>
      ${
        now.length < this.atLeast
          ? html`<p class="problem" role="alert">Choose at least ${this.atLeast === 1 ? 'one' : this.atLeast}.</p>`
          : nothing
      }`;
  }

  #filterField(): TemplateResult {
    return html`<input
      class="filter"
      type="text"
      placeholder="type to narrow the list"
      aria-label="narrow the list"
      .value=${this.filter}
      @input=${(event: Event) => {
        this.filter = (event.target as HTMLInputElement).value;
      }}
    />`;
  }

  #option(option: Option, now: readonly string[]): TemplateResult {
    const on = now.includes(option.value);
    const second = option.refused ?? option.hint;
    return html`<label class="option">
      <input
        type="checkbox"
        .checked=${on}
        ?disabled=${option.refused !== undefined && !on}
        data-value=${option.value}
        @change=${() => this.#toggle(option.value, now)}
      />
      <span>${option.label}</span>${second === undefined ? nothing : html`<small>${second}</small>`}
    </label>`;
  }

  /** Kept in the order of the list, whatever the order of ticking. */
  #toggle(value: string, now: readonly string[]): void {
    const wanted = new Set(now.includes(value) ? now.filter((each) => each !== value) : [...now, value]);
    const listed = this.options.map((option) => option.value).filter((each) => wanted.has(each));
    const unlisted = [...wanted].filter((each) => !listed.includes(each));
    const next = [...listed, ...unlisted];
    this.draft = next.length < this.atLeast ? next : null;
    if (this.draft === null) this.choose(next);
  }
}

customElements.define('sf-choices', ChoicesEditor);
