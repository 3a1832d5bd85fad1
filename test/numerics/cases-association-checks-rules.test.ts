import { fileURLToPath } from 'node:url';
import { expect, test } from 'vitest';
import { checkCases } from '../reference/check-cases.ts';
import { methods } from '../reference/methods/association-checks-rules.ts';

// Source of the numbers: test/reference/cases/README.md, each case names its own.
const folder = fileURLToPath(new URL('../reference/cases', import.meta.url));

test('agrees with the outside cases of association, regression, checks, outlier rules, transformations', {
  timeout: 120_000,
}, () => {
  const result = checkCases(folder, new Set(Object.keys(methods)), methods);
  expect(result.misses).toEqual([]);
  expect(result.failed).toBe(0);
  expect(result.passed).toBe(962);
});
