import { describe, expect, it } from 'vitest';
import type { ComparisonSpec } from '../../src/analysis/compare.ts';
import { type Design, declareDesign, type Roles } from '../../src/analysis/design.ts';
import { RELABEL_BLOCK, Relabeller, type RelabelPlan, relabelDesign, relabelPlan } from '../../src/analysis/relabel.ts';
import { trialColumns } from '../support/joint.ts';
import { tableOf } from '../support/tables.ts';

const roles: Roles = {
  participant: 'p',
  within: ['alert'],
  between: ['group'],
  outcome: 'ms',
  unit: 'ms',
  direction: 'lower',
  rows: 'several trials',
};
const within = { factor: 'alert', first: 'voice', second: 'tone' };
const between = { factor: 'group', first: 'old', second: 'new' };

function designOf(people: number, each = 2, alerts?: string[]): Design {
  return declareDesign(tableOf(trialColumns(people, each, alerts)), roles);
}

function planOf(
  design: Design,
  asked: Pick<ComparisonSpec, 'factor' | 'effect' | 'first' | 'second'>,
  relabellings = 199,
): RelabelPlan {
  const plan = relabelPlan(design, asked, { relabellings, seed: 11 });
  if (typeof plan === 'string') throw new Error(plan);
  return plan;
}

function all(plan: RelabelPlan): string[] {
  const relabeller = new Relabeller(plan);
  return Array.from({ length: plan.total }, (_, i) => relabeller.labels(i).join(''));
}

describe('relabelPlan', () => {
  it('by hand: 4 participants have 2^4 exchanges, all run once each, the data among them', () => {
    const plan = planOf(designOf(4), within);
    expect([plan.scope, plan.ways, plan.enumerated, plan.total]).toEqual(['within', 16, true, 16]);
    const labels = all(plan);
    expect(new Set(labels).size).toBe(16);
    expect(labels).toContain(plan.observed.join(''));
  });

  it('by hand: 8 participants in two groups of 4 have C(8, 4) = 70 splits, each with 4 and 4', () => {
    const plan = planOf(designOf(8), between);
    expect([plan.scope, plan.ways, plan.enumerated, plan.total]).toEqual(['between', 70, true, 70]);
    const labels = all(plan);
    expect(new Set(labels).size).toBe(70);
    expect(labels.every((each) => each.replaceAll('0', '').length === 4)).toBe(true);
    expect(labels).toContain(plan.observed.join(''));
  });

  it('by hand: 16 pairs are enumerated, 17 are drawn; so are 20,000 and more splits', () => {
    expect(planOf(designOf(16), within).total).toBe(65_536);
    const drawn = planOf(designOf(17), within);
    expect([drawn.enumerated, drawn.total]).toEqual([false, 199]);
    // C(16, 8) = 12,870; C(18, 9) = 48,620.
    expect(planOf(designOf(16), between).total).toBe(12_870);
    expect(planOf(designOf(18), between).enumerated).toBe(false);
  });

  it('by hand: only the levels compared change places; a participant with one of them is left alone', () => {
    const columns = trialColumns(5, 2, ['tone', 'voice', 'seat']);
    const rows = columns.p.map((p, row) => !(p === 'p3' && columns.alert[row] === 'voice'));
    const kept = Object.fromEntries(
      Object.entries(columns).map(([name, values]) => [
        name,
        (values as (string | number)[]).filter((_, i) => rows[i]),
      ]),
    );
    const design = declareDesign(tableOf(kept), roles);
    const plan = planOf(design, within);
    expect([...plan.units].map((who) => design.participants[who])).toEqual(['p0', 'p1', 'p2', 'p4']);
    expect(plan.ways).toBe(16);
    const seat = design.factors[0]!.levels.indexOf('seat');
    const changed = relabelDesign(design, plan, new Relabeller(plan).labels(9));
    changed.factors[0]!.codes.forEach((code, row) => {
      if (design.factors[0]!.codes[row] === seat || design.participants[design.participant[row]!] === 'p3')
        expect(code).toBe(design.factors[0]!.codes[row]);
    });
  });

  it('by hand: three levels of a contrast have 3! orders in each participant', () => {
    const effect = { type: 'contrast', factor: 'alert', first: ['voice'], second: ['tone', 'seat'] } as const;
    const plan = planOf(designOf(3, 1, ['tone', 'voice', 'seat']), {
      factor: 'alert',
      first: 'a',
      second: 'b',
      effect,
    });
    expect([plan.blocks, plan.ways]).toEqual([3, 216]);
    expect(new Set(all(plan)).size).toBe(216);
  });

  it('by hand: labels stay within the groups of another factor between participants', () => {
    const columns = trialColumns(8, 1);
    const site = columns.p.map((p) => (Number(p.slice(1)) < 4 ? 'north' : 'south'));
    const design = declareDesign(tableOf({ ...columns, site }), { ...roles, between: ['group', 'site'] });
    const plan = planOf(design, between);
    expect(plan.ways).toBe(36);
    expect(all(plan).every((each) => each.slice(0, 4).replaceAll('0', '').length === 2)).toBe(true);
  });

  it('refuses: a single value, several levels at once, nobody to relabel', () => {
    const design = designOf(4);
    const options = { relabellings: 9, seed: 1 };
    const value = { factor: '', first: 'a', second: 'b', effect: { type: 'value', value: 3 } } as const;
    expect(relabelPlan(design, value, options)).toMatch(/not assigned/);
    const levels = { ...within, effect: { type: 'levels', factor: 'alert', pairs: 'none' } } as const;
    expect(relabelPlan(design, levels, options)).toMatch(/several levels/);
    expect(relabelPlan(design, { ...within, factor: 'colour' }, options)).toMatch(/no condition called "colour"/);
    const nobody = { ...design, kept: new Uint8Array(design.kept.length) };
    expect(relabelPlan(nobody, within, options)).toMatch(/nothing to relabel/);
    expect(() => relabelPlan(design, within, { relabellings: 0, seed: 1 })).toThrow(RangeError);
  });
});

