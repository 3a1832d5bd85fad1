import { describe, expect, it } from 'vitest';
import { compareSamples } from '../../src/analysis/compare.ts';
import type { Samples } from '../../src/analysis/samples.ts';
import { args, row, sleepSamples, toothSamples } from '../support/samples.ts';

const within = compareSamples(args(sleepSamples));
const between = compareSamples(args(toothSamples));
const long: Samples = {
  ...sleepSamples,
  x: Float64Array.from({ length: 24 }, (_, i) => ((i * 29) % 23) + i),
  y: Float64Array.from({ length: 24 }, (_, i) => ((i * 13) % 19) + i),
};

describe('resampled and permuted rows', () => {
  it('theory: the bootstrap-t has the estimate and the SE of its t row, and about its interval', () => {
    for (const [findings, id, plain] of [
      [within, 'trimmed-differences-boot-t', 'trimmed-differences'],
      [between, 'yuen-boot-t', 'yuen-welch'],
    ] as const) {
      const [own, t] = [row(findings, id), row(findings, plain)];
      expect(own.estimate).toBeCloseTo(t.estimate as number, 12);
      expect(own.se).toBeCloseTo(t.se as number, 12);
      expect(own.df).toBeNull();
      const width = ([low, high]: readonly (number | null)[]) => (high as number) - (low as number);
      const ratio = width(own.interval ?? []) / width(t.interval ?? []);
      // Symmetric bootstrap-t limits of a few scores are wider or narrower by less than a factor of two.
      expect(ratio).toBeGreaterThan(0.5);
      expect(ratio).toBeLessThan(2.5);
    }
  });

  it('refuses BCa below 20 scores a condition, keeping the estimate (R17), and gives it from there on', () => {
    const few = row(within, 'trimmed-differences-bca');
    expect([few.p, few.interval]).toEqual([null, null]);
    expect(few.estimate).toBeCloseTo(row(within, 'trimmed-differences').estimate as number, 12);
    expect(few.reason).toMatch(/from 20 scores/);
    expect(few.cautions).toContain('R17');
    const enough = row(compareSamples(args(long)), 'trimmed-differences-bca');
    expect(enough.interval?.[0]).toBeLessThan(enough.estimate as number);
    expect(enough.cautions).not.toContain('R17');
    expect(row(between, 'yuen-bca').interval?.[1]).toBeGreaterThan(row(between, 'yuen-bca').estimate as number);
  });

  it('agrees with methods 6, sleep: the exact sign-flip test; drawn relabellings of 60 plants near the exact p', () => {
    expect(row(within, 'permutation-differences').pHow).toBe('all 1,024 sign flips');
    expect(row(between, 'permutation-groups').pHow).toBe('studentized relabelling, 1,999 drawn');
    // Welch p .0606: the drawn p lies within 4 Monte Carlo errors (.0053) of it.
    expect(Math.abs((row(between, 'permutation-groups').p as number) - 0.0606)).toBeLessThan(0.022);
  });

  it('theory: each has an effect size; the same seed gives the same digits', () => {
    for (const id of ['trimmed-differences-boot-t', 'permutation-differences']) {
      expect(row(within, id).effects[0]?.value).toBeGreaterThan(0);
    }
    expect(compareSamples(args(sleepSamples))).toEqual(within);
  });

  it('invariance: a change of unit scales estimates and limits, 8 digits', () => {
    const scaled = compareSamples(args({ ...long, x: long.x.map((v) => 60 * v), y: long.y.map((v) => 60 * v) }));
    const own = compareSamples(args(long));
    for (const id of ['trimmed-differences-boot-t', 'trimmed-differences-bca', 'permutation-differences']) {
      expect(row(scaled, id).interval?.[0]).toBeCloseTo(60 * (row(own, id).interval?.[0] as number), 8);
      expect(row(scaled, id).p).toBeCloseTo(row(own, id).p as number, 10);
    }
  });

  it('degenerate: equal differences give estimate and reason, no p', () => {
    const flat = compareSamples(args({ ...sleepSamples, y: sleepSamples.x.map((v) => v - 2) }));
    for (const id of ['trimmed-differences-boot-t', 'permutation-differences']) {
      expect(row(flat, id)).toMatchObject({ p: null, interval: null });
      expect(row(flat, id).estimate).toBeCloseTo(2, 10);
      expect((row(flat, id).reason ?? '').length).toBeGreaterThan(5);
    }
  });

  it('by hand: with five pairs no p can reach .05, and the row says so (R25)', () => {
    const short = { ...sleepSamples, x: sleepSamples.x.slice(0, 5), y: sleepSamples.y.slice(0, 5) };
    expect(row(compareSamples(args(short)), 'permutation-differences').cautions).toContain('R25');
  });
});
