import { describe, expect, it } from 'vitest';
import { decimalTies, rankZ, tailP } from '../../src/numerics/rank-test.ts';
import { close, scores } from './samples.ts';

describe('what rank tests share', () => {
  it('by hand: decimal ties are ties, zeros are plain zeros', () => {
    const d = decimalTies(scores(0.3 - 0.2, 0.2 - 0.1, 0.1, 0.3 - 0.2 - 0.1));
    expect([...d]).toEqual([0.1, 0.1, 0.1, 0]);
    expect(Object.is(d[3], 0)).toBe(true);
  });
  it('by hand: the correction moves the gap by .5 towards 0 or against the alternative', () => {
    expect(rankZ(3, 2, true, 'two-sided').z).toBe(1.25);
    expect(rankZ(-3, 2, true, 'two-sided').z).toBe(-1.25);
    expect(rankZ(3, 2, true, 'greater').z).toBe(1.25);
    expect(rankZ(3, 2, true, 'less').z).toBe(1.75);
    expect(rankZ(3, 2, false, 'less').z).toBe(1.5);
  });
  it('agrees with common practice: z = 1.959963984540054 has p = .05 (rtol 1e-12)', () => {
    expect(close(rankZ(1.959963984540054, 1, false, 'two-sided').p, 0.05, 1e-12)).toBe(true);
  });
  it('theory: the doubled smaller tail never exceeds 1', () => {
    expect([
      tailP(0.7, 0.6, 'two-sided'),
      tailP(0.2, 0.9, 'two-sided'),
      tailP(0.2, 0.9, 'greater'),
      tailP(0.2, 0.9, 'less'),
    ]).toEqual([1, 0.4, 0.9, 0.2]);
  });
  it('invariance: ties survive a change of unit down to 1e-12', () => {
    const d = decimalTies(scores(0.3 - 0.2, 0.2 - 0.1, 0.5).map((x) => x * 1e-12));
    expect(d[0]).toBe(d[1]);
    expect((d[2] as number) > (d[1] as number)).toBe(true);
  });
  it('degenerate: huge values stay as they are, no values stay none', () => {
    expect([...decimalTies(scores(1e9 + 0.123456789))]).toEqual([1e9 + 0.123456789]);
    expect(decimalTies(scores())).toHaveLength(0);
    expect(rankZ(0, 1, true, 'two-sided')).toEqual({ z: 0, p: 1 });
  });
});
