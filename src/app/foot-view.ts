import { html, nothing, type PropertyValues, type TemplateResult } from 'lit';
import './ruler.ts';
import './strip-view.ts';
import type { SharedNumber, Worksheet } from '../worksheet/format.ts';
import { dropShared, renameShared, setShared } from './cell-actions.ts';
import { titleOf } from './cell-model.ts';
import { usersOf } from './edits.ts';
import { LightElement } from './light-element.ts';
import type { Page } from './page.ts';
import { sharedText } from './shared-text.ts';
import type { StripModel } from './strip-view.ts';

/** The foot, always in view: the shared numbers on their rulers over the standing strip; folds to one line. */
export class FootView extends LightElement {
  static override properties = {
    page: { attribute: false },
    worksheet: { attribute: false },
    strip: { attribute: false },
    open: { type: Boolean },
    naming: { state: true },
  };
  declare page: Page;
  declare worksheet: Worksheet;
  declare strip: StripModel;
  declare open: boolean;
  declare naming: string | null;
  #watched: Element | null = null;
  readonly #resized = new ResizeObserver(() => this.#makeRoom());

  constructor() {
    super();
    this.open = true;
    this.naming = null;
  }

  override disconnectedCallback(): void {
    super.disconnectedCallback();
    this.#resized.disconnect();
  }

  /** The page leaves as much room below as the foot takes. */
  #makeRoom(): void {
    const foot = this.querySelector<HTMLElement>('footer');
    document.documentElement.style.setProperty('--foot', `${foot?.offsetHeight ?? 0}px`);
  }

  protected override updated(_changed: PropertyValues): void {
    const foot = this.querySelector('footer');
    if (foot !== null && foot !== this.#watched) {
      this.#resized.disconnect();
      this.#resized.observe(foot);
      this.#watched = foot;
    }
    if (this.naming !== null) this.querySelector<HTMLInputElement>('.naming input')?.focus();
  }

  protected override render(): TemplateResult {
    const { page, worksheet, strip, open } = this;
    const fold = html`<button
      type="button"
      class="word quiet fold"
      data-part="fold"
      aria-expanded=${open}
      @click=${() => page.show({ foot: !open })}
    >
      ${open ? 'fold' : 'show'}
    </button>`;
    if (!open) {
      return html`<footer class="page-foot folded" aria-label="shared numbers and standing strip">
        <sf-strip .model=${strip} .page=${page} line></sf-strip>
        ${fold}
      </footer>`;
    }
    return html`<footer class="page-foot" aria-label="shared numbers and standing strip">
      <div class="dials" role="group" aria-label="shared numbers">
        ${worksheet.shared.map((shared) => this.#dial(shared))}
        ${worksheet.shared.length === 0 ? html`<span class="hint">No number is shared yet.</span>` : nothing} ${fold}
      </div>
      <sf-strip .model=${strip} .page=${page}></sf-strip>
    </footer>`;
  }

  #dial(shared: SharedNumber): TemplateResult {
    const set = (value: number | null): void => setShared(this.page, shared.id, value);
    return html`<div class="dial-of" data-shared=${shared.id} data-part="shared-number">
      <button
        type="button"
        class="dial-name"
        aria-expanded=${this.naming === shared.id}
        title="what uses this number"
        @click=${() => {
          this.naming = this.naming === shared.id ? null : shared.id;
        }}
      >
        ${shared.name}
      </button>
      <sf-ruler
        .range=${shared}
        .value=${shared.value}
        .text=${sharedText(shared)}
        .label=${shared.name}
        .set=${set}
      ></sf-ruler>
      <span class="dial-value" data-part="shared-value">${sharedText(shared)}</span>
      ${this.naming === shared.id ? this.#about(shared) : nothing}
    </div>`;
  }

  #about(shared: SharedNumber): TemplateResult {
    const users = usersOf(this.worksheet, shared.id);
    const names = users.map((cell) => titleOf(this.page.parts.registry, cell)).join(', ');
    const close = (): void => {
      this.naming = null;
      this.querySelector<HTMLElement>(`[data-shared="${shared.id}"] .dial-name`)?.focus();
    };
    const key = (event: KeyboardEvent): void => {
      if (event.key !== 'Escape' && event.key !== 'Enter') return;
      event.stopPropagation();
      if (event.key === 'Enter') renameShared(this.page, shared.id, (event.target as HTMLInputElement).value ?? '');
      close();
    };
    return html`<div class="panel above" role="dialog" aria-label="shared number ${shared.name}" @keydown=${key}>
      <label class="naming"
        >name
        <input
          type="text"
          maxlength="40"
          .value=${shared.name}
          @change=${(event: Event) => renameShared(this.page, shared.id, (event.target as HTMLInputElement).value)}
      /></label>
      <p class="hint">${users.length === 0 ? 'No cell uses it.' : `Used by ${names}.`}</p>
      <div class="words">
        ${
          users.length === 0
            ? html`<button type="button" class="word" @click=${() => dropShared(this.page, shared)}>remove it</button>`
            : nothing
        }
        <button type="button" class="word" @click=${close}>done</button>
      </div>
    </div>`;
  }
}

customElements.define('sf-foot', FootView);
