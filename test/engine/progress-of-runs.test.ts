import { describe, expect, test } from 'vitest';
import { ProgressOfRuns } from '../../src/engine/progress-of-runs.ts';

function recorded() {
  const shares: number[] = [];
  return { shares, progress: new ProgressOfRuns((share) => shares.push(share)) };
}

describe('ProgressOfRuns', () => {
  test('by hand: several jobs begun together count by their mean', async () => {
    const { shares, progress } = recorded();
    const tell: ((share: number) => void)[] = [];
    const jobs = [0, 1].map(() =>
      progress.follow(async (told) => {
        tell.push(told);
        return 'done';
      }),
    );
    expect(await Promise.all(jobs)).toEqual(['done', 'done']);
    tell[0]?.(0.5);
    tell[1]?.(0.5);
    tell[0]?.(1);
    tell[1]?.(1);
    expect(shares).toEqual([0.25, 0.5, 0.75, 1]);
  });

  test('invariance: it never falls, and stays between 0 and 1', () => {
    const { shares, progress } = recorded();
    for (const share of [0.4, 0.2, Number.NaN, 0.4, -3, 7, 0.9]) progress.tell(share);
    expect(shares).toEqual([0.4, 1]);
  });
});
