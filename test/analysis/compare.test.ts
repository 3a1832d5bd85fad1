import { describe, expect, it } from 'vitest';
import { compareSamples } from '../../src/analysis/compare.ts';
import { args, row, sleepSamples } from '../support/samples.ts';

describe('withheld rows', () => {
  it('by hand: the estimate is shown, p, interval and intervals of effects are not', () => {
    const found = row(compareSamples({ ...args(sleepSamples), withheld: true }), 'paired-t');
    expect(found.estimate).toBeCloseTo(1.58, 12);
    expect([found.p, found.interval, found.se, found.effects[0]?.interval]).toEqual([null, null, null, null]);
    expect(found.cautions).toContain('R2');
  });
});
