import { type FTest, noFTest } from '../groups.ts';
import { largestSize, noSpread } from '../inference.ts';
import { kronecker, type Matrix, matrix } from '../matrix.ts';
import { applyQt, qr } from '../qr.ts';
import { requireScores } from '../scores.ts';
import { fUpper } from '../tails/f.ts';
import { effectsOf } from './effects.ts';
import { sumsOfSquares } from './one-way.ts';

export interface FactorialEffect extends FTest {
  /** Places of the factors that take part: [0] the first, [0, 1] the interaction of the first two. */
  readonly factors: readonly number[];
  /** Squared units of the scores. */
  readonly ss: number | null;
  /** ss / (ss + ssError). */
  readonly partialEta2: number | null;
}

export interface FactorialAnova {
  readonly effects: readonly FactorialEffect[];
  readonly ssError: number | null;
  readonly dfError: number;
  readonly reason?: string;
}

/** Sums of squares: 1 in the order of the factors, 2 given effects that do not contain it, 3 given all other effects. */
export type SumOfSquaresType = 1 | 2 | 3;

/** One combination of levels that holds scores. */
interface Cell {
  readonly index: number;
  readonly scores: Float64Array;
}

/**
 * Analysis of variance with crossed between-participant factors and all interactions.
 * @param cells scores of every combination of levels, first factor slowest; an empty vector where there are none
 * @param levels number of levels of each factor, each at least 2
 * @param type sums of squares: 1, 2 or 3 (type 3 with effects that add up to 0 over levels)
 * @returns for each effect (main effects, then interactions) sum of squares (squared units), df, F, p, partial eta2, and
 *   the error term; null with a reason when no cell holds two scores, scores do not vary within cells, an effect cannot be
 *   told from others, or (type 3) a cell is empty
 * @throws RangeError when cells and levels do not fit, a score is not finite, or the type is not 1, 2 or 3
 * @source Yates (1934), Scheffe (1959); sums of squares as the gain of an effect's columns by QR (Golub 1965) on cell means
 *   weighted by sqrt(n), error = sum of squares within cells
 * @checked cases `factorial_anova`, rtol 1e-9
 */
export function factorialAnova(
  cells: readonly Float64Array[],
  levels: readonly number[],
  type: SumOfSquaresType,
): FactorialAnova {
  requireCells(cells, levels, type);
  const effects = effectsOf(levels.length);
  const filled = cells.map((scores, index) => ({ index, scores })).filter(({ scores }) => scores.length > 0);
  const n = filled.reduce((sum, cell) => sum + cell.scores.length, 0);
  const dfError = n - filled.length;
  const refused = (reason: string, ssError: number | null = null) => ({
    effects: effects.map((factors) => ({ factors, ss: null, partialEta2: null, ...noFTest(reason) })),
    ssError,
    dfError,
    reason,
  });
  if (dfError < 1) return refused('no cell holds two scores');
  const ssError = sumsOfSquares(filled.map((cell) => cell.scores)).within;
  if (noSpread(Math.sqrt(ssError / dfError), largestSize(...cells))) {
    return refused('scores do not vary within cells', ssError);
  }
  if (type === 3 && filled.length < cells.length) return refused('a combination of levels holds no scores', ssError);
  const gains = effectGains(filled, levels, type);
  return { effects: effects.map((factors, i) => tested(factors, gains[i]!, ssError, dfError)), ssError, dfError };
}

function requireCells(cells: readonly Float64Array[], levels: readonly number[], type: number): void {
  const count = levels.reduce((product, k) => product * k, 1);
  if (count !== cells.length || levels.length === 0 || !levels.every((k) => Number.isInteger(k) && k >= 2)) {
    throw new RangeError(`*levels* must multiply to ${cells.length}, each at least 2; got ${levels.join(' x ')}`);
  }
  if (type !== 1 && type !== 2 && type !== 3) throw new RangeError(`*type* must be 1, 2 or 3; got ${type}`);
  cells.forEach((scores, j) => {
    requireScores(scores, 0, `cells[${j}]`);
  });
}

function tested(factors: readonly number[], gain: Gain, ssError: number, dfError: number): FactorialEffect {
  if (gain.df === 0) return { factors, ss: null, partialEta2: null, ...noFTest('empty cells hide this effect') };
  const F = gain.ss / gain.df / (ssError / dfError);
  const p = fUpper(F, gain.df, dfError);
  return { factors, ss: gain.ss, F, df1: gain.df, df2: dfError, p, partialEta2: gain.ss / (gain.ss + ssError) };
}

interface Gain {
  readonly ss: number;
  readonly df: number;
}

function effectGains(filled: readonly Cell[], levels: readonly number[], type: SumOfSquaresType): Gain[] {
  const { offsets, offset } = sumsOfSquares(filled.map((cell) => cell.scores));
  const roots = filled.map((cell) => Math.sqrt(cell.scores.length));
  const y = Float64Array.from(offsets, (own, i) => roots[i]! * (own - offset));
  const effects = effectsOf(levels.length);
  const columns = effects.map((factors) => effectColumns(filled, roots, levels, factors));
  return effects.map((factors, i) => {
    const before = columns.filter((_, j) => {
      if (j === i) return false;
      if (type === 1) return j < i;
      return type === 3 || !factors.every((factor) => effects[j]!.includes(factor));
    });
    return gainOf([[Float64Array.from(roots)], ...before].flat(), columns[i]!, y);
  });
}

/** Columns coded to add up to 0 over the levels of every factor of the effect, each row times sqrt(n). */
function effectColumns(
  filled: readonly Cell[],
  roots: readonly number[],
  levels: readonly number[],
  factors: readonly number[],
): Float64Array[] {
  const coded = levels.reduce(
    (all, k, i) => kronecker(all, factors.includes(i) ? sumToZero(k) : matrix(k, 1, new Float64Array(k).fill(1))),
    matrix(1, 1, [1]),
  );
  return Array.from({ length: coded.cols }, (_, c) =>
    Float64Array.from(filled, (cell, i) => roots[i]! * coded.data[cell.index * coded.cols + c]!),
  );
}

function sumToZero(k: number): Matrix {
  const out = matrix(k, k - 1);
  for (let j = 0; j < k - 1; j++) {
    out.data[j * (k - 1) + j] = 1;
    out.data[(k - 1) * (k - 1) + j] = -1;
  }
  return out;
}

/** Sum of squares that `added` explains beyond `before`, and its degrees of freedom. */
function gainOf(before: readonly Float64Array[], added: readonly Float64Array[], y: Float64Array): Gain {
  const all = [...before, ...added];
  const design = matrix(y.length, all.length);
  all.forEach((column, j) => {
    for (let i = 0; i < y.length; i++) design.data[i * all.length + j] = column[i]!;
  });
  const factors = qr(design);
  const parts = applyQt(factors, y);
  let ss = 0;
  let df = 0;
  for (let k = 0; k < factors.rank; k++) {
    if (factors.pivot[k]! < before.length) continue;
    ss += parts[k]! * parts[k]!;
    df++;
  }
  return { ss, df };
}
