import { beforeAll, describe, expect, it } from 'vitest';
import { type CheckOptions, type Checks, checkAssumptions } from '../../src/analysis/checks.ts';
import { expectedOf } from '../support/cases.ts';
import { layoutOf, mixedLayout, plantLayout, sleepLayout, visitLayout } from '../support/check-layouts.ts';

const options: CheckOptions = {
  test: 'shapiro-wilk',
  departures: ['exponential', 't3', 'contaminated', 'spread'],
  alpha: 0.05,
  seed: 4,
  runs: 100,
};

let pairs: Checks;
let plants: Checks;
let visits: Checks;
let mixed: Checks;
beforeAll(async () => {
  pairs = await checkAssumptions(sleepLayout, options);
  plants = await checkAssumptions(plantLayout, options);
  visits = await checkAssumptions(visitLayout, options);
  mixed = await checkAssumptions(mixedLayout, options);
}, 60_000);

describe('checkAssumptions', () => {
  it('by hand: the quantity follows the design', () => {
    expect([pairs, plants, visits, mixed].map(({ design }) => design)).toEqual([
      'differences',
      'groups',
      'repeated',
      'repeated',
    ]);
    expect(pairs.residuals.values.length).toBe(10);
    expect(visits.residuals.values.length).toBe(59 * 4);
  });

  it('agrees with the reference case sleep: W of the differences, rtol 1e-6', () => {
    const { W: w } = expectedOf('sleep', 'shapiro_wilk', { subject: 'subject' });
    expect((pairs.shape.tests[0]?.statistic as number) / (w as number)).toBeCloseTo(1, 6);
  });

  it('theory: heavy-tailed seizure counts leave the band in many places; plants and hours of sleep stay inside of it', () => {
    expect([pairs.outside, plants.outside]).toEqual([[], []]);
    const last = 59 * 4 - 1;
    expect(visits.outside.length).toBeGreaterThan(20);
    expect(visits.outside.at(-1)).toBe(last);
    expect(visits.standard?.[last]).toBeGreaterThan(visits.envelope?.high.at(-1) as number);
  });

  it('by hand: spread is compared between groups only, by what is compared there', () => {
    expect([pairs, plants, visits, mixed].map(({ spreads }) => spreads.map(({ what }) => what))).toEqual([
      [],
      ['scores'],
      [],
      ['means'],
    ]);
    expect(pairs.levels.map(({ level }) => level)).toEqual(['drug1', 'drug2']);
    expect(plants.levels).toEqual([]);
  });

  it('by hand: sphericity is looked at from three levels on', () => {
    expect([pairs, plants, visits, mixed].map(({ sphericity }) => sphericity !== null)).toEqual([
      false,
      false,
      true,
      true,
    ]);
  });

  it('by hand: a departure in spread is simulated only where there are groups', () => {
    expect(pairs.power.map(({ departure }) => departure)).toEqual(['exponential', 't3', 'contaminated']);
    expect(plants.power.at(-1)?.departure).toBe('spread');
    expect(plants.power.every(({ found }) => found?.runs === 100)).toBe(true);
    expect([pairs.testLevels, plants.testLevels?.welch.runs]).toEqual([null, 200]);
  });

  it('invariance: the same seed gives the same checks, also when it lets messages through', async () => {
    const shares: number[] = [];
    const again = await checkAssumptions(plantLayout, options, async (share) => {
      shares.push(share);
    });
    expect(again).toEqual(plants);
    expect(shares.every((share, at) => at === 0 || share >= (shares[at - 1] as number))).toBe(true);
    expect(shares.at(-1)).toBeGreaterThan(0.9);
  });

  it('degenerate: differences that are all equal have no picture and no tests, but come out', async () => {
    const flat = layoutOf([
      [2, 1],
      [3, 2],
      [4, 3],
      [9, 8],
      [7, 6],
    ]);
    const { standard, envelope, outside, shape, residuals } = await checkAssumptions(flat, options);
    expect([standard, envelope, outside, residuals.sd]).toEqual([null, null, [], 0]);
    expect(shape.tests[0]?.reason).toBe('all scores are equal');
  });

  it('degenerate: three participants have no band', async () => {
    const few = layoutOf([
      [2, 1],
      [3, 1],
      [4, 1],
    ]);
    const { envelope, standard } = await checkAssumptions(few, options);
    expect([envelope, standard?.length]).toEqual([null, 3]);
  });
});
