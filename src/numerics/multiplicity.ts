/** How p values are adjusted for their number. */
export type Adjustment = 'bonferroni' | 'holm' | 'hochberg' | 'hommel' | 'bh' | 'by' | 'sidak';

/**
 * Adjusted p values: an adjusted p at or below alpha is significant under the procedure at level alpha.
 * @param p p values, any number, each 0 to 1
 * @param method bonferroni, holm, hochberg, hommel and sidak (one step) hold the familywise error rate; bh and by the
 *   false discovery rate (hochberg, hommel and bh presume independent or positively dependent tests)
 * @returns adjusted p values, 0 to 1, in the order given
 * @throws RangeError when a p value is not between 0 and 1, or the method is not one of the list
 * @source Holm (1979); Hochberg (1988); Hommel (1988) by the algorithm of Wright (1992); Benjamini & Hochberg (1995);
 *   Benjamini & Yekutieli (2001); Sidak (1967): 1 - (1 - p)^m
 * @checked cases `p_adjust`, rtol 1e-9
 */
export function adjustP(p: ArrayLike<number>, method: Adjustment): Float64Array {
  const given = Float64Array.from(p);
  given.forEach((value, i) => {
    if (!(value >= 0 && value <= 1)) throw new RangeError(`*p* must be between 0 and 1; got ${value} at index ${i}`);
  });
  const m = given.length;
  if (method === 'bonferroni') return given.map((value) => Math.min(1, m * value));
  if (method === 'sidak') return given.map((value) => -Math.expm1(m * Math.log1p(-value)));
  const order = Uint32Array.from(given.keys()).sort((a, b) => given[a]! - given[b]!);
  const adjusted = inOrder(
    Float64Array.from(order, (i) => given[i]!),
    method,
  );
  const out = new Float64Array(m);
  order.forEach((i, place) => {
    out[i] = Math.min(1, adjusted[place]!);
  });
  return out;
}

function inOrder(p: Float64Array, method: Adjustment): Float64Array {
  const m = p.length;
  if (method === 'holm') return stepDown(p.map((value, i) => (m - i) * value));
  if (method === 'hochberg') return stepUp(p.map((value, i) => (m - i) * value));
  if (method === 'hommel') return hommel(p);
  if (method === 'bh') return stepUp(p.map((value, i) => (m / (i + 1)) * value));
  if (method !== 'by') throw new RangeError(`*method* must be one of the adjustments; got ${String(method)}`);
  let harmonic = 0;
  for (let i = 1; i <= m; i++) harmonic += 1 / i;
  return stepUp(p.map((value, i) => ((harmonic * m) / (i + 1)) * value));
}

/** From the smallest p on: none falls below one before it. */
function stepDown(values: Float64Array): Float64Array {
  let highest = 0;
  return values.map((value) => {
    highest = Math.max(highest, value);
    return highest;
  });
}

/** From the largest p back: none rises above one after it. */
function stepUp(values: Float64Array): Float64Array {
  const out = values.slice();
  for (let i = out.length - 2; i >= 0; i--) out[i] = Math.min(out[i]!, out[i + 1]!);
  return out;
}

function hommel(p: Float64Array): Float64Array {
  const n = p.length;
  const adjusted = p.slice();
  // Every size m of a joint hypothesis in turn: Simes's p of the m - 1 largest bounds that of each set holding a smaller one.
  for (let m = n; m > 1; m--) {
    let least = Number.POSITIVE_INFINITY;
    for (let i = n - m + 1; i < n; i++) least = Math.min(least, (m * p[i]!) / (m + i + 1 - n));
    for (let i = n - m + 1; i < n; i++) adjusted[i] = Math.max(adjusted[i]!, least);
    for (let i = 0; i <= n - m; i++) adjusted[i] = Math.max(adjusted[i]!, Math.min(least, m * p[i]!));
  }
  return adjusted;
}
