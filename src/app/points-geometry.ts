import { fixed } from '../../cells/numbers.ts';
import { limitAt, type PointScale, type PointStrip } from './points-scale.ts';

/** Measures of a strip in px. */
export interface StripBox {
  readonly width: number;
  readonly left: number;
  readonly right: number;
  readonly top: number;
  readonly bottom: number;
  readonly height: number;
  readonly rowHeight: number;
  /** The words under the axis, in lines that fit. */
  readonly words: readonly string[];
}

/** Words broken between their parts where one line is too short. */
function linesOf(words: string, width: number): readonly string[] {
  const lines: string[] = [];
  for (const part of words.split(' \u00b7 ')) {
    const last = lines.at(-1);
    const joined = last === undefined ? part : `${last} \u00b7 ${part}`;
    if (last !== undefined && joined.length * LETTER > width) lines.push(part);
    else lines[Math.max(0, lines.length - 1)] = joined;
  }
  return lines;
}

const AXIS = 26;
const LINE = 14;
/** Width of a letter of the axis text, about. */
const LETTER = 6;

export function stripBox(strip: PointStrip, width: number): StripBox {
  const { rows } = strip;
  const words = linesOf(strip.axis, width - 20);
  const plot = Math.min(260, Math.max(92, rows * 5));
  const top = 4;
  return {
    width,
    left: 10,
    right: width - 10,
    top,
    bottom: top + plot,
    height: top + plot + AXIS + LINE * words.length,
    rowHeight: plot / Math.max(1, rows),
    words,
  };
}

/** x in px, held inside the box so that an infinite limit stands at its edge. */
export function xAt(value: number, scale: PointScale, box: StripBox): number {
  if (scale.log && value <= 0) return box.left;
  const place = scale.place(value);
  return box.left + Math.min(1, Math.max(0, place)) * (box.right - box.left);
}

export function yAt(row: number, box: StripBox): number {
  return box.top + (row + 0.5) * box.rowHeight;
}

/** Foot of a line of the words under the axis. */
export function wordsY(box: StripBox, line: number): number {
  return box.bottom + 34 + line * LINE;
}

export interface Band {
  readonly x: number;
  readonly y: number;
  readonly width: number;
  readonly height: number;
  /** Limit lines at the left and right end. */
  readonly from: boolean;
  readonly to: boolean;
}

/** What is kept: one band where the limits are the same for all rows, else one a row. */
export function bands(strip: PointStrip, scale: PointScale, box: StripBox): readonly Band[] {
  const { from, to } = strip.limits;
  if (from === null && to === null) return [];
  const perRow = (from?.length ?? 1) > 1 || (to?.length ?? 1) > 1;
  const made: Band[] = [];
  for (let row = 0; row < (perRow ? strip.rows : 1); row++) {
    const low = limitAt(from, row);
    const high = limitAt(to, row);
    if (low === null && high === null) continue;
    const left = low === null ? box.left : xAt(low, scale, box);
    const right = high === null ? box.right : xAt(high, scale, box);
    made.push({
      x: left,
      y: perRow ? box.top + row * box.rowHeight : box.top,
      width: Math.max(0, right - left),
      height: perRow ? box.rowHeight : box.bottom - box.top,
      from: low !== null,
      to: high !== null,
    });
  }
  return made;
}

/** Tick labels that do not run into each other, each with its x. */
export function tickLabels(scale: PointScale, box: StripBox): readonly { x: number; text: string }[] {
  const shown: { x: number; text: string }[] = [];
  let edge = -Infinity;
  for (const tick of scale.ticks) {
    const decimals = Number.isInteger(tick) ? 0 : Math.min(6, Math.max(0, 1 - Math.floor(Math.log10(Math.abs(tick)))));
    const text = fixed(tick, decimals);
    const x = xAt(tick, scale, box);
    const half = 3.6 * text.length;
    if (x - half < edge + 6) continue;
    edge = x + half;
    shown.push({ x, text });
  }
  return shown;
}

export interface StripColours {
  readonly ink: string;
  readonly soft: string;
  readonly aside: string;
  readonly band: string;
  readonly axis: string;
  readonly font: string;
}

function escaped(text: string): string {
  return text.replace(/&/g, '&amp;').replace(/</g, '&lt;').replace(/"/g, '&quot;');
}

/** The strip as a picture to keep. */
export function stripSvg(strip: PointStrip, scale: PointScale, box: StripBox, colours: StripColours): string {
  const out: string[] = [];
  for (const band of bands(strip, scale, box)) {
    const { x, y, width, height } = band;
    out.push(`<rect x="${x}" y="${y}" width="${width}" height="${height}" fill="${colours.band}"/>`);
    const line = (at: number): string =>
      `<path d="M${at} ${y}v${height}" stroke="${colours.aside}" stroke-width="1.2"/>`;
    if (band.from) out.push(line(x));
    if (band.to) out.push(line(x + width));
  }
  for (const aside of [false, true]) {
    const look = aside
      ? `fill="none" stroke="${colours.aside}" stroke-width="1.4"`
      : `fill="${colours.ink}" fill-opacity="0.45"`;
    out.push(`<g ${look}>`);
    for (let i = 0; i < strip.x.length; i++) {
      if ((strip.mark[i] === 1) !== aside || !Number.isFinite(strip.x[i])) continue;
      const x = xAt(strip.x[i] as number, scale, box).toFixed(1);
      out.push(`<circle cx="${x}" cy="${yAt(strip.row[i] as number, box).toFixed(1)}" r="${aside ? 2.8 : 1.5}"/>`);
    }
    out.push('</g>');
  }
  out.push(`<path d="M${box.left} ${box.bottom}H${box.right}" stroke="${colours.axis}"/>`);
  for (const { x, text } of tickLabels(scale, box)) {
    out.push(`<path d="M${x} ${box.bottom}v4" stroke="${colours.axis}"/>`);
    out.push(`<text x="${x}" y="${box.bottom + 17}">${text}</text>`);
  }
  for (const [i, line] of box.words.entries()) {
    out.push(`<text x="${(box.left + box.right) / 2}" y="${wordsY(box, i)}">${escaped(line)}</text>`);
  }
  return `<svg xmlns="http://www.w3.org/2000/svg" width="${box.width}" height="${box.height}" font-family="${escaped(
    colours.font,
  )}" font-size="11.5" text-anchor="middle" fill="${colours.soft}">${out.join('')}</svg>`;
}
