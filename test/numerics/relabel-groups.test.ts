import { describe, expect, it } from 'vitest';
import { hodgesLehmannShift } from '../../src/numerics/hodges-lehmann.ts';
import { mannWhitney } from '../../src/numerics/mann-whitney.ts';
import { median } from '../../src/numerics/order.ts';
import { type GroupRow, middleOf, RelabelledGroups } from '../../src/numerics/relabel-groups.ts';
import { normalFromP } from '../../src/numerics/relabel-z.ts';
import { rng } from '../../src/numerics/rng.ts';
import { studentT } from '../../src/numerics/student.ts';
import { yuenWelch } from '../../src/numerics/yuen.ts';

const ROWS: readonly GroupRow[] = [
  { row: 'student' },
  ...[0, 10, 20, 25].map((trim) => ({ row: 'yuen', trim }) as const),
  { row: 'rank-sum' },
];

/** The plain way: the groups are formed and handed to the tests themselves; fewer than 4 left give no test. */
function plainly(scores: Float64Array, labels: Uint8Array) {
  const x = scores.filter((score, i) => labels[i] === 0 && !Number.isNaN(score));
  const y = scores.filter((score, i) => labels[i] !== 0 && !Number.isNaN(score));
  return ROWS.map((row) => {
    if (x.length === 0 || y.length === 0) return { estimate: Number.NaN, z: 0 };
    if (row.row === 'rank-sum') {
      const test = mannWhitney(x, y);
      const z = Math.min(x.length, y.length) < 4 ? 0 : normalFromP(test.p ?? 1, 2 * test.superiority - 1);
      return { estimate: hodgesLehmannShift(x, y).estimate, z };
    }
    const test = row.row === 'student' ? studentT(x, y) : yuenWelch(x, y, { trim: row.trim });
    const trim = row.row === 'student' ? 0 : row.trim;
    const left = [x, y].map((each) => each.length - 2 * Math.floor((trim * each.length) / 100));
    return { estimate: test.estimate ?? NaN, z: Math.min(...left) < 4 ? 0 : normalFromP(test.p ?? 1, test.t ?? 0) };
  });
}

function compare(scores: Float64Array, shares: readonly number[]): void {
  const kernel = new RelabelledGroups(scores, ROWS);
  const estimates = new Float64Array(ROWS.length + 1);
  const z = new Float64Array(ROWS.length + 1);
  const random = rng(21, scores.length);
  for (const share of shares) {
    const labels = Uint8Array.from(scores, () => (random.uniform() < share ? 0 : 1));
    kernel.run(labels, estimates, z, 1);
    plainly(scores, labels).forEach((expected, i) => {
      const size = Math.max(1, Math.abs(expected.estimate));
      if (Number.isNaN(expected.estimate)) expect(estimates[i + 1]).toBeNaN();
      else expect(Math.abs((estimates[i + 1] as number) - expected.estimate)).toBeLessThan(1e-9 * size);
      expect(Math.abs((z[i + 1] as number) - expected.z)).toBeLessThan(1e-9);
    });
  }
}

function skewed(n: number, offset = 0): Float64Array {
  const random = rng(4, n);
  return Float64Array.from({ length: n }, () => offset - 300 * Math.log(1 - random.uniform()));
}

describe('RelabelledGroups', () => {
  it('agrees with the tests themselves: 40 random labels of 33 skewed scores, 1e-9', () => {
    compare(
      skewed(33),
      Array.from({ length: 40 }, () => 0.5),
    );
  });

  it('agrees with the tests themselves: scores far from zero, ties, participants without a score, 1e-9', () => {
    compare(skewed(24, 1e6), [0.5, 0.4, 0.6]);
    compare(
      skewed(30).map((score) => Math.round(score / 200)),
      [0.5, 0.3, 0.7, 0.5],
    );
    compare(
      skewed(28).map((score, i) => (i % 5 === 0 ? NaN : score)),
      [0.5, 0.5, 0.5],
    );
  });

  it('degenerate: small and empty groups, equal scores', () => {
    compare(skewed(9), [0, 0.1, 0.3, 0.5, 1]);
    compare(new Float64Array(12).fill(3.3), [0.5, 0.5]);
    compare(
      Float64Array.from({ length: 16 }, (_, i) => (i === 0 ? 9.1 : 1.1)),
      [0.5, 0.5],
    );
  });

  it('invariance: exchanged labels turn every sign', () => {
    const scores = skewed(20);
    const kernel = new RelabelledGroups(scores, ROWS);
    const labels = Uint8Array.from(scores, (_, i) => (i * 7) % 2);
    const run = (own: Uint8Array) => {
      const [estimates, z] = [new Float64Array(ROWS.length), new Float64Array(ROWS.length)];
      kernel.run(own, estimates, z, 0);
      return [...estimates, ...z];
    };
    const turned = run(labels.map((each) => 1 - each));
    run(labels).forEach((value, i) => {
      expect(Math.abs(value + (turned[i] as number))).toBeLessThan(1e-9);
    });
  });
});

describe('middleOf', () => {
  it('agrees with median, exactly, for odd and even lengths with ties', () => {
    for (const n of [1, 2, 3, 8, 25, 60]) {
      const list = skewed(n).map((score) => Math.round(score / 100));
      expect(middleOf(list.slice())).toBe(median(list));
    }
  });
});
