import { describe, expect, it } from 'vitest';
import { type Design, declareDesign, type Roles } from '../../src/analysis/design.ts';
import { applyRule, applyRules, withoutRules } from '../../src/analysis/exclusion.ts';
import { flagExtremeBlind } from '../../src/analysis/flagging.ts';
import type { ExtremeRule, Rule } from '../../src/analysis/rules.ts';
import { rng } from '../../src/numerics/rng.ts';
import { tableOf } from '../support/tables.ts';

const roles: Roles = {
  participant: 'p',
  within: ['c'],
  between: [],
  outcome: 's',
  unit: 'ms',
  direction: 'lower',
  rows: 'several trials',
};

/** Two participants, two conditions, five trials each; one far score of each participant. */
const scores = [10, 11, 12, 13, 90, 20, 21, 22, 23, 24, 30, 31, 32, 33, 34, 40, 41, 42, 43, 1];
const table = tableOf({
  p: scores.map((_, i) => (i < 10 ? 'a' : 'b')),
  c: scores.map((_, i) => (i % 10 < 5 ? 'x' : 'y')),
  s: scores,
  accuracy: scores.map((_, i) => (i < 10 ? 0.9 : 0.7)),
});
const design = declareDesign(table, roles);
const extreme: ExtremeRule = {
  rule: 'extreme',
  on: 'trial',
  column: 's',
  measure: 'MAD',
  cutoff: 3,
  scope: 'participant',
  sides: 'both',
};

function aside(rule: Rule, on: Design = design): number[] {
  return [...(applyRule(on, rule).design.steps.at(-1)?.rows ?? [])];
}

