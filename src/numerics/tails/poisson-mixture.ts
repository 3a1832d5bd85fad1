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

/** A sum of weights times tails, on a scale of its own until it is finished. */
class ScaledSum {
  private sum = 0;
  private largest = 0;
  private largestAt = 0;
  private weightThere = 1;

  /** Adds one term; returns what the weights must be divided by from here on. */
  add(j: number, weight: number, tail: number): number {
    const term = weight * tail;
    this.sum += term;
    if (term >= this.largest) {
      this.largest = term;
      this.largestAt = j;
      this.weightThere = weight;
    }
    if (this.sum < BIG) return 1;
    const scale = this.sum;
    this.sum = 1;
    this.largest /= scale;
    this.weightThere /= scale;
    return scale;
  }

  /** Whether a term is lost beside the sum; true too for one that is not a number. */
  dwarfs(weight: number, tail: number): boolean {
    return !(weight * tail >= 1e-18 * this.sum);
  }

  /** The sum on its true scale, fixed at the largest term, whose logarithm has the least rounding. */
  value(family: StepFamily, mean: number): number {
    const log = logPoisson(this.largestAt, mean) + family.logTerm(this.largestAt);
    return Math.min(1, Math.exp(log) * (this.sum / this.weightThere));
  }
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
  let sum = new ScaledSum();
  let tail = family.lowerOverTerm(last);
  let weight = 1;
  weight /= sum.add(last, weight, tail);
  for (let j = last - 1; j >= 0; j--) {
    const ratio = family.ratio(j);
    tail = 1 + tail * ratio;
    weight *= (j + 1) / mean / ratio;
    if (weight === Infinity) {
      // All terms so far are lost beside this one.
      sum = new ScaledSum();
      weight = 1;
    }
    if (j < mean && sum.dwarfs(weight, tail)) break;
    weight /= sum.add(j, weight, tail);
  }
  return sum.value(family, mean);
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
  const sum = new ScaledSum();
  let tail = family.upperOverTerm(first);
  let weight = 1;
  let previous = tail;
  weight /= sum.add(first, weight, tail);
  for (let j = first; ; j++) {
    const ratio = family.ratio(j);
    tail = (tail + 1) / ratio;
    weight *= (mean * ratio) / (j + 1);
    const falling = !(weight * tail >= previous);
    if (j > mean && falling && sum.dwarfs(weight, tail)) break;
    previous = weight * tail;
    const scale = sum.add(j + 1, weight, tail);
    weight /= scale;
    previous /= scale;
  }
  return sum.value(family, mean);
}
