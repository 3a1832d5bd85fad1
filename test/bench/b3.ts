import { jointGrid, TRIMS } from './b3-grid.ts';
import type { BenchRow } from './bench-row.ts';
import { asked, compareInTurns } from './in-turns.ts';
import { type LineServer, pythonServer, rServer } from './line-server.ts';

const N = 40;

/** Rules and relabellings: the goal's case, a quarter of the specifications, a fifth of the relabellings. */
const cases: readonly (readonly [number, number])[] = [
  [40, 1000],
  [10, 1000],
  [40, 200],
];

/** A peer is asked for fewer relabellings, and its time is taken that many times: a loop would run for minutes. */
function fewer(
  server: LineServer | null,
  name: string,
  ask: string,
  {
    rules,
    relabellings,
    few,
    goal,
    absent,
  }: { rules: number; relabellings: number; few: number; goal: number; absent: string },
) {
  if (server === null) return { name, goal, absent };
  const peer = asked(server, `${name}, ${few} relabellings`, `${ask} ${N} ${rules} ${few}`, goal);
  return { ...peer, run: async () => (await peer.run()) * (relabellings / few) };
}

/** Joint permutation over rules x {raw, log} x six trims, two groups of 40. */
export async function rows(): Promise<BenchRow[]> {
  const python = pythonServer();
  const r = rServer();
  const noPython = 'skipped: no Python with NumPy, SciPy and pandas here';
  const all: BenchRow[] = [];
  try {
    for (const [rules, relabellings] of cases) {
      const name = `2 x ${N}, ${rules * 2 * TRIMS.length} specifications, ${relabellings} relabellings`;
      const numpy =
        python === null
          ? { name: 'NumPy, sorted once', goal: 2, absent: noPython }
          : asked(python, 'NumPy, sorted once', `joint_grid_numpy ${N} ${rules} ${relabellings}`, 2);
      const own = { rules, relabellings };
      const scipy = fewer(python, 'scipy.stats loop', 'joint_grid_scipy', {
        ...own,
        few: 1,
        goal: 1000,
        absent: noPython,
      });
      const noR = 'skipped: no R with the package boot here';
      const loop = fewer(r, 'R loop', 'joint_grid_r', { ...own, few: 10, goal: 100, absent: noR });
      all.push(...(await compareInTurns('B3', name, () => jointGrid(N, rules, relabellings), [numpy, scipy, loop])));
    }
  } finally {
    python?.close();
    r?.close();
  }
  return all;
}
