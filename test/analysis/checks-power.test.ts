import { describe, expect, it } from 'vitest';
import {
  type Departure,
  levelsAtSpread,
  type SimulatedShare,
  shapePower,
  spreadPower,
} from '../../src/analysis/checks-power.ts';

const options = { alpha: 0.05, seed: 5 };
const one = (n: number) => ({ group: new Int32Array(n), groups: 1 });

/** Whether a share lies within 3.5 SE of a published one, whose own Monte Carlo error is .008 at most (methods 4.4). */
function near(found: SimulatedShare | null, published: number): boolean {
  return Math.abs((found?.share ?? NaN) - published) < 3.5 * Math.hypot(found?.se ?? NaN, 0.008 / 2) + 0.005;
}

describe('shapePower', () => {
  // Methods 4.4, Shapiro-Wilk, rounded to two decimals.
  it.each([
    [12, 'exponential', 0.54],
    [20, 'exponential', 0.83],
    [12, 't3', 0.21],
    [30, 't3', 0.46],
    [20, 'contaminated', 0.29],
    [50, 'contaminated', 0.57],
  ] as const)('agrees with methods 4.4: n = %d, %s: %d, within 3.5 SE', async (n, departure, published) => {
    const found = await shapePower('shapiro-wilk', departure as Exclude<Departure, 'spread'>, one(n), options);
    expect(near(found, published)).toBe(true);
    expect(found?.runs).toBe(1000);
  });

  it('theory: residuals of groups find less than a single sample of the same size', async () => {
    const groups = { group: Int32Array.from({ length: 24 }, (_, who) => who % 6), groups: 6 };
    const [apart, together] = [
      await shapePower('shapiro-wilk', 'exponential', groups, options),
      await shapePower('shapiro-wilk', 'exponential', one(24), options),
    ];
    expect((together?.share ?? 0) - (apart?.share ?? 1)).toBeGreaterThan(0.05);
  });

  it('theory: the other tests find an exponential population too, Anderson-Darling more often than Lilliefors', async () => {
    const few = { ...options, runs: 400 };
    const a = await shapePower('anderson-darling', 'exponential', one(30), few);
    const d = await shapePower('lilliefors', 'exponential', one(30), few);
    expect(a?.share).toBeGreaterThan(d?.share as number);
    expect(d?.share).toBeGreaterThan(0.5);
  });

  it('invariance: the same seed gives the same share; another seed another one', async () => {
    const few = { ...options, runs: 200 };
    const run = (seed: number) => shapePower('shapiro-wilk', 't3', one(15), { ...few, seed });
    expect(await run(1)).toEqual(await run(1));
    expect(await run(1)).not.toEqual(await run(2));
  });

  it('degenerate: not defined for two scores', async () => {
    expect(await shapePower('shapiro-wilk', 'exponential', one(2), options)).toBeNull();
  });
});

describe('spreadPower', () => {
  // Methods 4.4, Brown-Forsythe, SD ratio 2, equal groups.
  it.each([
    [10, 0.31],
    [20, 0.7],
    [30, 0.9],
  ])('agrees with methods 4.4: two groups of %d, ratio 2: %d, within 3.5 SE', async (n, published) => {
    expect(near(await spreadPower([n, n], options), published)).toBe(true);
  });

  it('theory: with a ratio of 1 it keeps its level, .035 to .047 (methods 4.4) within 3.5 SE', async () => {
    const found = await spreadPower([20, 20], { ...options, ratio: 1 });
    expect(Math.abs((found?.share ?? 1) - 0.041)).toBeLessThan(0.006 + 3.5 * Math.sqrt((0.041 * 0.959) / 1000));
  });

  it('degenerate: groups of one and two have no distances that vary', async () => {
    expect(await spreadPower([1, 2], options)).toBeNull();
  });
});

describe('levelsAtSpread', () => {
  it('agrees with methods 4.3: 10 and 30, SDs 2 to 1: Student .156, Welch .050, within 3.5 SE', async () => {
    const { pooled, welch } = await levelsAtSpread([10, 30], [2, 1], options);
    expect(Math.abs(pooled.share - 0.156)).toBeLessThan(3.5 * pooled.se);
    expect(Math.abs(welch.share - 0.05)).toBeLessThan(3.5 * Math.sqrt((0.05 * 0.95) / 2000));
  });

  it('agrees with methods 4.3: 10 and 30, SDs 1 to 1.5: Student .017, within 3.5 SE', async () => {
    const { pooled } = await levelsAtSpread([10, 30], [1, 1.5], options);
    expect(Math.abs(pooled.share - 0.017)).toBeLessThan(3.5 * Math.sqrt((0.017 * 0.983) / 2000));
  });
});
