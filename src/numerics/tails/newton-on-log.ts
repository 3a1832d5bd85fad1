/** Height and slope of a function at one place. */
export interface Height {
  readonly value: number;
  readonly slope: number;
}

/**
 * Root of a concave, monotone function (a logarithm of a tail minus its target), by Newton's method inside a bracket.
 * A value of -Infinity (the tail underflowed) says only on which side the root lies.
 * @param at value and slope at w
 * @param start a first guess
 * @param rising whether the function rises with w
 * @returns the root; its last correction was below 1e-13 max(1, |root|), which Newton's method squares
 * @source Newton's method: w - f(w) / f'(w), halving the bracket where that leaves it
 * @checked by hand, 1e-14; through the quantile grids, 1e-11
 */
export function newtonOnLog(at: (w: number) => Height, start: number, rising: boolean): number {
  let below = -Infinity;
  let above = Infinity;
  let w = start;
  let reach = 1;
  for (let i = 0; i < 400; i++) {
    const { value, slope } = at(w);
    if (value === 0) return w;
    if (value < 0 === rising) below = w;
    else above = w;
    // From a flat place the full step would lead far beyond the root.
    const most = 20 + Math.abs(w);
    let next = w - Math.max(-most, Math.min(most, value / slope));
    // Asked before the bracket, whose ends rounding makes meet when the root is found.
    if (Math.abs(next - w) <= 1e-13 * Math.max(1, Math.abs(w))) return next;
    if (!(next > below && next < above)) {
      if (Number.isFinite(above - below)) next = below + 0.5 * (above - below);
      else next = below === w ? w + reach : w - reach;
      reach *= 2;
    }
    if (next === w) return w;
    w = next;
  }
  return w;
}
