import { type SphericityFactors, sphericityFactors } from '../numerics/anova/sphericity.ts';
import { skewness } from '../numerics/checks/skewness.ts';
import type { Limits } from '../numerics/inference.ts';
import { type Matrix, matrix, trace } from '../numerics/matrix.ts';
import { type MauchlyTest, mauchlyTest } from '../numerics/mauchly.ts';
import { mean } from '../numerics/moments.ts';
import { adjustP } from '../numerics/multiplicity.ts';
import { contrastScores, helmertContrasts, squaresAndProducts } from '../numerics/repeated.ts';
import { chiSquareQuantile, chiSquareQuantileUpper } from '../numerics/tails/chi-square.ts';
import type { CheckLayout } from './checks-layout.ts';
import { byGroup, centre, columnOf } from './checks-residuals.ts';
import { type ShapeTestId, shapeTest } from './checks-shape.ts';

/** The differences of two levels, groups' means taken out of spread and shape. */
export interface PairDifference {
  readonly first: string;
  readonly second: string;
  /** Mean over participants, in the outcome's unit. */
  readonly mean: number;
  readonly sd: number;
  /** Of the SD, from chi-square on n - groups df; null where the differences do not vary. */
  readonly interval: Limits | null;
  readonly skew: number | null;
  readonly statistic: number | null;
  readonly p: number | null;
  /** Adjusted for the number of pairs by Holm. */
  readonly adjusted: number | null;
}

export interface SphericityChecks {
  readonly factors: SphericityFactors | null;
  readonly mauchly: MauchlyTest | null;
  /** Why there are no factors. */
  readonly reason?: string;
  readonly pairs: readonly PairDifference[];
  /** For each group, SD of each column and Greenhouse and Geisser's factor of its own covariances. */
  readonly groups: readonly {
    readonly name: string;
    readonly n: number;
    readonly sds: readonly (number | null)[];
    readonly gg: number | null;
  }[];
}

/**
 * Whether the differences between three or more levels vary alike; with two levels there is nothing to ask (R6).
 *
 * @param layout participants with three columns or more
 * @param options level of the intervals; which test of shape each pair is given
 * @returns factors from the covariances pooled over groups, Mauchly's test, all pairwise differences, spread by group
 * @throws RangeError with fewer than three columns
 * @source Greenhouse & Geisser 1959; Huynh & Feldt 1976 as corrected by Lecoutre 1991; Mauchly 1940; Holm 1979
 * @checked outside check cases repeated_measures_anova
 */
export function sphericityChecks(
  layout: CheckLayout,
  options: { readonly level: number; readonly test: ShapeTestId },
): SphericityChecks {
  const k = layout.columns.length;
  if (k < 3) throw new RangeError(`*layout* must have at least 3 columns; got ${k}`);
  const columns = layout.columns.map((_, column) => columnOf(layout, column));
  const own = columns.map((scores) => byGroup(scores, layout.group, layout.groups.length));
  const products = layout.groups.map((_, code) => productsOf(own.map((groups) => groups[code] as Float64Array)));
  const df = layout.participants.length - layout.groups.length;
  const pooled = products.reduce(add);
  const flat = !(trace(pooled) > 0);
  return {
    factors: flat ? null : sphericityFactors(pooled, df),
    mauchly: flat ? null : mauchlyTest(pooled, df),
    ...(flat ? { reason: 'the differences between levels do not vary' } : {}),
    pairs: pairsOf(layout, columns, options),
    groups: layout.groups.map((name, code) => {
      const n = own[0]?.[code]?.length ?? 0;
      const varies = n >= 2 && trace(products[code] as Matrix) > 0;
      return {
        name,
        n,
        sds: own.map((groups) => (n < 2 ? null : sdOf(groups[code] as Float64Array, n - 1))),
        gg: varies ? sphericityFactors(products[code] as Matrix, n - 1).gg : null,
      };
    }),
  };
}

function productsOf(columns: readonly Float64Array[]): Matrix {
  return squaresAndProducts(contrastScores(columns, helmertContrasts(columns.length))).products;
}

function add(a: Matrix, b: Matrix): Matrix {
  return matrix(
    a.rows,
    a.cols,
    a.data.map((value, at) => value + (b.data[at] as number)),
  );
}

/** SD on df degrees of freedom of values about their own mean. */
function sdOf(x: Float64Array, df: number): number {
  const middle = mean(x);
  return Math.sqrt(x.reduce((sum, value) => sum + (value - middle) ** 2, 0) / df);
}

function pairsOf(
  layout: CheckLayout,
  columns: readonly Float64Array[],
  options: { readonly level: number; readonly test: ShapeTestId },
): PairDifference[] {
  const df = layout.participants.length - layout.groups.length;
  const pairs = columns.flatMap((x, i) =>
    columns.slice(i + 1).map((y, j) => {
      const d = x.map((value, who) => value - (y[who] as number));
      const residuals = centre(d.slice(), { group: layout.group, groups: layout.groups.length, columns: 1 });
      const sd = sdOf(residuals, df);
      const { statistic, p } = shapeTest(options.test, residuals);
      return {
        first: layout.columns[i] as string,
        second: layout.columns[i + 1 + j] as string,
        mean: mean(d),
        sd,
        interval: sd > 0 ? sdLimits(sd, df, options.level) : null,
        skew: skewness(residuals).bigG1,
        statistic,
        p,
      };
    }),
  );
  const known = pairs.flatMap(({ p }) => (p === null ? [] : [p]));
  const adjusted = adjustP(known, 'holm');
  let next = 0;
  return pairs.map((pair) => ({ ...pair, adjusted: pair.p === null ? null : (adjusted[next++] as number) }));
}

function sdLimits(sd: number, df: number, level: number): Limits {
  const tail = (1 - level) / 2;
  return [sd * Math.sqrt(df / chiSquareQuantileUpper(tail, df)), sd * Math.sqrt(df / chiSquareQuantile(tail, df))];
}
