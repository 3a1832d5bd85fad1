import { oneWayAnova } from '../numerics/anova/one-way.ts';
import { fillContaminated, fillExponential, fillNormal } from '../numerics/draws.ts';
import { leveneTest } from '../numerics/levene.ts';
import { type Rng, rng } from '../numerics/rng.ts';
import { welchAnova } from '../numerics/welch-anova.ts';
import type { Step } from './checks-envelope.ts';
import { centre } from './checks-residuals.ts';
import { type ShapeTestId, shapeTest } from './checks-shape.ts';

/** Departures that a check is tried on: three shapes, and a spread. */
export type Departure = 'exponential' | 't3' | 'contaminated' | 'spread';

/** A share of simulated studies. */
export interface SimulatedShare {
  readonly share: number;
  /** Monte Carlo standard error. */
  readonly se: number;
  readonly runs: number;
}

/** Who stands in which group. */
export interface GroupShape {
  readonly group: Int32Array;
  readonly groups: number;
}

/** Simulated studies of each departure. */
export const RUNS = 1000;
/** Simulated studies for the level of the tests at the SDs at hand. */
export const LEVEL_RUNS = 2000;
/** Streams of random numbers, one each. */
const STREAMS = { exponential: 211, t3: 212, contaminated: 213, spread: 214, levels: 215 } as const;

/**
 * How often a test of shape comes out below alpha when the population has a named other shape.
 *
 * @param test which test
 * @param departure the shape of every score: exponential, t with 3 df, or 10 % of a normal one with three times the SD
 * @param shape groups of the study at hand; their means are taken out, as they are of the residuals
 * @param options alpha, seed, runs (1,000), step (told the share done)
 * @returns share of studies with its standard error; null where the test is not defined at this n
 * @source simulation; methods 4.4
 * @checked agrees with methods 4.4, within 3.5 SE
 */
export async function shapePower(
  test: ShapeTestId,
  departure: Exclude<Departure, 'spread'>,
  shape: GroupShape,
  options: PowerOptions,
): Promise<SimulatedShare | null> {
  const { alpha, seed, runs = RUNS, step } = options;
  const sample = new Float64Array(shape.group.length);
  const random = rng(seed, STREAMS[departure]);
  let found = 0;
  for (let run = 0; run < runs; run++) {
    fillDeparture(sample, departure, random.fork(run));
    const { p } = shapeTest(test, centre(sample, { ...shape, columns: 1 }));
    // Anderson and Darling's p has no formula far out, where it is beyond doubt small.
    if (p === null && test !== 'anderson-darling') return null;
    if (p === null || p <= alpha) found++;
    if (step !== undefined && run % 25 === 0) await step(run / runs);
  }
  return shareOf(found, runs);
}

export interface PowerOptions {
  readonly alpha: number;
  readonly seed: number;
  readonly runs?: number;
  readonly step?: Step;
}

/** Fills a vector with a named departure; scale and centre do not matter to the checks. */
function fillDeparture(out: Float64Array, departure: Exclude<Departure, 'spread'>, random: Rng): void {
  if (departure === 'exponential') fillExponential(out, random);
  else if (departure === 'contaminated') fillContaminated(out, random, 0.1, 3);
  else fillT3(out, random);
}

/** Student's t with 3 degrees of freedom: a normal draw over the root of the mean of three squared ones. */
function fillT3(out: Float64Array, random: Rng): void {
  const normals = new Float64Array(4 * out.length);
  fillNormal(normals, random);
  for (let i = 0; i < out.length; i++) {
    const [z, a, b, c] = normals.subarray(4 * i, 4 * i + 4) as unknown as [number, number, number, number];
    out[i] = z / Math.sqrt((a * a + b * b + c * c) / 3);
  }
}

/**
 * How often Brown and Forsythe's test comes out below alpha when the smallest group (the first of them) has an SD `ratio`
 * times that of the others, all scores normal.
 *
 * @param sizes participants of each group, two groups or more
 * @param ratio of SDs (2)
 * @param options alpha, seed, runs (1,000), step
 * @returns share of studies with its standard error; null where the test is not defined at these sizes
 * @source simulation; methods 4.4
 * @checked agrees with methods 4.4, within 3.5 SE
 */
export async function spreadPower(
  sizes: readonly number[],
  options: PowerOptions & { readonly ratio?: number },
): Promise<SimulatedShare | null> {
  const { alpha, seed, runs = RUNS, step, ratio = 2 } = options;
  const least = sizes.indexOf(Math.min(...sizes));
  const random = rng(seed, STREAMS.spread);
  let found = 0;
  for (let run = 0; run < runs; run++) {
    const groups = normalGroups(
      sizes,
      sizes.map((_, at) => (at === least ? ratio : 1)),
      random.fork(run),
    );
    const { p } = leveneTest(groups, { center: 'median' });
    if (p === null) return null;
    if (p <= alpha) found++;
    if (step !== undefined && run % 25 === 0) await step(run / runs);
  }
  return shareOf(found, runs);
}

/** How often the tests of equal means come out below alpha although the means are equal. */
export interface LevelsAtSpread {
  /** One spread for all: Student's t, with more groups the classical F. */
  readonly pooled: SimulatedShare;
  /** Spreads apart: Welch. */
  readonly welch: SimulatedShare;
}

/**
 * The level of the tests of means when group sizes and SDs are those at hand, scores normal, means equal.
 *
 * @param sizes participants of each group, two groups or more, each at least 2
 * @param sds of each group, above 0
 * @param options alpha, seed, runs (2,000), step
 * @returns shares of studies in which each test rejects
 * @source simulation; exact values for two groups in methods 5.1
 * @checked agrees with methods 4.3, 10 and 30 with SDs 2 to 1, within 3.5 SE
 */
export async function levelsAtSpread(
  sizes: readonly number[],
  sds: readonly number[],
  options: PowerOptions,
): Promise<LevelsAtSpread> {
  const { alpha, seed, runs = LEVEL_RUNS, step } = options;
  const random = rng(seed, STREAMS.levels);
  let [pooled, welch] = [0, 0];
  for (let run = 0; run < runs; run++) {
    const groups = normalGroups(sizes, sds, random.fork(run));
    if ((oneWayAnova(groups).p ?? 1) <= alpha) pooled++;
    if ((welchAnova(groups).p ?? 1) <= alpha) welch++;
    if (step !== undefined && run % 25 === 0) await step(run / runs);
  }
  return { pooled: shareOf(pooled, runs), welch: shareOf(welch, runs) };
}

function normalGroups(sizes: readonly number[], sds: readonly number[], random: Rng): Float64Array[] {
  return sizes.map((n, at) => {
    const own = new Float64Array(n);
    fillNormal(own, random);
    return own.map((z) => z * (sds[at] as number));
  });
}

function shareOf(found: number, runs: number): SimulatedShare {
  const share = found / runs;
  return { share, se: Math.sqrt((share * (1 - share)) / runs), runs };
}
