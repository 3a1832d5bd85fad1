import { html, nothing, type PropertyValues, type TemplateResult } from 'lit';
import { repeat } from 'lit/directives/repeat.js';
import './cell-view.ts';
import './chart.ts';
import './foot-view.ts';
import './head-view.ts';
import './log-sheet.ts';
import './points.ts';
import './save-sheet.ts';
import './sheet-view.ts';
import type { StemView } from './stem-view.ts';
import './stem-view.ts';
import './worksheets-sheet.ts';
import { type CellModel, computedOf } from './cell-model.ts';
import { CellModels } from './cell-models.ts';
import { claimOf, plannedOf } from './hold-reference.ts';
import { LightElement } from './light-element.ts';
import { changeOpensSheet, openConditionsSheet } from './open-sheets.ts';
import type { Page } from './page.ts';
import { saidOf } from './said.ts';
import { incomingSheet, keysSheet } from './small-sheets.ts';
import { stripModel } from './strip-model.ts';
import { thenView } from './then-view.ts';
import { dependentsOf } from './wiring.ts';

/** Below this width the notes fold under their cell and the stem is a thin line. */
const WIDE = 1100;

type StemFlow = StemView['cells'][number];

const EMPTY: ReadonlySet<string> = new Set();

/** The whole page: head, cells between stem and margin, foot, and the sheet that is open. */
export class AppView extends LightElement {
  static override properties = {
    page: { attribute: false },
    turn: { state: true },
    width: { state: true },
    live: { state: true },
  };
  declare page: Page;
  /** Rises whenever the page tells that something changed. */
  declare turn: number;
  declare width: number;
  /** What the live region says. */
  declare live: string;
  readonly #models = new CellModels();
  #stemCells: readonly StemFlow[] = [];
  #stop: () => void = () => undefined;
  #stopLive: () => void = () => undefined;
  readonly #resized = new ResizeObserver(() => this.#measure());

  constructor() {
    super();
    this.turn = 0;
    this.width = window.innerWidth;
    this.live = '';
  }

