import type { Finding } from './finding.ts';
import { type Rule, readsCondition } from './rules.ts';

/** Whether the rules split the conditions under test, so that textbook p and interval are withheld (methods R2). */
export function withholdsTextbook(rules: readonly Rule[], rows: 'one score' | 'several trials'): boolean {
  return rules.some(
    (rule) =>
      rule.rule === 'extreme' &&
      rule.cutoff !== null &&
      readsCondition(rule) &&
      (rule.scope === 'condition' || rows === 'one score'),
  );
}

/** A row with everything taken back that a rule reading the condition makes wrong; the estimate stays. */
export function withheldFinding(finding: Finding): Finding {
  return {
    ...finding,
    reason: 'p and interval withheld: an exclusion rule above looks at each condition separately',
    se: null,
    df: null,
    ...(finding.df2 === undefined ? {} : { df2: null }),
    statistic: null,
    p: null,
    interval: null,
    effects: finding.effects.map((effect) => ({ ...effect, interval: null, reason: 'withheld with the interval' })),
    cautions: [...finding.cautions, 'R2'],
  };
}
