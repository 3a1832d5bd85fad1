import { type BootstrapMethod, bootstrapOneSample } from '../../src/numerics/bootstrap.ts';
import type { BenchRow } from './bench-row.ts';
import { asked, compareInTurns } from './in-turns.ts';
import { type LineServer, pythonServer, rServer } from './line-server.ts';
import { benchScores } from './scores.ts';

const sizes = [40, 400, 16_000];
const resamples = [2_000, 10_000];
const numpyWays = ['sort', 'partition', 'rank sort'];

type Peers = Parameters<typeof compareInTurns>[3];

function pythonPeers(python: LineServer | null, n: number, B: number, corrected: number): Peers {
  const scipyGoal = n <= 400 ? 8 : 5;
  if (python === null) {
    const absent = 'skipped: no Python with NumPy, SciPy and pandas here';
    return [
      { name: 'NumPy', goal: 5, absent },
      { name: 'scipy.stats.bootstrap', goal: scipyGoal, absent },
    ];
  }
  return [
    ...numpyWays.map((way, i) => asked(python, `NumPy, ${way}`, `bootstrap_numpy ${n} ${B} ${i} ${corrected}`, 5)),
    asked(python, 'scipy.stats.bootstrap', `bootstrap_scipy ${n} ${B} ${corrected}`, scipyGoal),
  ];
}

function rPeer(r: LineServer | null, n: number, B: number, corrected: number): Peers {
  if (r === null) return [{ name: 'R boot', goal: 20, absent: 'skipped: no R with the package boot here' }];
  if (corrected === 1 && B <= n) {
    return [{ name: 'R boot', goal: 20, absent: 'skipped: its BCa interval wants more resamples than scores' }];
  }
  return [asked(r, 'R boot', `bootstrap_boot ${n} ${B} ${corrected}`, 20)];
}

function caseRows(python: LineServer | null, r: LineServer | null, n: number, B: number, method: BootstrapMethod) {
  const x = benchScores(n);
  const corrected = method === 'bca' ? 1 : 0;
  const work = () => bootstrapOneSample(x, 'trimmed-mean', { trim: 20, B, seed: 1, method, level: 0.95 });
  return compareInTurns('B1', `n=${n} B=${B} ${method === 'bca' ? 'BCa' : 'percentile'}`, work, [
    ...pythonPeers(python, n, B, corrected),
    ...rPeer(r, n, B, corrected),
  ]);
}

/** Bootstrap of a 20 % trimmed mean: percentile and BCa interval. */
export async function rows(): Promise<BenchRow[]> {
  const python = pythonServer();
  const r = rServer();
  const all: BenchRow[] = [];
  try {
    for (const n of sizes) {
      for (const B of resamples) {
        for (const method of ['percentile', 'bca'] as const) all.push(...(await caseRows(python, r, n, B, method)));
      }
    }
  } finally {
    python?.close();
    r?.close();
  }
  return all;
}
