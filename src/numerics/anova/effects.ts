/**
 * Every effect of crossed factors: main effects first, then interactions of two, of three, ...
 * @param count number of factors, 1 to 8
 * @returns lists of factor places: [0], [1], [0, 1] for two factors
 * @throws RangeError when count is not a whole number from 1 to 8
 * @source common practice
 * @checked by hand
 */
export function effectsOf(count: number): number[][] {
  if (!Number.isInteger(count) || count < 1 || count > 8) {
    throw new RangeError(`*count* must be a whole number from 1 to 8; got ${count}`);
  }
  const effects: number[][] = [];
  for (let set = 1; set < 1 << count; set++) {
    effects.push(Array.from({ length: count }, (_, i) => i).filter((i) => set & (1 << i)));
  }
  const before = (a: readonly number[], b: readonly number[]) => {
    const at = a.findIndex((factor, i) => factor !== b[i]);
    return a.length - b.length || (at < 0 ? 0 : a[at]! - b[at]!);
  };
  return effects.sort(before);
}
