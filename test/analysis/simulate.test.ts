import { describe, expect, test } from 'vitest';
import { addCounts, METHODS, type SimulationSpec, simulate, truthOf } from '../../src/analysis/simulate.ts';
import { atOnce } from '../support/chains.ts';
import { countFor, noteLongRun } from '../support/long-run.ts';

const base: SimulationSpec = {
  scope: 'between',
  shape: 'normal',
  n: [20, 20],
  spread: [1, 1],
  difference: 0,
  equal: 'means',
  own: 0,
  rule: null,
  alpha: 0.05,
  trim: 20,
  resamples: 0,
  seed: 20_261_201,
};

/** Rates of the closed-form methods, in the order of METHODS. */
async function rates(spec: Partial<SimulationSpec>, runs: number) {
  const { methods } = await simulate({ ...base, ...spec }, 0, runs, atOnce);
  return methods.map((each) => ({ ...each, rate: each.rejected / runs }));
}

/** Within 3.5 standard errors of two simulations; seeds stated beforehand. */
function within(rate: number, reference: number, ours: number, theirs: number): void {
  const variance = reference * (1 - reference);
  expect(Math.abs(rate - reference)).toBeLessThan(3.5 * Math.sqrt(variance / ours + variance / theirs) + 0.0005);
}

// Methods 5.3, 40,000 runs: Student, Welch, Yuen 20 %, Mann-Whitney.
const samePopulations: [SimulationSpec['shape'], [number, number], number[]][] = [
  ['lognormal', [10, 10], [0.034, 0.027, 0.031, 0.043]],
  ['lognormal', [20, 20], [0.041, 0.037, 0.036, 0.05]],
  ['lognormal', [15, 45], [0.046, 0.067, 0.052, 0.048]],
  ['lognormal', [40, 40], [0.042, 0.04, 0.042, 0.047]],
  ['exponential', [15, 45], [0.047, 0.061, 0.054, 0.048]],
  ['contaminated', [20, 20], [0.03, 0.028, 0.049, 0.05]],
  ['contaminated', [15, 45], [0.047, 0.03, 0.052, 0.049]],
  ['t3', [20, 20], [0.045, 0.044, 0.047, 0.048]],
  ['chi-square-3', [15, 45], [0.048, 0.06, 0.056, 0.05]],
];

describe('methods 5.3', () => {
  test.each(samePopulations)('agrees with 5.3, two equal %s populations of %j', async (shape, n, reference) => {
    const runs = countFor(1500, 20_000);
    const found = await rates({ shape, n }, runs);
    reference.forEach((value, i) => {
      within(found[i]?.rate ?? NaN, value, runs, 40_000);
    });
  });

  test('agrees with 5.3, equal means with SD 1:2, lognormal 45 and 15: .158 and .118; trimmed means .069', async () => {
    const runs = countFor(1500, 20_000);
    // The larger group has the smaller spread.
    const means = await rates({ shape: 'lognormal', n: [45, 15], spread: [1, 2] }, runs);
    within(means[0]?.rate ?? NaN, 0.158, runs, 40_000);
    within(means[1]?.rate ?? NaN, 0.118, runs, 40_000);
    const trimmed = await rates({ shape: 'lognormal', n: [45, 15], spread: [1, 2], equal: 'trimmed means' }, runs);
    within(trimmed[2]?.rate ?? NaN, 0.069, runs, 40_000);
  });

  test('agrees with 5.3, power for a shift of 1, n 25: normal and contaminated', async () => {
    const runs = countFor(1500, 20_000);
    const normal = await rates({ n: [25, 25], difference: 1 }, runs);
    const contaminated = await rates({ n: [25, 25], difference: 1, shape: 'contaminated' }, runs);
    [0.932, 0.932, 0.886, 0.917].forEach((value, i) => {
      within(normal[i]?.rate ?? NaN, value, runs, 40_000);
    });
    [0.285, 0.279, 0.797, 0.776].forEach((value, i) => {
      within(contaminated[i]?.rate ?? NaN, value, runs, 40_000);
    });
  });
});

// Methods 5.4, 20,000 runs of Welch: none, across, within.
const afterRules: [SimulationSpec['shape'], number, NonNullable<SimulationSpec['rule']>, number[]][] = [
  ['normal', 20, { measure: 'SD', cutoff: 2 }, [0.051, 0.053, 0.102]],
  ['lognormal', 20, { measure: 'MAD', cutoff: 3 }, [0.036, 0.05, 0.204]],
  ['normal', 20, { measure: 'fences', cutoff: 1.5 }, [0.051, 0.052, 0.086]],
  ['lognormal', 20, { measure: 'fences', cutoff: 1.5 }, [0.036, 0.05, 0.175]],
  ['mixture', 20, { measure: 'MAD', cutoff: 2 }, [0.046, 0.049, 0.128]],
  ['lognormal', 50, { measure: 'MAD', cutoff: 3 }, [0.042, 0.049, 0.225]],
];

