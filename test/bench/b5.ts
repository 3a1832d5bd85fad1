import { declareDesign } from '../../src/analysis/design.ts';
import { applyRule } from '../../src/analysis/exclusion.ts';
import type { ExtremeRule } from '../../src/analysis/rules.ts';
import { scoreDesign } from '../../src/analysis/score.ts';
import type { BenchRow } from './bench-row.ts';
import { asked, compareInTurns } from './in-turns.ts';
import { pythonServer } from './line-server.ts';
import { trialRoles, trialSizes, trialTable } from './trials.ts';

const rule: ExtremeRule = {
  rule: 'extreme',
  on: 'trial',
  column: 'ms',
  measure: 'MAD',
  cutoff: 2.5,
  scope: 'participant',
  sides: 'both',
};

/** Design, exclusion beyond 2.5 MAD within participant, and 20 % trimmed scores, from the table on. */
export async function rows(): Promise<BenchRow[]> {
  const python = pythonServer();
  const all: BenchRow[] = [];
  try {
    for (const { rows: count, people } of trialSizes) {
      const table = trialTable(count, people);
      const work = () =>
        scoreDesign(applyRule(declareDesign(table, trialRoles), rule).design, { statistic: 'trimmed mean', trim: 20 });
      const peer =
        python === null
          ? { name: 'pandas', goal: 1, absent: 'skipped: no Python with NumPy, SciPy and pandas here' }
          : asked(python, 'pandas', `rule_scores_pandas ${count} ${people}`, 1);
      all.push(...(await compareInTurns('B5', `${count} rows`, work, [peer])));
    }
  } finally {
    python?.close();
  }
  return all;
}
