import { html, nothing, type PropertyValues, svg, type TemplateResult } from 'lit';
import type { FlowMark } from '../../cells/kind.ts';
import { count } from '../../cells/numbers.ts';
import { LightElement } from './light-element.ts';
import { bracketPath, type StemCell, type StemShape, stemShape } from './stem.ts';

/** Where the stem and the bracket stand in their column, px. */
const STEM_X = 104;
const BRACKET_X = 126;
const BOX = { x: 8, width: 58, height: 30 };

/** The participant-flow line beside the cells. It measures the cells and draws again when they move. */
export class StemView extends LightElement {
  static override properties = {
    cells: { attribute: false },
    pointed: { attribute: false },
    dependents: { attribute: false },
    measured: { state: true },
  };
  /** The shown cells in order, with what each says of the flow. */
  declare cells: readonly { readonly id: string; readonly flow: FlowMark | null }[];
  declare pointed: string | null;
  /** Cells that depend on the pointed one. */
  declare dependents: ReadonlySet<string>;
  declare measured: { readonly cells: readonly StemCell[]; readonly height: number };
  readonly #resized = new ResizeObserver(() => this.measure());

  constructor() {
    super();
    this.cells = [];
    this.pointed = null;
    this.dependents = new Set();
    this.measured = { cells: [], height: 0 };
  }

  override connectedCallback(): void {
    super.connectedCallback();
    if (this.parentElement !== null) this.#resized.observe(this.parentElement);
  }

  override disconnectedCallback(): void {
    super.disconnectedCallback();
    this.#resized.disconnect();
  }

  protected override updated(changed: PropertyValues): void {
    // the cells draw after the stem: they are measured once they have
    if (changed.has('cells')) requestAnimationFrame(() => this.measure());
  }

  /** Reads where the cells stand now. */
  measure(): void {
    const main = this.parentElement;
    if (main === null || this.offsetParent === null) return;
    const top = main.getBoundingClientRect().top;
    const cells: StemCell[] = [];
    for (const { id, flow } of this.cells) {
      const cell = main.querySelector(`[data-cell="${id}"]`);
      const name = cell?.querySelector('.name')?.getBoundingClientRect();
      const say = cell?.querySelector('.say')?.getBoundingClientRect();
      if (name === undefined || say === undefined) continue;
      cells.push({ id, flow, top: name.top + name.height / 2 - top, line: say.top + 17 - top });
    }
    const next = { cells, height: main.clientHeight };
    if (JSON.stringify(next) !== JSON.stringify(this.measured)) this.measured = next;
  }

  protected override render(): TemplateResult {
    const { cells, height } = this.measured;
    const shape = stemShape(cells, height);
    return html`<svg class="stem" width="148" height=${height} viewBox="0 0 148 ${height}" aria-hidden="true">
      ${shape.pieces.map(
        ({ from, to, width }) =>
          svg`<path class="stem-line" d="M${STEM_X} ${from}V${to}" stroke-width=${width.toFixed(2)} />`,
      )}
      ${ticks(shape)} ${branches(shape)} ${this.#bracket(cells)}
    </svg>`;
  }

  #bracket(cells: readonly StemCell[]): TemplateResult | typeof nothing {
    const from = cells.find((cell) => cell.id === this.pointed);
    if (from === undefined) return nothing;
    const readers = cells.filter((cell) => this.dependents.has(cell.id)).map((cell) => cell.line);
    return svg`<path class="bracket" d=${bracketPath(from.line, readers, BRACKET_X, 9)} />`;
  }
}

function ticks(shape: StemShape): readonly TemplateResult[] {
  return shape.ticks.map(
    ({ y, count: n, label }) => svg`<path class="tick" d="M${STEM_X - 6} ${y}h18" />
      <text class="n" x=${STEM_X - 14} y=${y - 2}>${count(n)}</text>
      <text class="l" x=${STEM_X - 14} y=${y + 12}>${label}</text>`,
  );
}

function branches(shape: StemShape): readonly TemplateResult[] {
  const middle = BOX.x + BOX.width / 2;
  return shape.branches.map(
    ({ y, setAside }) => svg`<path class="branch" d="M${STEM_X} ${y}H${BOX.x + BOX.width}" />
      <rect class="box" x=${BOX.x} y=${y - BOX.height / 2} width=${BOX.width} height=${BOX.height} />
      <text class="bn" x=${middle} y=${y - 1}>${count(setAside)}</text>
      <text class="bl" x=${middle} y=${y + 10}>set aside</text>`,
  );
}

customElements.define('sf-stem', StemView);
