import { describe, expect, it } from 'vitest';
import { takeCheckLayout } from '../../src/analysis/checks-layout.ts';
import { additivityChecks, orderChecks } from '../../src/analysis/checks-order.ts';
import { residualsOf } from '../../src/analysis/checks-residuals.ts';
import { autocorrelation } from '../../src/numerics/checks/autocorrelation.ts';
import { expectedOf } from '../support/cases.ts';
import { layoutOf, mixedLayout, plantLayout, sleepLayout } from '../support/check-layouts.ts';
import { scoresOf } from '../support/designs.ts';
import { csv } from '../support/samples.ts';

const order = (layout: Parameters<typeof residualsOf>[0]) => orderChecks(layout, residualsOf(layout));
const additivity = (layout: Parameters<typeof residualsOf>[0]) => additivityChecks(layout, residualsOf(layout), 0.95);

describe('orderChecks', () => {
  it('agrees with the reference cases airquality: lag 1 and Durbin-Watson of one sample in file order, rtol 1e-9', () => {
    const temp = csv('airquality').temp as number[];
    const layout = layoutOf(
      temp.map((value) => [value]),
      { columns: [''] },
    );
    const known = expectedOf('airquality', 'autocorrelation', { outcome: 'temp' });
    expect(order(layout).lag1).toBeCloseTo((known.r as unknown as number[])[0] as number, 9);
    expect(order(layout).durbinWatson).toBeCloseTo(known.durbin_watson as number, 9);
    const runs = expectedOf('airquality', 'runs_test', { outcome: 'temp', cutoff: 'median' });
    expect(order(layout).runs).toBe(runs.runs);
    expect((order(layout).p as number) / (runs.p as number)).toBeCloseTo(1, 9);
  });

  it('by hand: with several levels one value a participant is looked at, freed of the group', () => {
    const { n, lag1 } = order(mixedLayout);
    expect(n).toBe(59);
    const k = 4;
    const means = mixedLayout.participants.map((_, who) => {
      const own = mixedLayout.values.slice(who * k, who * k + k);
      return own.reduce((sum, value) => sum + value, 0) / k;
    });
    const ofGroup = (code: number) => means.filter((_, who) => mixedLayout.group[who] === code);
    const middle = [0, 1].map((code) => ofGroup(code).reduce((sum, value) => sum + value, 0) / ofGroup(code).length);
    const freed = means.map((value, who) => value - (middle[mixedLayout.group[who] as number] as number));
    expect(lag1).toBeCloseTo(autocorrelation(Float64Array.from(freed), { lags: 1 }).r?.[0] as number, 9);
  });

  it('degenerate: residuals that do not vary have no order, and a reason', () => {
    const layout = layoutOf([
      [2, 1],
      [3, 2],
      [4, 3],
    ]);
    expect(order(layout)).toMatchObject({ n: 3, lag1: null, p: null, reason: 'all scores are equal' });
  });
});

describe('additivityChecks', () => {
  it('agrees with SciPy 1.10 linregress: two levels are the regression of differences on means (sleep), 1e-9', () => {
    // linregress((drug1 + drug2) / 2, drug1 - drug2): (slope / stderr)^2 and p.
    const { F, df, p } = additivity(sleepLayout);
    expect(F).toBeCloseTo(0.27705766574511526, 9);
    expect([df, p]).toEqual([8, expect.closeTo(0.612912877461085, 9)]);
  });

  it('agrees with NumPy least squares: the single degree of freedom of 5 trees at 7 ages, rtol 1e-9', () => {
    const scores = scoresOf('orange_trees', { participant: 'tree', within: ['age'], outcome: 'circumference' });
    const layout = takeCheckLayout(scores, { factor: 'age', levels: [], by: '' });
    const { F, df, p, growth } = additivity(layout);
    // numpy.linalg.lstsq with and without the product of row and column effects; growth = coefficient x grand mean.
    expect((F as number) / 165.21366191665408).toBeCloseTo(1, 9);
    expect([layout.columns.length, df]).toEqual([7, 23]);
    expect((p as number) / 5.541829678560176e-12).toBeCloseTo(1, 6);
    expect(growth).toBeCloseTo(1.2737860224026842, 9);
  });

  it('by hand: change in proportion to the level has growth 1, equal change 0', () => {
    const noise = [0.2, -0.1, -0.3, 0.1, 0.1];
    const rows = (change: (own: number) => number) =>
      layoutOf(
        [10, 20, 30, 40, 50].map((own, at) => [own + change(own) / 2 + (noise[at] ?? 0), own - change(own) / 2]),
      );
    const proportional = additivity(rows((own) => own / 5));
    expect(proportional.growth).toBeCloseTo(1, 1);
    expect(proportional.p).toBeLessThan(1e-4);
    const equal = additivity(rows(() => 4));
    expect(Math.abs(equal.growth as number)).toBeLessThan(0.1);
    expect(equal.p).toBeGreaterThan(0.05);
  });

  it('agrees with SciPy 1.10 linregress: log SD on log mean of six insect sprays, 1e-9', () => {
    const scores = scoresOf('insect_sprays', { between: ['spray'], outcome: 'count' });
    const { what, growth, p, df } = additivity(takeCheckLayout(scores, { factor: 'spray', levels: [], by: '' }));
    expect([what, df]).toEqual(['spread', 4]);
    expect(growth).toBeCloseTo(0.5497108313006823, 9);
    expect(p).toBeCloseTo(0.0045337658244748984, 9);
  });

  it('degenerate: what cannot grow says why', () => {
    const two = layoutOf([[1], [2], [5], [9]], { columns: [''], groups: ['a', 'b'], group: [0, 0, 1, 1] });
    expect(additivity(two).reason).toBe('any two groups lie on a line');
    expect(additivity({ ...plantLayout, values: plantLayout.values.map((value) => value - 9) }).reason).toBe(
      'a mean or a spread is not above zero',
    );
    const same = layoutOf([
      [1, 3],
      [3, 1],
      [2, 2],
    ]);
    expect(additivity(same).reason).toBe('the participants\u2019 means do not vary');
    const below = additivity({ ...sleepLayout, values: sleepLayout.values.map((value) => value - 20) });
    expect([below.growth, below.reason]).toEqual([null, 'scores of zero or less have no proportions']);
    expect(below.F).toBeCloseTo(0.27705766574511526, 9);
  });
});
