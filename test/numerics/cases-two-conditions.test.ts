import { describe, expect, it } from 'vitest';
import { checkCases } from '../reference/check-cases.ts';
import { methods } from '../reference/methods/two-conditions.ts';

// Outside check cases, test/reference/cases (sources and tolerances in its README and in each case).
describe('one sample, pairs and two groups', () => {
  it('agrees with every outside check case of its methods', () => {
    const result = checkCases('test/reference/cases', new Set(Object.keys(methods)), methods);
    expect(result.misses).toEqual([]);
    expect(result.failed).toBe(0);
    expect(result.passed).toBe(1433);
  }, 120_000);
});
