/** What a comparison comes to, by what it asks. */
import { type AskedOmnibus, isOmnibus, sidesOf } from '../../src/analysis/asked.ts';
import type { ComparisonSpec, Result } from '../../src/analysis/compare.ts';
import { peopleIn, takeLayout } from '../../src/analysis/layout.ts';
import { fittingOmnibusRows } from '../../src/analysis/omnibus.ts';
import { labelsOf, pipelineNumbers, rerunsOf, withPipeline } from '../../src/analysis/pipeline.ts';
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
  const result = isOmnibus(effect)
    ? await computeLevels(comparison, effect, scores, withheld, env)
    : await computeSides(comparison, scores, withheld, env);
  return withheld ? rerunPlanned(result, env) : result;
}

/** Parts the re-runs are cut into, each a job. */
const PARTS = 8;

/** Gives the planned row p and interval from re-runs of the rules, where the comparison has labels to exchange. */
async function rerunPlanned(result: Result, env: Env): Promise<Result> {
  const { scores, comparison, findings, planned } = result;
  const finding = findings[planned];
  if (!finding || finding.estimate === null || finding.cautions.includes('R22')) return result;
  if (labelsOf(scores.design, comparison) === null) return result;
  const B = rerunsOf(comparison);
  const edges = Array.from({ length: PARTS + 1 }, (_, i) => Math.floor((i * B) / PARTS));
  let done = 0;
  const run = async (purpose: 'relabel' | 'resample') => {
    const parts = edges.slice(1).map(async (to, i) => {
      const part = await env.run('pipeline', { scores, comparison, purpose, from: edges[i] ?? 0, to });
      env.progress(++done / (2 * PARTS));
      return part;
    });
    return Float64Array.from((await Promise.all(parts)).flatMap((part) => [...part]));
  };
  const [relabelled, resampled] = await Promise.all([run('relabel'), run('resample')]);
  const numbers = pipelineNumbers(scores, comparison, relabelled, resampled);
  const rerun = withPipeline(finding, numbers, B, 1 - comparison.alpha);
  return { ...result, findings: findings.map((each, index) => (index === planned ? rerun : each)) };
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
  const base = { ...own, trim: trimOf(numberOf(settings.trim) ?? 0), seed };
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

/** @throws Refusal where nothing, or less than nothing, would be left to average (R3) */
function trimOf(trim: number): number {
  if (Number.isInteger(trim) && trim >= 0 && trim < 50) return trim;
  throw new Refusal(`A trim of ${trim} % at each end cannot be computed. Give a whole number from 0 to 25.`);
}
