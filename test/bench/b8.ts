import { shapiroWilk } from '../../src/numerics/checks/shapiro-wilk.ts';
import { hodgesLehmannPaired, hodgesLehmannShift } from '../../src/numerics/hodges-lehmann.ts';
import { mannWhitney } from '../../src/numerics/mann-whitney.ts';
import { theilSen } from '../../src/numerics/regression/theil-sen.ts';
import { signedRankTest } from '../../src/numerics/wilcoxon.ts';
import type { BenchRow } from './bench-row.ts';
import { asked, compareInTurns, inTurns, ours } from './in-turns.ts';
import { pythonServer } from './line-server.ts';
import { benchScores } from './scores.ts';

/** Goal for the exact test of 100 against 100, ms. */
const EXACT = 10;

interface Work {
  readonly name: string;
  readonly peer: string;
  readonly line: string;
  readonly run: () => unknown;
}

function pairOf(n: number): [Float64Array, Float64Array] {
  return [benchScores(n), benchScores(2 * n).subarray(n)];
}

function works(): Work[] {
  const work = (name: string, peer: string, line: string, run: () => unknown): Work => ({ name, peer, line, run });
  const sized = [50, 1000].flatMap((n) => {
    const [x, y] = pairOf(n);
    return [
      work(`Shapiro-Wilk, n = ${n}`, 'scipy.stats.shapiro', `shapiro_scipy ${n}`, () => shapiroWilk(x)),
      work(`Theil-Sen with interval, n = ${n}`, 'scipy.stats.theilslopes', `theil_sen_scipy ${n}`, () =>
        theilSen(x, y),
      ),
      work(`Hodges-Lehmann of one sample, n = ${n}`, 'NumPy, all pairs', `walsh_numpy ${n}`, () =>
        hodgesLehmannPaired(x),
      ),
      work(`Hodges-Lehmann shift, ${n} + ${n}`, 'NumPy, all pairs', `shift_numpy ${n}`, () => hodgesLehmannShift(x, y)),
    ];
  });
  const [a, b] = pairOf(20);
  const ranks = work('exact Mann-Whitney, 20 + 20', 'scipy.stats.mannwhitneyu', 'mann_whitney_scipy 20', () =>
    mannWhitney(a, b),
  );
  const d = benchScores(50, -0.7);
  const signed = work('exact signed-rank, n = 50', 'scipy.stats.wilcoxon', 'signed_rank_scipy 50', () =>
    signedRankTest(d),
  );
  return [...sized, ranks, signed];
}

/** Rank tests, Shapiro-Wilk, Theil-Sen and Hodges-Lehmann estimates. */
export async function rows(): Promise<BenchRow[]> {
  const python = pythonServer();
  const all: BenchRow[] = [];
  try {
    for (const { name, peer, line, run } of works()) {
      const beside =
        python === null
          ? { name: peer, goal: 1, absent: 'skipped: no Python with NumPy, SciPy and pandas here' }
          : asked(python, peer, line, 1);
      all.push(...(await compareInTurns('B8', name, run, [beside])));
    }
    // The peer takes more than a minute for this one: the goal is a time of ours.
    const [x, y] = pairOf(100);
    const [ms = 0] = await inTurns([ours(() => mannWhitney(x, y))]);
    const name = 'exact Mann-Whitney, 100 + 100';
    all.push({ id: 'B8', case: name, ours_ms: ms, peer: '-', peer_ms: null, ratio: null, goal: `<= ${EXACT} ms` });
  } finally {
    python?.close();
  }
  return all;
}
