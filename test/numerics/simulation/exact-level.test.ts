import { readFileSync } from 'node:fs';
import { describe, expect, test } from 'vitest';
import { exactLevelTwoGroups, type TwoNormalGroups } from '../../../src/numerics/simulation/exact-level.ts';

interface Row extends TwoNormalGroups {
  readonly student: number;
  readonly welch: number;
}
const reference = JSON.parse(readFileSync(new URL('../../reference/error_rates.json', import.meta.url), 'utf8'));
const rows: Row[] = reference.exact_type1_two_group_normal;

describe('exact level of two normal groups', () => {
  test.each(rows)('agrees with methods 5.1: $n1 and $n2, SD $sd1 and $sd2', (row) => {
    const { student, welch } = exactLevelTwoGroups(row);
    expect(Math.abs(student - row.student)).toBeLessThan(2e-5);
    expect(Math.abs(welch - row.welch)).toBeLessThan(2e-5);
  });

  test('theory: with equal spreads Student keeps its level, whatever it is', () => {
    expect(exactLevelTwoGroups({ n1: 4, n2: 9, sd1: 3, sd2: 3, alpha: 0.01 }).student).toBeCloseTo(0.01, 6);
  });

  test('invariance: unit and order', () => {
    const a = exactLevelTwoGroups({ n1: 8, n2: 20, sd1: 2, sd2: 1 });
    const b = exactLevelTwoGroups({ n1: 20, n2: 8, sd1: 100, sd2: 200 });
    expect(b.student).toBeCloseTo(a.student, 10);
    expect(b.welch).toBeCloseTo(a.welch, 10);
  });

  test('refuses: one score in a group, no spread', () => {
    expect(() => exactLevelTwoGroups({ n1: 1, n2: 5, sd1: 1, sd2: 1 })).toThrow(RangeError);
    expect(() => exactLevelTwoGroups({ n1: 5, n2: 5, sd1: 0, sd2: 1 })).toThrow(RangeError);
  });
});
