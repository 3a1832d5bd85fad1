/**
 * New levels for old: levels that get the same text become one, those that get null become missing, and levels no row
 * holds any more are dropped.
 *
 * @param codes one code a row, -1 = missing
 * @param levels the old levels
 * @param rename the new text of a level, or null
 * @returns codes and levels, the levels in order of first appearance
 */
export function relabel(
  codes: Int32Array,
  levels: readonly string[],
  rename: (level: string) => string | null,
): { codes: Int32Array; levels: string[] } {
  const renamed = levels.map(rename);
  const next = new Int32Array(codes.length).fill(-1);
  const out: string[] = [];
  const known = new Map<string, number>();
  const codeFor = new Int32Array(levels.length).fill(-1);
  for (let row = 0; row < codes.length; row++) {
    const old = codes[row] as number;
    const level = old < 0 ? null : (renamed[old] as string | null);
    if (level === null) continue;
    if ((codeFor[old] as number) < 0) {
      codeFor[old] = known.get(level) ?? out.length;
      if (codeFor[old] === out.length) out.push(level);
      known.set(level, codeFor[old] as number);
    }
    next[row] = codeFor[old] as number;
  }
  return { codes: next, levels: out };
}
