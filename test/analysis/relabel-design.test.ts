import { describe, expect, it } from 'vitest';
import { declareDesign } from '../../src/analysis/design.ts';
import { relabelDesign, resampleDesign } from '../../src/analysis/relabel-design.ts';
import type { Rule } from '../../src/analysis/rules.ts';
import { rng } from '../../src/numerics/rng.ts';
import { tableOf } from '../support/tables.ts';

/** Six participants, two trials under each of three alerts; three standard, three refreshed. */
const rows = Array.from({ length: 36 }, (_, i) => ({
  who: Math.floor(i / 6),
  alert: ['tone', 'voice', 'pulse'][Math.floor(i / 2) % 3],
}));
const design = declareDesign(
  tableOf({
    p: rows.map(({ who }) => `p${who}`),
    alert: rows.map(({ alert }) => alert ?? ''),
    training: rows.map(({ who }) => (who % 2 === 0 ? 'standard' : 'refreshed')),
    ms: rows.map((_, i) => 100 + i),
    gaze: rows.map((_, i) => i),
  }),
  {
    participant: 'p',
    within: ['alert'],
    between: ['training'],
    outcome: 'ms',
    unit: 'ms',
    direction: 'lower',
    rows: 'several trials',
  },
);

describe('relabelDesign', () => {
  it('theory: within participants whole levels change places, every count is kept, other levels stay', () => {
    const alert = design.factors[0];
    let moved = 0;
    for (let b = 0; b < 20; b++) {
      const codes = relabelDesign(design, { factor: 'alert', levels: ['tone', 'voice'] }, rng(3).fork(b)).factors[0]
        ?.codes;
      for (let who = 0; who < 6; who++) {
        const own = [...(codes ?? [])].slice(6 * who, 6 * who + 6);
        expect([own[0], own[2]].sort()).toEqual([0, 1]);
        expect([own[0], own[2], own[4]]).toEqual([own[1], own[3], own[5]]);
        expect(own[4]).toBe(2);
        if (own[0] === 1) moved++;
      }
    }
    expect(design.factors[0]).toBe(alert);
    // 120 exchanges with probability one half: within 4 standard deviations of 60.
    expect(Math.abs(moved - 60)).toBeLessThan(22);
  });

  it('theory: between participants groups are shuffled over participants, sizes kept, a participant in one group', () => {
    const seen = new Set<string>();
    for (let b = 0; b < 30; b++) {
      const codes =
        relabelDesign(design, { factor: 'training', levels: ['standard', 'refreshed'] }, rng(4).fork(b)).factors[1]
          ?.codes ?? [];
      const own = Array.from({ length: 6 }, (_, who) => codes[6 * who] as number);
      codes.forEach((code, row) => {
        expect(code).toBe(own[Math.floor(row / 6)]);
      });
      expect(own.filter((code) => code === 0)).toHaveLength(3);
      seen.add(own.join(''));
    }
    expect(seen.size).toBeGreaterThan(8);
  });

  it('invariance: the same stream gives the same labels', () => {
    const labels = { factor: 'alert', levels: ['tone', 'pulse'] };
    expect(relabelDesign(design, labels, rng(1).fork(5))).toEqual(relabelDesign(design, labels, rng(1).fork(5)));
  });

  it('refuses a factor that is not there', () => {
    expect(() => relabelDesign(design, { factor: 'load', levels: [] }, rng(1))).toThrow(/factor of the design/);
  });
});

describe('resampleDesign', () => {
  const rules: Rule[] = [
    { rule: 'named', participants: ['p1'], reason: 'r' },
    { rule: 'limit', on: 'trial', column: 'gaze', side: 'above', limit: 30, reason: 'r' },
  ];

  it('theory: whole participants with all their rows, as many in each group; copies are participants of their own', () => {
    const { design: drawn } = resampleDesign(design, rules, rng(2).fork(0));
    expect(drawn.participants).toHaveLength(6);
    expect(new Set(drawn.participants).size).toBe(6);
    expect(drawn.outcome).toHaveLength(36);
    const refreshed = drawn.participants.filter((name) => Number(name.slice(1, 2)) % 2 === 1);
    expect(refreshed).toHaveLength(3);
    expect(drawn.table.columns.map((column) => column.name)).toEqual(['gaze']);
    drawn.outcome.forEach((score, row) => {
      const column = drawn.table.columns[0];
      expect(column?.type === 'number' && column.values[row]).toBe(score - 100);
    });
  });

  it('by hand: a rule by name follows the copies, and is dropped where nobody of that name is drawn', () => {
    const names = (b: number) => {
      const { design: drawn, rules: own } = resampleDesign(design, rules, rng(2).fork(b));
      const copies = drawn.participants.filter((name) => name.startsWith('p1 '));
      const named = own.find((rule) => rule.rule === 'named');
      expect(named?.rule === 'named' ? named.participants : []).toEqual(copies);
      return copies.length;
    };
    const counts = Array.from({ length: 30 }, (_, b) => names(b));
    expect(Math.max(...counts)).toBeGreaterThan(1);
    expect(Math.min(...counts)).toBe(0);
  });
});
