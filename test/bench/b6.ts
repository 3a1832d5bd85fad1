import { declareDesign } from '../../src/analysis/design.ts';
import { applyRule } from '../../src/analysis/exclusion.ts';
import type { ExtremeRule } from '../../src/analysis/rules.ts';
import { scoreDesign } from '../../src/analysis/score.ts';
import type { BenchRow } from './bench-row.ts';
import { asked, compareInTurns } from './in-turns.ts';
import { pythonServer } from './line-server.ts';
import { trialRoles, trialSizes, trialTable } from './trials.ts';

/** One frame at 60 a second. */
const FRAME = 16.7;

function ruleWith(cutoff: number): ExtremeRule {
  return { rule: 'extreme', on: 'trial', column: 'ms', measure: 'MAD', cutoff, scope: 'participant', sides: 'both' };
}

/** One step of the cutoff of B5 on a design that is there already, to the new scores. */
export async function rows(): Promise<BenchRow[]> {
  const python = pythonServer();
  const all: BenchRow[] = [];
  try {
    for (const { rows: count, people } of trialSizes) {
      const design = declareDesign(trialTable(count, people), trialRoles);
      let step = 0;
      const work = () => {
        step = (step + 1) % 10;
        return scoreDesign(applyRule(design, ruleWith(2.5 + step / 10)).design, {
          statistic: 'trimmed mean',
          trim: 20,
        });
      };
      const peer =
        python === null
          ? { name: 'pandas', goal: 50, absent: 'skipped: no Python with NumPy, SciPy and pandas here' }
          : asked(python, 'pandas', `rule_step_pandas ${count} ${people}`, 50);
      const found = await compareInTurns('B6', `${count} rows`, work, [peer]);
      all.push(...found);
      if (count < 1_000_000) continue;
      const own = found[0]?.ours_ms ?? null;
      all.push({
        id: 'B6',
        case: `${count} rows within a frame`,
        ours_ms: own,
        peer: '-',
        peer_ms: null,
        ratio: null,
        goal: `<= ${FRAME} ms`,
      });
    }
  } finally {
    python?.close();
  }
  return all;
}
