import { describe, expect, test } from 'vitest';
import { repeatedMeasuresAnova } from '../../../src/numerics/anova/repeated-measures.ts';
import { fillNormal } from '../../../src/numerics/draws.ts';
import { rng } from '../../../src/numerics/rng.ts';
import { fenceLimits } from '../../../src/numerics/rules/iqr-fences.ts';
import { madLimits } from '../../../src/numerics/rules/mad.ts';
import { zScoreLimits } from '../../../src/numerics/rules/z-score.ts';
import { countFor } from '../../support/long-run.ts';

type LimitsOf = (x: Float64Array) => { readonly lower: number | null; readonly upper: number | null };

// Methods 5.5: chance that someone of n = 10, 20, 50, 100 normal scores is flagged.
const flagging: [string, LimitsOf, number[]][] = [
  ['1.5 IQR', (x) => fenceLimits(x, { k: 1.5, quartiles: 'type7' }), [0.277, 0.305, 0.404, 0.547]],
  ['2.2 IQR', (x) => fenceLimits(x, { k: 2.2, quartiles: 'type7' }), [0.115, 0.085, 0.068, 0.067]],
  ['3 IQR', (x) => fenceLimits(x, { k: 3, quartiles: 'type7' }), [0.047, 0.019, 0.006, 0.003]],
  ['2.5 MAD', (x) => madLimits(x, { cutoff: 2.5 }), [0.322, 0.374, 0.524, 0.706]],
  ['3 MAD', (x) => madLimits(x, { cutoff: 3 }), [0.198, 0.196, 0.233, 0.311]],
  ['2.5 SD', (x) => zScoreLimits(x, { cutoff: 2.5 }), [0.008, 0.129, 0.44, 0.739]],
  ['3 SD', (x) => zScoreLimits(x, { cutoff: 3 }), [0, 0.011, 0.083, 0.206]],
];
/** Runs behind the reference are not stated; its three decimals bound its error at what 40,000 give. */
const REFERENCE_RUNS = 40_000;

function near(count: number, runs: number, reference: number): void {
  const variance = Math.max(reference * (1 - reference), 1 / runs);
  const se = Math.sqrt(variance / runs + variance / REFERENCE_RUNS);
  expect(Math.abs(count / runs - reference)).toBeLessThan(3.5 * se + 0.0005);
}

describe('methods 5.5', () => {
  test.each(flagging)(
    'agrees with 5.5, someone beyond %s in clean normal samples (seed 55)',
    (_, limitsOf, reference) => {
      const runs = countFor(600, 20_000);
      [10, 20, 50, 100].forEach((n, which) => {
        const draw = rng(55, n);
        const x = new Float64Array(n);
        let flagged = 0;
        for (let i = 0; i < runs; i++) {
          fillNormal(x, draw);
          const { lower, upper } = limitsOf(x);
          if (x.some((score) => (lower !== null && score < lower) || (upper !== null && score > upper))) flagged++;
        }
        near(flagged, runs, reference[which] ?? NaN);
      });
    },
  );
});

interface Structure {
  readonly n: number;
  readonly sd: readonly number[];
  readonly rho: number;
  /** AR(1) where true, else the same correlation everywhere. */
  readonly serial: boolean;
  /** Uncorrected, Greenhouse-Geisser, Huynh-Feldt, lower bound. */
  readonly rates: readonly [number, number, number, number];
}

// Methods 5.7, four levels, 40,000 runs.
const structures: [string, Structure][] = [
  ['epsilon 1', { n: 10, sd: [1, 1, 1, 1], rho: 0.5, serial: false, rates: [0.05, 0.035, 0.046, 0.007] }],
  ['epsilon .7245', { n: 20, sd: [1, 1, 1, 1], rho: 0.8, serial: true, rates: [0.066, 0.047, 0.052, 0.017] }],
  ['epsilon .5034', { n: 20, sd: [1, 1, 2, 4], rho: 0.5, serial: false, rates: [0.091, 0.052, 0.056, 0.033] }],
  ['epsilon .3716', { n: 20, sd: [1, 1, 1, 6], rho: 0.3, serial: false, rates: [0.106, 0.05, 0.051, 0.044] }],
];

/** Scores of four levels: from one draw to the next (serial), or about a level of the participant's own. */
function draw({ n, sd, rho, serial }: Structure, random: ReturnType<typeof rng>): Float64Array[] {
  const z = Array.from({ length: 5 }, () => new Float64Array(n));
  for (const each of z) fillNormal(each, random);
  const [common, ...rest] = z as [Float64Array, ...Float64Array[]];
  let before = rest[0] as Float64Array;
  return rest.map((own, level) => {
    const x = own.map((score, i) => {
      if (!serial) return Math.sqrt(rho) * (common[i] as number) + Math.sqrt(1 - rho) * score;
      return level === 0 ? score : rho * (before[i] as number) + Math.sqrt(1 - rho * rho) * score;
    });
    before = x;
    return x.map((score) => (sd[level] as number) * score);
  });
}

describe('methods 5.7', () => {
  test.each(structures)('agrees with 5.7, level of repeated measures, %s (seed 57)', (_, structure) => {
    const runs = countFor(800, 20_000);
    const random = rng(57, structure.n);
    const rejected = [0, 0, 0, 0];
    for (let i = 0; i < runs; i++) {
      const found = repeatedMeasuresAnova(draw(structure, random));
      [found.p, found.pGg, found.pHf, found.pLb].forEach((p, which) => {
        if ((p ?? 1) <= 0.05) rejected[which] = (rejected[which] ?? 0) + 1;
      });
    }
    structure.rates.forEach((rate, which) => {
      near(rejected[which] ?? 0, runs, rate);
    });
  });
});
