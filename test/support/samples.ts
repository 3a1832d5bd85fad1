import { readFileSync } from 'node:fs';
import type { CompareArgs, ComparisonSpec } from '../../src/analysis/compare.ts';
import { declareDesign } from '../../src/analysis/design.ts';
import type { Finding } from '../../src/analysis/finding.ts';
import { type Samples, takeSamples } from '../../src/analysis/samples.ts';
import { scoreDesign } from '../../src/analysis/score.ts';
import { tableOf } from './tables.ts';

/** Columns of a reference data set, numbers where every cell is one. */
export function csv(name: string): Record<string, (number | string)[]> {
  const lines = readFileSync(new URL(`../reference/cases/${name}.csv`, import.meta.url), 'utf8')
    .trim()
    .split(/\r?\n/);
  const names = (lines[0] ?? '').split(',');
  const rows = lines.slice(1).map((line) => line.split(','));
  return Object.fromEntries(
    names.map((each, column) => {
      const values = rows.map((row) => row[column] ?? '');
      return [each, values.every((value) => Number.isFinite(Number(value))) ? values.map(Number) : values];
    }),
  );
}

const spec: ComparisonSpec = {
  factor: 'f',
  first: 'a',
  second: 'b',
  estimator: 'trimmed-differences',
  trim: 20,
  alternative: 'two-sided',
  alpha: 0.05,
  resamples: 1999,
  seed: 7,
};

/** What a comparison of two samples needs. */
export function args(samples: Samples, comparison: Partial<ComparisonSpec> = {}): CompareArgs {
  return { samples, comparison: { ...spec, ...comparison }, unit: 'h', direction: 'higher', withheld: false };
}

/** The row of an estimator. */
export function row(findings: readonly Finding[], estimator: string): Finding {
  const found = findings.find((each) => each.estimator === estimator);
  if (!found) throw new Error(`no row ${estimator}`);
  return found;
}

const sleepColumns = csv('sleep');
/** Cushny & Peebles 1905: ten patients, extra hours of sleep under two drugs (reference case sleep). */
export const sleep = declareDesign(tableOf(sleepColumns), {
  participant: 'subject',
  within: ['drug'],
  between: [],
  outcome: 'extra_hours',
  unit: 'h',
  direction: 'higher',
  rows: 'one score',
});
export const sleepSamples = takeSamples(scoreDesign(sleep, { statistic: 'mean', trim: 0 }), 'drug', 'drug2', 'drug1');

const tooth = csv('tooth_growth');
/** Crampton 1947: tooth growth by supplement, dose ignored (reference case tooth_growth). */
export const toothSamples: Samples = {
  scope: 'between',
  factor: 'supplement',
  first: 'OJ',
  second: 'VC',
  x: groupOf('OJ'),
  y: groupOf('VC'),
  xParticipants: [],
  yParticipants: [],
  left: [],
};

function groupOf(level: string): Float64Array {
  const [name] = Object.entries(tooth).find(([, values]) => values.includes(level)) ?? [''];
  const [outcome] = Object.entries(tooth).find(([key]) => /len/.test(key)) ?? [''];
  return Float64Array.from((tooth[outcome] ?? []).filter((_, i) => tooth[name]?.[i] === level) as number[]);
}
