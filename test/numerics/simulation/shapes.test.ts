import { describe, expect, test } from 'vitest';
import { mean, standardDeviation } from '../../../src/numerics/moments.ts';
import { rng } from '../../../src/numerics/rng.ts';
import { populationTrimmedMean, SHAPES, type ShapeId, shapeOf } from '../../../src/numerics/simulation/shapes.ts';
import { normalLower, normalQuantile } from '../../../src/numerics/tails/normal.ts';
import { trimmedMean } from '../../../src/numerics/trimmed-mean.ts';

describe('shapes', () => {
  test.each(SHAPES)('theory: $id, mean and trimmed mean of 40,000 draws within 4.5 SE (seed 3)', (shape) => {
    const x = new Float64Array(40_000);
    shape.fill(x, rng(3));
    const se = standardDeviation(x) / Math.sqrt(x.length);
    expect(Math.abs(mean(x) - shape.mean)).toBeLessThan(4.5 * se);
    expect(Math.abs(trimmedMean(x, 20) - populationTrimmedMean(shape, 20))).toBeLessThan(4.5 * se);
  });

  test('by hand: trimmed means in closed form', () => {
    // Exponential: int -log(1-u) du = (1-u) log(1-u) - (1-u) from .2 to .8, over .6.
    const part = (v: number) => v * Math.log(v) - v;
    expect(populationTrimmedMean(shapeOf('exponential'), 20)).toBeCloseTo((part(0.2) - part(0.8)) / 0.6, 9);
    const z = normalQuantile(0.8);
    const lognormal = (Math.exp(0.5) * (normalLower(z - 1) - normalLower(-z - 1))) / 0.6;
    expect(populationTrimmedMean(shapeOf('lognormal'), 20)).toBeCloseTo(lognormal, 9);
    expect(populationTrimmedMean(shapeOf('contaminated'), 20)).toBe(0);
    expect(populationTrimmedMean(shapeOf('lognormal'), 0)).toBe(Math.exp(0.5));
  });

  test('theory: quantile functions rise', () => {
    for (const { quantile } of SHAPES) {
      if (quantile === null) continue;
      expect(quantile(0.3)).toBeLessThan(quantile(0.31));
    }
  });

  test('refuses: a shape that is not there', () => {
    expect(() => shapeOf('flat' as ShapeId)).toThrow(RangeError);
  });
});
