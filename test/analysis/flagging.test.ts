import { describe, expect, it } from 'vitest';
import {
  type BlindScores,
  flagExtremeBlind,
  flagExtremeByCondition,
  flagKeptShare,
  flagLimit,
  participantMeans,
} from '../../src/analysis/flagging.ts';
import type { ExtremeRule } from '../../src/analysis/rules.ts';

const scores: BlindScores = {
  values: Float64Array.of(10, 11, 12, 13, 50, 30, 31, 32, 33, 34),
  kept: Uint8Array.of(1, 1, 1, 1, 1, 1, 1, 1, 1, 1),
  participant: Int32Array.of(0, 0, 0, 0, 0, 1, 1, 1, 1, 1),
  participants: 2,
};
const extreme: ExtremeRule = {
  rule: 'extreme',
  on: 'trial',
  column: 's',
  measure: 'MAD',
  cutoff: 3,
  scope: 'participant',
  sides: 'both',
};
const marks = (rows: Uint8Array) => [...rows].flatMap((mark, row) => (mark ? [row] : []));

describe('flagging', () => {
  it('by hand: within participant 50 is far from 12 (MAD 1), pooled it is not (median 30.5, MAD 11)', () => {
    expect(marks(flagExtremeBlind(scores, extreme).rows)).toEqual([4]);
    expect(marks(flagExtremeBlind(scores, { ...extreme, scope: 'pooled' }).rows)).toEqual([]);
  });

  it('theory: mean and SD with n - 1: no score of five lies beyond (n - 1) / sqrt(n) = 1.789 SD (Shiffler 1988)', () => {
    expect(marks(flagExtremeBlind(scores, { ...extreme, measure: 'SD', cutoff: 1.79 }).rows)).toEqual([]);
    expect(marks(flagExtremeBlind(scores, { ...extreme, measure: 'SD', cutoff: 1.7 }).rows)).toEqual([4]);
  });

  it('by hand: quartile fences by type 7 quartiles: 11, 13, so 1.5 IQR is 8 to 16', () => {
    const { limits, rows } = flagExtremeBlind(scores, { ...extreme, measure: 'fences', cutoff: 1.5 });
    expect([limits[0]?.lower, limits[0]?.upper]).toEqual([8, 16]);
    expect(marks(rows)).toEqual([4]);
  });

  it('invariance: shifting and scaling the scores moves the limits with them and flags the same rows', () => {
    for (const measure of ['MAD', 'SD', 'fences'] as const) {
      const rule = { ...extreme, measure, cutoff: 1.5 };
      const moved = { ...scores, values: scores.values.map((value) => 60 * value + 7) };
      expect(marks(flagExtremeBlind(moved, rule).rows)).toEqual(marks(flagExtremeBlind(scores, rule).rows));
      const [a, b] = [flagExtremeBlind(scores, rule).limits[0], flagExtremeBlind(moved, rule).limits[0]];
      expect(b?.upper).toBeCloseTo(60 * (a?.upper as number) + 7, 8);
    }
  });

  it('by hand: rows set aside before are neither judged nor counted', () => {
    const without = { ...scores, kept: Uint8Array.of(1, 1, 1, 1, 0, 1, 1, 1, 1, 1) };
    const { limits, rows } = flagExtremeBlind(without, extreme);
    expect(limits[0]?.n).toBe(4);
    expect(marks(rows)).toEqual([]);
  });

  it('by hand: participants are judged by their means, in groups only where the rule says so', () => {
    expect([...participantMeans(scores)]).toEqual([19.2, 32]);
    const condition = { codes: new Int32Array(10), count: 1, perParticipant: Int32Array.of(0, 1) };
    const { limits } = flagExtremeByCondition(scores, condition, { ...extreme, on: 'participant', scope: 'condition' });
    expect(limits.map((each) => each.n)).toEqual([1]);
  });

  it('by hand: fixed limits and the least share of kept trials', () => {
    expect(
      marks(flagLimit(scores, { rule: 'limit', on: 'trial', column: 's', side: 'above', limit: 34, reason: 'r' }).rows),
    ).toEqual([4]);
    expect(
      marks(
        flagLimit(scores, { rule: 'limit', on: 'participant', column: 's', side: 'below', limit: 20, reason: 'r' })
          .rows,
      ),
    ).toEqual([0, 1, 2, 3, 4]);
    const kept = Uint8Array.of(1, 1, 1, 0, 0, 1, 1, 1, 1, 1);
    expect(marks(flagKeptShare(kept, scores.participant, 2, { rule: 'kept-share', least: 60 }).rows)).toEqual([]);
    expect(marks(flagKeptShare(kept, scores.participant, 2, { rule: 'kept-share', least: 61 }).rows)).toEqual([
      0, 1, 2, 3, 4,
    ]);
  });

  it('degenerate: missing values are never flagged', () => {
    const values = scores.values.slice();
    values[4] = NaN;
    expect(marks(flagExtremeBlind({ ...scores, values }, extreme).rows)).toEqual([]);
    expect(
      marks(
        flagLimit(
          { ...scores, values },
          { rule: 'limit', on: 'trial', column: 's', side: 'above', limit: 1, reason: 'r' },
        ).rows,
      ),
    ).not.toContain(4);
  });
});