describe('Relabeller', () => {
  it('invariance: a relabelling depends on its number only, not on those before', () => {
    const plan = planOf(designOf(20), within);
    const inOrder = all(plan);
    for (const index of [0, 5, RELABEL_BLOCK - 1, RELABEL_BLOCK, 130, 198]) {
      expect(new Relabeller(plan).labels(index).join('')).toBe(inOrder[index]);
    }
    const hopping = new Relabeller(plan);
    for (const index of [130, 5, 6, 5]) expect(hopping.labels(index).join('')).toBe(inOrder[index]);
  });

  it('invariance: the relabellings are the same whatever the labels were, so that they can be drawn while blind', () => {
    for (const asked of [within, between]) {
      const design = designOf(18);
      const plan = planOf(design, asked);
      const other = relabelDesign(design, plan, new Relabeller(plan).labels(7).slice());
      const otherPlan = planOf(other, asked);
      expect(otherPlan.observed).not.toEqual(plan.observed);
      expect(all(otherPlan)).toEqual(all(plan));
      expect({ ...otherPlan, observed: 0 }).toEqual({ ...plan, observed: 0 });
    }
  });

  it('theory: every participant is exchanged in half of the relabellings, within 4 SE', () => {
    const plan = planOf(designOf(18), within, 2000);
    const relabeller = new Relabeller(plan);
    const counts = new Float64Array(18);
    for (let b = 0; b < 2000; b++) {
      const labels = relabeller.labels(b);
      for (let unit = 0; unit < 18; unit++) counts[unit]! += labels[2 * unit] as number;
    }
    for (const count of counts) expect(Math.abs(count / 2000 - 0.5)).toBeLessThan(4 * 0.0112);
  });

  it('refuses a number that is not among the relabellings', () => {
    const relabeller = new Relabeller(planOf(designOf(4), within));
    expect(() => relabeller.labels(16)).toThrow(/index.*0 to 15/);
  });
});

describe('relabelDesign', () => {
  it('invariance: the observed labels give the design itself; whole blocks change and counts stay', () => {
    for (const asked of [within, between]) {
      const design = designOf(9, 3);
      const plan = planOf(design, asked);
      expect(relabelDesign(design, plan, plan.observed)).toEqual(design);
      const labels = new Relabeller(plan).labels(3).slice();
      const changed = relabelDesign(design, plan, labels);
      const at = changed.factors.findIndex((factor) => factor.name === asked.factor);
      const block = (own: Design) =>
        [...own.factors[at]!.codes].map(
          (code, row) => `${own.participant[row]} ${design.factors[0]!.codes[row]} ${code}`,
        );
      // Rows of one participant under one level stay together.
      expect(new Set(block(changed)).size).toBe(new Set(block(design)).size);
      const counts = (own: Design) =>
        own.factors[at]!.levels.map(
          (_, code) =>
            new Set(
              [...own.factors[at]!.codes.keys()]
                .filter((row) => own.factors[at]!.codes[row] === code)
                .map((row) => own.participant[row]),
            ).size,
        );
      expect(counts(changed)).toEqual(counts(design));
      expect(changed.factors[1 - at]).toEqual(design.factors[1 - at]);
    }
  });
});
