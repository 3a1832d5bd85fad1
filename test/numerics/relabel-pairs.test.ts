import { describe, expect, it } from 'vitest';
import { hodgesLehmannPaired } from '../../src/numerics/hodges-lehmann.ts';
import { pairedT } from '../../src/numerics/one-sample-t.ts';
import { type PairRow, RelabelledPairs } from '../../src/numerics/relabel-pairs.ts';
import { normalFromP } from '../../src/numerics/relabel-z.ts';
import { rng } from '../../src/numerics/rng.ts';
import { differences } from '../../src/numerics/scores.ts';
import { trimmedMeanTest } from '../../src/numerics/trimmed-mean.ts';
import { signedRankTest } from '../../src/numerics/wilcoxon.ts';
import { winsorizedMeanTest } from '../../src/numerics/winsorized.ts';
import { yuenPaired } from '../../src/numerics/yuen-paired.ts';

const ROWS: readonly PairRow[] = [
  { row: 'paired-t' },
  ...(['trimmed', 'winsorized', 'marginal'] as const).flatMap((row) => [0, 10, 20, 25].map((trim) => ({ row, trim }))),
  { row: 'signed-rank' },
];

/** The plain way: the pairs are formed and handed to the tests themselves; fewer than 4 left give no test. */
function plainly(x: Float64Array, y: Float64Array) {
  const d = differences(x, y);
  return ROWS.map((row) => {
    if (row.row === 'signed-rank') {
      const test = signedRankTest(d);
      const z = d.length < 4 ? 0 : normalFromP(test.p ?? 1, test.V - test.wMinus);
      return { estimate: hodgesLehmannPaired(d).estimate, z };
    }
    const trim = 'trim' in row ? row.trim : 0;
    const test = {
      'paired-t': () => pairedT(x, y),
      trimmed: () => trimmedMeanTest(d, { trim }),
      winsorized: () => winsorizedMeanTest(d, { trim }),
      marginal: () => yuenPaired(x, y, { trim }),
    }[row.row]();
    const left = d.length - 2 * Math.floor((trim * d.length) / 100);
    return { estimate: test.estimate ?? NaN, z: left < 4 ? 0 : normalFromP(test.p ?? 1, test.t ?? 0) };
  });
}

function compare(a: Float64Array, b: Float64Array, times: number): void {
  const kernel = new RelabelledPairs(a, b, ROWS);
  const estimates = new Float64Array(ROWS.length + 1);
  const z = new Float64Array(ROWS.length + 1);
  const random = rng(22, a.length);
  for (let k = 0; k < times; k++) {
    const labels = Uint8Array.from(a, () => (random.uniform() < 0.5 ? 0 : 1));
    kernel.run(labels, estimates, z, 1);
    const entered = [...a.keys()].filter((i) => !Number.isNaN(a[i]) && !Number.isNaN(b[i]));
    const take = (first: boolean) =>
      Float64Array.from(entered, (i) => ((labels[i] === 0) === first ? a[i] : b[i]) as number);
    plainly(take(true), take(false)).forEach((expected, i) => {
      const size = Math.max(1, Math.abs(expected.estimate));
      expect(Math.abs((estimates[i + 1] as number) - expected.estimate)).toBeLessThan(1e-9 * size);
      expect(Math.abs((z[i + 1] as number) - expected.z)).toBeLessThan(1e-9);
    });
  }
}

function scores(n: number, stream: number, offset = 0): Float64Array {
  const random = rng(6, stream);
  return Float64Array.from({ length: n }, () => offset - 200 * Math.log(1 - random.uniform()));
}

describe('RelabelledPairs', () => {
  it('agrees with the tests themselves: 30 random exchanges in 27 skewed pairs, 1e-9', () => {
    compare(scores(27, 1), scores(27, 2), 30);
  });

  it('agrees with the tests themselves: far from zero, rounded with ties and zeros, missing scores, 1e-9', () => {
    compare(scores(20, 1, 1e5), scores(20, 2, 1e5), 4);
    const round = (x: Float64Array) => x.map((each) => Math.round(each / 100));
    compare(round(scores(22, 3)), round(scores(22, 4)), 6);
    compare(
      scores(23, 5).map((each, i) => (i % 6 === 0 ? NaN : each)),
      scores(23, 7).map((each, i) => (i === 7 ? NaN : each)),
      4,
    );
  });

  it('agrees with the tests themselves: more pairs than averages are formed for, 1e-9', () => {
    compare(scores(95, 8), scores(95, 9), 2);
  });

  it('degenerate: three pairs, equal differences, all zero', () => {
    compare(scores(3, 1), scores(3, 2), 4);
    compare(Float64Array.of(2, 3, 4, 5, 6, 7), Float64Array.of(1, 2, 3, 4, 5, 6), 6);
    compare(Float64Array.of(2, 3, 4, 5, 6, 7), Float64Array.of(2, 3, 4, 5, 6, 7), 2);
  });

  it('degenerate: without a pair every estimate is missing and every Z is 0', () => {
    const [estimates, z] = [new Float64Array(ROWS.length), new Float64Array(ROWS.length).fill(7)];
    new RelabelledPairs(Float64Array.of(NaN), Float64Array.of(1), ROWS).run(Uint8Array.of(0), estimates, z, 0);
    expect([...estimates].every(Number.isNaN)).toBe(true);
    expect([...z].every((each) => each === 0)).toBe(true);
  });

  it('invariance: exchanging every pair turns every sign', () => {
    const kernel = new RelabelledPairs(scores(15, 1), scores(15, 2), ROWS);
    const run = (label: number) => {
      const [estimates, z] = [new Float64Array(ROWS.length), new Float64Array(ROWS.length)];
      kernel.run(new Uint8Array(15).fill(label), estimates, z, 0);
      return [...estimates, ...z];
    };
    const turned = run(1);
    run(0).forEach((value, i) => {
      expect(Math.abs(value + (turned[i] as number))).toBeLessThan(1e-9);
    });
  });
});
