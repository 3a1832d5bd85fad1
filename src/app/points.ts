import { html, type PropertyValues, type TemplateResult } from 'lit';
import { download } from './download.ts';
import { LightElement } from './light-element.ts';
import {
  bands,
  type StripBox,
  type StripColours,
  stripBox,
  stripSvg,
  tickLabels,
  wordsY,
  xAt,
  yAt,
} from './points-geometry.ts';
import { type PointScale, type PointStrip, pointScale } from './points-scale.ts';
import { coloursOf } from './theme.ts';
import { WhenSeen } from './when-seen.ts';

/**
 * A strip of raw scores on a plain canvas: kept ones as translucent dots, those set aside as hollow circles. The limits
 * lie on a canvas of their own below, so that moving one does not draw thousands of points again.
 */
export class PointsView extends LightElement {
  static override properties = { points: { attribute: false }, label: {}, theme: { state: true } };
  declare points: PointStrip | undefined;
  declare label: string;
  declare theme: string;
  #width = 0;
  /** What the points and the axis were drawn from. */
  #drawn: { x: Float64Array; mark: Uint8Array; axis: string } | null = null;
  readonly #seen = new WhenSeen(() => this.#draw());
  readonly #resized = new ResizeObserver(() => this.#measure());

  constructor() {
    super();
    this.points = undefined;
    this.label = '';
    this.theme = '';
  }

  override connectedCallback(): void {
    super.connectedCallback();
    this.#resized.observe(this);
    this.#seen.watch(this);
    window.addEventListener('sf-theme', this.#themed);
  }

  override disconnectedCallback(): void {
    super.disconnectedCallback();
    this.#resized.disconnect();
    this.#seen.stop();
    window.removeEventListener('sf-theme', this.#themed);
  }

  protected override render(): TemplateResult {
    return html`<div class="strip-of-points" role="img" tabindex="0" aria-label=${this.label}>
        <canvas class="limits"></canvas><canvas class="dots"></canvas><canvas class="axis"></canvas>
      </div>
      <div class="words keep">
        <button type="button" class="word" aria-label="save this figure as SVG" @click=${this.#saveSvg}>SVG</button>
        <button type="button" class="word" aria-label="save this figure as PNG" @click=${this.#savePng}>PNG</button>
      </div>`;
  }

  protected override updated(_changed: PropertyValues): void {
    this.#seen.ask();
  }

  #themed = (): void => {
    this.theme = document.documentElement.dataset.theme ?? '';
  };

  #measure(): void {
    const width = Math.round(this.clientWidth);
    if (width === this.#width) return;
    this.#width = width;
    this.#draw();
  }

  #draw(): void {
    const strip = this.points;
    const width = this.#width || Math.round(this.clientWidth);
    if (strip === undefined || width === 0) return;
    const scale = pointScale(strip);
    const box = stripBox(strip, width);
    const colours = coloursOf();
    drawLimits(this.#canvas('.limits', box), strip, scale, box, colours);
    const { x, mark } = strip;
    const axis = `${width} ${this.theme} ${scale.log} ${scale.low} ${scale.high} ${strip.axis}`;
    const was = this.#drawn;
    if (was?.axis !== axis) drawAxis(this.#canvas('.axis', box), scale, box, colours);
    if (was?.axis !== axis || was.x !== x || was.mark !== mark) {
      drawPoints(this.#canvas('.dots', box), strip, scale, box, colours);
    }
    this.#drawn = { x, mark, axis };
  }

  #canvas(which: string, box: StripBox): CanvasRenderingContext2D | null {
    const canvas = this.querySelector<HTMLCanvasElement>(which);
    return canvas === null ? null : sized(canvas, box, window.devicePixelRatio || 1);
  }

  #saveSvg(): void {
    const strip = this.points;
    if (strip === undefined) return;
    const svg = stripSvg(strip, pointScale(strip), stripBox(strip, 652), coloursOf('light'));
    download(new Blob([svg], { type: 'image/svg+xml' }), 'scores.svg');
  }

  #savePng(): void {
    const strip = this.points;
    if (strip === undefined) return;
    const box = stripBox(strip, 652);
    const canvas = document.createElement('canvas');
    const context = sized(canvas, box, 2);
    const colours = coloursOf('light');
    const scale = pointScale(strip);
    if (context !== null) {
      context.fillStyle = colours.sheet;
      context.fillRect(0, 0, box.width, box.height);
    }
    drawLimits(context, strip, scale, box, colours);
    drawPoints(context, strip, scale, box, colours);
    drawAxis(context, scale, box, colours);
    canvas.toBlob((blob) => blob !== null && download(blob, 'scores.png'));
  }
}

