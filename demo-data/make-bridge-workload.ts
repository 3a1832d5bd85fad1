import { rng } from '../src/numerics/rng.ts';
import { csvText, exponential, nearlyNormal } from './draw.ts';

/** Invented: after each block of the bridge study the same 36 officers rate their workload on a scale from 0 to 100. */
const SEED = 7;

const OFFICERS = 36;
const alerts = ['tone', 'voice', 'seat pulse'];
const usual = [51, 45, 47];

/** Officers whose block was lost gave no rating of it. */
const missing = new Map([
  [14, 'tone'],
  [31, 'seat pulse'],
]);

/** The text of bridge-workload-wide.csv: one row per officer, one column per alert. */
export function makeBridgeWorkload(seed = SEED): string {
  const rows: (string | number | null)[][] = [];
  for (let officer = 1; officer <= OFFICERS; officer++) {
    const source = rng(seed).fork(officer);
    const level = 13 * nearlyNormal(source);
    const ratings = alerts.map((alert, i) => {
      const rating = (usual[i] as number) + level + 6 * nearlyNormal(source) + 6 * (exponential(source) - 1);
      return missing.get(officer) === alert ? null : Math.min(100, Math.max(0, Math.round(rating)));
    });
    rows.push([officer, officer % 2 === 0 ? 'refresher' : 'standard', ...ratings]);
  }
  return csvText(['officer', 'training', 'workload_tone', 'workload_voice', 'workload_seat_pulse'], rows);
}
