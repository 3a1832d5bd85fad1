import { describe, expect, it } from 'vitest';
import {
  pairedEffects,
  robustEffect,
  robustPairedEffect,
  studentEffect,
  welchEffect,
} from '../../src/analysis/effects.ts';
import { differences } from '../../src/numerics/scores.ts';
import { sleepSamples, toothSamples } from '../support/samples.ts';

const context = { level: 0.95, resamples: 1999, seed: 4 };
const { x, y } = sleepSamples;

describe('effect sizes of rows', () => {
  it('agrees with the reference case cohens_d_paired of sleep: d_z 1.58 / 1.22999548', () => {
    expect(pairedEffects(x, y, context)[1]?.value).toBeCloseTo(1.284558, 6);
  });

  it('theory: at trim 0 the robust d of pairs is d_z, and of groups the pooled d', () => {
    expect(robustPairedEffect(differences(x, y), 0, context).value).toBeCloseTo(
      pairedEffects(x, y, context)[1]?.value as number,
      10,
    );
    const n = toothSamples.x.length + toothSamples.y.length - 2;
    const approximateFactor = 1 - 3 / (4 * n - 1);
    const g = studentEffect(toothSamples.x, toothSamples.y, context).value as number;
    // Exact and approximate small-sample factors differ by less than 1e-4 at 58 df.
    expect(robustEffect(toothSamples.x, toothSamples.y, 0, context).value).toBeCloseTo(g / approximateFactor, 3);
  });

  it('theory: equal group sizes make the average-variance g the pooled g', () => {
    const welch = welchEffect(toothSamples.x, toothSamples.y, context).value as number;
    expect(welch).toBeCloseTo(studentEffect(toothSamples.x, toothSamples.y, context).value as number, 10);
  });

  it('invariance: a change of unit and a common shift leave every effect size and interval as they are', () => {
    const move = (v: number) => 60 * v + 7;
    const moved = pairedEffects(x.map(move), y.map(move), context)[0];
    const before = pairedEffects(x, y, context)[0];
    expect(moved?.interval?.[0]).toBeCloseTo(before?.interval?.[0] as number, 8);
    const robust = robustEffect(toothSamples.x.map(move), toothSamples.y.map(move), 20, context);
    expect(robust.interval?.[1]).toBeCloseTo(
      robustEffect(toothSamples.x, toothSamples.y, 20, context).interval?.[1] as number,
      8,
    );
  });

  it('invariance: turning the pair round turns the robust d', () => {
    const turned = robustPairedEffect(differences(y, x), 20, context).value as number;
    expect(turned).toBeCloseTo(-(robustPairedEffect(differences(x, y), 20, context).value as number), 12);
  });

  it('degenerate: resamples of equal scores with rounding in them make no huge interval', () => {
    const tied = Float64Array.of(0.1 + 0.2, 0.3, 0.3, 0.3, 0.3, 0.3, 0.3, 0.3, 0.5, 0.9);
    const limits = robustPairedEffect(tied, 20, context).interval;
    if (limits !== null) expect(Math.max(...limits.map((each) => Math.abs(each as number)))).toBeLessThan(1e6);
  });

  it('degenerate: no spread gives no value, with a reason', () => {
    const flat = Float64Array.of(2, 2, 2, 2);
    expect(robustPairedEffect(flat, 20, context)).toMatchObject({
      value: null,
      interval: null,
      reason: 'winsorized SD is zero',
    });
    expect(welchEffect(flat, flat, context).value).toBeNull();
  });
});
