import { describe, expect, test } from 'vitest';
import { rng } from '../../../src/numerics/rng.ts';
import { OUTCOME, sortInPlace, tOutcome } from '../../../src/numerics/simulation/outcome.ts';

const { judged, rejected, hasInterval, covered } = OUTCOME;

describe('marks of a t test', () => {
  test('by hand: estimate 3, SE 1, critical value 2', () => {
    expect(tOutcome(3, 1, 0, () => 2)).toBe(judged | hasInterval | rejected);
    expect(tOutcome(3, 1, 2, () => 2)).toBe(judged | hasInterval | rejected | covered);
    expect(tOutcome(1, 1, 0, () => 2)).toBe(judged | hasInterval | covered);
    expect(tOutcome(-1, 1, -3, () => 2)).toBe(judged | hasInterval | covered);
  });

  test('degenerate: no standard error gives no decision', () => {
    expect(tOutcome(3, 0, 0, () => 2)).toBe(0);
    expect(tOutcome(3, NaN, 0, () => 2)).toBe(0);
  });

  test('agrees with sort, few and many scores (seed 2)', () => {
    const draw = rng(2);
    for (const n of [0, 1, 7, 48, 49, 300]) {
      const x = Float64Array.from({ length: n }, () => draw.below(20));
      expect(sortInPlace(x.slice())).toEqual(x.slice().sort());
    }
  });
});
