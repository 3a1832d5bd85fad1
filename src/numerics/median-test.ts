import { medianSorted, sorted } from './order.ts';
import { requireScores } from './scores.ts';
import { chiSquareUpper } from './tails/chi-square.ts';

export interface MedianTestOptions {
  /** Where scores equal to the grand median are counted: 'below' (default), 'above', or left out ('ignore'). */
  readonly ties?: 'below' | 'above' | 'ignore';
  /** Yates' correction, used for two groups only (default true). */
  readonly correct?: boolean;
}

export interface MedianTest {
  readonly grandMedian: number;
  /** Counts above and not above the grand median, per group. */
  readonly table: readonly [readonly number[], readonly number[]];
  readonly chiSquare: number | null;
  readonly df: number;
  readonly p: number | null;
  readonly reason?: string;
}

/** Pearson's chi-square of a table of two rows; each gap between count and expectation reduced by up to `step`. */
function pearson(above: readonly number[], below: readonly number[], step: number): number {
  const total = (row: readonly number[]) => row.reduce((all, count) => all + count, 0);
  const rows = [total(above), total(below)] as const;
  const all = rows[0] + rows[1];
  let chiSquare = 0;
  for (let j = 0; j < above.length; j++) {
    const column = (above[j] as number) + (below[j] as number);
    for (const [i, row] of [above, below].entries()) {
      const expected = ((rows[i] as number) * column) / all;
      const gap = Math.abs((row[j] as number) - expected);
      const moved = gap - Math.min(step, gap);
      chiSquare += (moved * moved) / expected;
    }
  }
  return chiSquare;
}

/**
 * Mood's median test of two or more independent groups.
 * @param groups scores of each group, at least two groups of at least one score, finite
 * @param options where ties with the grand median go, Yates' correction
 * @returns grandMedian, table, chiSquare on k - 1 df, p; null with a reason when a row or a column of the table is empty
 * @throws RangeError when there are fewer than two groups, or a group is empty or not finite
 * @source Mood (1950), section 16.4; correction: Yates (1934), each gap moved by up to .5
 * @checked cases `median_test`, rtol 1e-9
 */
export function medianTest(groups: readonly Float64Array[], options: MedianTestOptions = {}): MedianTest {
  if (groups.length < 2) throw new RangeError(`*groups* must be at least two; got ${groups.length}`);
  for (const group of groups) requireScores(group, 1, 'groups');
  const { ties = 'below', correct = true } = options;
  const grandMedian = medianSorted(sorted(Float64Array.from(groups.flatMap((group) => [...group]))));
  const count = (group: Float64Array, test: (score: number) => boolean) => group.filter(test).length;
  const above = groups.map((g) => count(g, (x) => x > grandMedian || (ties === 'above' && x === grandMedian)));
  const below = groups.map((g) => count(g, (x) => x < grandMedian || (ties === 'below' && x === grandMedian)));
  const table = [above, below] as const;
  const df = groups.length - 1;
  const none = { grandMedian, table, chiSquare: null, df, p: null };
  if (above.every((n) => n === 0) || below.every((n) => n === 0)) {
    return { ...none, reason: 'no score lies on one side of the grand median' };
  }
  if (above.some((n, j) => n === 0 && below[j] === 0)) return { ...none, reason: 'all scores of a condition are ties' };
  const chiSquare = pearson(above, below, correct && groups.length === 2 ? 0.5 : 0);
  return { grandMedian, table, chiSquare, df, p: chiSquareUpper(chiSquare, df) };
}
