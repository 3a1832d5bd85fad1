import { html, LitElement, type TemplateResult } from 'lit';
import type { Rule } from '../../src/analysis/rules.ts';
import type { ScoreSpec } from '../../src/analysis/score.ts';
import type { Picture } from './chart.ts';

/** The state of the worksheet an analysis stands for. */
export interface Adopted {
  readonly rules: readonly Rule[];
  readonly trim: number;
  readonly estimator: string;
  readonly score: ScoreSpec;
}

/** One analysis as it is walked over. */
export interface WalkRow {
  /** Short, for the list. */
  readonly line: string;
  readonly sentence: string;
  readonly own: boolean;
  readonly adopted: Adopted;
}

/** Rows of the list shown before and after the one that is read. */
const AROUND = 3;

/**
 * The picture with a list of its analyses below, from left to right: pointing at a column or walking the list with the
 * arrow keys reads an analysis as a sentence, and the button puts the worksheet into its state.
 */
export class SensitivityWalk extends LitElement {
  static override properties = {
    picture: { attribute: false },
    rows: { attribute: false },
    label: {},
    active: { state: true },
  };
  declare picture: Picture;
  declare rows: readonly WalkRow[];
  declare label: string;
  declare active: number | null;

  constructor() {
    super();
    this.rows = [];
    this.label = '';
    this.active = null;
  }

  /** One style sheet and one tree, as the rest of the page. */
  protected override createRenderRoot(): HTMLElement {
    return this;
  }

  get #at(): number {
    const own = this.rows.findIndex((row) => row.own);
    return Math.min(Math.max(0, this.active ?? own), Math.max(0, this.rows.length - 1));
  }

  protected override render(): TemplateResult {
    const at = this.#at;
    const row = this.rows[at];
    const data = { ...this.picture.data, active: row === undefined ? [] : [{ x: at }] };
    return html`<div class="walk-picture" @mousemove=${this.#pointed} @click=${this.#pressed}>
        <sf-chart .spec=${this.picture.spec} .data=${data} label=${this.label} name="sensitivity"></sf-chart>
      </div>
      ${row === undefined ? null : this.#list(row, at)}`;
  }

  #list(row: WalkRow, at: number): TemplateResult {
    const first = Math.max(0, Math.min(at - AROUND, this.rows.length - 2 * AROUND - 1));
    const shown = this.rows.slice(first, first + 2 * AROUND + 1);
    return html`<div
        class="walk"
        role="listbox"
        tabindex="0"
        data-part="walk"
        aria-label=${`${this.rows.length} analyses, from the lowest estimate to the highest`}
        aria-activedescendant=${`${this.id}-${at}`}
        @keydown=${this.#key}
      >
        ${shown.map((each, i) => {
          const place = first + i;
          return html`<div
            role="option"
            id=${`${this.id}-${place}`}
            aria-selected=${place === at}
            aria-setsize=${this.rows.length}
            aria-posinset=${place + 1}
            class=${place === at ? 'read' : ''}
            @click=${() => this.#read(place)}
          >
            ${each.line}
          </div>`;
        })}
      </div>
      <p class="walk-sentence" aria-live="polite" data-part="walk-sentence">
        ${`${at + 1} of ${this.rows.length}. ${row.sentence}`}
      </p>
      <button
        type="button"
        class="word"
        data-part="adopt"
        ?disabled=${row.own}
        @click=${() => this.#adopt(row.adopted)}
      >
        ${row.own ? 'the worksheet stands here' : 'put the worksheet into this state'}
      </button>`;
  }

  #read(place: number): void {
    this.active = Math.min(Math.max(0, place), this.rows.length - 1);
  }

  #key(event: KeyboardEvent): void {
    const steps: { readonly [key: string]: number } = {
      ArrowDown: 1,
      ArrowRight: 1,
      ArrowUp: -1,
      ArrowLeft: -1,
      PageDown: 10,
      PageUp: -10,
      Home: -this.rows.length,
      End: this.rows.length,
    };
    const step = steps[event.key];
    const row = this.rows[this.#at];
    if (step !== undefined) this.#read(this.#at + step);
    else if (event.key === 'Enter' && row !== undefined && !row.own) this.#adopt(row.adopted);
    else return;
    event.preventDefault();
  }

  /** The analysis under the pointer, or null beside the picture. */
  #under(event: MouseEvent): number | null {
    const canvas = this.querySelector('canvas');
    if (canvas === null) return null;
    const place = Math.floor(
      (event.clientX - canvas.getBoundingClientRect().left - this.picture.left) / this.picture.step,
    );
    return place >= 0 && place < this.rows.length ? place : null;
  }

  #pointed(event: MouseEvent): void {
    const place = this.#under(event);
    if (place !== null) this.#read(place);
  }

  #pressed(event: MouseEvent): void {
    if (this.#under(event) === null || !(event.target instanceof HTMLCanvasElement)) return;
    this.querySelector<HTMLElement>('[role=listbox]')?.focus();
  }

  #adopt(detail: Adopted): void {
    this.dispatchEvent(new CustomEvent('sf-adopt', { detail, bubbles: true, composed: true }));
  }
}

customElements.define('sf-sensitivity-walk', SensitivityWalk);
