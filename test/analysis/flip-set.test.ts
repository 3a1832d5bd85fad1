import { describe, expect, test } from 'vitest';
import { fewestRemovals, type RemovalJudge } from '../../src/analysis/flip-set.ts';
import { atOnce } from '../support/chains.ts';

/** Changes when the values taken out sum to at least `need`. */
function sumJudge(values: readonly number[], need: number, more: Partial<RemovalJudge> = {}): RemovalJudge {
  return {
    candidates: values.length,
    mostSets: 1e6,
    mostTries: 1e5,
    largest: values.length - 1,
    pull: (removed) => need - Array.from(removed, (place) => values[place] as number).reduce((a, b) => a + b, 0),
    ...more,
  };
}

const values = [1, 5, 2, 8, 3, 4, 7, 6];

describe('the smallest set', () => {
  test('by hand: three of 1 to 8 sum to 20 or more in two ways, two never do', async () => {
    const found = await fewestRemovals(sumJudge(values, 20), atOnce);
    // 8 + 7 + 6 = 21 and 8 + 7 + 5 = 20; the best is the first.
    expect(found).toEqual({ members: [3, 6, 7], exact: true, changing: 2, sets: 56, noneUpTo: 2, triedUpTo: 3 });
  });

  test('agrees with the search of every set where only some can be tried', async () => {
    const found = await fewestRemovals(sumJudge(values, 20, { mostSets: 10 }), atOnce);
    expect(found.members).toEqual([3, 6, 7]);
    expect(found).toMatchObject({ exact: false, changing: null, sets: null, noneUpTo: 1 });
  });

  test('by hand: exchanging pairs finds what adding one by one misses', async () => {
    // The 9 alone pulls most, but only the pair of the two 6s changes it.
    const pairs = (removed: Int32Array) =>
      removed.includes(1) && removed.includes(2) ? 0 : removed.includes(0) ? 1 : 5;
    const gentle = (removed: Int32Array) =>
      pairs(removed) - (removed.includes(1) ? 0.1 : 0) - (removed.includes(2) ? 0.1 : 0);
    const found = await fewestRemovals(sumJudge([9, 6, 6, 1], 0, { mostSets: 1, pull: gentle }), atOnce);
    expect(found.members).toEqual([1, 2]);
  });

  test('theory: where the strongest sets are known a size is exact without trying all', async () => {
    const strongestSets = (size: number) => [Int32Array.from([3, 6, 7, 1].slice(0, size)).sort()];
    const found = await fewestRemovals(sumJudge(values, 20, { mostSets: 1, strongestSets }), atOnce);
    expect(found).toMatchObject({ members: [3, 6, 7], exact: true, changing: null, noneUpTo: 2 });
  });

  test('degenerate: nothing changes it, and nothing can be judged', async () => {
    const never = await fewestRemovals(sumJudge(values, 1000), atOnce);
    expect(never).toMatchObject({ members: null, exact: true, noneUpTo: 7 });
    const unknown = await fewestRemovals(sumJudge(values, 0, { pull: () => null, mostSets: 1 }), atOnce);
    expect(unknown).toMatchObject({ members: null, exact: false, triedUpTo: 0 });
  });

  test('refuses: to go on once it is stopped', async () => {
    const stop = { pause: () => Promise.reject(new Error('stopped')), progress: () => undefined };
    await expect(fewestRemovals(sumJudge(values, 1000, { mostSets: 1e4 }), stop)).rejects.toThrow('stopped');
  });
});