describe('methods 5.4', () => {
  test.each(afterRules)('agrees with 5.4, %s, n %i, %j, then Welch', async (shape, n, rule, reference) => {
    const runs = countFor(1000, 20_000);
    const found = await rates({ shape, n: [n, n], rule }, runs);
    const welch = found.filter((each) => each.method === 'welch');
    expect(welch.map((each) => each.cleaning)).toEqual(['none', 'across', 'within']);
    reference.forEach((value, i) => {
      within(welch[i]?.rate ?? NaN, value, runs, 20_000);
    });
  });

  test('agrees with 5.4, a true difference of 1 SD, n 50: coverage after 2 SD across .838, within .897', async ({
    task,
  }) => {
    const runs = countFor(1000, 20_000);
    const found = await rates({ n: [50, 50], difference: 1, rule: { measure: 'SD', cutoff: 2 } }, runs);
    const welch = found.filter((each) => each.method === 'welch').map((each) => each.covered / each.intervals);
    within(welch[1] ?? NaN, 0.838, runs, 20_000);
    within(welch[2] ?? NaN, 0.897, runs, 20_000);
    noteLongRun(task, {
      count: `${runs} experiments`,
      outcome: `coverage ${welch.map((each) => each.toFixed(3)).join(', ')}`,
    });
  });

  test('agrees with 5.4, share set aside within: SD 2, n 20, normal .036', async () => {
    const found = await simulate({ ...base, rule: { measure: 'SD', cutoff: 2 } }, 0, 1000, atOnce);
    expect(found.aside[1] / found.scores).toBeCloseTo(0.036, 2);
  });
});

describe('simulated experiments', () => {
  test('theory: exact tests keep their level, resampling ones stay near, an interval covers where its test does not reject', async () => {
    const runs = countFor(400, 10_000);
    const found = await rates({ resamples: 199, n: [15, 15] }, runs);
    expect(found).toHaveLength(METHODS.between.length);
    for (const each of found) {
      // Student's test and the relabelled difference are exact here; the others stay near (Bradley 1978, from memory).
      if (each.method === 'student' || each.method === 'permutation') within(each.rate, 0.05, runs, Infinity);
      expect(Math.abs(each.rate - 0.05)).toBeLessThan(0.025 + 3.5 * Math.sqrt(0.0475 / runs));
      if (each.intervals > 0) expect(each.intervals - each.covered).toBe(each.rejected);
    }
    const pairs = await rates({ scope: 'within', resamples: 199, own: 0.6, shape: 'exponential' }, runs);
    expect(pairs).toHaveLength(METHODS.within.length);
    for (const each of pairs) {
      if (each.method === 'signFlip') within(each.rate, 0.05, runs, Infinity);
      expect(Math.abs(each.rate - 0.05)).toBeLessThan(0.025 + 3.5 * Math.sqrt(0.0475 / runs));
    }
  });

  test('invariance: any cut into parts gives the same counts', async () => {
    const spec = { ...base, resamples: 39, rule: { measure: 'MAD', cutoff: 2.5 } as const };
    const whole = await simulate(spec, 0, 40, atOnce);
    const parts = [await simulate(spec, 0, 7, atOnce), await simulate(spec, 7, 40, atOnce)];
    expect(addCounts(parts)).toEqual(whole);
  });

  test('by hand: the truth where spreads differ: trimmed means differ although means are equal', () => {
    const truth = truthOf({ ...base, shape: 'exponential', spread: [1, 3], difference: 0.5 });
    expect(truth.means).toBe(0.5);
    // -2 times (trimmed mean of the exponential minus 1).
    const part = (v: number) => v * Math.log(v) - v;
    expect(truth.trimmedMeans).toBeCloseTo(0.5 - 2 * ((part(0.2) - part(0.8)) / 0.6 - 1), 9);
  });

  test('degenerate: a rule that leaves nobody to judge by is counted as not judged', async () => {
    const found = await simulate(
      { ...base, n: [3, 3], trim: 25, rule: { measure: 'MAD', cutoff: 0.01 } },
      0,
      50,
      atOnce,
    );
    const across = found.methods.find((each) => each.cleaning === 'within' && each.method === 'student');
    expect(across?.judged).toBe(0);
  });

  test('refuses: fewer than three participants, no spread, no parts', async () => {
    await expect(simulate({ ...base, n: [2, 20] }, 0, 1, atOnce)).rejects.toThrow(RangeError);
    await expect(simulate({ ...base, spread: [0, 1] }, 0, 1, atOnce)).rejects.toThrow(RangeError);
    expect(() => addCounts([])).toThrow(RangeError);
  });
});
