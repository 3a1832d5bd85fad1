import { html, type PropertyValues, type TemplateResult } from 'lit';
import embed, { type EmbedOptions, type Result } from 'vega-embed';
import { expressionInterpreter } from 'vega-interpreter';
import { chartConfig, withColours } from './chart-config.ts';
import { download } from './download.ts';
import { LightElement } from './light-element.ts';
import { type Colours, coloursOf } from './theme.ts';
import { WhenSeen } from './when-seen.ts';

type Rows = readonly object[];

/** Refuses every address: a figure is made of what the page holds, and of nothing else. */
const refusing = {
  load: () => Promise.reject(new Error('a figure may not load anything')),
  sanitize: () => Promise.reject(new Error('a figure may not load anything')),
  http: () => Promise.reject(new Error('a figure may not load anything')),
  file: () => Promise.reject(new Error('a figure may not load anything')),
};

/**
 * A figure from a Vega-Lite specification and named rows. While only the rows change the drawn figure is given the
 * new ones; it is not made again.
 */
export class ChartView extends LightElement {
  static override properties = { spec: { attribute: false }, data: { attribute: false }, label: {} };
  declare spec: object | undefined;
  declare data: { readonly [name: string]: Rows };
  declare label: string;
  #shown: Result | null = null;
  #key = '';
  #rows: { readonly [name: string]: Rows } = {};
  /** Figures are made one after another: a newer one waits for the one being made. */
  #turn: Promise<void> = Promise.resolve();
  readonly #seen = new WhenSeen(() => this.#next());

  constructor() {
    super();
    this.spec = undefined;
    this.data = {};
    this.label = '';
  }

  override connectedCallback(): void {
    super.connectedCallback();
    window.addEventListener('sf-theme', this.#again);
    this.#seen.watch(this);
    if (this.hasUpdated) this.#again();
  }

  override disconnectedCallback(): void {
    super.disconnectedCallback();
    window.removeEventListener('sf-theme', this.#again);
    this.#seen.stop();
    this.#shown?.finalize();
    this.#shown = null;
    this.#key = '';
  }

  protected override render(): TemplateResult {
    return html`<div class="chart" role="img" tabindex="0" aria-label=${this.label} data-part="chart">
        <div class="chart-in" aria-hidden="true"></div>
      </div>
      <div class="words keep">
        <button type="button" class="word" aria-label="save this figure as SVG" @click=${this.#saveSvg}>SVG</button>
        <button type="button" class="word" aria-label="save this figure as PNG" @click=${this.#savePng}>PNG</button>
      </div>`;
  }

  protected override updated(_changed: PropertyValues): void {
    this.#seen.ask();
  }

  #again = (): void => {
    this.#key = '';
    this.#seen.ask();
  };

  #next(): void {
    this.#turn = this.#turn.then(() => this.#draw()).catch((error) => this.#failed(error));
  }

  async #draw(): Promise<void> {
    const place = this.querySelector<HTMLElement>('.chart-in');
    if (this.spec === undefined || place === null || !this.isConnected) return;
    const colours = coloursOf();
    const key = JSON.stringify([this.spec, colours]);
    if (key === this.#key && this.#shown !== null) {
      await this.#give(this.#shown);
      return;
    }
    this.#shown?.finalize();
    this.#key = key;
    this.#rows = this.data;
    this.#shown = await embed(place, specOf(this.spec, this.data, colours), optionsOf(colours, 'canvas'));
  }

  async #give(shown: Result): Promise<void> {
    const changed = Object.entries(this.data).filter(([name, rows]) => !sameRows(rows, this.#rows[name]));
    if (changed.length === 0) return;
    for (const [name, rows] of changed) shown.view.data(name, [...rows]);
    this.#rows = this.data;
    await shown.view.runAsync();
  }

  #failed(error: unknown): void {
    const place = this.querySelector<HTMLElement>('.chart-in');
    const words = error instanceof Error ? error.message : String(error);
    if (place !== null) place.textContent = `This figure could not be drawn: ${words}`;
    this.#key = '';
  }

  /** The figure for a file: always in the light colours. */
  async #made(): Promise<Result | null> {
    if (this.spec === undefined) return null;
    const colours = coloursOf('light');
    const place = document.createElement('div');
    return embed(place, specOf(this.spec, this.data, colours), optionsOf(colours, 'svg'));
  }

  async #saveSvg(): Promise<void> {
    const made = await this.#made();
    if (made === null) return;
    const svg = await made.view.toSVG();
    made.finalize();
    download(new Blob([svg], { type: 'image/svg+xml' }), `${this.getAttribute('name') ?? 'figure'}.svg`);
  }

  async #savePng(): Promise<void> {
    const made = await this.#made();
    if (made === null) return;
    made.view.background(coloursOf('light').sheet);
    const canvas = await made.view.toCanvas(2);
    made.finalize();
    canvas.toBlob((blob) => blob !== null && download(blob, `${this.getAttribute('name') ?? 'figure'}.png`));
  }
}

/** Whether a figure need not be given these rows again. */
function sameRows(a: Rows, b: Rows | undefined): boolean {
  return a === b || (b !== undefined && a.length === b.length && JSON.stringify(a) === JSON.stringify(b));
}

/** The specification as drawn: named rows filled in, the page's colours, nothing of its own settings for embedding. */
function specOf(spec: object, data: { readonly [name: string]: Rows }, colours: Colours): EmbedSpec {
  const { usermeta: _, ...rest } = withColours(spec, colours) as { usermeta?: unknown };
  const datasets = Object.fromEntries(Object.entries(data).map(([name, rows]) => [name, [...rows]]));
  return { ...rest, datasets } as EmbedSpec;
}

type EmbedSpec = Parameters<typeof embed>[1];

function optionsOf(colours: Colours, renderer: 'canvas' | 'svg'): EmbedOptions {
  return {
    mode: 'vega-lite',
    actions: false,
    renderer,
    ast: true,
    expr: expressionInterpreter,
    loader: refusing,
    config: chartConfig(colours),
    tooltip: false,
    // an empty ghost or band is no fault: only errors are told
    logLevel: 1,
  } as unknown as EmbedOptions;
}

customElements.define('sf-chart', ChartView);
