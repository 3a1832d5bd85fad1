import { html, nothing, type TemplateResult } from 'lit';
import './blank-panel.ts';
import type { Note, Part } from '../../cells/kind.ts';
import { count } from '../../cells/numbers.ts';
import { arrangeView } from './arrange-view.ts';
import { moveCell } from './cell-actions.ts';
import { cellKey } from './cell-keys.ts';
import { type CellModel, computedOf } from './cell-model.ts';
import { startDrag } from './drag-cell.ts';
import { LightElement } from './light-element.ts';
import { notesView } from './notes-view.ts';
import { outputView, progressView } from './output-view.ts';
import type { Page } from './page.ts';
import { saidOf } from './said.ts';
import { sentenceView } from './sentence-view.ts';
import { thenView } from './then-view.ts';

/** One cell on the page: the quiet word, the sentence with its blanks, what it came to, and the margin beside it. */
export class CellView extends LightElement {
  static override properties = {
    model: { attribute: false },
    page: { attribute: false },
    narrow: { type: Boolean },
    last: { type: Boolean },
  };
  declare model: CellModel;
  declare page: Page;
  declare narrow: boolean;
  declare last: boolean;

  constructor() {
    super();
    this.narrow = false;
    this.last = false;
  }

  protected override render(): TemplateResult {
    const { model, page } = this;
    const { cell, kind, state, recomputed } = model;
    const live = recomputed === 0 ? '' : recomputed % 2 === 0 ? ' live even' : ' live odd';
    return html`<section
      class="cell${live}${cell.leftOut === true ? ' left-out' : ''}"
      role="group"
      tabindex="-1"
      data-cell=${cell.id}
      data-kind=${cell.kind}
      data-status=${state.status}
      aria-busy=${state.status === 'computing'}
      aria-labelledby="name-${cell.id}"
      @keydown=${(event: KeyboardEvent) => cellKey(page, cell.id, event)}
    >
      <div class="stem-space">${this.#handle()}</div>
      <div class="body">
        <div class="head-line">
          <h2 class="name" id="name-${cell.id}" data-part="name">
            ${kind?.title(cell.settings) ?? cell.kind}${
              recomputed === 0 ? nothing : html`<span class="recomputed"> \u00b7 recomputed</span>`
            }${
              cell.leftOut === true && state.status !== 'left-out'
                ? html`<span> \u00b7 left out for now</span>`
                : nothing
            }
          </h2>
          ${this.narrow ? this.#counts() : nothing} ${progressView(model)}
          <div class="arranging">${arrangeView(page, model)}</div>
        </div>
        <div class="say serif" data-part="sentence">
          ${kind === undefined ? cell.kind : sentenceView(page, cell.id, this.#parts(), model.openBlank)}
        </div>
        ${this.#panel()} ${outputView(page, model)}
        ${this.narrow ? notesView(this.#notes(), true) : nothing}
        ${this.last ? nothing : thenView(page, cell.id, model.openPanel === 'then', false)}
      </div>
      ${this.narrow ? nothing : notesView(this.#notes(), false)}
    </section>`;
  }

  #parts(): readonly Part[] {
    const { kind, cell, context } = this.model;
    return kind?.sentence(cell.settings, context) ?? [];
  }

  #notes(): readonly Note[] {
    const { kind, state, resolved } = this.model;
    const computed = state.status === 'fresh' || state.status === 'computing' ? computedOf(state) : undefined;
    return computed === undefined || kind === undefined ? [] : saidOf(kind, computed, resolved).notes;
  }

  #panel(): TemplateResult | typeof nothing {
    const { openBlank, cell } = this.model;
    const blank = this.#parts().find((part) => typeof part !== 'string' && part.key === openBlank);
    if (openBlank === null || blank === undefined || typeof blank === 'string') return nothing;
    return html`<sf-blank-panel .blank=${blank} .cellId=${cell.id} .page=${this.page}></sf-blank-panel>`;
  }

  /** On a narrow page the stem is a thin line and its counts stand in words beside the cell's name. */
  #counts(): TemplateResult | typeof nothing {
    const { kind, state, resolved } = this.model;
    const computed = computedOf(state);
    const flow = computed === undefined || kind === undefined ? null : saidOf(kind, computed, resolved).flow;
    if (flow === null) return nothing;
    const aside =
      (flow.setAside ?? 0) > 0
        ? html`<span class="aside-count">${count(flow.setAside ?? 0)} set aside</span>`
        : nothing;
    const tick =
      flow.count === undefined ? nothing : html`<span class="tick-count">${count(flow.count)} ${flow.label}</span>`;
    return html`<span class="flow">${aside} ${tick}</span>`;
  }

  #handle(): TemplateResult {
    const { page, model } = this;
    const { id } = model.cell;
    const key = (event: KeyboardEvent): void => {
      if (event.key !== 'ArrowUp' && event.key !== 'ArrowDown') return;
      event.preventDefault();
      event.stopPropagation();
      moveCell(page, id, event.key === 'ArrowUp' ? -1 : 1);
    };
    return html`<button
      type="button"
      class="handle"
      data-part="handle"
      tabindex="-1"
      aria-label="drag to move this cell; arrow keys move it"
      title="drag to move"
      @pointerdown=${(event: PointerEvent) => startDrag(page, id, event)}
      @keydown=${key}
    ></button>`;
  }
}

customElements.define('sf-cell', CellView);
