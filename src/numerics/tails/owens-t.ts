import { gaussLegendre } from './gauss-legendre.ts';
import { normalUpper } from './normal.ts';
import { requireNumber } from './require.ts';

const RULE = gaussLegendre(20);
const PANELS = 3;

/** T(h, a) for h >= 0 and 0 <= a <= 1. */
function byQuadrature(h: number, a: number): number {
  // Beyond nine standard deviations the rest of the integral is below the last digit.
  const end = h * a > 9 ? 9 / h : a;
  const half = end / (2 * PANELS);
  let sum = 0;
  for (let panel = 0; panel < PANELS; panel++) {
    for (let i = 0; i < RULE.nodes.length; i++) {
      const x = half * (2 * panel + 1 + RULE.nodes[i]!);
      const hx = h * x;
      sum += (RULE.weights[i]! * Math.exp(-0.5 * hx * hx)) / (1 + x * x);
    }
  }
  return (Math.exp(-0.5 * h * h) * half * sum) / (2 * Math.PI);
}

/**
 * Owen's T function: P(X > h and 0 < Y < a X) for independent standard normal X and Y.
 * @param h any number, infinities allowed
 * @param a any number, infinities allowed
 * @returns -1/4..1/4, even in h and odd in a
 * @throws RangeError if h or a is NaN
 * @source Owen 1956: 1 / (2 pi) * integral of exp(-h^2 (1 + x^2) / 2) / (1 + x^2) from 0 to a; a > 1 turned to 1 / a
 * @checked grid owens_t, 1e-11
 */
export function owensT(h: number, a: number): number {
  requireNumber('h', h);
  requireNumber('a', a);
  if (a < 0) return -owensT(h, -a);
  const size = Math.abs(h);
  if (size > 38.6 || a === 0) return 0;
  if (a <= 1) return byQuadrature(size, a);
  if (a === Infinity) return 0.5 * normalUpper(size);
  const near = normalUpper(size);
  const far = normalUpper(a * size);
  return 0.5 * (near + far) - near * far - (a * size > 38.6 ? 0 : byQuadrature(a * size, 1 / a));
}
