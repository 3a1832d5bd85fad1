import { readdirSync, readFileSync } from 'node:fs';
import { describe, expect, test } from 'vitest';
import { flagExtremeBlind } from '../../src/analysis/flagging.ts';
import { judgeScope } from '../../src/analysis/judge-scope.ts';
import type { ExtremeRule, Measure } from '../../src/analysis/rules.ts';
import { cellsBy, numbersOf, parseCaseCsv, stringsArg, usedRows } from '../reference/methods/case-data.ts';

const rule: ExtremeRule = {
  rule: 'extreme',
  on: 'trial',
  column: 's',
  measure: 'MAD',
  cutoff: 3,
  scope: 'participant',
  sides: 'both',
};
const of = (measure: Measure, more: Partial<ExtremeRule> = {}): ExtremeRule => ({ ...rule, measure, ...more });
const marks = (values: readonly number[], own: ExtremeRule) =>
  [...judgeScope(Float64Array.from(values), 0, own).flags].flatMap((mark, i) => (mark === 1 ? [i] : []));

interface Case {
  readonly id: string;
  readonly method: string;
  readonly args: Readonly<Record<string, unknown>>;
  readonly expect: { readonly rows?: readonly number[]; readonly cells?: readonly Limits[] } & Limits;
}
interface Limits {
  readonly lower?: number | null;
  readonly upper?: number | null;
}

const folder = new URL('../reference/cases/', import.meta.url);

/** The rule of a case, where it is one of the cell's. */
function ruleOf({ method, args }: Case): ExtremeRule | null {
  const cutoff = Number(args.cutoff ?? args.k ?? args.coef ?? 1);
  switch (method) {
    case 'z_score_rule':
      return of('SD', { cutoff });
    case 'double_mad_rule':
      return args.mad_constant === 1.4826 ? of('double MAD', { cutoff }) : null;
    case 'iqr_fences':
      if (args.quartiles === 'type7') return of('fences', { cutoff });
      return args.quartiles === 'tukey_hinges' ? of('hinge fences', { cutoff }) : null;
    case 'carling_boxplot':
      return of('Carling', { cutoff: 1 });
    case 'adjusted_boxplot':
      return args.a_exp === -4 && args.b_exp === 3 ? of('adjusted fences', { cutoff }) : null;
    default:
      return null;
  }
}

/** Whether a scope of the case has no spread on a side: the cases then flag all but the middle, the cell nobody (R4). */
function hasFlatScope({ cells = [], lower, upper }: Case['expect'], judged: readonly { reason?: string }[]): boolean {
  const limits = cells.length > 0 ? cells : [{ lower, upper }];
  return judged.some((each) => each.reason !== undefined) || limits.some((each) => each.lower === each.upper);
}

// Rows as R 4.2.2 and NumPy 1.24 found them: sources stand in each case of test/reference/cases.
describe('agrees with the outside cases', () => {
  const found = new Map<string, number>();
  for (const file of readdirSync(folder).filter((name) => name.endsWith('.json') && name !== 'index.json')) {
    const name = file.replace('.json', '');
    const { cases } = JSON.parse(readFileSync(new URL(file, folder), 'utf8')) as { cases: readonly Case[] };
    const own = cases.filter((each) => ruleOf(each) !== null && each.expect.rows !== undefined);
    if (own.length === 0) continue;
    test(`agrees with the outside cases: the same rows of ${name}`, () => {
      const data = parseCaseCsv(readFileSync(new URL(`${name}.csv`, folder), 'utf8'));
      for (const each of own) {
        const cells = cellsBy(usedRows(data, each.args), stringsArg(each.args, 'by'));
        const rows = cells.flatMap((cell) => cell.rows);
        const flagged = flagExtremeBlind(
          {
            values: numbersOf(rows, String(each.args.outcome)),
            kept: new Uint8Array(rows.length).fill(1),
            participant: Int32Array.from(cells.flatMap((cell, code) => cell.rows.map(() => code))),
            participants: cells.length,
          },
          ruleOf(each) as ExtremeRule,
        );
        if (hasFlatScope(each.expect, flagged.limits)) continue;
        const numbers = rows.filter((_, i) => flagged.rows[i] === 1).map((row) => row.number);
        expect(
          numbers.sort((a, b) => a - b),
          each.id,
        ).toEqual(each.expect.rows);
        found.set(each.method, (found.get(each.method) ?? 0) + 1);
      }
    });
  }

  test('by hand: enough cases of every method were compared', () => {
    expect([...found.keys()].sort()).toEqual(
      ['adjusted_boxplot', 'carling_boxplot', 'double_mad_rule', 'iqr_fences', 'z_score_rule'].sort(),
    );
    expect(Math.min(...found.values())).toBeGreaterThanOrEqual(10);
  });
});

