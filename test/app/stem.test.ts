import { describe, expect, it } from 'vitest';
import { bracketPath, FULL_WIDTH, stemShape } from '../../src/app/stem.ts';

const cells = [
  { id: 'c1', top: 10, line: 30, flow: { count: 2120, label: 'trials read', share: 1 } },
  { id: 'c2', top: 100, line: 120, flow: null },
  { id: 'c3', top: 200, line: 220, flow: { count: 2051, label: 'trials kept', setAside: 9, share: 0.5 } },
];

describe('the stem', () => {
  it('by hand: as wide as the share kept, narrower from the branch on', () => {
    expect(stemShape(cells, 400).pieces).toEqual([
      { from: 10, to: 220, width: FULL_WIDTH },
      { from: 220, to: 400, width: FULL_WIDTH / 2 },
    ]);
  });

  it('by hand: a tick at a count, lower where a branch leaves; a branch with the number set aside', () => {
    const { ticks, branches } = stemShape(cells, 400);
    expect(ticks.map(({ y, count }) => [y, count])).toEqual([
      [10, 2120],
      [272, 2051],
    ]);
    expect(branches).toEqual([{ id: 'c3', y: 220, setAside: 9 }]);
  });

  it('degenerate: nobody set aside draws no branch, nobody kept still draws a hairline', () => {
    const none = stemShape([{ id: 'c1', top: 0, line: 10, flow: { setAside: 0, share: 0 } }], 50);
    expect(none.branches).toEqual([]);
    expect(none.pieces).toEqual([{ from: 0, to: 50, width: 1.5 }]);
    expect(stemShape([], 0).pieces).toEqual([]);
  });

  it('by hand: a square bracket from a cell to those that depend on it', () => {
    expect(bracketPath(10, [200, 100], 126, 9)).toBe('M126 10h9V200h-9 M126 100h9');
    expect(bracketPath(10, [], 126, 9)).toBe('');
  });
});
