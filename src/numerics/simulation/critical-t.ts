import { tQuantileUpper } from '../tails/t.ts';

/**
 * Critical values of t for many degrees of freedom between two whole ones, without a quantile each.
 * @param tail upper tail beyond the critical value, 0 to .5
 * @param most largest degrees of freedom asked for
 * @returns a function of df and of the |t| that is held against it: exactly the critical value where |t| comes near it,
 *   elsewhere a value on the same side
 * @throws RangeError from the quantile
 * @source the critical value falls with df, so that those of the whole df beside it enclose it
 * @checked agrees with tQuantileUpper in every decision
 */
export function criticalT(tail: number, most: number): (df: number, t: number) => number {
  const table = Float64Array.from({ length: Math.ceil(most) + 2 }, (_, df) =>
    df === 0 ? NaN : tQuantileUpper(tail, df),
  );
  return (df, t) => {
    const whole = Math.floor(df);
    if (whole < 1) return tQuantileUpper(tail, df);
    if (whole === df) return table[whole] as number;
    const above = table[whole] as number;
    const below = table[whole + 1] as number;
    const between = above + (df - whole) * (below - above);
    return Math.abs(t - between) > above - below ? between : tQuantileUpper(tail, df);
  };
}
