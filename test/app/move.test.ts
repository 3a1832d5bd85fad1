import { describe, expect, it } from 'vitest';
import { move, moveBy } from '../../src/app/move.ts';
import { plainWorksheet, plainRegistry as registry, wiring } from '../support/plain-registry.ts';

const rules = plainWorksheet(
  'c1 data',
  'c2 design table=c1',
  'c3 exclusion design=c2',
  'c4 exclusion design=c3',
  'c5 score design=c4',
);

describe('moving a cell', () => {
  it('by hand: two rules change places in the flow', () => {
    expect(wiring(move(rules, registry, 'c4', -1)!)).toEqual([
      'c1 data',
      'c2 design table=c1',
      'c4 exclusion design=c2',
      'c3 exclusion design=c4',
      'c5 score design=c3',
    ]);
  });

  it('by hand: a rule moved below the score no longer reaches it', () => {
    expect(wiring(move(rules, registry, 'c4', 1)!).slice(2)).toEqual([
      'c3 exclusion design=c2',
      'c5 score design=c3',
      'c4 exclusion design=c3',
    ]);
  });

  it('invariance: down and up again gives the record back', () => {
    for (const id of ['c3', 'c4']) {
      const down = move(rules, registry, id, 1)!;
      expect(move(down, registry, id, -1)).toEqual(rules);
    }
  });

  it('refuses to put a cell above what it must read', () => {
    expect(move(rules, registry, 'c2', -1)).toBeNull();
    expect(move(rules, registry, 'c1', -1)).toBeNull();
    expect(move(rules, registry, 'c5', 1)).toBeNull();
  });

  it('by hand: a note moves anywhere and rewires nothing', () => {
    const noted = plainWorksheet('c1 data', 'c2 design table=c1', 'c9 note', 'c3 standing');
    const first = moveBy(noted, registry, 'c9', -2)!;
    expect(wiring(first)).toEqual(['c9 note', 'c1 data', 'c2 design table=c1', 'c3 standing']);
    expect(moveBy(first, registry, 'c9', 5)).toEqual(noted);
  });

  it('by hand: moving by several places goes as far as the ports allow', () => {
    const moved = moveBy(rules, registry, 'c4', -9)!;
    expect(wiring(moved)[2]).toBe('c4 exclusion design=c2');
    expect(moveBy(rules, registry, 'c2', -3)).toBeNull();
  });
});
