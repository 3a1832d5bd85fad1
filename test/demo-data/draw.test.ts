import { expect, test } from 'vitest';
import { csvText, exponential, nearlyNormal } from '../../demo-data/draw.ts';
import { rng } from '../../src/numerics/rng.ts';

const N = 20_000;

function meanAndVariance(draw: () => number): [number, number] {
  const values = Array.from({ length: N }, draw);
  const mean = values.reduce((sum, value) => sum + value, 0) / N;
  return [mean, values.reduce((sum, value) => sum + (value - mean) ** 2, 0) / (N - 1)];
}

// SE of a mean is SD / sqrt(N) = .007; of a variance sqrt((kurtosis - 1) / N) = .010 (normal), .020 (exponential).
test('theory: nearly normal draws have mean 0 and variance 1 within 3.5 SE', () => {
  const source = rng(41);
  const [mean, variance] = meanAndVariance(() => nearlyNormal(source));
  expect(Math.abs(mean)).toBeLessThan(3.5 * 0.0071);
  expect(Math.abs(variance - 1)).toBeLessThan(3.5 * 0.01);
});

test('theory: exponential draws have mean 1 and variance 1 within 3.5 SE, and are above ln 2 half of the time', () => {
  const source = rng(42);
  const [mean, variance] = meanAndVariance(() => exponential(source));
  expect(Math.abs(mean - 1)).toBeLessThan(3.5 * 0.0071);
  expect(Math.abs(variance - 1)).toBeLessThan(3.5 * 0.02);
  const above = Array.from({ length: N }, () => exponential(source)).filter((value) => value > Math.LN2).length;
  expect(Math.abs(above / N - 0.5)).toBeLessThan(3.5 * 0.5 * 0.0071);
});

test('by hand: a missing value is an empty cell and every row ends its line', () => {
  expect(
    csvText(
      ['a', 'b'],
      [
        [1, null],
        ['x', 2],
      ],
    ),
  ).toBe('a,b\n1,\nx,2\n');
});
