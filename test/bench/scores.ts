/** Skewed scores, the same as in peers.py and peers.R: -log of an evenly spread sequence. */
export function benchScores(n: number, shift = 0): Float64Array {
  return Float64Array.from({ length: n }, (_, i) => shift - Math.log((((i + 1) * 7919) % 10007) / 10008 + 1 / 10008));
}
