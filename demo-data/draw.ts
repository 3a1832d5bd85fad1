import type { Rng } from '../src/numerics/rng.ts';

/** What the generators of the demo data draw; only + - * / and comparisons, so that every engine makes the same file. */

/** Nearly normal, mean 0 and SD 1: twelve uniforms added, minus six. */
export function nearlyNormal(source: Rng): number {
  let sum = -6;
  for (let i = 0; i < 12; i++) sum += source.uniform();
  return sum;
}

/** Exponential with mean 1, by counting runs of falling uniforms (von Neumann 1951). */
export function exponential(source: Rng): number {
  for (let whole = 0; ; whole++) {
    const first = source.uniform();
    let last = first;
    let length = 1;
    for (let next = source.uniform(); next < last; next = source.uniform()) {
      last = next;
      length++;
    }
    if (length % 2 === 1) return whole + first;
  }
}

/** Uniform between two numbers. */
export function between(source: Rng, from: number, to: number): number {
  return from + (to - from) * source.uniform();
}

/** Rows as CSV text with a line end after each. */
export function csvText(header: readonly string[], rows: readonly (readonly (string | number | null)[])[]): string {
  return [header, ...rows].map((row) => `${row.map((cell) => cell ?? '').join(',')}\n`).join('');
}
