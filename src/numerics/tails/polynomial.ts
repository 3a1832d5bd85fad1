/**
 * Polynomial by Horner's scheme.
 * @param coefficients constant term first
 * @param x any number
 * @returns c0 + c1 x + c2 x^2 + ...
 * @checked by hand, exact
 */
export function polynomial(coefficients: readonly number[], x: number): number {
  let sum = 0;
  for (let i = coefficients.length - 1; i >= 0; i--) sum = sum * x + coefficients[i]!;
  return sum;
}
