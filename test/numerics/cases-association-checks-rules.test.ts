import { readdirSync, readFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { expect, test } from 'vitest';
import { checkCases, compareValue } from '../reference/check-cases.ts';
import { methods } from '../reference/methods/association-checks-rules.ts';
import { type CaseArgs, parseCaseCsv } from '../reference/methods/case-data.ts';

// Source of the numbers: test/reference/cases/README.md, each case names its own.
const folder = fileURLToPath(new URL('../reference/cases', import.meta.url));
const { lilliefors_test: lilliefors, ...others } = methods;

test('agrees with the outside cases of association, regression, checks, outlier rules, transformations', {
  timeout: 120_000,
}, () => {
  const result = checkCases(folder, new Set(Object.keys(others)), others);
  expect(result.misses).toEqual([]);
  expect(result.failed).toBe(0);
  expect(result.passed).toBe(937);
});

interface Case {
  readonly id: string;
  readonly method: string;
  readonly args: CaseArgs;
  readonly expect: { readonly D: number; readonly p_table: number; readonly p_dallal_wilkinson?: number };
}

// The cases' p_table goes linearly in p between few points of another simulation, which overstates p between them; ours has
// more points. D and the published formula must agree as closely as everything else.
test('agrees with the outside cases of Lilliefors: D and the formula 1e-9, p of the simulated table absolute .016', {
  timeout: 120_000,
}, () => {
  if (lilliefors === undefined) throw new Error('lilliefors_test must be offered');
  let count = 0;
  for (const file of readdirSync(folder).filter((name) => name.endsWith('.json') && name !== 'index.json')) {
    const { cases } = JSON.parse(readFileSync(`${folder}/${file}`, 'utf8')) as { cases: Case[] };
    const data = parseCaseCsv(readFileSync(`${folder}/${file.replace(/json$/, 'csv')}`, 'utf8'));
    for (const one of cases.filter((own) => own.method === 'lilliefors_test')) {
      const { p_table: table, ...exact } = one.expect;
      const got = lilliefors(data, one.args);
      expect(compareValue(exact, got, one.id, { rtol: 1e-9, atol: 1e-12 })).toBe(null);
      expect(compareValue({ p_table: table }, got, one.id, { rtol: 0, atol: 0.016 })).toBe(null);
      count++;
    }
  }
  expect(count).toBe(25);
});
