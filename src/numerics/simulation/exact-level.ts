import { chiSquareQuantile } from '../tails/chi-square.ts';
import { gaussLegendre } from '../tails/gauss-legendre.ts';
import { normalUpper } from '../tails/normal.ts';
import { tQuantileUpper } from '../tails/t.ts';

export interface TwoNormalGroups {
  readonly n1: number;
  readonly n2: number;
  readonly sd1: number;
  readonly sd2: number;
  /** Nominal two-sided level (default .05). */
  readonly alpha?: number;
}

/**
 * Actual level of Student's and Welch's test for two normal groups, by integration over the two variances.
 * @param groups sizes (2 or more), SDs (> 0), nominal two-sided level
 * @returns probability that each test rejects equal means
 * @throws RangeError when a size is below 2 or an SD is not positive
 * @source given both variances, P = 2 Q(c sqrt(estimated variance / true variance)), averaged over the two chi-square
 *   distributions with 60 Gauss-Legendre nodes each on a probability scale drawn towards both ends
 * @checked error_rates.json, exact_type1_two_group_normal: 24 designs, 2e-5
 */
export function exactLevelTwoGroups(groups: TwoNormalGroups): { readonly student: number; readonly welch: number } {
  const { n1, n2, sd1, sd2, alpha = 0.05 } = groups;
  if (!(n1 >= 2 && n2 >= 2)) throw new RangeError(`*n1* and *n2* must be at least 2; got ${n1} and ${n2}`);
  if (!(sd1 > 0 && sd2 > 0)) throw new RangeError(`*sd1* and *sd2* must be positive; got ${sd1} and ${sd2}`);
  const first = varianceNodes(n1 - 1, sd1);
  const second = varianceNodes(n2 - 1, sd2);
  const truth = (sd1 * sd1) / n1 + (sd2 * sd2) / n2;
  const pooledCut = tQuantileUpper(alpha / 2, n1 + n2 - 2);
  let student = 0;
  let welch = 0;
  first.value.forEach((v1, i) => {
    second.value.forEach((v2, j) => {
      const weight = (first.weight[i] as number) * (second.weight[j] as number);
      const pooled = (((n1 - 1) * v1 + (n2 - 1) * v2) / (n1 + n2 - 2)) * (1 / n1 + 1 / n2);
      const d1 = v1 / n1;
      const d2 = v2 / n2;
      const share = d1 / (d1 + d2);
      const df = 1 / ((share * share) / (n1 - 1) + ((1 - share) * (1 - share)) / (n2 - 1));
      student += weight * 2 * normalUpper(pooledCut * Math.sqrt(pooled / truth));
      welch += weight * 2 * normalUpper(tQuantileUpper(alpha / 2, df) * Math.sqrt((d1 + d2) / truth));
    });
  });
  return { student, welch };
}

/** Variances of n - 1 = df, at nodes of the probability scale drawn towards both ends, where the variance bends. */
function varianceNodes(df: number, sd: number) {
  const { nodes, weights } = gaussLegendre(60);
  // u = s^3 (10 - 15 s + 6 s^2) is flat at both ends.
  const at = nodes.map((x) => (1 + x) / 2);
  const u = at.map((s) => s * s * s * (10 - 15 * s + 6 * s * s));
  return {
    value: u.map((share) => (sd * sd * chiSquareQuantile(share, df)) / df),
    weight: at.map((s, i) => ((weights[i] as number) / 2) * 30 * s * s * (1 - s) * (1 - s)),
  };
}
