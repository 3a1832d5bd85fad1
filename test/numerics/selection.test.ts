import { describe, expect, it } from 'vitest';
import { sorted } from '../../src/numerics/order.ts';
import { pairDifference, pairDistance, selectKth, walshAverage } from '../../src/numerics/selection.ts';
import { scores, uneven } from './samples.ts';

function pairs(n: number, from: (i: number) => number, value: (i: number, j: number) => number): Float64Array {
  const out: number[] = [];
  for (let i = 0; i < n; i++) for (let j = from(i); j < n; j++) out.push(value(i, j));
  return Float64Array.from(out).sort();
}

describe('selection from pairwise sums', () => {
  it('by hand: averages and differences of 1, 2, 4', () => {
    const s = scores(1, 2, 4);
    expect([1, 2, 3, 4, 5, 6].map((k) => walshAverage(s, k))).toEqual([1, 1.5, 2, 2.5, 3, 4]);
    expect([1, 2, 3].map((k) => pairDistance(s, k))).toEqual([1, 2, 3]);
    expect([1, 2, 3].map((k) => pairDifference(s, scores(1), k))).toEqual([0, 1, 3]);
  });
  it('agrees with sorting every pair, with ties and decimals (exactly)', () => {
    for (const x of [uneven(3), uneven(60), uneven(61).map((v) => v / 3), uneven(200)]) {
      const s = sorted(x);
      const at = (i: number) => s[i] as number;
      const averages = pairs(
        s.length,
        (i) => i,
        (i, j) => (at(i) + at(j)) / 2,
      );
      const distances = pairs(
        s.length,
        (i) => i + 1,
        (i, j) => at(j) - at(i),
      );
      for (const share of [0, 0.1, 0.25, 0.5, 0.77, 1]) {
        const k = Math.max(1, Math.round(share * averages.length));
        expect(walshAverage(s, k)).toBe(averages[k - 1]);
        const m = Math.max(1, Math.round(share * distances.length));
        expect(pairDistance(s, m)).toBe(distances[m - 1]);
      }
    }
  });
  it('agrees with sorting every difference of two groups (exactly)', () => {
    const s = sorted(uneven(90));
    const t = sorted(uneven(70).map((v) => v * 1.1));
    const all = Float64Array.from([...s].flatMap((a) => [...t].map((b) => a - b))).sort();
    for (const k of [1, 2, 100, 3150, 6299, 6300]) expect(pairDifference(s, t, k)).toBe(all[k - 1]);
  });
  it('agrees with sorting: k-th of a list, infinite and tied values included (exactly)', () => {
    for (const list of [
      uneven(1),
      uneven(2),
      uneven(57),
      scores(3, Infinity, -Infinity, 3, 3, 0),
      uneven(500).sort(),
    ]) {
      const s = sorted(list);
      for (let k = 1; k <= list.length; k++) expect(selectKth(list.slice(), k)).toBe(s[k - 1]);
    }
    expect(() => selectKth(scores(), 1)).toThrow('*k* must be');
  });
  it('invariance: adding a power of two moves averages and leaves distances', () => {
    const s = sorted(uneven(40));
    const far = s.map((v) => v + 1024);
    expect(walshAverage(far, 300)).toBe(walshAverage(s, 300) + 1024);
    expect(pairDistance(far, 300)).toBe(pairDistance(s, 300));
  });
  it('degenerate: all scores equal, one score, huge ties', () => {
    expect([walshAverage(scores(3, 3, 3, 3), 7), pairDistance(scores(3, 3), 1), walshAverage(scores(5), 1)]).toEqual([
      3, 0, 5,
    ]);
    const tied = Float64Array.from({ length: 600 }, (_, i) => (i < 300 ? 0 : 1));
    expect([walshAverage(tied, 90_000), pairDistance(tied, 90_000)]).toEqual([0.5, 1]);
  });
  it('refuses ranks outside the pairs', () => {
    for (const k of [0, 7, 1.5])
      expect(() => walshAverage(scores(1, 2, 3), k)).toThrow('*k* must be an integer from 1 to 6');
    expect(() => pairDistance(scores(1), 1)).toThrow(RangeError);
    expect(() => pairDifference(scores(1), scores(2, 3), 3)).toThrow('from 1 to 2');
  });
});
