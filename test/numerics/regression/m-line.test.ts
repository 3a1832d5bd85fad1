import { expect, test } from 'vitest';
import { mLine } from '../../../src/numerics/regression/m-line.ts';
import { mRegression } from '../../../src/numerics/regression/m-regression.ts';
import { columnIn, referenceColumns } from '../../support/reference-columns.ts';

const cars = referenceColumns('mtcars');
const wt = columnIn(cars, 'wt');
const mpg = columnIn(cars, 'mpg');
const stars = referenceColumns('stars_cyg');
const te = columnIn(stars, 'log_te');
const light = columnIn(stars, 'log_light');

test('by hand: points of a line with one a little off, the bisquare line', () => {
  const x = Float64Array.of(0, 1, 2, 3, 4, 5);
  const line = mLine(x, Float64Array.of(1.1, 2.9, 5.1, 6.9, 9.1, 100), 'bisquare');
  // Without the last, which gets no weight, ordinary least squares of five points: slope 20 / 10, intercept 1.02.
  expect(line?.slope).toBeCloseTo(2, 1);
  expect(line?.intercept).toBeCloseTo(1.02, 1);
});

// R 4.2.2 MASS rlm, k = 1.345 and c = 4.685, as recorded in test/reference/cases (stars_cyg.json, mtcars.json).
test('agrees with the outside cases: stars -.428523, cars -5.250312, bisquare -.417980 and -5.231928', () => {
  expect(mLine(te, light, 'huber')?.slope).toBeCloseTo(-0.42852317997700695, 7);
  expect(mLine(wt, mpg, 'huber')?.slope).toBeCloseTo(-5.250311998199433, 6);
  expect(mLine(te, light, 'bisquare')?.slope).toBeCloseTo(-0.417980007260831, 7);
  expect(mLine(wt, mpg, 'bisquare')?.slope).toBeCloseTo(-5.231928037254908, 6);
});

test('agrees with mRegression on resamples, relative 1e-6', () => {
  for (let start = 0; start < 8; start++) {
    const rows = Array.from({ length: 32 }, (_, i) => (start * 5 + i * i) % 32);
    const [x, y] = [Float64Array.from(rows, (i) => wt[i] as number), Float64Array.from(rows, (i) => mpg[i] as number)];
    const whole = mRegression(y, [x], { psi: 'huber' }).coefficients;
    expect((mLine(x, y, 'huber')?.slope as number) / (whole?.[1] as number)).toBeCloseTo(1, 6);
  }
});

test('invariance: adding a line adds its slope and intercept', () => {
  const plain = mLine(wt, mpg, 'huber');
  const tilted = mLine(
    wt,
    mpg.map((value, i) => value + 7 - 3 * (wt[i] as number)),
    'huber',
  );
  expect(tilted?.slope).toBeCloseTo((plain?.slope as number) - 3, 6);
  expect(tilted?.intercept).toBeCloseTo((plain?.intercept as number) + 7, 6);
});

test('degenerate: no spread of x, or half of the points exactly on a line, has no M line', () => {
  expect(mLine(new Float64Array(5).fill(2), Float64Array.of(1, 2, 3, 4, 5), 'huber')).toBe(null);
  expect(mLine(Float64Array.of(1, 2, 3, 4, 5), Float64Array.of(2, 4, 6, 8, 10), 'bisquare')).toBe(null);
});
