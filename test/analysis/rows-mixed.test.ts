import { describe, expect, it } from 'vitest';
import { type Layout, takeLayout } from '../../src/analysis/layout.ts';
import { mixedEffect } from '../../src/analysis/rows-mixed.ts';
import { factorialAnova } from '../../src/numerics/anova/factorial.ts';
import { differences } from '../../src/numerics/scores.ts';
import { effectsOf } from '../support/cases.ts';
import { scoresOf } from '../support/designs.ts';
import { compareAll, everyLevel } from '../support/omnibus.ts';
import { row } from '../support/samples.ts';

const visits = scoresOf('epilepsy_visits', {
  participant: 'id',
  within: ['visit'],
  between: ['treatment'],
  outcome: 'seizures',
});

/** Two between factors, of 2 and 3 levels, uneven, with so many columns. */
function crossed(columns: number, inEffect: readonly [boolean, boolean]): Layout {
  const sizes = [4, 5, 6, 5, 7, 4];
  return {
    between: [
      { factor: 'ship', levels: ['a', 'b'], inEffect: inEffect[0] },
      { factor: 'watch', levels: ['x', 'y', 'z'], inEffect: inEffect[1] },
    ],
    within: [{ factor: 'alert', levels: Array.from({ length: columns }, (_, i) => `l${i}`), inEffect: true }],
    groups: sizes.map((n, g) => ({
      levels: [Math.floor(g / 3), g % 3],
      scores: Array.from({ length: columns }, (_, c) =>
        Float64Array.from({ length: n }, (_, i) => ((i * 37 + g * 11 + c * c * 5 + i * c * 3) % 23) + g * c),
      ),
    })),
    left: [],
  };
}

describe('mixed rows', () => {
  it('agrees with the reference case mixed_anova of epilepsy_visits, 9 digits', () => {
    const own = effectsOf('epilepsy_visits', 'mixed_anova');
    const main = compareAll(visits, everyLevel('visit')).findings;
    expect(row(main, 'mixed').statistic?.value).toBeCloseTo(own.visit?.F as number, 9);
    expect(row(main, 'mixed-gg').p).toBeCloseTo(own.visit?.p_gg as number, 10);
    const cross = compareAll(visits, { type: 'interaction', factors: ['visit', 'treatment'] }).findings;
    const interaction = own['treatment:visit'] ?? own['visit:treatment'];
    expect(row(cross, 'mixed').statistic?.value).toBeCloseTo(interaction?.F as number, 9);
    expect(row(cross, 'mixed-hf').p).toBeCloseTo(interaction?.p_hf as number, 10);
  });

  it('theory: with two levels the interaction with one of two between factors is that factor on the differences, 10 digits', () => {
    const layout = crossed(2, [false, true]);
    const cells = layout.groups.map((group) =>
      differences(group.scores[0] as Float64Array, group.scores[1] as Float64Array),
    );
    const own = factorialAnova(cells, [2, 3], 3).effects.find(
      (each) => each.factors.length === 1 && each.factors[0] === 1,
    );
    const { effect } = mixedEffect(layout);
    expect(effect.F).toBeCloseTo(own?.F as number, 10);
    expect([effect.df1, effect.df2]).toEqual([own?.df1, own?.df2]);
    expect(effect.p).toBeCloseTo(own?.p as number, 10);
  });

  it('invariance: exchanging the order of the between factors, and a shift of every score, leave F, 10 digits', () => {
    const layout = crossed(3, [true, false]);
    const { effect } = mixedEffect(layout);
    const order = [0, 3, 1, 4, 2, 5];
    const turned: Layout = {
      ...layout,
      between: [...layout.between].reverse(),
      groups: order.map((at) => {
        const group = layout.groups[at] as Layout['groups'][number];
        return {
          levels: [...group.levels].reverse(),
          scores: group.scores.map((scores) => scores.map((score) => score + 50)),
        };
      }),
    };
    expect(mixedEffect(turned).effect.F).toBeCloseTo(effect.F as number, 10);
    expect(mixedEffect(turned).effect.ggEpsilon).toBeCloseTo(effect.ggEpsilon as number, 10);
    expect(effect.df1).toBe(2);
  });

  it('by hand: the main effect with two between factors has every group alike, on participants minus groups', () => {
    const { effect } = mixedEffect(crossed(3, [false, false]));
    expect([effect.df1, effect.df2]).toEqual([2, 2 * (31 - 6)]);
  });

  it('degenerate: a group without participants, or differences that do not vary, give a reason', () => {
    const layout = crossed(3, [true, false]);
    const holed = {
      ...layout,
      groups: layout.groups.map((group, i) =>
        i === 2 ? { ...group, scores: group.scores.map(() => new Float64Array(0)) } : group,
      ),
    };
    expect(mixedEffect(holed).effect.reason).toMatch(/no participants/);
    const flat = {
      ...layout,
      groups: layout.groups.map((group) => ({
        ...group,
        scores: group.scores.map(() => group.scores[0] as Float64Array),
      })),
    };
    expect((mixedEffect(flat).effect.reason ?? '').length).toBeGreaterThan(5);
  });

  it('refuses no design with groups: the rows stand beside those that put participants together', () => {
    const { findings } = compareAll(visits, everyLevel('visit'));
    expect(row(findings, 'mixed').n).toBe(row(findings, 'repeated').n);
    expect(row(findings, 'mixed').method).toMatch(/participants within treatment/);
    expect(takeLayout(visits, everyLevel('visit')).groups).toHaveLength(2);
  });
});
