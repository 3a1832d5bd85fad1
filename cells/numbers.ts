/** How numbers are written, in one place: as the field reports them, with a real minus sign. */

const MINUS = '\u2212';

/** A count with thousands separated by commas: 2,120. */
export function count(n: number): string {
  return withMinus(
    Math.round(n)
      .toString()
      .replace(/\B(?=(\d{3})+(?!\d))/g, ','),
  );
}

/** A number to so many decimals, thousands separated, a real minus sign; never "-0". */
export function fixed(value: number, decimals: number): string {
  const text = Math.abs(value).toFixed(decimals);
  const [whole = '', part] = text.split('.');
  const grouped = whole.replace(/\B(?=(\d{3})+(?!\d))/g, ',') + (part === undefined ? '' : `.${part}`);
  return value < 0 && Number(text) !== 0 ? MINUS + grouped : grouped;
}

/** A number that cannot exceed one in size: no leading zero (.85, −.21). */
export function bounded(value: number, decimals: number): string {
  return fixed(value, decimals).replace(/^(\u2212?)0\./, '$1.');
}

/**
 * Decimals at which an interval this wide is worth reading: two figures of its width (common practice: report to a
 * tenth of the uncertainty).
 */
export function decimalsFor(width: number): number {
  if (!(width > 0) || !Number.isFinite(width)) return 2;
  return Math.min(6, Math.max(0, 1 - Math.floor(Math.log10(width))));
}

/** p to three places without a leading zero: "p = .017", "p < .001". Never a star. */
export function pValue(p: number): string {
  if (p < 0.001) return 'p < .001';
  if (p > 0.999) return 'p > .999';
  return `p = ${p.toFixed(3).replace(/^0/, '')}`;
}

/** "[−131, −38]"; an absent limit is written as no limit. */
export function limits(interval: readonly [number | null, number | null], write: (value: number) => string): string {
  const [low, high] = interval;
  return `[${low === null ? 'no limit' : write(low)}, ${high === null ? 'no limit' : write(high)}]`;
}

/** Degrees of freedom: whole where they are whole, else to one decimal. */
export function degrees(df: number): string {
  return Number.isInteger(df) ? String(df) : df.toFixed(1);
}

/** A share as a percentage: "0.4 %"; below a tenth of a percent, but not zero, "< 0.1 %". */
export function percent(share: number): string {
  const value = 100 * share;
  if (value > 0 && value < 0.05) return '< 0.1 %';
  return `${value < 10 ? value.toFixed(1).replace(/\.0$/, '') : Math.round(value)} %`;
}

/** A level as a percentage for "95 % interval". */
export function levelPercent(level: number): string {
  return `${Number((100 * level).toFixed(2))} %`;
}

/** "alpha = .05" without the leading zero. */
export function alphaText(alpha: number): string {
  return `\u03b1 = ${String(alpha).replace(/^0/, '')}`;
}

/** A plain number as a blank shows it: shortest form, real minus sign. */
export function plain(value: number): string {
  return withMinus(String(value));
}

/** A number with its unit: "150 ms", "20 %", "2.5". */
export function withUnit(value: number, unit: string): string {
  return unit === '' ? plain(value) : `${plain(value)} ${unit}`;
}

/** "1 trial", "2 trials". */
export function counted(n: number, noun: string): string {
  return `${count(n)} ${n === 1 ? noun : plural(noun)}`;
}

/** English plural of a plain noun, as far as column names go. */
export function plural(noun: string): string {
  if (/(s|x|z|ch|sh)$/.test(noun)) return `${noun}es`;
  if (/[^aeiou]y$/.test(noun)) return `${noun.slice(0, -1)}ies`;
  return `${noun}s`;
}

function withMinus(text: string): string {
  return text.replace(/^-/, MINUS);
}
