import type { ClaimSpec } from '../../src/analysis/claim.ts';
import { type ComparisonSpec, compareRow, type Result } from '../../src/analysis/compare.ts';
import { declareDesign, type Roles } from '../../src/analysis/design.ts';
import { estimatorOf } from '../../src/analysis/estimators.ts';
import { applyRules } from '../../src/analysis/exclusion.ts';
import type { LongWork } from '../../src/analysis/flip-set.ts';
import type { Rule } from '../../src/analysis/rules.ts';
import { takeSamples } from '../../src/analysis/samples.ts';
import { scoreDesign } from '../../src/analysis/score.ts';
import { tableOf } from './tables.ts';

/** Work that never has to stop. */
export const atOnce: LongWork = { pause: async () => undefined, progress: () => undefined };

const comparison: ComparisonSpec = {
  factor: 'condition',
  first: 'a',
  second: 'b',
  estimator: 'paired-t',
  trim: 0,
  alternative: 'two-sided',
  alpha: 0.05,
  resamples: 199,
  seed: 7,
};

/** "a is higher than b", by any amount. */
export const aHigher: ClaimSpec = { first: 'a', relation: 'higher', second: 'b', margin: 0, title: '' };

/** A comparison of a with b by its planned row, with its chain, from a table of participant, condition and score. */
export function resultOf(
  columns: {
    readonly who: readonly string[];
    readonly condition: readonly string[];
    readonly score: readonly number[];
  },
  scope: 'within' | 'between',
  spec: Partial<ComparisonSpec> = {},
  rules: readonly Rule[] = [],
): Result {
  const roles: Roles = {
    participant: 'who',
    within: scope === 'within' ? ['condition'] : [],
    between: scope === 'between' ? ['condition'] : [],
    outcome: 'score',
    unit: 'ms',
    direction: 'neither',
    rows: 'one score',
  };
  const design = applyRules(declareDesign(tableOf(columns), roles), rules);
  const scores = scoreDesign(design, { statistic: 'mean', trim: 0 });
  const all = { ...comparison, ...spec };
  const samples = takeSamples(scores, 'condition', all.first, all.second);
  const estimator = estimatorOf(all.estimator);
  if (estimator === undefined) throw new Error(`no row ${all.estimator}`);
  const planned = compareRow(estimator, {
    samples,
    comparison: all,
    unit: 'ms',
    direction: 'neither',
    withheld: false,
  });
  return {
    scores,
    comparison: all,
    scope: samples.scope,
    findings: [planned],
    planned: 0,
    left: samples.left,
  };
}

/** Pairs: participant i has x[i] under a and y[i] under b. */
export function pairsOf(
  x: readonly number[],
  y: readonly number[],
  spec: Partial<ComparisonSpec> = {},
  rules: readonly Rule[] = [],
) {
  const who = x.map((_, i) => `p${i + 1}`);
  return resultOf(
    { who: [...who, ...who], condition: [...x.map(() => 'a'), ...y.map(() => 'b')], score: [...x, ...y] },
    'within',
    spec,
    rules,
  );
}

/** Two groups, a and b. */
export function groupsOf(
  x: readonly number[],
  y: readonly number[],
  spec: Partial<ComparisonSpec> = {},
  rules: readonly Rule[] = [],
) {
  return resultOf(
    {
      who: [...x.map((_, i) => `a${i + 1}`), ...y.map((_, i) => `b${i + 1}`)],
      condition: [...x.map(() => 'a'), ...y.map(() => 'b')],
      score: [...x, ...y],
    },
    'between',
    { estimator: 'welch', ...spec },
    rules,
  );
}
