import { type SimulationSpec, simulate } from '../../src/analysis/simulate.ts';
import type { BenchRow } from './bench-row.ts';
import { asked, compareInTurns } from './in-turns.ts';
import { type LineServer, pythonServer, rServer } from './line-server.ts';

const EXPERIMENTS = 5000;
const spec: SimulationSpec = {
  scope: 'between',
  shape: 'normal',
  n: [20, 20],
  spread: [1, 1],
  difference: 0,
  equal: 'means',
  own: 0,
  rule: null,
  alpha: 0.05,
  trim: 20,
  resamples: 599,
  seed: 1,
};

/** A peer is asked for fewer experiments, and its time is taken that many times: a loop would run for an hour. */
function fewer(
  server: LineServer | null,
  name: string,
  ask: string,
  goal: number,
  experiments: number,
  absent: string,
) {
  if (server === null) return { name, goal, absent };
  const peer = asked(server, `${name}, ${experiments} experiments`, `${ask} ${experiments} ${spec.resamples}`, goal);
  return { ...peer, run: async () => (await peer.run()) * (EXPERIMENTS / experiments) };
}

/** Error rates of eight tests, 20 + 20 normal scores, 599 resamples and relabellings in each of 5,000 experiments. */
export async function rows(): Promise<BenchRow[]> {
  const python = pythonServer();
  const r = rServer();
  const noPython = 'skipped: no Python with NumPy, SciPy and pandas here';
  const work = { pause: async () => undefined, progress: () => undefined };
  try {
    return await compareInTurns(
      'B4',
      `20+20, ${EXPERIMENTS} experiments, 8 tests`,
      () => simulate(spec, 0, EXPERIMENTS, work),
      [
        fewer(python, 'NumPy', 'error_rates_numpy', 20, 200, noPython),
        fewer(python, 'scipy.stats', 'error_rates_scipy', 40, 50, noPython),
        fewer(r, 'R loop', 'error_rates_r', 500, 5, 'skipped: no R with the package boot here'),
      ],
    );
  } finally {
    python?.close();
    r?.close();
  }
}
