import { expect, test } from 'vitest';
import { movingCriterion, movingCutoff } from '../../../src/numerics/rules/moving-criterion.ts';

// Values of the criterion table of Van Selst & Jolicoeur 1994: from memory.
test('by hand: tabled sizes, the line between them, and the value from 100 on', () => {
  expect(movingCutoff(4, 'non-recursive')).toBe(1.458);
  expect(movingCutoff(20, 'modified-recursive')).toBe(3.64);
  expect(movingCutoff(18, 'non-recursive')).toBeCloseTo(2.326 + 0.6 * (2.391 - 2.326), 12);
  expect(movingCutoff(100, 'non-recursive')).toBe(2.5);
  expect(movingCutoff(4000, 'modified-recursive')).toBe(3.5);
});

test('by hand: one pass over 1..9 and 60', () => {
  const x = Float64Array.of(1, 2, 3, 4, 5, 6, 7, 8, 9, 60);
  const found = movingCriterion(x, { procedure: 'non-recursive' });
  // Mean 10.5, SD sqrt(2782.5 / 9): limits 10.5 -+ 2.173 * 17.583...
  const reach = 2.173 * Math.sqrt(2782.5 / 9);
  expect(found.upper).toBeCloseTo(10.5 + reach, 10);
  expect(found.lower).toBeCloseTo(10.5 - reach, 10);
  expect([...found.flags]).toEqual([0, 0, 0, 0, 0, 0, 0, 0, 0, 1]);
});

test('by hand: the modified recursive procedure takes a masked pair out in turn', () => {
  const x = Float64Array.of(500, 400, 410, 420, 430, 440, 450, 460, 470, 2000, 3000);
  const found = movingCriterion(x, { procedure: 'modified-recursive' });
  // 11 scores: without 3000 mean 598, SD 493.4, criterion 4.0: limit 2572 < 3000. 10: without 2000 mean 442.2, limit 577.
  expect([...found.flags]).toEqual([0, 0, 0, 0, 0, 0, 0, 0, 0, 1, 1]);
  expect(found.passes).toBe(3);
  expect(found.criterion).toBe(4.25);
});

test('agrees with a written-out pass: limits at the last pass come from the rest without its largest', () => {
  const x = Float64Array.of(500, 400, 410, 420, 430, 440, 450, 460, 470, 2000, 3000);
  const rest = [400, 410, 420, 430, 440, 450, 460, 470];
  const mean = rest.reduce((a, b) => a + b, 0) / 8;
  const sd = Math.sqrt(rest.reduce((a, b) => a + (b - mean) ** 2, 0) / 7);
  const found = movingCriterion(x, { procedure: 'modified-recursive' });
  expect(found.upper).toBeCloseTo(mean + 4.25 * sd, 10);
});

test('theory: the one-pass criterion rises with n, the recursive one falls', () => {
  for (let n = 4; n < 120; n++) {
    expect(movingCutoff(n + 1, 'non-recursive')).toBeGreaterThanOrEqual(movingCutoff(n, 'non-recursive'));
    expect(movingCutoff(n + 1, 'modified-recursive')).toBeLessThanOrEqual(movingCutoff(n, 'modified-recursive'));
  }
});

test('invariance: marks follow their scores when the order changes', () => {
  const x = Float64Array.of(500, 400, 410, 3000, 430, 440, 2000, 460, 470, 420, 450);
  const found = movingCriterion(x, { procedure: 'modified-recursive' });
  expect([...found.flags]).toEqual([0, 0, 0, 1, 0, 0, 1, 0, 0, 0, 0]);
});

test('degenerate: fewer than 4 or equal scores set nothing aside, with a reason', () => {
  for (const procedure of ['non-recursive', 'modified-recursive'] as const) {
    expect(movingCriterion(Float64Array.of(1, 2, 900), { procedure }).reason).toBe('fewer than 4 scores');
    const same = movingCriterion(Float64Array.of(7, 7, 7, 7), { procedure });
    expect(same).toMatchObject({ lower: null, upper: null, passes: 0, reason: 'all scores are equal' });
  }
  const found = movingCriterion(Float64Array.of(7, 7, 7, 7, 8), { procedure: 'modified-recursive' });
  expect(found.reason).toBe('without the largest, all scores are equal');
  expect([...found.flags]).toEqual([0, 0, 0, 0, 0]);
});

test('refuses sizes below 4 and unknown procedures', () => {
  expect(() => movingCutoff(3, 'non-recursive')).toThrow(/\*n\* must be a whole number of 4 or more/);
  expect(() => movingCutoff(8, 'simple' as 'non-recursive')).toThrow(/\*procedure\* must be/);
});