describe('applyRule', () => {
  it('by hand: k MAD within participant sets the far scores of each aside', () => {
    // a: median 20.5, distances 10.5 9.5 8.5 7.5 69.5 .5 .5 1.5 2.5 3.5, MAD 5.5 x 1.4826; limits -3.96 to 44.96.
    // b: median 33.5, distances 3.5 2.5 1.5 .5 .5 6.5 7.5 8.5 9.5 32.5, MAD 5 x 1.4826; limits 11.26 to 55.74.
    expect(aside(extreme)).toEqual([4, 19]);
    const { limits } = applyRule(design, extreme).flagged;
    expect(limits[0]?.lower).toBeCloseTo(20.5 - 3 * 1.4826 * 5.5, 10);
    expect(limits[1]?.upper).toBeCloseTo(33.5 + 3 * 1.4826 * 5, 10);
  });

  it('by hand: one side only', () => {
    expect(aside({ ...extreme, sides: 'above' })).toEqual([4]);
    expect(aside({ ...extreme, sides: 'below' })).toEqual([19]);
  });

  it('by hand: fixed limits are strict, and a score exactly on the limit is kept', () => {
    const limit: Rule = { rule: 'limit', on: 'trial', column: 's', side: 'below', limit: 10, reason: 'r' };
    expect(aside(limit)).toEqual([19]);
    expect(aside({ ...limit, side: 'above', limit: 43 })).toEqual([4]);
  });

  it('by hand: by name takes every row of the participant and says who is gone', () => {
    const applied = applyRule(design, { rule: 'named', participants: ['b'], reason: 'left early' });
    expect(applied.design.steps.at(-1)?.participants).toEqual(['b']);
    expect(applied.design.steps.at(-1)?.rows.length).toBe(10);
  });

  it('by hand: a participant is judged by the mean of another column', () => {
    expect(
      aside({ rule: 'limit', on: 'participant', column: 'accuracy', side: 'below', limit: 0.8, reason: 'r' }),
    ).toHaveLength(10);
  });

  it('by hand: the share of kept trials counts whole trials, 8 of 10 being 80 % exactly', () => {
    const two = applyRules(design, [
      { rule: 'limit', on: 'trial', column: 's', side: 'below', limit: 12, reason: 'r' },
      { rule: 'kept-share', least: 80 },
    ]);
    expect(two.steps.map((step) => step.participants)).toEqual([[], []]);
    expect(applyRule(two, { rule: 'kept-share', least: 81 }).design.steps.at(-1)?.participants).toEqual(['a']);
  });

  it('theory: rules in order see only what is still in', () => {
    const first = applyRule(design, { ...extreme, sides: 'above' }).design;
    const { limits } = applyRule(first, extreme).flagged;
    expect(limits[0]?.n).toBe(9);
  });

  it('theory: no cutoff sets nothing aside and makes no limits', () => {
    const applied = applyRule(design, { ...extreme, cutoff: null });
    expect(applied.design.kept).toEqual(design.kept);
    expect(applied.flagged.limits.every((each) => each.lower === null && each.upper === null)).toBe(true);
  });

  it('invariance: taking the rules off gives the design back', () => {
    const ruled = applyRules(design, [extreme, { rule: 'named', participants: ['a'], reason: 'r' }]);
    expect(withoutRules(ruled).kept).toEqual(design.kept);
  });

  it('invariance: a blind rule gives the same marks whatever the condition of each trial', () => {
    const draw = rng(11);
    for (let run = 0; run < 20; run++) {
      const c = table.columns[1];
      if (c?.type !== 'text') throw new Error('not text');
      const codes = c.codes.slice();
      for (const from of [0, 10]) {
        for (let i = 9; i > 0; i--) {
          const j = draw.below(i + 1);
          [codes[from + i], codes[from + j]] = [codes[from + j] as number, codes[from + i] as number];
        }
      }
      const relabelled = declareDesign(
        { ...table, columns: table.columns.map((each) => (each === c ? { ...c, codes } : each)) },
        roles,
      );
      for (const rule of [
        extreme,
        { ...extreme, scope: 'pooled' as const },
        { ...extreme, measure: 'SD' as const, cutoff: 2 },
      ]) {
        expect(aside(rule, relabelled)).toEqual(aside(rule));
      }
    }
  });

  it('theory: the function of a blind rule takes scores, marks and participants only', () => {
    const blind = { values: design.outcome, kept: design.kept, participant: design.participant, participants: 2 };
    expect([...flagExtremeBlind(blind, extreme).rows].flatMap((mark, row) => (mark ? [row] : []))).toEqual([4, 19]);
    expect(Object.keys(blind).sort()).toEqual(['kept', 'participant', 'participants', 'values']);
  });

  it('by hand: within each condition the scopes are the conditions', () => {
    const { limits } = applyRule(design, { ...extreme, scope: 'condition' }).flagged;
    expect(limits.map((each) => each.n)).toEqual([10, 10]);
    expect(
      applyRule(design, { ...extreme, scope: 'participant-condition' }).flagged.limits.map((each) => each.n),
    ).toEqual([5, 5, 5, 5]);
  });

  it('degenerate: a scope of equal scores or of fewer than three is left alone, with the reason', () => {
    const flat = declareDesign(
      tableOf({ p: ['a', 'a', 'a', 'a', 'b', 'b'], c: ['x', 'y', 'x', 'y', 'x', 'y'], s: [5, 5, 5, 9, 1, 2] }),
      roles,
    );
    const applied = applyRule(flat, extreme);
    expect(applied.design.kept).toEqual(flat.kept);
    expect(applied.flagged.limits.map((each) => each.reason)).toEqual([
      'more than half of the scores are equal',
      'fewer than 3 scores',
    ]);
  });

  it('refuses a name and a column that are not there', () => {
    expect(() => applyRule(design, { rule: 'named', participants: ['z'], reason: 'r' })).toThrow(/no p called "z"/);
    expect(() => applyRule(design, { ...extreme, column: 'zz' })).toThrow(/no column called "zz"/);
    expect(() => applyRule(design, { ...extreme, column: 'c' })).toThrow(/holds text/);
  });
});
