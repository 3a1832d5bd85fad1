import { html, type PropertyValues, type TemplateResult } from 'lit';
import { LightElement } from './light-element.ts';

/** A sheet over the page: what is behind waits; Escape or "close" puts it away and the focus goes back. */
export class SheetView extends LightElement {
  static override properties = { heading: {}, name: {}, content: { attribute: false }, close: { attribute: false } };
  declare heading: string;
  declare name: string;
  declare content: TemplateResult;
  declare close: () => void;
  #before: Element | null = null;

  constructor() {
    super();
    this.heading = '';
    this.name = '';
    this.content = html``;
    this.close = () => undefined;
  }

  override connectedCallback(): void {
    super.connectedCallback();
    this.#before = document.activeElement;
  }

  override disconnectedCallback(): void {
    super.disconnectedCallback();
    if (this.#before instanceof HTMLElement && this.#before.isConnected) this.#before.focus();
  }

  protected override firstUpdated(_changed: PropertyValues): void {
    this.querySelector('dialog')?.showModal();
  }

  protected override render(): TemplateResult {
    const outside = (event: MouseEvent): void => {
      if (event.target === event.currentTarget) this.close();
    };
    return html`<dialog
      class="sheet"
      aria-labelledby="sheet-heading"
      data-part=${`sheet-${this.name}`}
      @cancel=${(event: Event) => {
        event.preventDefault();
        this.close();
      }}
      @mousedown=${outside}
    >
      <div class="sheet-in">
        <div class="sheet-head">
          <h2 id="sheet-heading" class="serif">${this.heading}</h2>
          <button type="button" class="word" data-part="close" @click=${() => this.close()}>close</button>
        </div>
        ${this.content}
      </div>
    </dialog>`;
  }
}

customElements.define('sf-sheet', SheetView);
