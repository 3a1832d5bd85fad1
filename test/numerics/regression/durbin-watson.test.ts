import { expect, test } from 'vitest';
import { durbinWatson, durbinWatsonRatio } from '../../../src/numerics/regression/durbin-watson.ts';
import { lightness, quality } from '../correlation/tuna.ts';

test('by hand: 1, -1, 1, -1 has steps of 4 and squares of 1: 12 / 4', () => {
  expect(durbinWatsonRatio(Float64Array.of(1, -1, 1, -1))).toBe(3);
});

test('agrees with R 4.2 on residuals of lm: 1.2590', () => {
  expect(durbinWatson(quality, [lightness]).ratio).toBeCloseTo(1.258972885470274, 11);
});

test('theory: equal residuals give 0, switching ones come near 4', () => {
  expect(durbinWatsonRatio(Float64Array.of(2, 2, 2))).toBe(0);
  const switching = Float64Array.from({ length: 400 }, (_, i) => (i % 2 === 0 ? 1 : -1));
  expect(durbinWatsonRatio(switching)).toBeCloseTo(4, 1);
});

test('invariance: reversing the order changes nothing', () => {
  const a = durbinWatson(quality, [lightness]).ratio as number;
  expect(durbinWatson(quality.slice().reverse(), [lightness.slice().reverse()]).ratio).toBeCloseTo(a, 12);
});

test('degenerate: residuals of 0, an exact fit, dependent predictors', () => {
  expect(durbinWatsonRatio(Float64Array.of(0, 0))).toBe(null);
  expect(durbinWatson(Float64Array.of(1, 3, 5), [Float64Array.of(0, 1, 2)]).reason).toContain('exact');
  expect(durbinWatson(quality, [lightness, lightness]).ratio).toBe(null);
});

test('refuses one residual', () => {
  expect(() => durbinWatsonRatio(Float64Array.of(1))).toThrow(/\*e\* must hold at least 2/);
});
