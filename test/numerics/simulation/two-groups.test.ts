import { describe, expect, test } from 'vitest';
import { mannWhitney } from '../../../src/numerics/mann-whitney.ts';
import { rng } from '../../../src/numerics/rng.ts';
import { OUTCOME } from '../../../src/numerics/simulation/outcome.ts';
import { shapeOf } from '../../../src/numerics/simulation/shapes.ts';
import { twoGroupDecider, uOfSorted } from '../../../src/numerics/simulation/two-groups.ts';
import { studentT } from '../../../src/numerics/student.ts';
import { welchT } from '../../../src/numerics/welch.ts';
import { yuenWelch } from '../../../src/numerics/yuen.ts';

const empty = () => ({ student: 0, welch: 0, yuen: 0, mannWhitney: 0 });

describe('closed-form decisions', () => {
  test('agrees with the tests themselves: 300 experiments of skewed scores (seed 9)', () => {
    const draw = rng(9);
    const decide = twoGroupDecider({ alpha: 0.05, trim: 20, most: 40 });
    const truth = { means: 0.4, trimmedMeans: 0.3 };
    for (let i = 0; i < 300; i++) {
      const x = new Float64Array(5 + draw.below(15));
      const y = new Float64Array(5 + draw.below(15));
      shapeOf('lognormal').fill(x, draw);
      shapeOf('exponential').fill(y, draw);
      const out = empty();
      decide(x.slice().sort(), y.slice().sort(), truth, out);
      const tests = { student: studentT(x, y), welch: welchT(x, y), yuen: yuenWelch(x, y) };
      for (const [name, test] of Object.entries(tests)) {
        const marks = out[name as 'student' | 'welch' | 'yuen'];
        expect((marks & OUTCOME.rejected) !== 0).toBe((test.p ?? 1) < 0.05);
        const [low, high] = (test.interval ?? [NaN, NaN]) as [number, number];
        const value = name === 'yuen' ? truth.trimmedMeans : truth.means;
        expect((marks & OUTCOME.covered) !== 0).toBe(low <= value && value <= high);
      }
      expect((out.mannWhitney & OUTCOME.rejected) !== 0).toBe((mannWhitney(x, y).p ?? 1) <= 0.05);
    }
  });

  test('by hand: U of 1, 3, 3 against 2, 3, 4', () => {
    // 1: none; 3: over 2, ties with 3: 1.5; twice.
    expect(uOfSorted(Float64Array.of(1, 3, 3), Float64Array.of(2, 3, 4))).toBe(3);
  });

  test('degenerate: one score in a group, and no spread', () => {
    const decide = twoGroupDecider({ alpha: 0.05, trim: 20, most: 10 });
    const out = empty();
    decide(Float64Array.of(1), Float64Array.of(1, 2), { means: 0, trimmedMeans: 0 }, out);
    expect(out).toEqual(empty());
    decide(Float64Array.of(1, 1), Float64Array.of(2, 2), { means: 0, trimmedMeans: 0 }, out);
    expect([out.student, out.welch, out.yuen]).toEqual([0, 0, 0]);
  });
});