test('by hand: double MAD of 1, 2, 3, 4, 5, 9, 20: MADs 1.5 and 3.5 (raw) around 4', () => {
  const { limits } = judgeScope(Float64Array.of(1, 2, 3, 4, 5, 9, 20), 0, of('double MAD', { cutoff: 2 }));
  expect(limits.lower).toBeCloseTo(4 - 2 * 1.4826 * 1.5, 12);
  // Distances above: 0, 1, 5, 16: median 3.
  expect(limits.upper).toBeCloseTo(4 + 2 * 1.4826 * 3, 12);
  expect(marks([1, 2, 3, 4, 5, 9, 20], of('double MAD', { cutoff: 2 }))).toEqual([6]);
});

test('by hand: hinges of 1 to 9 are 3 and 7, type 7 quartiles of 1 to 8 are 2.75 and 6.25', () => {
  const nine = judgeScope(Float64Array.of(1, 2, 3, 4, 5, 6, 7, 8, 9), 0, of('hinge fences', { cutoff: 1.5 }));
  expect([nine.limits.lower, nine.limits.upper]).toEqual([-3, 13]);
  const eight = judgeScope(Float64Array.of(1, 2, 3, 4, 5, 6, 7, 8), 0, of('hinge fences', { cutoff: 1.5 }));
  expect([eight.limits.lower, eight.limits.upper]).toEqual([-3.5, 12.5]);
  const seven = judgeScope(Float64Array.of(1, 2, 3, 4, 5, 6, 7, 8), 0, of('fences', { cutoff: 1.5 }));
  expect([seven.limits.lower, seven.limits.upper]).toEqual([-2.5, 11.5]);
});

test('by hand: the moving criterion of five scores is 1.680 SD: 1, 2, 3, 4, 20 has mean 6, SD 7.906, limit 19.28', () => {
  expect(marks([1, 2, 3, 4, 20], of('moving', { cutoff: 1 }))).toEqual([4]);
  expect(marks([1, 2, 3, 4, 20], of('moving', { cutoff: 1, sides: 'below' }))).toEqual([]);
  // A fixed 2.5 SD can set nobody of five aside.
  expect(marks([1, 2, 3, 4, 20], of('SD', { cutoff: 2.5 }))).toEqual([]);
});

test('by hand: modified recursive: 20 lies beyond 2.5 + 6.2 SD of 1, 2, 3, 4 (10.5), then 4 is within 8 SD of 1, 2, 3', () => {
  const judged = judgeScope(Float64Array.of(1, 2, 3, 4, 20), 0, of('recursive', { cutoff: 1 }));
  expect([...judged.flags]).toEqual([0, 0, 0, 0, 1]);
  expect(judged.limits.upper).toBeCloseTo(2 + 8 * 1, 12);
});