function sized(canvas: HTMLCanvasElement, box: StripBox, ratio: number): CanvasRenderingContext2D | null {
  canvas.width = Math.round(box.width * ratio);
  canvas.height = Math.round(box.height * ratio);
  canvas.style.width = `${box.width}px`;
  canvas.style.height = `${box.height}px`;
  const context = canvas.getContext('2d');
  context?.scale(ratio, ratio);
  return context;
}

function drawLimits(
  context: CanvasRenderingContext2D | null,
  strip: PointStrip,
  scale: PointScale,
  box: StripBox,
  colours: StripColours,
): void {
  if (context === null) return;
  for (const band of bands(strip, scale, box)) {
    context.fillStyle = colours.band;
    context.fillRect(band.x, band.y, band.width, band.height);
    context.fillStyle = colours.aside;
    if (band.from) context.fillRect(band.x - 0.6, band.y, 1.2, band.height);
    if (band.to) context.fillRect(band.x + band.width - 0.6, band.y, 1.2, band.height);
  }
}

function drawPoints(
  context: CanvasRenderingContext2D | null,
  strip: PointStrip,
  scale: PointScale,
  box: StripBox,
  colours: StripColours,
): void {
  if (context === null) return;
  const { x, row, mark } = strip;
  context.fillStyle = colours.ink;
  context.globalAlpha = x.length > 6000 ? 0.28 : 0.45;
  // squares of two px draw ten times as fast as arcs and look the same
  for (let i = 0; i < x.length; i++) {
    if (mark[i] === 1 || !Number.isFinite(x[i])) continue;
    context.fillRect(xAt(x[i] as number, scale, box) - 1.25, yAt(row[i] as number, box) - 1.25, 2.5, 2.5);
  }
  context.globalAlpha = 1;
  context.strokeStyle = colours.aside;
  context.lineWidth = 1.4;
  context.beginPath();
  for (let i = 0; i < x.length; i++) {
    if (mark[i] !== 1 || !Number.isFinite(x[i])) continue;
    const at = xAt(x[i] as number, scale, box);
    const y = yAt(row[i] as number, box);
    context.moveTo(at + 2.8, y);
    context.arc(at, y, 2.8, 0, 2 * Math.PI);
  }
  context.stroke();
}

function drawAxis(
  context: CanvasRenderingContext2D | null,
  scale: PointScale,
  box: StripBox,
  colours: StripColours,
): void {
  if (context === null) return;
  context.fillStyle = colours.axis;
  context.fillRect(box.left, box.bottom, box.right - box.left, 1);
  context.textAlign = 'center';
  context.font = `11.5px ${colours.font}`;
  for (const { x, text } of tickLabels(scale, box)) {
    context.fillStyle = colours.axis;
    context.fillRect(x - 0.5, box.bottom, 1, 5);
    context.fillStyle = colours.soft;
    context.fillText(text, x, box.bottom + 17);
  }
  for (const [i, line] of box.words.entries()) {
    context.fillText(line, (box.left + box.right) / 2, wordsY(box, i), box.right - box.left);
  }
}

customElements.define('sf-points', PointsView);
