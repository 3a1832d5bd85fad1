/** What a comparison comes to, by what it asks. */
import { type AskedOmnibus, isOmnibus, sidesOf } from '../../src/analysis/asked.ts';
import type { ComparisonSpec, Result } from '../../src/analysis/compare.ts';
import { peopleIn, takeLayout } from '../../src/analysis/layout.ts';
import { fittingOmnibusRows } from '../../src/analysis/omnibus.ts';
import { type Samples, samplesFor } from '../../src/analysis/samples.ts';
import type { Scores } from '../../src/analysis/score.ts';
import { withholdsTextbook } from '../../src/analysis/withhold.ts';
import { type Env, numberOf, Refusal } from '../kind.ts';
import { questionWords } from './question.ts';
import { askedOf, type ComparisonSettings } from './settings.ts';

/** Runs every fitting row, and what re-running the rules gives the planned one where a rule reads the condition. */
export async function computeComparison(settings: ComparisonSettings, scores: Scores, env: Env): Promise<Result> {
  const comparison = specOf(settings, scores, env.seed);
  const { effect } = comparison;
  const { rules, roles } = scores.design;
  const withheld = effect?.type !== 'value' && withholdsTextbook(rules, roles.rows);
  return isOmnibus(effect)
    ? computeLevels(comparison, effect, scores, withheld, env)
    : computeSides(comparison, scores, withheld, env);
}

async function computeSides(comparison: ComparisonSpec, scores: Scores, withheld: boolean, env: Env): Promise<Result> {
  const samples = samplesFor(scores, comparison);
  refuseEmpty(samples);
  const { unit, direction } = scores.design.roles;
  const findings = await env.run('compare', { samples, comparison, unit, direction, withheld });
  const planned = findings.findIndex((finding) => finding.estimator === comparison.estimator);
  return { scores, comparison, scope: samples.scope, findings, planned, left: samples.left };
}

async function computeLevels(
  comparison: ComparisonSpec,
  asked: AskedOmnibus,
  scores: Scores,
  withheld: boolean,
  env: Env,
): Promise<Result> {
  const layout = takeLayout(scores, asked);
  if (peopleIn(layout) === 0) {
    throw new Refusal(
      'Nobody is left with a score under every condition compared, so there is nothing to compare. Look at the rules above, or at the missing combinations.',
    );
  }
  const rows = fittingOmnibusRows(scores.design.factors, asked).map((row) => row.id);
  const { findings, levels, pairs } = await env.run('levels', { layout, asked, comparison, rows, withheld });
  const planned = findings.findIndex((finding) => finding.estimator === comparison.estimator);
  return { scores, comparison, scope: 'omnibus', findings, planned, left: layout.left, levels, pairs };
}

function specOf(settings: ComparisonSettings, scores: Scores, seed: number): ComparisonSpec {
  const { effect: _, ...own } = settings;
  const base = { ...own, trim: numberOf(settings.trim) ?? 0, seed };
  const asked = askedOf(settings, numberOf);
  if (asked === undefined) return base;
  const factor = asked.type === 'contrast' || asked.type === 'levels' ? asked.factor : '';
  const [first, second] =
    asked.type === 'contrast' || asked.type === 'value'
      ? sidesOf(asked, scores.design.roles.unit)
      : [settings.effect ? questionWords(settings.effect, scores.design.factors) : '', ''];
  return { ...base, factor, effect: asked, first, second, ...(isOmnibus(asked) ? { alternative: 'two-sided' } : {}) };
}

function refuseEmpty(samples: Samples): void {
  const empty = samples.parts?.find((part) => part.scores.length === 0)?.level;
  const side = samples.x.length === 0 ? samples.first : samples.y.length === 0 ? samples.second : undefined;
  const condition = empty ?? side;
  if (condition === undefined) return;
  throw new Refusal(
    `Nobody is left with a score under ${condition}, so there is nothing to compare. Look at the rules above, or at the missing combinations.`,
  );
}
