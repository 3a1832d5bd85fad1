import { describe, expect, it } from 'vitest';
import { sorted } from '../../src/numerics/order.ts';
import { centreOutFor, fillCentreOut } from '../../src/numerics/relabel-sums.ts';
import { rng } from '../../src/numerics/rng.ts';
import { trimmedMean } from '../../src/numerics/trimmed-mean.ts';
import { winsorizedMean, winsorizedVariance } from '../../src/numerics/winsorized.ts';

const TRIMS = [0, 25, 10, 20, 10, 5];

function draw(n: number, offset: number, spread: number): Float64Array {
  const random = rng(5, n);
  return sorted(Float64Array.from({ length: n }, () => offset + spread * (random.uniform() - 0.3) ** 3));
}

describe('fillCentreOut', () => {
  it.each([
    [5, 0, 1],
    [12, 0, 1],
    [33, 4, 1],
    [40, 1e6, 1],
    [41, -1e9, 3],
  ])('agrees with trimmedMean and winsorizedVariance: n = %d about %d, 1e-11 of the spread', (n, offset, spread) => {
    const s = draw(n, offset, spread);
    const sums = centreOutFor(TRIMS);
    fillCentreOut(sums, s, n);
    expect([...sums.trims]).toEqual([25, 20, 10, 5, 0]);
    sums.trims.forEach((trim, j) => {
      expect(sums.g[j]).toBe(Math.floor((trim * n) / 100));
      // A score near 1e9 carries an error of 1e-7 itself.
      const grain = 1e-11 + 1e-15 * Math.abs(offset);
      expect(Math.abs((sums.trimmed[j] as number) - trimmedMean(s, trim))).toBeLessThan(grain);
      expect(Math.abs((sums.winsorized[j] as number) - winsorizedMean(s, trim))).toBeLessThan(grain);
      const squares = (n - 1) * winsorizedVariance(s, trim);
      expect(Math.abs((sums.squares[j] as number) / squares - 1)).toBeLessThan(1e-9);
    });
  });

  it('degenerate: equal scores have squares of exactly 0, also far from zero', () => {
    const sums = centreOutFor([0, 20]);
    fillCentreOut(sums, new Float64Array(9).fill(1234.1), 9);
    expect([...sums.squares]).toEqual([0, 0]);
  });

  it('by hand: 1, 2, 4, 8, 100 at 20 % have the mean 14/3 and the winsorized scores 2, 2, 4, 8, 8', () => {
    const sums = centreOutFor([20]);
    fillCentreOut(sums, Float64Array.of(1, 2, 4, 8, 100, 999), 5);
    expect(Math.abs((sums.trimmed[0] as number) - 14 / 3)).toBeLessThan(1e-14);
    expect(Math.abs((sums.winsorized[0] as number) - 4.8)).toBeLessThan(1e-14);
    // 2 * 2.8^2 + .8^2 + 2 * 3.2^2 = 36.8
    expect(Math.abs((sums.squares[0] as number) - 36.8)).toBeLessThan(1e-12);
  });
});
