import { describe, expect, it } from 'vitest';
import { compareSamples } from '../../src/analysis/compare.ts';
import { args, row, sleepSamples } from '../support/samples.ts';

describe('rows within participants on ranks, ratios and signs', () => {
  const findings = compareSamples(args(sleepSamples));

  it('agrees with library_disagreements 12, sleep: the median of the Walsh averages is 1.3', () => {
    expect(row(findings, 'signed-rank').estimate).toBeCloseTo(1.3, 12);
  });

  it('by hand: the share of pairs counts the equal pair as half: 9 of 10 higher and one equal', () => {
    const found = row(findings, 'pairs-share');
    expect(found.estimate).toBeCloseTo(0.95, 12);
    // Nine unequal pairs, all in one direction: 2 / 2^9.
    expect(found.p).toBeCloseTo(2 / 512, 12);
  });

  it('refuses a ratio where scores are zero or negative, with the count', () => {
    const found = row(findings, 'paired-ratio');
    expect(found.estimate).toBeNull();
    expect(found.reason).toMatch(/scores are zero or negative/);
    expect(found.cautions).toContain('R5');
  });

  it('invariance: a monotone change of both conditions leaves the share of pairs, 12 digits', () => {
    const cubed = compareSamples(
      args({ ...sleepSamples, x: sleepSamples.x.map((v) => v ** 3), y: sleepSamples.y.map((v) => v ** 3) }),
    );
    expect(row(cubed, 'pairs-share').estimate).toBeCloseTo(row(findings, 'pairs-share').estimate as number, 12);
    expect(row(cubed, 'pairs-share').p).toBeCloseTo(row(findings, 'pairs-share').p as number, 12);
  });

  it('degenerate: nobody with both scores gives rows with reasons', () => {
    const nobody = compareSamples(args({ ...sleepSamples, x: new Float64Array(0), y: new Float64Array(0) }));
    for (const id of ['signed-rank', 'paired-ratio', 'pairs-share'])
      expect(row(nobody, id).reason).toMatch(/no participant/);
  });
});
