import { html, type PropertyValues, type TemplateResult } from 'lit';
import { LightElement } from './light-element.ts';
import { placeOf, type Range, stepByKey, tickCount, valueAt } from './number-step.ts';

/** A straight ruler with one notch: a slider for pointer and keyboard. Tells `set` of every new value. */
export class Ruler extends LightElement {
  static override properties = {
    range: { attribute: false },
    value: { attribute: false },
    text: {},
    label: {},
    set: { attribute: false },
    plan: { attribute: false },
  };
  declare range: Range;
  declare value: number | null;
  /** The value as it is written: "20 %", "none". */
  declare text: string;
  declare label: string;
  declare set: (value: number | null) => void;
  /** Where the sealed plan stands; undefined = no sealed plan. */
  declare plan: number | null | undefined;
  #frame = 0;

  constructor() {
    super();
    this.range = { min: 0, max: 1, step: 1, none: false };
    this.value = null;
    this.text = '';
    this.label = '';
    this.set = () => undefined;
    this.plan = undefined;
  }

  override disconnectedCallback(): void {
    super.disconnectedCallback();
    cancelAnimationFrame(this.#frame);
  }

  protected override willUpdate(_changed: PropertyValues): void {
    const share = this.range.none ? 0.9 : 1;
    this.style.setProperty('--ticks', String(tickCount(this.range)));
    this.style.setProperty('--share', String(share));
    this.style.setProperty('--place', String(placeOf(this.value, this.range)));
  }

  protected override render(): TemplateResult {
    const { range, value } = this;
    return html`<span
      class="ruler"
      role="slider"
      tabindex="0"
      aria-label=${this.label}
      aria-valuemin=${range.min}
      aria-valuemax=${range.max}
      aria-valuenow=${value ?? range.max}
      aria-valuetext=${this.text}
      @keydown=${this.#key}
      @pointerdown=${this.#down}
      @pointermove=${this.#move}
      ><span class="ruler-line"></span>${
        this.plan === undefined
          ? null
          : html`<span class="ruler-plan" style="--at:${placeOf(this.plan, range)}"><span>plan</span></span>`
      }<span class="ruler-notch"></span
    ></span>`;
  }

  #key(event: KeyboardEvent): void {
    if (event.altKey || event.ctrlKey || event.metaKey) return;
    const next = stepByKey(event.key, this.value, this.range);
    if (next === undefined) return;
    event.preventDefault();
    event.stopPropagation();
    this.#become(next);
  }

  #down(event: PointerEvent): void {
    if (event.button !== 0) return;
    (event.currentTarget as HTMLElement).setPointerCapture(event.pointerId);
    this.#follow(event);
  }

  #move(event: PointerEvent): void {
    if ((event.currentTarget as HTMLElement).hasPointerCapture(event.pointerId)) this.#follow(event);
  }

  /** At most one step a frame, however fast the pointer moves. */
  #follow(event: PointerEvent): void {
    const box = (event.currentTarget as HTMLElement).getBoundingClientRect();
    const place = (event.clientX - box.left) / box.width;
    cancelAnimationFrame(this.#frame);
    this.#frame = requestAnimationFrame(() => this.#become(valueAt(place, this.range)));
  }

  #become(value: number | null): void {
    if (value === this.value) return;
    this.value = value;
    this.set(value);
  }
}

customElements.define('sf-ruler', Ruler);