  override connectedCallback(): void {
    super.connectedCallback();
    this.#stop = this.page.subscribe(() => {
      this.turn++;
    });
    this.#stopLive = this.page.parts.document.subscribe((change) => void this.#say(change.type, change.label));
    this.#resized.observe(document.documentElement);
  }

  override disconnectedCallback(): void {
    super.disconnectedCallback();
    this.#stop();
    this.#stopLive();
    this.#resized.disconnect();
  }

  #measure(): void {
    this.width = document.documentElement.clientWidth;
  }

  /** Tells once what recomputed, when all of it has. */
  async #say(type: string, label: string): Promise<void> {
    const { document: open, engine } = this.page.parts;
    const { record } = open;
    await engine.idle();
    if (open.record !== record || type === 'open') return;
    const done = type === 'undo' ? `Taken back: ${label}. ` : type === 'redo' ? `Done again: ${label}. ` : '';
    const titles = this.page.recomputedTitles();
    this.live = `${done}${titles.length === 0 ? 'Nothing had to be recomputed.' : `Recomputed: ${titles.join(', ')}.`}`;
  }

  /** Width of the column of sentences, px: as the style sheet sets it. */
  #column(): number {
    if (this.width >= WIDE) return Math.min(680, this.width - 48 - 148 - 292 - 52);
    return Math.min(760, this.width - (this.width < 700 ? 58 : 96));
  }

  #stripWidth(): number {
    if (this.width >= WIDE) return Math.max(240, this.width - 64 - 372 - 220 - 56);
    return Math.max(240, this.width - 32);
  }

  protected override render(): TemplateResult {
    const { page, width } = this;
    const { view, worksheet } = page;
    const narrow = width < WIDE;
    const models = this.#models.of(page, this.#column());
    const { document: open } = page.parts;
    return html`<a class="skip" href="#cells" @click=${this.#skip}>to the cells</a>
      <sf-head
        .page=${page}
        .worksheet=${worksheet}
        .view=${view}
        .undoLabel=${open.undoLabel}
        .redoLabel=${open.redoLabel}
        .mayHold=${plannedOf(claimOf(page)) !== null}
      ></sf-head>
      ${this.#banner()}
      <main id="cells" tabindex="-1" class=${narrow ? 'narrow' : 'wide'} @pointerover=${this.#point} @focusin=${this.#point}>
        ${narrow ? nothing : this.#stem(models)}
        ${this.#cells(models, narrow)}
        <div class="end">${thenView(page, models.at(-1)?.cell.id ?? null, this.#thenOpen(models), true)}</div>
      </main>
      <sf-foot
        .page=${page}
        .worksheet=${worksheet}
        .strip=${stripModel(page, this.#stripWidth())}
        .open=${view.foot}
      ></sf-foot>
      ${this.#sheet()}
      <div class="unseen" role="status" aria-live="polite" data-part="live">${this.live}</div>
      <div hidden id="hint-number">Arrow keys change the number, Enter opens it.</div>
      <div hidden id="hint-blank">Enter opens it.</div>`;
  }

  protected override updated(_changed: PropertyValues): void {
    const title = `${this.page.worksheet.title} \u00b7 Standfast`;
    if (document.title !== title) document.title = title;
  }

  protected override firstUpdated(_changed: PropertyValues): void {
    this.#measure();
  }

  #thenOpen(models: readonly CellModel[]): boolean {
    const { panel } = this.page.view;
    return panel?.part === 'then' && panel.cellId === (models.at(-1)?.cell.id ?? '');
  }

  #stem(models: readonly CellModel[]): TemplateResult {
    const { page } = this;
    const { pointed } = page.view;
    const cells = models.map((model) => {
      const computed = computedOf(model.state);
      const shown = computed !== undefined && model.state.status !== 'veiled';
      const flow = shown && model.kind !== undefined ? saidOf(model.kind, computed, model.resolved).flow : null;
      return { id: model.cell.id, flow };
    });
    const before = this.#stemCells;
    const same = (cell: StemFlow, i: number): boolean => cell.id === before[i]?.id && cell.flow === before[i]?.flow;
    if (cells.length !== before.length || !cells.every(same)) this.#stemCells = cells;
    const dependents = pointed === null ? EMPTY : dependentsOf(page.worksheet, pointed);
    return html`<sf-stem
      .cells=${this.#stemCells} .pointed=${pointed} .dependents=${dependents}></sf-stem>`;
  }

  #cells(models: readonly CellModel[], narrow: boolean): unknown {
    const { page } = this;
    return repeat(
      models,
      (model) => model.cell.id,
      (model, i) =>
        html`<sf-cell
              .page=${page}
              .model=${model}
              .narrow=${narrow}
              .last=${i === models.length - 1}
            ></sf-cell>`,
    );
  }

  #banner(): TemplateResult | typeof nothing {
    const { banner } = this.page.view;
    if (banner === null) return nothing;
    return html`<div
      class=${banner.wrong ? 'banner wrong' : 'banner'}
      role=${banner.wrong ? 'alert' : 'status'}
      data-part="banner"
    >
      <p>${banner.text}</p>
      <button type="button" class="word" @click=${() => this.page.show({ banner: null })}>close</button>
    </div>`;
  }

  #sheet(): TemplateResult | typeof nothing {
    const { page } = this;
    const { sheet } = page.view;
    if (sheet === null) return nothing;
    const sheets = {
      log: {
        heading: 'Decision log',
        content: html`<sf-log .page=${page} .log=${page.worksheet.log}></sf-log>`,
      },
      keys: { heading: 'Keys', content: keysSheet() },
      worksheets: { heading: 'Worksheets', content: html`<sf-worksheets .page=${page}></sf-worksheets>` },
      save: { heading: 'Save a copy', content: html`<sf-save .page=${page} .worksheet=${page.worksheet}></sf-save>` },
      open: { heading: 'Open the conditions', content: openConditionsSheet(page) },
      opens: { heading: 'This opens the conditions', content: changeOpensSheet(page) },
      incoming: { heading: 'These data', content: incomingSheet(page) },
    };
    const { heading, content } = sheets[sheet];
    const close = (): void => {
      page.parts.document.answer(null);
      page.show({ sheet: null, incoming: null });
    };
    return html`<sf-sheet .heading=${heading} .name=${sheet} .content=${content} .close=${close}></sf-sheet>`;
  }

  #skip(event: Event): void {
    event.preventDefault();
    this.querySelector<HTMLElement>('main')?.focus();
  }

  /** The cell pointed at or focused: the bracket runs from it. */
  #point(event: Event): void {
    const cell = (event.target as Element).closest<HTMLElement>('[data-cell]')?.dataset.cell ?? null;
    if (cell !== null && cell !== this.page.view.pointed) this.page.show({ pointed: cell });
  }
}

customElements.define('sf-app', AppView);
