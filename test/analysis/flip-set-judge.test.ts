import { describe, expect, test } from 'vitest';
import type { ComparisonSpec } from '../../src/analysis/compare.ts';
import { judgeOf, samplesLess } from '../../src/analysis/flip-set-judge.ts';
import { orientedEstimate, pullOf } from '../../src/analysis/flip-set-target.ts';
import { chainOf, plannedRow, samplesWithout } from '../../src/analysis/influence-chain.ts';
import { aHigher, groupsOf, pairsOf } from '../support/chains.ts';

const x = [12, 15, 11, 19, 14, 16, 22, 13, 17, 30];
const y = [10, 11, 12, 13, 9, 10, 12, 14, 8, 11];

/** Judge and exact refit of the same sets of two. */
function both(result: ReturnType<typeof pairsOf>, target: 'loses support' | 'changes sign') {
  const chain = chainOf(result);
  if (chain === null) throw new Error('no chain');
  const samples = samplesWithout(chain, new Set());
  const full = orientedEstimate(plannedRow(chain, samples), aHigher, 'a') ?? 0;
  const judge = judgeOf(chain, samples, { target, claim: aHigher, smallest: 0, full });
  return Array.from({ length: judge.candidates - 1 }, (_, i) => {
    const gone = new Set([judge.names[i] as string, judge.names[i + 1] as string]);
    const row = plannedRow(chain, samplesWithout(chain, gone));
    return { fast: judge.pull(Int32Array.of(i, i + 1)), exact: pullOf(row, target, aHigher, 'a', full, 0) };
  });
}

const specs: [string, 'within' | 'between', Partial<ComparisonSpec>][] = [
  ['paired t', 'within', { estimator: 'paired-t' }],
  ['trimmed differences', 'within', { estimator: 'trimmed-differences', trim: 20 }],
  ['signed rank, row by row', 'within', { estimator: 'signed-rank' }],
  ['Student', 'between', { estimator: 'student' }],
  ['Welch', 'between', { estimator: 'welch' }],
  ['Yuen-Welch', 'between', { estimator: 'yuen-welch', trim: 20 }],
];

describe('what a removal does', () => {
  test.each(specs)('agrees with refitting the chain: %s', (_, scope, spec) => {
    const result = scope === 'within' ? pairsOf(x, y, spec) : groupsOf(x, y, spec);
    for (const { fast, exact } of both(result, 'loses support')) {
      expect(fast).not.toBe(null);
      expect(Math.abs((fast ?? 0) - (exact ?? 0))).toBeLessThan(0.01);
      expect((fast ?? 0) <= 0).toBe((exact ?? 0) <= 0);
    }
    for (const { fast, exact } of both(result, 'changes sign')) expect(fast).toBeCloseTo(exact ?? NaN, 9);
  });

  test('by hand: two samples without one participant each', () => {
    const chain = chainOf(groupsOf(x, y));
    if (chain === null) throw new Error('no chain');
    const left = samplesLess(samplesWithout(chain, new Set()), new Set(['a10', 'b1']));
    expect(Array.from(left.x)).toEqual(x.slice(0, 9));
    expect(Array.from(left.y)).toEqual(y.slice(1));
    expect(left.yParticipants).not.toContain('b1');
  });

  test('degenerate: a set that leaves one score on a side has no verdict', () => {
    const chain = chainOf(groupsOf([1, 2, 3], [0, 1, 2]));
    if (chain === null) throw new Error('no chain');
    const samples = samplesWithout(chain, new Set());
    const judge = judgeOf(chain, samples, { target: 'gains support', claim: aHigher, smallest: 0, full: 1 });
    expect(judge.pull(Int32Array.of(0, 1))).toBe(null);
  });
});
