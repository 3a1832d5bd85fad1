import { bootstrapTwoGroups } from '../../src/numerics/bootstrap.ts';
import type { BenchRow } from './bench-row.ts';
import { asked, compareInTurns } from './in-turns.ts';
import { pythonServer, rServer } from './line-server.ts';
import { benchScores } from './scores.ts';

const N = 25;

/** Bootstrap-t for the difference of two 20 % trimmed means (Yuen), 25 + 25. */
export async function rows(): Promise<BenchRow[]> {
  const python = pythonServer();
  const r = rServer();
  const all: BenchRow[] = [];
  const x = benchScores(N);
  const y = benchScores(2 * N, 0.5).subarray(N);
  const noPython = 'skipped: no Python with NumPy, SciPy and pandas here';
  const absentR = 'skipped: no R with the package boot here';
  try {
    for (const B of [2_000, 10_000]) {
      const options = { trim: 20, B, seed: 1, method: 't-symmetric', level: 0.95 } as const;
      all.push(
        ...(await compareInTurns('B2', `n=25+25 B=${B}`, () => bootstrapTwoGroups(x, y, 'trimmed-mean', options), [
          python === null
            ? { name: 'NumPy, sort', goal: 5, absent: noPython }
            : asked(python, 'NumPy, sort', `bootstrap_t_numpy ${N} ${B}`, 5),
          python === null
            ? { name: 'scipy.stats.ttest_ind on each', goal: 8, absent: noPython }
            : asked(python, 'scipy.stats.ttest_ind on each', `bootstrap_t_scipy ${N} ${B}`, 8),
          r === null
            ? { name: 'R loop', goal: 100, absent: absentR }
            : asked(r, 'R loop', `bootstrap_t_r ${N} ${B}`, 100),
        ])),
      );
    }
  } finally {
    python?.close();
    r?.close();
  }
  return all;
}
