import type { Result } from '../../src/analysis/compare.ts';
import { addRelabelCounts, type RateRow, type Rates, ruleChoices } from '../../src/analysis/error-rates.ts';
import { addCounts, type Cleaning, METHODS, type SimulationSpec } from '../../src/analysis/simulate.ts';
import { exactLevelTwoGroups } from '../../src/numerics/simulation/exact-level.ts';
import { type Env, numberOf, Refusal } from '../kind.ts';
import type { RatesSettings } from './sentence.ts';

/** Runs of one job; the parts depend on nothing else, so that any number of workers gives the same. */
const PART = { relabel: 100, simulate: 250 } as const;

const CLEANING: Readonly<Record<Cleaning, string>> = {
  none: 'nobody set aside',
  across: 'set aside across conditions',
  within: 'set aside within conditions',
};

/** Runs a job for each part and keeps the order of the parts. */
function parts<T>(runs: number, size: number, run: (from: number, to: number) => Promise<T>): Promise<T[]> {
  const starts = Array.from({ length: Math.ceil(runs / size) }, (_, index) => index * size);
  return Promise.all(starts.map((from) => run(from, Math.min(runs, from + size))));
}

/** Relabels the data through the whole chain. */
export async function relabelled(settings: RatesSettings, result: Result, env: Env): Promise<Rates> {
  const spec = { measure: settings.measure, cutoff: numberOf(settings.cutoff) ?? 2.5 };
  const counts = addRelabelCounts(
    await parts(settings.runs, PART.relabel, (from, to) => env.run('relabelRates', { result, spec, from, to })),
  );
  const choices = ruleChoices(result, spec);
  const rows: RateRow[] = choices.map(({ label }, i) => ({
    label,
    cleaning: '',
    judged: counts.judged[i] ?? 0,
    rejected: counts.rejected[i] ?? 0,
    intervals: 0,
    covered: 0,
  }));
  const inBest = choices.filter((each) => each.inBest).length;
  rows.push({
    label: `the best of no cutoff and ${inBest - 1} cutoffs`,
    cleaning: '',
    judged: counts.relabellings,
    rejected: counts.best,
    intervals: 0,
    covered: 0,
  });
  const { alpha } = result.comparison;
  return { mode: 'relabel', runs: settings.runs, alpha, difference: 0, rows, aside: null, exact: null };
}

/** The experiments a sentence states. */
export function simulationOf(settings: RatesSettings, result: Result, seed: number): SimulationSpec {
  if (result.scope !== 'within' && result.scope !== 'between') {
    throw new Refusal(
      'Experiments are simulated for two conditions: two groups, or pairs. Compare two conditions above, or relabel these data.',
    );
  }
  const { scope, comparison } = result;
  const first = need(settings.first);
  const cutoff = numberOf(settings.cutoff);
  return {
    scope,
    shape: settings.shape,
    n: [first, scope === 'within' ? first : need(settings.second)],
    spread: [need(settings.ratio), 1],
    difference: need(settings.difference),
    equal: settings.equal,
    own: scope === 'within' ? need(settings.own) / 100 : 0,
    rule: cutoff === null ? null : { measure: settings.measure, cutoff },
    alpha: comparison.alpha,
    trim: comparison.trim > 0 ? comparison.trim : 20,
    resamples: settings.resamples,
    seed,
  };
}

function need(value: RatesSettings['first']): number {
  const number = numberOf(value);
  if (number === null) throw new Refusal('A number is missing in the sentence above. Fill it in.');
  return number;
}

/** Simulates experiments like this one. */
export async function simulatedRates(settings: RatesSettings, result: Result, env: Env): Promise<Rates> {
  const spec = simulationOf(settings, result, env.seed);
  const counts = addCounts(
    await parts(settings.runs, PART.simulate, (from, to) => env.run('simulate', { spec, from, to })),
  );
  const names = new Map(METHODS[spec.scope]);
  const exact = spec.scope === 'between' && spec.shape === 'normal' && spec.difference === 0;
  const [n1, n2] = spec.n;
  const [sd1, sd2] = spec.spread;
  return {
    mode: 'simulate',
    runs: settings.runs,
    alpha: spec.alpha,
    difference: spec.difference,
    rows: counts.methods
      .filter((each) => each.judged > 0)
      .map(({ method, cleaning, judged, rejected, intervals, covered }) => {
        return {
          label: names.get(method) ?? method,
          cleaning: CLEANING[cleaning],
          judged,
          rejected,
          intervals,
          covered,
        };
      }),
    aside: spec.rule === null ? null : [counts.aside[0] / counts.scores, counts.aside[1] / counts.scores],
    exact: exact ? exactLevelTwoGroups({ n1, n2, sd1, sd2, alpha: spec.alpha }) : null,
  };
}
