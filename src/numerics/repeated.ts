/** What the methods for repeated scores share: checks, orthonormal comparisons, and sums of squares and products. */
import { kronecker, type Matrix, matrix } from './matrix.ts';
import { sum } from './moments.ts';
import { requireScores } from './scores.ts';

/** Scores of every level, in the order of the levels: `scores[j][i]` is participant i under level j. */
export type RepeatedScores = readonly Float64Array[];

/**
 * Refuses fewer than two levels, vectors of unequal length, and scores that are not finite.
 * @param scores one vector a level, one score a participant
 * @throws RangeError when there are fewer than two levels, lengths differ, or a score is not finite
 * @source common practice
 * @checked by hand
 */
export function requireRepeated(scores: RepeatedScores): void {
  if (scores.length < 2) throw new RangeError(`*scores* must hold at least 2 levels; got ${scores.length}`);
  const n = scores[0]!.length;
  scores.forEach((level, j) => {
    requireScores(level, 0, `scores[${j}]`);
    if (level.length !== n) throw new RangeError(`*scores* must be of equal length (${n}); got ${level.length}`);
  });
}

/**
 * Comparisons among k levels: orthogonal to each other, of length 1, each adding up to 0.
 * @param k number of levels, at least 2
 * @returns k by k - 1; column j compares level j + 1 with the mean of the levels before it
 * @throws RangeError when k is not a whole number of at least 2
 * @source Helmert (1876): entries -1 / sqrt(j (j+1)) and j / sqrt(j (j+1))
 * @checked by hand; U'U = identity 1e-15
 */
export function helmertContrasts(k: number): Matrix {
  if (!Number.isInteger(k) || k < 2) throw new RangeError(`*k* must be a whole number of at least 2; got ${k}`);
  const out = matrix(k, k - 1);
  for (let j = 1; j < k; j++) {
    const length = Math.sqrt(j * (j + 1));
    for (let i = 0; i < j; i++) out.data[i * (k - 1) + j - 1] = -1 / length;
    out.data[j * (k - 1) + j - 1] = j / length;
  }
  return out;
}

/**
 * Orthonormal comparisons that carry one effect of crossed within-participant factors.
 * @param levels number of levels of each factor, first factor slowest
 * @param inEffect whether each factor belongs to the effect
 * @returns product of levels by df of the effect
 * @throws RangeError when the lists differ in length or no factor belongs to the effect
 * @source common practice: Helmert comparisons for factors of the effect, the mean (1 / sqrt k) for the others
 * @checked by hand; U'U = identity 1e-15
 */
export function effectContrasts(levels: readonly number[], inEffect: readonly boolean[]): Matrix {
  if (levels.length !== inEffect.length) {
    throw new RangeError(`*inEffect* must be ${levels.length} marks; got ${inEffect.length}`);
  }
  if (!inEffect.includes(true)) throw new RangeError('*inEffect* must mark at least one factor; got none');
  return levels.reduce(
    (all, k, i) =>
      kronecker(all, inEffect[i] ? helmertContrasts(k) : matrix(k, 1, new Float64Array(k).fill(k ** -0.5))),
    matrix(1, 1, [1]),
  );
}

/**
 * Each participant's value on each comparison.
 * @param scores one vector a level, one score a participant
 * @param contrasts levels by p, each column adding up to 0
 * @returns p vectors, one value a participant
 * @throws RangeError when the number of levels and rows differ
 * @source common practice, z = U'y; y is first lessened by the participant's first score, which U' takes away anyhow
 * @checked by hand
 */
export function contrastScores(scores: RepeatedScores, contrasts: Matrix): Float64Array[] {
  const { rows, cols, data } = contrasts;
  if (rows !== scores.length) throw new RangeError(`*contrasts* must have ${scores.length} rows; got ${rows}`);
  const first = scores[0]!;
  return Array.from({ length: cols }, (_, c) =>
    first.map((start, i) => {
      let value = 0;
      for (let j = 1; j < rows; j++) value += data[j * cols + c]! * (scores[j]![i]! - start);
      return value;
    }),
  );
}

/** Means of vectors and the sums of squares and products about them. */
export interface SquaresAndProducts {
  readonly n: number;
  readonly means: Float64Array;
  /** p by p, not divided by anything. */
  readonly products: Matrix;
}

/**
 * Sums of squares and products of p vectors about their means.
 * @param vectors p vectors of equal length, at least one value each
 * @returns n, means, and the p by p matrix
 * @source Chan, Golub & LeVeque (1983), two passes with correction
 * @checked by hand
 */
export function squaresAndProducts(vectors: readonly Float64Array[]): SquaresAndProducts {
  const n = vectors[0]!.length;
  const p = vectors.length;
  const means = Float64Array.from(vectors, (vector) => sum(vector) / n);
  const centred = vectors.map((vector, j) => vector.map((value) => value - means[j]!));
  const drifts = centred.map((vector) => sum(vector));
  const products = matrix(p, p);
  for (let i = 0; i < p; i++) {
    for (let j = 0; j <= i; j++) {
      const total = sum(centred[i]!.map((value, row) => value * centred[j]![row]!)) - (drifts[i]! * drifts[j]!) / n;
      products.data[i * p + j] = total;
      products.data[j * p + i] = total;
    }
  }
  return { n, means, products };
}
