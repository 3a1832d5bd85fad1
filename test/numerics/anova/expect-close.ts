import { expect } from 'vitest';

/** Fails unless got is a number with |got - want| <= tolerance * |want|; for want 0 the tolerance is absolute. */
export function expectClose(got: number | null | undefined, want: number, tolerance: number): void {
  expect(typeof got === 'number' ? got : Number.NaN).toSatisfy(
    (value: number) => Math.abs(value - want) <= tolerance * (want === 0 ? 1 : Math.abs(want)),
    `within ${tolerance} of ${want}`,
  );
}

/** Every key of `want` within the relative tolerance. */
export function expectAll(got: object, want: Readonly<Record<string, number>>, tolerance: number): void {
  for (const [key, value] of Object.entries(want)) {
    const own = (got as Record<string, unknown>)[key];
    expect(typeof own === 'number' ? own : Number.NaN).toSatisfy(
      (number: number) => Math.abs(number - value) <= tolerance * (value === 0 ? 1 : Math.abs(value)),
      `${key} within ${tolerance} of ${value}, got ${String(own)}`,
    );
  }
}
