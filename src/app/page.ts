import type { nothing, TemplateResult } from 'lit';
import type { Computed, Registry, Settings, ViewContext } from '../../cells/kind.ts';
import type { Runner } from '../workers/runner.ts';
import type { DataBlock, Worksheet } from '../worksheet/format.ts';
import { changeSentence } from './change-sentence.ts';
import type { WorksheetDocument } from './document.ts';
import { setSettings } from './edits.ts';
import type { PageEngine } from './page-engine.ts';
import type { Autosave, SaveState, Store } from './storage.ts';
import { cellOf, isHidden } from './wiring.ts';

export type Views = {
  readonly [kind: string]: (computed: Computed<never, never>, context: ViewContext) => TemplateResult | typeof nothing;
};

export type SheetName = 'log' | 'keys' | 'worksheets' | 'save' | 'open' | 'opens' | 'incoming';

export interface PageParts {
  readonly registry: Registry;
  readonly views: Views;
  readonly document: WorksheetDocument;
  readonly engine: PageEngine;
  readonly runner: Runner;
  readonly store: Store;
  readonly autosave: Autosave;
}

/** What is open and pointed at on the page; nothing of it is saved. */
export interface PageView {
  /** The blank whose panel is open. */
  readonly blank: { readonly cellId: string; readonly key: string } | null;
  /** Which quiet disclosure of which cell is open. */
  readonly panel: { readonly cellId: string; readonly part: 'arrange' | 'then' } | null;
  readonly sheet: SheetName | null;
  /** A sentence over the page: what could not be opened, what was done. */
  readonly banner: { readonly text: string; readonly wrong: boolean } | null;
  readonly theme: 'light' | 'dark';
  readonly save: SaveState;
  /** The cell pointed at or focused: the bracket starts there. */
  readonly pointed: string | null;
  /** Data that arrived without a blank to go to. */
  readonly incoming: DataBlock | null;
  readonly foot: boolean;
  /** The reason that stands in the sheet for opening the conditions from the start. */
  readonly openReason?: string;
}

const SAID_MS = 6000;

/** The page's one place of state: the document, the engine, and what is open; tells its parts once a frame. */
export class Page {
  readonly parts: PageParts;
  view: PageView;
  /** Cell id -> the computation that is marked as recomputed since the last edit. */
  readonly recomputed = new Map<string, number>();
  #counts = new Map<string, number>();
  /** Whether computations are marked: not those of a worksheet that was just opened. */
  #marking = false;
  #waiting = false;
  readonly #listeners = new Set<() => void>();

  constructor(parts: PageParts, view: PageView) {
    this.parts = parts;
    this.view = view;
    parts.document.subscribe((change) => {
      this.#marking = change.type !== 'open';
      if (this.#marking) parts.autosave.changed(change.record);
      if (!change.continued) {
        this.#counts = new Map(parts.engine.counts());
        this.recomputed.clear();
      }
      parts.engine.show(change.record);
      this.tell();
    });
    parts.engine.show(parts.document.record);
  }

  get worksheet(): Worksheet {
    return this.parts.document.record;
  }

  subscribe(listener: () => void): () => void {
    this.#listeners.add(listener);
    return () => this.#listeners.delete(listener);
  }

  /** Something changed: the parts draw at the next frame, or soon where the page is hidden. */
  tell(): void {
    if (this.#waiting) return;
    this.#waiting = true;
    const draw = (): void => {
      this.#waiting = false;
      for (const listener of this.#listeners) listener();
    };
    if (document.visibilityState === 'visible') requestAnimationFrame(draw);
    else setTimeout(draw, 0);
  }

  show(view: Partial<PageView>): void {
    this.view = { ...this.view, ...view };
    this.tell();
  }

  /** The engine's word that a cell's state changed. */
  stateChanged(cellId: string): void {
    const { engine } = this.parts;
    const state = engine.state(cellId);
    const before = this.#counts.get(cellId) ?? 0;
    if (this.#marking && state.status === 'fresh' && before > 0 && state.count > before)
      this.recomputed.set(cellId, state.count);
    this.tell();
  }

  /** Names of the cells that recomputed since the last edit, without the hidden ones. */
  recomputedTitles(): readonly string[] {
    const cells = this.worksheet.cells.filter((cell) => !isHidden(cell.kind) && this.recomputed.has(cell.id));
    return cells.map((cell) => this.parts.registry[cell.kind]?.title(cell.settings) ?? cell.kind);
  }

  /** Fills a blank: the log says what changed in the kind's own words. */
  fill(cellId: string, key: string, settings: Settings): void {
    const { document: open, registry, engine } = this.parts;
    const cell = cellOf(this.worksheet, cellId);
    const kind = cell === undefined ? undefined : registry[cell.kind];
    if (kind === undefined) return;
    const label = (before: Worksheet, after: Worksheet): string | null => {
      const was = cellOf(before, cellId);
      const is = cellOf(after, cellId);
      if (was === undefined || is === undefined) return null;
      return changeSentence(kind, was.settings, is.settings, { ...engine.context(cellId), shared: after.shared });
    };
    open.edit(label, (worksheet) => setSettings(worksheet, cellId, settings), { merge: `${cellId}.${key}` });
  }

  /** A sentence over the page; what went well goes away by itself. */
  say(text: string, wrong = false): void {
    const banner = { text, wrong };
    this.show({ banner });
    if (!wrong) setTimeout(() => this.view.banner === banner && this.show({ banner: null }), SAID_MS);
  }
}
