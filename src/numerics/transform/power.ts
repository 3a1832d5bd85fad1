/**
 * (exp(rate u) - 1) / rate, which is u at rate 0: the power transformation of a number whose log is u.
 * @param u log of a positive number
 * @param rate exponent
 * @returns transformed value
 * @source Box & Cox 1964: (x^l - 1) / l, log x at l = 0
 * @checked by hand, 1e-15
 */
export function powered(u: number, rate: number): number {
  return rate === 0 ? u : Math.expm1(rate * u) / rate;
}

/**
 * Derivative of `powered` by its rate.
 * @param u log of a positive number
 * @param rate exponent
 * @returns u^2 (t e^t - e^t + 1) / t^2 with t = rate u
 * @source d/dl of (e^(l u) - 1) / l; near 0 by its series sum t^k / (k! (k + 2))
 * @checked against differences of `powered`, 1e-7
 */
export function poweredSlope(u: number, rate: number): number {
  const t = rate * u;
  if (Math.abs(t) > 0.5) return (u * u * (t * Math.exp(t) - Math.expm1(t))) / (t * t);
  let term = 1;
  let sum = 0;
  for (let k = 0; k < 25; k++) {
    sum += term / (k + 2);
    term *= t / (k + 1);
  }
  return u * u * sum;
}
