import { describe, expect, it } from 'vitest';
import { effectsOf, expectedOf } from '../support/cases.ts';
import { scoresOf } from '../support/designs.ts';
import { compareAll, everyLevel } from '../support/omnibus.ts';
import { row } from '../support/samples.ts';

const looms = scoresOf('warpbreaks', { between: ['wool', 'tension'], outcome: 'breaks' });
const both = { type: 'interaction', factors: ['wool', 'tension'] } as const;
const visits = scoresOf('epilepsy_visits', {
  participant: 'id',
  within: ['visit'],
  between: ['treatment'],
  outcome: 'seizures',
});

describe('factorial and Welch-James rows', () => {
  it('agrees with methods 3.3, warpbreaks: the interaction is significant only untrimmed', () => {
    const { findings } = compareAll(looms, both);
    const trimmed = row(findings, 'trimmed-welch-james');
    expect(trimmed.statistic?.value).toBeCloseTo(2.45555, 5);
    expect(trimmed.df2).toBeCloseTo(17.65, 3);
    expect(trimmed.p).toBeCloseTo(0.114582, 6);
    expect(row(findings, 'welch-james').statistic?.value).toBeCloseTo(3.70469, 5);
    expect(row(findings, 'welch-james').p).toBeCloseTo(0.039076, 6);
    expect(row(findings, 'factorial-3').p).toBeCloseTo(0.02104, 5);
    expect(findings.map((each) => each.estimator)).toEqual(['factorial-3', 'welch-james', 'trimmed-welch-james']);
  });

  it('agrees with the reference cases factorial_anova of warpbreaks, types II and III, and welch_james, 9 digits', () => {
    const { findings } = compareAll(looms, everyLevel('tension'));
    for (const type of [2, 3]) {
      const own = effectsOf('warpbreaks', 'factorial_anova', { ss_type: type }).tension;
      const found = row(findings, `factorial-${type}`);
      expect(found.statistic?.value).toBeCloseTo(own?.F as number, 9);
      expect(found.p).toBeCloseTo(own?.p as number, 10);
      expect(found.estimate).toBeCloseTo(own?.partial_eta2 as number, 10);
    }
    const johansen = expectedOf('warpbreaks', 'welch_james', { trim: 0.2, effect: ['tension'] });
    expect(row(findings, 'trimmed-welch-james').statistic?.value).toBeCloseTo(johansen.F as number, 9);
    expect(row(findings, 'trimmed-welch-james').p).toBeCloseTo(johansen.p as number, 10);
  });

  it('by hand: in an uneven layout types II and III differ, and the order of the factors does not matter', () => {
    const keep = (at: number) => at % 7 !== 0 && at > 4;
    const uneven = scoresOf('warpbreaks', { between: ['wool', 'tension'], outcome: 'breaks' }, keep);
    const turned = scoresOf('warpbreaks', { between: ['tension', 'wool'], outcome: 'breaks' }, keep);
    const one = compareAll(uneven, everyLevel('wool')).findings;
    const other = compareAll(turned, everyLevel('wool')).findings;
    expect(row(one, 'factorial-2').statistic?.value).not.toBeCloseTo(
      row(one, 'factorial-3').statistic?.value as number,
      3,
    );
    for (const id of ['factorial-2', 'factorial-3', 'welch-james', 'trimmed-welch-james']) {
      expect(row(other, id).statistic?.value).toBeCloseTo(row(one, id).statistic?.value as number, 9);
      expect(row(other, id).estimate).toBeCloseTo(row(one, id).estimate as number, 9);
    }
  });

  it('agrees with the reference case welch_james of epilepsy_visits: visit, and visit by treatment, 9 digits', () => {
    const main = expectedOf('epilepsy_visits', 'welch_james', { trim: 0.2, effect: ['visit'] });
    expect(row(compareAll(visits, everyLevel('visit')).findings, 'trimmed-welch-james').statistic?.value).toBeCloseTo(
      main.F as number,
      9,
    );
    const cross = expectedOf('epilepsy_visits', 'welch_james', { trim: 0.2, effect: ['treatment', 'visit'] });
    const found = compareAll(visits, { type: 'interaction', factors: ['treatment', 'visit'] }).findings;
    expect(row(found, 'trimmed-welch-james').statistic?.value).toBeCloseTo(cross.F as number, 9);
    expect(row(found, 'trimmed-welch-james').p).toBeCloseTo(cross.p as number, 10);
  });

  it('invariance: naming the factors of an interaction the other way round changes no statistic, 9 digits', () => {
    const one = compareAll(visits, { type: 'interaction', factors: ['treatment', 'visit'] }).findings;
    const other = compareAll(visits, { type: 'interaction', factors: ['visit', 'treatment'] }).findings;
    one.forEach((found, i) => {
      expect(other[i]?.statistic?.value).toBeCloseTo(found.statistic?.value as number, 9);
      expect(other[i]?.estimate).toBeCloseTo(found.estimate as number, 9);
    });
  });

  it('degenerate: an empty combination of groups refuses types III and Welch-James with a reason, and keeps type II', () => {
    const holed = scoresOf('warpbreaks', { between: ['wool', 'tension'], outcome: 'breaks' }, (at) => at > 8);
    const { findings } = compareAll(holed, everyLevel('tension'));
    expect(row(findings, 'factorial-3').reason).toMatch(/holds no scores/);
    expect(row(findings, 'welch-james').reason).toMatch(/fewer than 2/);
    expect(row(findings, 'factorial-2').statistic?.value).toBeGreaterThan(0);
  });

  it('refuses to be silent about few participants for many covariances (WJN)', () => {
    const trees = scoresOf('orange_trees', { participant: 'tree', within: ['age'], outcome: 'circumference' });
    expect(row(compareAll(trees, everyLevel('age')).findings, 'welch-james').cautions).toContain('WJN');
  });
});
