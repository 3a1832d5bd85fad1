import { deviance } from './deviance.ts';
import { stirlingError } from './special.ts';

/** A family of tails P_j whose neighbours differ by one positive term: lower_j = lower_(j+1) + t_j. */
export interface StepFamily {
  /** log t_j. */
  readonly logTerm: (j: number) => number;
  /** t_(j+1) / t_j. */
  readonly ratio: (j: number) => number;
  /** lower_j / t_j, asked for at one j above the mean of the mixture. */
  readonly lowerOverTerm: (j: number) => number;
  /** upper_j / t_j, asked for at one j below the mean of the mixture. */
  readonly upperOverTerm: (j: number) => number;
}

const BIG = 1e200;

function logPoisson(j: number, mean: number): number {
  return j === 0 ? -mean : -stirlingError(j) - deviance(j, mean) - 0.5 * Math.log(2 * Math.PI * j);
}

/**
 * Mean of the lower tails of a family over a Poisson index, from positive terms: a downward sum.
 * @param family tails that fall as the index rises
 * @param mean Poisson mean, above 0
 * @returns sum of Poisson(j; mean) lower_j
 * @source Poisson mixture; r_j = lower_j / t_j obeys r_j = 1 + r_(j+1) t_(j+1) / t_j
 * @checked through grid ncf_cdf, 1e-11
 */
export function poissonLower(family: StepFamily, mean: number): number {
  const last = Math.ceil(mean + 10 * Math.sqrt(mean) + 40);
  let tail = family.lowerOverTerm(last);
  let weight = 1;
  let sum = tail;
  let log = logPoisson(last, mean) + family.logTerm(last);
  for (let j = last - 1; j >= 0; j--) {
    const ratio = family.ratio(j);
    tail = 1 + tail * ratio;
    weight *= (j + 1) / (mean * ratio);
    const term = weight * tail;
    sum += term;
    if (j < mean && term < 1e-18 * sum) break;
    if (sum > BIG) {
      sum /= BIG;
      weight /= BIG;
      log += Math.log(BIG);
    }
  }
  return Math.min(1, Math.exp(log + Math.log(sum)));
}

/**
 * Mean of the upper tails of a family over a Poisson index, from positive terms: an upward sum.
 * @param family tails that rise with the index
 * @param mean Poisson mean, above 0
 * @returns sum of Poisson(j; mean) upper_j
 * @source Poisson mixture; r_j = upper_j / t_j obeys r_(j+1) = (r_j + 1) t_j / t_(j+1)
 * @checked through grid ncf_cdf, 1e-11
 */
export function poissonUpper(family: StepFamily, mean: number): number {
  const first = Math.max(0, Math.floor(mean - 10 * Math.sqrt(mean)));
  let tail = family.upperOverTerm(first);
  let weight = 1;
  let sum = tail;
  let log = logPoisson(first, mean) + family.logTerm(first);
  let previous = tail;
  for (let j = first; ; j++) {
    const ratio = family.ratio(j);
    tail = (tail + 1) / ratio;
    weight *= (mean * ratio) / (j + 1);
    const term = weight * tail;
    sum += term;
    // Written so that a term that is not a number ends the sum too.
    if (j > mean && !(term >= previous) && !(term >= 1e-18 * sum)) break;
    previous = term;
    if (sum > BIG) {
      sum /= BIG;
      weight /= BIG;
      previous /= BIG;
      log += Math.log(BIG);
    }
  }
  return Math.min(1, Math.exp(log + Math.log(sum)));
}
