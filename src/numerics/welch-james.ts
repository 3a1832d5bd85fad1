import { largestSize, noSpread } from './inference.ts';
import { type JohansenGroup, type JohansenTest, johansenTest, noJohansen } from './johansen.ts';
import { kronecker, type Matrix, matrix } from './matrix.ts';
import { mean } from './moments.ts';
import { sorted } from './order.ts';
import { type RepeatedScores, squaresAndProducts } from './repeated.ts';
import { requireScores, trimCount } from './scores.ts';
import { winsorized } from './winsorized.ts';

/** A design of crossed factors, between participants, within them, or both. */
export interface WelchJamesDesign {
  /** Number of levels of each between-participant factor; empty when there is none. */
  readonly between: readonly number[];
  /** Number of levels of each within-participant factor; empty when there is none. */
  readonly within: readonly number[];
}

/** Which factors the tested effect is made of, in the order of the design. */
export interface WelchJamesEffect {
  readonly between: readonly boolean[];
  readonly within: readonly boolean[];
}

/**
 * Welch and James's test of an effect on (trimmed) means, without assuming equal spread or sphericity.
 * @param groups for each combination of between levels (first factor slowest; one group when there is none) one vector a
 *   combination of within levels (one when there is none), one score a participant, finite
 * @param design levels of the factors
 * @param effect factors of the effect; cells count alike whatever their n
 * @param options `trim` integer percentage at each end, 0 to 49 (default 20)
 * @returns T, A, F, df1, df2, p and p from the corrected chi-square point; null with a reason when a group keeps fewer than
 *   two scores or the compared means have no spread
 * @throws RangeError when groups, design and effect do not fit, a score is not finite, or `trim` is out of range
 * @source Johansen (1980); Keselman, Wilcox & Lix (2003): V_j = (n-1) S_w / (h (h-1)), S_w winsorized covariance matrix
 * @checked cases `welch_james`, rtol 1e-9; warpbreaks 2 x 3
 */
export function welchJames(
  groups: readonly RepeatedScores[],
  design: WelchJamesDesign,
  effect: WelchJamesEffect,
  options: { readonly trim?: number } = {},
): JohansenTest {
  const { trim = 20 } = options;
  requireDesign(groups, design, effect);
  const short = groups.findIndex(([first]) => first!.length - 2 * trimCount(first!.length, trim) < 2);
  if (short >= 0) return noJohansen(`group ${short + 1} keeps fewer than 2 scores`);
  const contrasts = contrastRows([...design.between, ...design.within], [...effect.between, ...effect.within]);
  return johansenTest(
    groups.map((group) => trimmedGroup(group, trim)),
    contrasts,
  );
}

function requireDesign(groups: readonly RepeatedScores[], design: WelchJamesDesign, effect: WelchJamesEffect): void {
  const { between, within } = design;
  const levels = [...between, ...within];
  const cells = between.reduce((product, k) => product * k, 1);
  const columns = within.reduce((product, k) => product * k, 1);
  if (levels.length === 0 || !levels.every((k) => Number.isInteger(k) && k >= 2)) {
    throw new RangeError(`*design* must hold factors of at least 2 levels; got ${levels.join(' x ')}`);
  }
  if (effect.between.length !== between.length || effect.within.length !== within.length) {
    throw new RangeError(
      `*effect* must mark ${levels.length} factors; got ${effect.between.length + effect.within.length}`,
    );
  }
  if (![...effect.between, ...effect.within].includes(true)) {
    throw new RangeError('*effect* must mark at least one factor; got none');
  }
  if (groups.length !== cells) throw new RangeError(`*groups* must be ${cells}; got ${groups.length}`);
  for (const group of groups) {
    if (group.length !== columns)
      throw new RangeError(`*groups* must hold ${columns} vectors each; got ${group.length}`);
    for (const scores of group) {
      requireScores(scores, 0, 'groups');
      if (scores.length !== group[0]!.length) {
        throw new RangeError(
          `*groups* must hold vectors of equal length; got ${group[0]!.length} and ${scores.length}`,
        );
      }
    }
  }
}

function trimmedGroup(group: RepeatedScores, trim: number): JohansenGroup {
  const n = group[0]!.length;
  const g = trimCount(n, trim);
  const h = n - 2 * g;
  const means = Float64Array.from(group, (scores) => mean(sorted(scores).subarray(g, n - g)));
  const clipped = group.map((scores) => winsorized(scores, trim));
  const { products } = squaresAndProducts(clipped);
  const q = group.length;
  // Rounding left where scores are equal must not pass for a very small spread.
  const flat = clipped.map((scores, j) =>
    noSpread(Math.sqrt(products.data[j * q + j]! / (n - 1)), largestSize(scores)),
  );
  const entries = products.data.map((value, i) => (flat[Math.floor(i / q)] || flat[i % q] ? 0 : value / (h * (h - 1))));
  const covariance = matrix(q, q, entries);
  return { means, covariance, df: h - 1 };
}

/** Differences of neighbouring levels for factors of the effect, sums over the others. */
function contrastRows(levels: readonly number[], inEffect: readonly boolean[]): Matrix {
  return levels.reduce((all, k, i) => kronecker(all, inEffect[i] ? neighbours(k) : sumRow(k)), matrix(1, 1, [1]));
}

function sumRow(k: number): Matrix {
  return matrix(1, k, new Float64Array(k).fill(1));
}

function neighbours(k: number): Matrix {
  const out = matrix(k - 1, k);
  for (let i = 0; i < k - 1; i++) {
    out.data[i * k + i] = 1;
    out.data[i * k + i + 1] = -1;
  }
  return out;
}