test('by hand: 2 SD repeated: 100 hides 20 among 1 to 9, and falls first', () => {
  const values = [1, 2, 3, 4, 5, 6, 7, 8, 9, 20, 100];
  expect(marks(values, of('SD', { cutoff: 2 }))).toEqual([10]);
  expect(marks(values, of('SD', { cutoff: 2, repeated: true }))).toEqual([9, 10]);
  const { limits } = judgeScope(Float64Array.from(values), 0, of('SD', { cutoff: 2, repeated: true }));
  // First pass 100, second 20, third nobody: mean 5, SD 2.739.
  expect(limits.passes).toEqual({ count: 3, first: 1, total: 2 });
  expect(limits.upper).toBeCloseTo(5 + 2 * Math.sqrt(7.5), 12);
});

test('invariance: shift, scale and order leave the marks of every measure', () => {
  const values = [12, 15, 11, 14, 13, 16, 12.5, 60, 13.5, 14.5, 2, 15.5];
  const all: Measure[] = [
    'MAD',
    'double MAD',
    'SD',
    'fences',
    'hinge fences',
    'adjusted fences',
    'Carling',
    'moving',
    'recursive',
  ];
  for (const measure of all) {
    const own = of(measure, { cutoff: 1 });
    const plain = marks(values, own);
    expect(plain, measure).toContain(7);
    expect(
      marks(
        values.map((v) => 60 * v + 7),
        own,
      ),
      measure,
    ).toEqual(plain);
    const turned = marks(values.toReversed(), own).map((i) => values.length - 1 - i);
    expect(
      turned.sort((a, b) => a - b),
      measure,
    ).toEqual(plain);
  }
});

test('theory: old rules keep their meaning: "fences" are of type 7, and a rule without "repeated" passes once', () => {
  const values = Float64Array.of(1, 2, 3, 4, 5, 6, 7, 8, 9, 20, 100);
  const judged = judgeScope(values, 0, of('fences', { cutoff: 1.5 }));
  expect([judged.limits.lower, judged.limits.upper]).toEqual([3.5 - 1.5 * 5, 8.5 + 1.5 * 5]);
  expect(judged.limits).not.toHaveProperty('passes');
});

test('degenerate: small scopes, no cutoff, no spread, and no spread on one side', () => {
  expect(judgeScope(Float64Array.of(1, 9), 0, rule).limits.reason).toBe('fewer than 3 scores');
  expect(judgeScope(Float64Array.of(1, 2, 9), 0, of('moving', { cutoff: 1 })).limits.reason).toBe(
    'fewer than 4 scores',
  );
  expect(judgeScope(Float64Array.of(1, 2, 900), 0, of('SD', { cutoff: null })).flags).toEqual(new Uint8Array(3));
  const flat = Float64Array.of(5, 5, 5, 5, 5, 5, 9);
  for (const measure of ['MAD', 'double MAD', 'fences', 'hinge fences', 'adjusted fences', 'Carling'] as const) {
    const judged = judgeScope(flat, 0, of(measure, { cutoff: 1 }));
    expect(judged.limits.reason, measure).toMatch(/^more than half of the scores/);
    expect([...judged.flags], measure).toEqual([0, 0, 0, 0, 0, 0, 0]);
  }
  for (const measure of ['moving', 'recursive'] as const) {
    expect(judgeScope(new Float64Array(6), 0, of(measure, { cutoff: 1 })).limits.reason).toMatch(/^more than half/);
  }
  const oneSide = judgeScope(Float64Array.of(4, 5, 5, 6, 40), 0, of('double MAD'));
  expect(oneSide.limits).toMatchObject({ lower: null, reason: expect.stringMatching(/one side of the median/) });
  expect([...oneSide.flags]).toEqual([0, 0, 0, 0, 1]);
});

test('refuses the recursive procedure on one side, and several columns', () => {
  const values = Float64Array.of(1, 2, 3, 4, 20);
  expect(() => judgeScope(values, 0, of('recursive', { cutoff: 1, sides: 'above' }))).toThrow(/\*sides\* must be both/);
  expect(() => judgeScope(values, 0, of('MCD', { cutoff: 97.5 }))).toThrow(/\*measure\* must judge one column/);
});
