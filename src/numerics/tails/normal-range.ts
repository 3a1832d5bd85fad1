import { gaussLegendre } from './gauss-legendre.ts';
import { normalDensity, normalUpper } from './normal.ts';

const SHORT = gaussLegendre(12);

/** P(low < Z < low + width), without cancellation in the tails or for a short stretch. */
function between(low: number, width: number): number {
  const high = low + width;
  if (width > 0.4) {
    if (low >= 0) return normalUpper(low) - normalUpper(high);
    return high <= 0 ? normalUpper(-high) - normalUpper(-low) : 1 - normalUpper(high) - normalUpper(-low);
  }
  let sum = 0;
  for (let i = 0; i < SHORT.nodes.length; i++) {
    sum += SHORT.weights[i]! * normalDensity(low + 0.5 * width * (1 + SHORT.nodes[i]!));
  }
  return 0.5 * width * sum;
}

/** Trapezoid sum of a unimodal function from its middle outward, over -reach..reach of the middle. */
function outward(at: (c: number) => number, step: number, lowest: number, highest: number): number {
  let sum = at(0);
  for (const direction of [-step, step]) {
    for (let i = 1; ; i++) {
      const c = i * direction;
      if (c < lowest || c > highest) break;
      const term = at(c);
      sum += term;
      if (term < 1e-18 * sum && Math.abs(c) > 1) break;
    }
  }
  return sum * step;
}

/** Narrowest feature of the integrand is that of the k-th power of a density. */
function stepFor(k: number): number {
  return 0.6 / Math.sqrt(k + 1);
}

/**
 * Lower tail of the range of independent standard normal values.
 * @param w range, at least 0
 * @param k number of values, whole, at least 2
 * @returns P(range <= w)
 * @source k * integral of density(z) (P(z < Z < z + w))^(k - 1) dz over the smallest value z; trapezoid rule
 * @checked k = 2 in closed form, 1e-13; through grid tukey_cdf, 1e-9
 */
export function normalRangeLower(w: number, k: number): number {
  if (w <= 0) return 0;
  if (w > 40) return 1;
  const at = (c: number) => {
    const low = c - 0.5 * w;
    return normalDensity(low) * Math.exp((k - 1) * Math.log(between(low, w)));
  };
  return Math.min(1, k * outward(at, stepFor(k), -9, 0.5 * w + 9));
}

/**
 * Upper tail of the range of independent standard normal values, from positive terms.
 * @param w range, at least 0
 * @param k number of values, whole, at least 2
 * @returns P(range > w)
 * @source k * integral of density(z) (P(Z > z)^(k - 1) - P(z < Z < z + w)^(k - 1)) dz over the smallest value z
 * @checked k = 2 in closed form, 1e-13; through grid tukey_cdf, 1e-9
 */
export function normalRangeUpper(w: number, k: number): number {
  if (w <= 0) return 1;
  if (w > 80) return 0;
  const at = (c: number) => {
    const low = c - 0.5 * w;
    const above = normalUpper(low);
    if (above === 0) return 0;
    const missed = Math.log1p(-Math.min(1, normalUpper(low + w) / above));
    return normalDensity(low) * Math.exp((k - 1) * Math.log(above)) * -Math.expm1((k - 1) * missed);
  };
  return Math.min(1, k * outward(at, stepFor(k), -9, 0.5 * w + 9));
}
