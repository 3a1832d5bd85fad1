import { readFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { describe, expect, it } from 'vitest';
import { oneWayAnova } from '../../../src/numerics/anova/one-way.ts';
import { groupsOf, parseCaseCsv } from '../../reference/methods/case-data.ts';

const folder = fileURLToPath(new URL('../../reference/cases/', import.meta.url));

/** Digits of agreement: -log10 of the relative error, at most 15 (NIST StRD; McCullough 1998). */
function digits(got: number, want: number): number {
  return got === want ? 15 : Math.min(15, -Math.log10(Math.abs(got - want) / Math.abs(want)));
}

// [set, digits of F against the certified value, digits of F against the exact answer for the scores as doubles].
// SmLs07 to SmLs09 have 13 leading digits in common: the doubles themselves agree with the printed scores to 4 digits only.
const sets: [string, number, number][] = [
  ['nist_sirstv', 13, 14],
  ['nist_smls01', 14, 14],
  ['nist_smls03', 13, 14],
  ['nist_smls04', 9.5, 14],
  ['nist_smls06', 9.5, 14],
  ['nist_smls07', 4, 14],
  ['nist_smls09', 3.5, 14],
];

// NIST Statistical Reference Datasets, one-way analysis of variance; exact answers by rational arithmetic
describe('NIST StRD one-way analysis of variance', () => {
  it.each(sets)('agrees with %s to %s digits, with the exact answer for the doubles to %s', (set, certified, exact) => {
    const data = parseCaseCsv(readFileSync(`${folder}${set}.csv`, 'utf8'));
    const { cases } = JSON.parse(readFileSync(`${folder}${set}.json`, 'utf8')) as {
      cases: { expect: { F: number }; args: Record<string, unknown> }[];
    };
    const F = oneWayAnova(groupsOf(data, cases[0]!.args).scores).F!;
    expect(digits(F, cases[0]!.expect.F)).toBeGreaterThanOrEqual(certified);
    expect(digits(F, cases[1]!.expect.F)).toBeGreaterThanOrEqual(exact);
  });
});
