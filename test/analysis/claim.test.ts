import { describe, expect, it } from 'vitest';
import { type ClaimSpec, claimWords, verdictOf } from '../../src/analysis/claim.ts';
import type { Finding, Limits } from '../../src/analysis/finding.ts';

const claim: ClaimSpec = { first: 'voice', relation: 'lower', second: 'tone', margin: 0, title: '' };

function finding(interval: Limits | null, more: Partial<Finding> = {}): Finding {
  return {
    estimator: 'x',
    label: '',
    quantity: '',
    group: '',
    unit: 'ms',
    sameUnit: true,
    nullValue: 0,
    reversed: false,
    trim: 0,
    estimate: 0,
    se: null,
    df: null,
    statistic: null,
    p: null,
    pHow: '',
    interval,
    level: 0.95,
    alternative: 'two-sided',
    effects: [],
    n: 10,
    counts: [],
    cautions: [],
    method: '',
    ...more,
  };
}

describe('verdictOf', () => {
  it('by hand: lower is supported where the whole interval of first minus second lies below 0', () => {
    expect(verdictOf(finding([-131, -38]), claim, 'voice')).toBe('supported');
    expect(verdictOf(finding([-131, 2]), claim, 'voice')).toBe('undecided');
    expect(verdictOf(finding([3, 9]), claim, 'voice')).toBe('contradicted');
  });

  it('by hand: a limit exactly at the margin decides nothing', () => {
    expect(verdictOf(finding([-131, 0]), claim, 'voice')).toBe('undecided');
    expect(verdictOf(finding([-131, -20]), { ...claim, margin: 20 }, 'voice')).toBe('undecided');
  });

  it('by hand: the margin moves the line', () => {
    expect(verdictOf(finding([-131, -38]), { ...claim, margin: 30 }, 'voice')).toBe('supported');
    expect(verdictOf(finding([-131, -38]), { ...claim, margin: 50 }, 'voice')).toBe('undecided');
    expect(verdictOf(finding([-31, -8]), { ...claim, margin: 50 }, 'voice')).toBe('contradicted');
  });

  it('invariance: naming the pair the other way round with the opposite relation is the same claim', () => {
    for (const interval of [
      [-131, -38],
      [-131, 2],
      [3, 9],
    ] as Limits[]) {
      const turned: ClaimSpec = { ...claim, first: 'tone', relation: 'higher', second: 'voice' };
      expect(verdictOf(finding(interval), turned, 'voice')).toBe(verdictOf(finding(interval), claim, 'voice'));
    }
  });

  it('by hand: ratios are judged around 1, a probability of being lower around one half and turned', () => {
    expect(verdictOf(finding([0.8, 0.95], { sameUnit: false, nullValue: 1 }), claim, 'voice')).toBe('supported');
    const lower = { sameUnit: false, nullValue: 0.5, reversed: true };
    expect(verdictOf(finding([0.54, 0.85], lower), claim, 'voice')).toBe('supported');
    expect(verdictOf(finding([0.2, 0.4], lower), claim, 'voice')).toBe('contradicted');
  });

  it('refuses to hold another unit against a margin', () => {
    expect(
      verdictOf(finding([0.8, 0.95], { sameUnit: false, nullValue: 1 }), { ...claim, margin: 5 }, 'voice'),
    ).toBeNull();
  });

  it('by hand: a one-sided bound supports or leaves undecided', () => {
    expect(verdictOf(finding([null, -5]), claim, 'voice')).toBe('supported');
    expect(verdictOf(finding([null, 5]), claim, 'voice')).toBe('undecided');
  });

  it('by hand: "different" needs the interval on one side of the margin, and is contradicted only inside it', () => {
    const different: ClaimSpec = { ...claim, relation: 'different' };
    expect(verdictOf(finding([3, 9]), different, 'voice')).toBe('supported');
    expect(verdictOf(finding([-3, 9]), different, 'voice')).toBe('undecided');
    expect(verdictOf(finding([-3, 9]), { ...different, margin: 10 }, 'voice')).toBe('contradicted');
  });

  it('degenerate: no interval, no verdict', () => {
    expect(verdictOf(finding(null), claim, 'voice')).toBeNull();
  });
});

describe('claimWords', () => {
  it('by hand: the sentence, or the own words', () => {
    expect(claimWords({ ...claim, margin: 20 }, 'ack_ms', 'ms')).toBe(
      'voice is lower than tone on ack_ms by more than 20 ms.',
    );
    expect(claimWords({ ...claim, title: ' Voice is sooner. ' }, 'ack_ms', 'ms')).toBe('Voice is sooner.');
  });
});
