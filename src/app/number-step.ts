/** A number that can be stepped along a straight ruler; `none` stands past its upper end. */
export interface Range {
  readonly min: number;
  readonly max: number;
  readonly step: number;
  /** Whether "none" is a setting of it. */
  readonly none: boolean;
}

/** Decimals that a step of this size needs. */
function decimalsOf(step: number): number {
  const text = String(step);
  const exponent = /e-(\d+)$/.exec(text);
  if (exponent !== null) return Number(exponent[1]);
  return text.split('.')[1]?.length ?? 0;
}

/** The nearest multiple of the step from `min`, inside the range. */
export function snap(value: number, range: Range): number {
  const steps = Math.round((value - range.min) / range.step);
  const snapped = Number(
    (range.min + steps * range.step).toFixed(Math.min(12, decimalsOf(range.step) + decimalsOf(range.min))),
  );
  return Math.min(range.max, Math.max(range.min, snapped));
}

/** Some steps up or down; past the upper end lies "none", where that is a setting. */
export function stepBy(value: number | null, steps: number, range: Range): number | null {
  if (value === null) return steps < 0 ? range.max : null;
  if (range.none && steps > 0 && value >= range.max) return null;
  // a value typed between two steps goes to the next step in that direction first
  const on = snap(value, range);
  const towards = (on - value) * steps > 0 ? steps - Math.sign(steps) : steps;
  return snap(on + towards * range.step, range);
}

/** The step of PageUp and PageDown: about a tenth of the range, whole steps, at least two. */
export function pageSteps(range: Range): number {
  return Math.max(2, Math.round((range.max - range.min) / range.step / 10));
}

/** What a key asks of a number: its new value, or undefined where the key is not for it. */
export function stepByKey(key: string, value: number | null, range: Range): number | null | undefined {
  switch (key) {
    case 'ArrowUp':
    case 'ArrowRight':
      return stepBy(value, 1, range);
    case 'ArrowDown':
    case 'ArrowLeft':
      return stepBy(value, -1, range);
    case 'PageUp':
      return stepBy(value, pageSteps(range), range);
    case 'PageDown':
      return stepBy(value, -pageSteps(range), range);
    case 'Home':
      return range.min;
    case 'End':
      return range.none ? null : range.max;
    default:
      return undefined;
  }
}

/** Share of the ruler that its numbers take; what is left to the right is for "none". */
const NUMBERS = 0.9;

/** Place on the ruler, 0 to 1. */
export function placeOf(value: number | null, range: Range): number {
  if (value === null) return 1;
  const span = range.max - range.min;
  const share = span > 0 ? Math.min(1, Math.max(0, (value - range.min) / span)) : 0;
  return range.none ? share * NUMBERS : share;
}

/** The number at a place on the ruler, on a step; null = none. */
export function valueAt(place: number, range: Range): number | null {
  if (range.none && place > (1 + NUMBERS) / 2) return null;
  const share = Math.min(1, Math.max(0, range.none ? place / NUMBERS : place));
  return snap(range.min + share * (range.max - range.min), range);
}

/** Intervals between ruler ticks: whole steps, at most a dozen. */
export function tickCount(range: Range): number {
  const steps = Math.max(1, Math.round((range.max - range.min) / range.step));
  if (steps <= 12) return steps;
  for (let n = 12; n >= 5; n--) if (steps % n === 0) return n;
  return 10;
}

export type Typed = { readonly value: number | null } | { readonly problem: string };

/** A number as it was typed, with a decimal point or comma and its unit allowed; a sentence where it will not do. */
export function readNumber(text: string, range: Range, unit: string): Typed {
  const bare = text
    .trim()
    .replace(/\u2212/g, '-')
    .replace(unit, '')
    .trim();
  if (range.none && /^(none|)$/i.test(bare)) return { value: null };
  if (!/^[-+]?(\d+([.,]\d*)?|[.,]\d+)(e[-+]?\d+)?$/i.test(bare))
    return { problem: `\u201c${text}\u201d is not a number.` };
  const value = Number(bare.replace(',', '.'));
  if (value < range.min || value > range.max) {
    return { problem: `It must lie between ${range.min} and ${range.max}${unit === '' ? '' : ` ${unit}`}.` };
  }
  return { value };
}
