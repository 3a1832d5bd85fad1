import { expect, test } from 'vitest';
import { compareInTurns, inTurns } from './in-turns.ts';

function timed(name: string, times: number[], log: string[]) {
  let next = 0;
  return {
    name,
    run: async () => {
      log.push(name);
      return times[next++ % times.length] as number;
    },
  };
}

test('by hand: each is warmed up, then asked in turn, and the median is given', async () => {
  const log: string[] = [];
  // 1,000 ms a round leaves three rounds of the 3,000 ms; the first time of each is its warm-up.
  const medians = await inTurns([timed('A', [700, 10, 30, 20], log), timed('B', [300, 7, 5, 6], log)]);
  expect(log.join('')).toBe('ABABABAB');
  expect(medians).toEqual([20, 6]);
});

test('degenerate: a peer that is not here has its row, with the reason and no numbers', async () => {
  const rows = await compareInTurns('B0', 'n=1', () => 1 + 1, [{ name: 'R', goal: 8, absent: 'skipped: no R here' }]);
  expect(rows.map(({ peer, peer_ms, ratio, note, goal }) => ({ peer, peer_ms, ratio, note, goal }))).toEqual([
    { peer: 'R', peer_ms: null, ratio: null, note: 'skipped: no R here', goal: '>= 8' },
  ]);
});
