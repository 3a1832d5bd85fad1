import { describe, expect, it } from 'vitest';
import { multiply, transpose } from '../../src/numerics/matrix.ts';
import {
  contrastScores,
  effectContrasts,
  helmertContrasts,
  requireRepeated,
  squaresAndProducts,
} from '../../src/numerics/repeated.ts';
import { expectClose } from './anova/expect-close.ts';

function expectEntries(got: ArrayLike<number>, want: readonly number[], tolerance: number): void {
  expect(got.length).toBe(want.length);
  want.forEach((value, i) => {
    expectClose(got[i], value, tolerance);
  });
}

describe('repeated scores', () => {
  // (-1, 1, 0) / sqrt 2 and (-1, -1, 2) / sqrt 6
  it('by hand: comparisons of three levels (1e-15)', () => {
    const [r2, r6] = [Math.SQRT1_2, 1 / Math.sqrt(6)];
    expectEntries(helmertContrasts(3).data, [-r2, -r6, r2, -r6, 0, 2 * r6], 1e-15);
  });

  it('by hand: comparisons of a 2 x 2 design and their values (1e-15)', () => {
    expectEntries(effectContrasts([2, 2], [true, false]).data, [-0.5, -0.5, 0.5, 0.5], 1e-15);
    expectEntries(effectContrasts([2, 2], [true, true]).data, [0.5, -0.5, -0.5, 0.5], 1e-15);
    const cells = [Float64Array.of(1, 0), Float64Array.of(2, 0), Float64Array.of(4, 0), Float64Array.of(9, 6)];
    expectEntries(contrastScores(cells, effectContrasts([2, 2], [true, true]))[0]!, [2, 3], 1e-15);
  });

  // 1 2 3 and 2 4 9 about 2 and 5: 2, 7, 26
  it('by hand: sums of squares and products (1e-15)', () => {
    const found = squaresAndProducts([Float64Array.of(1, 2, 3), Float64Array.of(2, 4, 9)]);
    expect(found.n).toBe(3);
    expectEntries(found.means, [2, 5], 1e-15);
    expectEntries(found.products.data, [2, 7, 7, 26], 1e-15);
  });

  it('theory: comparisons are orthonormal and add up to 0 (1e-15)', () => {
    const u = effectContrasts([3, 2, 4], [true, false, true]);
    expect([u.rows, u.cols]).toEqual([24, 6]);
    multiply(transpose(u), u).data.forEach((value, i) => {
      expect(Math.abs(value - (i % 7 === 0 ? 1 : 0))).toBeLessThan(1e-15);
    });
    const sums = multiply(transpose(u), { rows: 24, cols: 1, data: new Float64Array(24).fill(1) }).data;
    for (const sum of sums) expect(Math.abs(sum)).toBeLessThan(1e-15);
  });

  it('invariance: a constant added to a participant changes no comparison, exactly', () => {
    const scores = [Float64Array.of(1, 5), Float64Array.of(4, 2), Float64Array.of(8, 3)];
    const added = scores.map((level) => Float64Array.of(level[0]! + 1024, level[1]! - 64));
    expect(contrastScores(added, helmertContrasts(3))).toEqual(contrastScores(scores, helmertContrasts(3)));
  });

  it('degenerate: two levels are one comparison, the difference over sqrt 2 (1e-15)', () => {
    const z = contrastScores([Float64Array.of(1), Float64Array.of(4)], helmertContrasts(2));
    expectEntries(z[0]!, [3 / Math.SQRT2], 1e-15);
  });

  it('refuses one level, unequal lengths, an effect of no factor', () => {
    expect(() => requireRepeated([Float64Array.of(1)])).toThrow('*scores* must hold at least 2 levels; got 1');
    expect(() => requireRepeated([Float64Array.of(1), new Float64Array(0)])).toThrow(
      '*scores* must be of equal length (1); got 0',
    );
    expect(() => requireRepeated([Float64Array.of(1), Float64Array.of(Number.NaN)])).toThrow(RangeError);
    expect(() => helmertContrasts(1)).toThrow(RangeError);
    expect(() => effectContrasts([2, 2], [false, false])).toThrow(RangeError);
    expect(() => effectContrasts([2, 2], [true])).toThrow('*inEffect* must be 2 marks; got 1');
    expect(() => contrastScores([Float64Array.of(1)], helmertContrasts(2))).toThrow(RangeError);
  });
});
