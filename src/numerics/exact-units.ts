/**
 * Decimal scores as whole numbers, so that sums of them tie exactly when they should.
 * @param x scores, finite
 * @param largest largest sum of |units| allowed
 * @returns the scores in whole units of 10^-k, k up to 10 (divided by what all share), and the unit; null when they are
 *   not decimals of at most 10 places or the units are too large
 * @source common practice: sums of whole numbers are exact
 * @checked by hand: .1, .2 and .3 become 1, 2 and 3
 */
export function exactUnits(x: Float64Array, largest: number): { units: Float64Array; unit: number } | null {
  let size = 0;
  for (const score of x) size = Math.max(size, Math.abs(score));
  for (let places = 0, scale = 1; places <= 10; places++, scale *= 10) {
    const units = x.map((score) => Math.round(score * scale));
    let total = 0;
    for (const value of units) total += Math.abs(value);
    const exact = x.every((score, i) => Math.abs((units[i] as number) / scale - score) <= 4e-16 * size);
    if (!exact) continue;
    const shared = units.reduce(greatestDivisor, 0) || 1;
    if (total / shared > largest) return null;
    return { units: units.map((value) => value / shared), unit: shared / scale };
  }
  return null;
}

function greatestDivisor(a: number, b: number): number {
  let one = Math.abs(a);
  let other = Math.abs(b);
  while (other !== 0) [one, other] = [other, one % other];
  return one;
}
