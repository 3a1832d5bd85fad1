/** (1 + u) log(1 + u) - u by its power series, for |u| < 0.4: no cancellation near u = 0. */
function seriesNearZero(u: number): number {
  const v = u / (2 + u);
  const square = v * v;
  let term = 2 * v * square;
  let sum = u * v;
  let extra = 0;
  for (let j = 3; ; j += 2) {
    const next = extra + term / j;
    if (next === extra) break;
    extra = next;
    term *= square;
  }
  sum += (1 + u) * extra;
  return sum;
}

/**
 * Deviance of a count from its mean, without the cancellation of the plain formula.
 * @param x at least 0
 * @param mean above 0
 * @returns x log(x / mean) + mean - x, at least 0
 * @source Loader 2000, equation 5: bd0(x, m)
 * @checked through gamma_cdf, beta_cdf, binom_cdf: 1e-11
 */
export function deviance(x: number, mean: number): number {
  const difference = x - mean;
  if (Math.abs(difference) < 0.4 * mean) return mean * seriesNearZero(difference / mean);
  if (x === 0) return mean;
  const ratio = x / mean;
  const log = ratio > 0 && ratio < Infinity ? Math.log(ratio) : Math.log(x) - Math.log(mean);
  return x * log + mean - x;
}
