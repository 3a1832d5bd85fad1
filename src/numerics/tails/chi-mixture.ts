import { normalLogLower } from './normal.ts';
import { stirlingError } from './special.ts';

/** Derivative of log P(Z <= z): the density over the tail. */
function slopeOfLog(z: number): number {
  if (z < -1e4) return -z;
  return Math.exp(-0.5 * z * z - 0.9189385332046728 - normalLogLower(z));
}

/** log s where s^df exp(-df s^2 / 2) P(Z <= rate * s - shift), log-concave in s, is largest, to within `near`. */
function peakOf(rate: number, shift: number, df: number, near: number): number {
  const rising = (w: number) => {
    const drive = rate * Math.exp(w);
    return slopeOfLog(drive - shift) * drive - df * Math.expm1(2 * w) > 0;
  };
  let below = -1;
  let above = 1;
  while (!rising(below)) below *= 2;
  while (rising(above)) above *= 2;
  for (let i = 0; i < 200 && above - below > near; i++) {
    const middle = 0.5 * (below + above);
    if (rising(middle)) below = middle;
    else above = middle;
  }
  return 0.5 * (below + above);
}

/** exp(u) - 1 - u without cancellation near 0. */
function deviationOf(u: number): number {
  if (Math.abs(u) > 0.3) return Math.expm1(u) - u;
  let term = 0.5 * u * u;
  let sum = 0;
  for (let k = 3; sum + term !== sum; k++) {
    sum += term;
    term *= u / k;
  }
  return sum;
}

/**
 * Log density of w = log S, S the root of a chi-square variable over its degrees of freedom.
 * @param df degrees of freedom, above 0, finite
 * @returns function of w
 * @source log(2 sqrt(a / (2 pi))) - stirling error(a) - a (exp(2w) - 1 - 2w), a = df / 2
 * @checked theory: it integrates to one, 1e-13
 */
export function chiLogDensity(df: number): (w: number) => number {
  const half = 0.5 * df;
  const constant = 0.5 * Math.log(df / Math.PI) - stirlingError(half);
  return (w) => constant - half * deviationOf(2 * w);
}

/**
 * Mean of P(Z <= rate * S - shift) over S, the root of a chi-square variable over its degrees of freedom.
 * All terms are positive, so the result keeps its digits however small it is.
 * @param rate any finite number
 * @param shift any finite number
 * @param df degrees of freedom, above 0, finite
 * @returns a probability
 * @source trapezoid rule in w = log s, whose error falls exponentially with the step
 * @checked through the grids nct_cdf, 1e-11
 */
export function chiMixture(rate: number, shift: number, df: number): number {
  const logDensity = chiLogDensity(df);
  const logAt = (w: number) => logDensity(w) + normalLogLower(rate * Math.exp(w) - shift);
  const step = Math.min(0.12, 0.55 / (Math.sqrt(2 * df) + Math.abs(shift) + 9));
  const peak = peakOf(rate, shift, df, step);
  const top = logAt(peak);
  let sum = 1;
  for (const direction of [-step, step]) {
    for (let i = 1; ; i++) {
      const term = Math.exp(logAt(peak + i * direction) - top);
      sum += term;
      if (term < 1e-18 * sum) break;
    }
  }
  return Math.min(1, step * sum * Math.exp(top));
}
