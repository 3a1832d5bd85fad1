import { expect, test } from 'vitest';
import { projectionOutliers } from '../../../src/numerics/correlation/projection-outliers.ts';
import { columnIn, referenceColumns } from '../../support/reference-columns.ts';

const stars = referenceColumns('stars_cyg');
const te = columnIn(stars, 'log_te');
const light = columnIn(stars, 'log_light');
const marked = (flags: Uint8Array) => [...flags].flatMap((mark, i) => (mark === 1 ? [i + 1] : []));

test('by hand: nine pairs on a line, the last far out: distances 0, 1, 1, 2, 2, 3, 3, 4, 50 from the middle 5', () => {
  // Ideal fourths of the nine distances: places 2.67 and 7.33, so q1 = 1 and q2 = 3.33; M = 2; limit 2 + 2.716 * 2.33 = 8.3.
  const x = Float64Array.of(1, 2, 3, 4, 5, 6, 7, 8, 55);
  expect(marked(projectionOutliers(x, new Float64Array(9)))).toEqual([9]);
  expect(marked(projectionOutliers(x.with(8, 13), new Float64Array(9)))).toEqual([]);
  expect(marked(projectionOutliers(x.with(8, 13.4), new Float64Array(9)))).toEqual([9]);
});

test('agrees with a transcription in Python 3.11 and NumPy: stars 7, 11, 20, 30 and 34; nobody among the 32 cars', () => {
  expect(marked(projectionOutliers(te, light))).toEqual([7, 11, 20, 30, 34]);
  const cars = referenceColumns('mtcars');
  expect(marked(projectionOutliers(columnIn(cars, 'wt'), columnIn(cars, 'mpg')))).toEqual([]);
});

test('invariance: another order, unit common to both, or origin leaves the marks', () => {
  const turned = projectionOutliers(te.toReversed(), light.toReversed());
  expect(marked(turned.reverse())).toEqual([7, 11, 20, 30, 34]);
  expect(
    marked(
      projectionOutliers(
        te.map((v) => 10 * v - 3),
        light.map((v) => 10 * v + 9),
      ),
    ),
  ).toEqual([7, 11, 20, 30, 34]);
});

test('degenerate: no pairs, equal pairs, and lines on which most pairs are equally far mark nobody', () => {
  expect(projectionOutliers(new Float64Array(0), new Float64Array(0))).toHaveLength(0);
  expect(marked(projectionOutliers(new Float64Array(6).fill(2), new Float64Array(6).fill(3)))).toEqual([]);
  expect(marked(projectionOutliers(Float64Array.of(1, 1, 1, 1, 1, 1, 1, 1, 9), new Float64Array(9)))).toEqual([]);
});

test('refuses unequal lengths and a missing score', () => {
  expect(() => projectionOutliers(te, light.subarray(1))).toThrow(/must be as long as/);
  expect(() => projectionOutliers(Float64Array.of(1, NaN), Float64Array.of(1, 2))).toThrow(RangeError);
});
