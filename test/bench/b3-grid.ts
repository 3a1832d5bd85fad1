import { Relabeller, type RelabelPlan } from '../../src/analysis/relabel.ts';
import { middleOf, RelabelledGroups } from '../../src/numerics/relabel-groups.ts';
import { fenceLimits } from '../../src/numerics/rules/iqr-fences.ts';
import { madLimits } from '../../src/numerics/rules/mad.ts';
import { zScoreLimits } from '../../src/numerics/rules/z-score.ts';
import { benchScores } from './scores.ts';

/** Trims of the rows, percent at each end: Welch's test and five of Yuen's. */
export const TRIMS = [0, 5, 10, 15, 20, 25];

/** Scores of 2 x n participants with those outside a rule's limits taken out: no rule, then cutoffs of three distances. */
export function keptSets(n: number, rules: number): Float64Array[] {
  const x = benchScores(2 * n);
  const limits = [
    ...Array.from({ length: 13 }, (_, i) => madLimits(x, { cutoff: 1.5 + i / 4 })),
    ...Array.from({ length: 13 }, (_, i) => zScoreLimits(x, { cutoff: 1.5 + i / 4 })),
    ...Array.from({ length: 13 }, (_, i) => fenceLimits(x, { k: 0.5 + i / 4, quartiles: 'type7' })),
  ];
  const within = (score: number, { lower, upper }: (typeof limits)[number]) =>
    (lower === null || score >= lower) && (upper === null || score <= upper);
  return [x, ...limits.slice(0, rules - 1).map((each) => x.map((score) => (within(score, each) ? score : Number.NaN)))];
}

/** Two groups of n, labels drawn `total` times. */
function planOf(n: number, total: number): RelabelPlan {
  const halves = Uint8Array.from({ length: 2 * n }, (_, i) => (i < n ? 0 : 1));
  return {
    scope: 'between',
    factor: 'group',
    levels: Int32Array.of(0, 1),
    units: Int32Array.from({ length: 2 * n }, (_, i) => i),
    blocks: 1,
    observed: halves,
    canonical: halves,
    pools: [Int32Array.from({ length: 2 * n }, (_, i) => i)],
    ways: Infinity,
    enumerated: false,
    total,
    seed: 1,
  };
}

/**
 * Joint permutation over rules x {raw, log} x trims: for each relabelling the median raw estimate, the average Z, the
 * share significant and the largest |Z|, and how often each reaches that of the data.
 */
export function jointGrid(n: number, rules: number, relabellings: number): number[] {
  const rows = TRIMS.map((trim) => ({ row: 'yuen', trim }) as const);
  const sets = keptSets(n, rules).flatMap((scores) => [scores, scores.map(Math.log)]);
  const kernels = sets.map((scores) => new RelabelledGroups(scores, rows));
  const estimates = new Float64Array(kernels.length * rows.length);
  const z = new Float64Array(estimates.length);
  const raw = new Float64Array(estimates.length / 2);
  const rawPlaces = Int32Array.from(raw, (_, s) => Math.floor(s / rows.length) * 2 * rows.length + (s % rows.length));
  const run = (labels: Uint8Array): number[] => {
    for (let i = 0; i < kernels.length; i++) kernels[i]?.run(labels, estimates, z, i * rows.length);
    let sum = 0;
    let above = 0;
    let below = 0;
    let most = 0;
    for (let s = 0; s < z.length; s++) {
      const value = z[s] as number;
      sum += value;
      if (value >= 1.959963984540054) above++;
      if (value <= -1.959963984540054) below++;
      if (Math.abs(value) > most) most = Math.abs(value);
    }
    for (let s = 0; s < raw.length; s++) raw[s] = estimates[rawPlaces[s] as number] as number;
    return [Math.abs(middleOf(raw)), Math.abs(sum / z.length), Math.max(above, below) / z.length, most];
  };
  const plan = planOf(n, relabellings);
  const relabeller = new Relabeller(plan);
  const observed = run(plan.observed);
  const counts = observed.map(() => 0);
  for (let index = 0; index < relabellings; index++) {
    run(relabeller.labels(index)).forEach((value, i) => {
      if (value >= (observed[i] as number)) counts[i] = (counts[i] as number) + 1;
    });
  }
  return counts.map((count) => (1 + count) / (1 + relabellings));
}
