import { describe, expect, it } from 'vitest';
import { expectedOf } from '../support/cases.ts';
import { scoresOf } from '../support/designs.ts';
import { compareAll, everyLevel } from '../support/omnibus.ts';
import { row } from '../support/samples.ts';

const plants = scoresOf('plant_growth', { between: ['group'], outcome: 'weight' });
const { findings } = compareAll(plants, everyLevel('group'));

describe('rows of several groups', () => {
  it('agrees with the reference case one_way_anova of plant_growth, 9 digits', () => {
    const own = expectedOf('plant_growth', 'one_way_anova');
    const found = row(findings, 'anova');
    expect(found.statistic).toMatchObject({ name: 'F', value: expect.closeTo(own.F as number, 9) });
    expect([found.df, found.df2]).toEqual([own.df1, own.df2]);
    expect(found.p).toBeCloseTo(own.p as number, 10);
    expect(found.estimate).toBeCloseTo(own.eta2 as number, 10);
    expect(found.effects.map((each) => each.value)[1]).toBeCloseTo(own.omega2 as number, 10);
    expect(found.effects.map((each) => each.value)[2]).toBeCloseTo(own.epsilon2 as number, 10);
  });

  it('agrees with the reference cases welch_anova, brown_forsythe_f and kruskal_wallis of plant_growth, 9 digits', () => {
    const cases = [
      ['welch-anova', expectedOf('plant_growth', 'welch_anova', { trim: 0 })],
      ['trimmed-anova', expectedOf('plant_growth', 'welch_anova', { trim: 0.2 })],
      ['brown-forsythe', expectedOf('plant_growth', 'brown_forsythe_f')],
    ] as const;
    for (const [id, own] of cases) {
      const found = row(findings, id);
      expect(found.statistic?.value).toBeCloseTo(own.F as number, 9);
      expect(found.df2).toBeCloseTo(own.df2 as number, 8);
      expect(found.p).toBeCloseTo(own.p as number, 10);
    }
    const ranks = expectedOf('plant_growth', 'kruskal_wallis');
    expect(row(findings, 'kruskal-wallis').statistic).toMatchObject({
      name: 'H',
      value: expect.closeTo(ranks.H as number, 9),
    });
    expect(row(findings, 'kruskal-wallis').estimate).toBeCloseTo(ranks.epsilon2 as number, 10);
    expect(row(findings, 'kruskal-wallis').p).toBeCloseTo(ranks.p as number, 10);
  });

  it('theory: every estimate is a share between 0 and 1, with its interval, in no unit', () => {
    for (const found of findings) {
      expect(found.sameUnit).toBe(false);
      expect(found.estimate).toBeGreaterThan(0);
      expect(found.interval?.[0]).toBeGreaterThanOrEqual(0);
      expect(found.interval?.[1]).toBeLessThanOrEqual(1);
      expect(found.interval?.[0]).toBeLessThanOrEqual(found.estimate as number);
    }
  });

  it('theory: the lower limit of the noncentral F interval is above 0 exactly when p is below alpha (Steiger 2004)', () => {
    for (const alpha of [0.2, 0.05, 0.016, 0.0159, 0.01]) {
      const found = row(compareAll(plants, everyLevel('group'), { alpha }).findings, 'anova');
      expect((found.interval?.[0] as number) > 0).toBe((found.p as number) < alpha);
      expect(found.level).toBeCloseTo(1 - 2 * alpha, 12);
    }
  });

  it('invariance: a change of unit and a shift leave every row as it is, 8 digits', () => {
    const moved = {
      ...plants,
      values: plants.values.map((value) => 1000 * value - 3),
    };
    compareAll(moved, everyLevel('group')).findings.forEach((found, i) => {
      expect(found.statistic?.value).toBeCloseTo(findings[i]?.statistic?.value as number, 8);
      expect(found.estimate).toBeCloseTo(findings[i]?.estimate as number, 8);
      expect(found.interval?.[1]).toBeCloseTo(findings[i]?.interval?.[1] as number, 8);
    });
  });

  it('degenerate: scores that do not vary give no test, with a reason', () => {
    const flat = { ...plants, values: plants.values.map(() => 4) };
    for (const found of compareAll(flat, everyLevel('group')).findings) {
      expect([found.statistic, found.p, found.interval]).toEqual([null, null, null]);
      expect((found.reason ?? '').length).toBeGreaterThan(5);
    }
  });

  it('refuses p and interval where fewer than four scores are left in a group (R22), and warns of few and unequal ones', () => {
    const few = scoresOf('plant_growth', { between: ['group'], outcome: 'weight' }, (at) => at < 13 || at > 19);
    for (const found of compareAll(few, everyLevel('group')).findings) {
      expect([found.p, found.interval]).toEqual([null, null]);
      expect(found.cautions).toContain('R22');
    }
    const uneven = scoresOf('insect_sprays', { between: ['spray'], outcome: 'count' }, (at) => at > 6);
    const own = compareAll(uneven, everyLevel('spray')).findings;
    expect(row(own, 'anova').cautions).toContain('R18');
    expect(row(own, 'welch-anova').cautions).not.toContain('R18');
  });
});
