import { fileURLToPath } from 'node:url';
import { describe, expect, it } from 'vitest';
import { checkCases } from '../reference/check-cases.ts';
import { methods } from '../reference/methods/groups.ts';

const cases = fileURLToPath(new URL('../reference/cases', import.meta.url));

describe('outside check cases: several conditions', () => {
  // test/reference/cases: R 4.2, SciPy 1.10, statsmodels 0.13, NIST StRD and transcribed formulas; tolerances beside each case
  it('agrees with every case of its methods', { timeout: 60_000 }, () => {
    const result = checkCases(cases, new Set(Object.keys(methods)), methods);
    expect(result.misses).toEqual([]);
    expect(result.passed).toBe(459);
  });
});
