import { mean, standardDeviation } from '../numerics/moments.ts';
import { type Envelope, normalEnvelope, placesOutside, type Step, standardise } from './checks-envelope.ts';
import { type InfluenceChecks, influenceChecks } from './checks-influence.ts';
import type { CheckLayout } from './checks-layout.ts';
import { type AdditivityChecks, additivityChecks, type OrderChecks, orderChecks } from './checks-order.ts';
import {
  type Departure,
  type LevelsAtSpread,
  levelsAtSpread,
  type SimulatedShare,
  shapePower,
  spreadPower,
} from './checks-power.ts';
import { byGroup, columnOf, differencesOf, participantMeans, type Residuals, residualsOf } from './checks-residuals.ts';
import { type ShapeChecks, type ShapeTestId, shapeChecks } from './checks-shape.ts';
import { type SphericityChecks, sphericityChecks } from './checks-sphericity.ts';
import { type SpreadChecks, spreadChecks } from './checks-spread.ts';

/** How the checks are made. */
export interface CheckOptions {
  /** Which test of shape is told with its power. */
  readonly test: ShapeTestId;
  /** Which departures are simulated at this n. */
  readonly departures: readonly Departure[];
  readonly alpha: number;
  readonly seed: number;
  /** Simulated studies of each departure; 1,000 where left out. */
  readonly runs?: number;
}

/** What is looked at, by design. */
export type CheckDesign = 'sample' | 'groups' | 'differences' | 'repeated';

/** Scores under one level as they are, for the description beside the differences. */
export interface LevelSpread {
  readonly level: string;
  readonly mean: number;
  readonly sd: number;
}

/** Everything the checks of one comparison came to; nothing in it chooses a test. */
export interface Checks {
  readonly design: CheckDesign;
  readonly layout: CheckLayout;
  readonly options: CheckOptions;
  readonly residuals: Residuals;
  /** Residuals in SDs, ascending; null where they do not vary. */
  readonly standard: Float64Array | null;
  /** Simultaneous band of `standard`, and the places outside of it; null where there is none. */
  readonly envelope: Envelope | null;
  readonly outside: readonly number[];
  /** Of the residuals; with three levels or more described only, since residuals of one participant hang together. */
  readonly shape: ShapeChecks;
  /** Of groups of participants, by what is compared between them; empty with one group. */
  readonly spreads: readonly { readonly what: 'scores' | 'differences' | 'means'; readonly checks: SpreadChecks }[];
  /** Scores under each level within participants; no test, the participants are the same. */
  readonly levels: readonly LevelSpread[];
  /** With three levels or more within participants. */
  readonly sphericity: SphericityChecks | null;
  readonly order: OrderChecks;
  readonly additivity: AdditivityChecks;
  readonly influence: InfluenceChecks;
  /** How often the tests would find each departure; null where they are not defined at this n. */
  readonly power: readonly { readonly departure: Departure; readonly found: SimulatedShare | null }[];
  /** Level of the tests of means at the sizes and SDs at hand; null with one group or without SDs. */
  readonly testLevels: LevelsAtSpread | null;
}

/**
 * Looks at what a comparison assumes, on the quantity that the assumption is about, and simulates what these checks could
 * have shown with so many participants.
 *
 * @param layout participants with their columns (checks-layout.ts)
 * @param options test, departures, alpha, seed
 * @param step told the share done, lets messages through
 * @returns all checks; what is not defined is null with a reason
 * @source methods 4: quantities by design, power of the checks, wording
 * @checked each part by its own tests; agrees with the reference case sleep
 */
export async function checkAssumptions(layout: CheckLayout, options: CheckOptions, step?: Step): Promise<Checks> {
  const { alpha, seed } = options;
  const level = 1 - alpha;
  const residuals = residualsOf(layout);
  const envelope = await normalEnvelope(residuals.shape, { seed, ...partOf(step, 0, 0.4) });
  const standard = residuals.sd === 0 ? null : standardise(residuals.values.slice(), residuals.shape);
  const spreads = spreadsOf(layout, level);
  const power = await powerOf(layout, options, step);
  return {
    design: designOf(layout),
    layout,
    options,
    residuals,
    standard,
    envelope: standard === null ? null : envelope,
    outside: standard === null || envelope === null ? [] : placesOutside(standard, envelope),
    shape: shapeChecks(residuals.values, level),
    spreads,
    levels: levelsOf(layout),
    sphericity: layout.columns.length < 3 ? null : sphericityChecks(layout, { level, test: options.test }),
    order: orderChecks(layout, residuals),
    additivity: additivityChecks(layout, residuals, level),
    influence: influenceChecks(layout, residuals),
    power,
    testLevels: await levelsOfTests(spreads[0]?.checks, options, step),
  };
}

function designOf(layout: CheckLayout): CheckDesign {
  if (layout.columns.length > 2) return 'repeated';
  if (layout.columns.length === 2) return 'differences';
  return layout.groups.length > 1 ? 'groups' : 'sample';
}

function levelsOf(layout: CheckLayout): LevelSpread[] {
  if (layout.columns.length < 2) return [];
  return layout.columns.map((level, column) => {
    const scores = columnOf(layout, column);
    return { level, mean: mean(scores), sd: standardDeviation(scores) };
  });
}

function spreadsOf(layout: CheckLayout, level: number): Checks['spreads'] {
  const groups = layout.groups.length;
  if (groups < 2) return [];
  const of = (what: 'scores' | 'differences' | 'means', values: Float64Array) => ({
    what,
    checks: spreadChecks(layout.groups, byGroup(values, layout.group, groups), level),
  });
  if (layout.columns.length === 1) return [of('scores', layout.values)];
  const means = of('means', participantMeans(layout));
  return layout.columns.length === 2 ? [of('differences', differencesOf(layout)), means] : [means];
}

async function powerOf(layout: CheckLayout, options: CheckOptions, step?: Step): Promise<Checks['power']> {
  const { alpha, seed, runs, test } = options;
  const shape = { group: layout.group, groups: layout.groups.length };
  const sizes = layout.groups.map((_, code) => layout.group.filter((each) => each === code).length);
  const power: { departure: Departure; found: SimulatedShare | null }[] = [];
  for (const [at, departure] of options.departures.entries()) {
    if (departure === 'spread' && sizes.length < 2) continue;
    const from = 0.4 + (0.5 * at) / options.departures.length;
    const settings = {
      alpha,
      seed,
      ...(runs === undefined ? {} : { runs }),
      ...partOf(step, from, 0.5 / options.departures.length),
    };
    const found =
      departure === 'spread' ? await spreadPower(sizes, settings) : await shapePower(test, departure, shape, settings);
    power.push({ departure, found });
  }
  return power;
}

/** Most scores drawn for the levels; with more of them fewer studies settle the same digits. */
const MOST_DRAWS = 2e6;

async function levelsOfTests(
  spread: SpreadChecks | undefined,
  options: CheckOptions,
  step?: Step,
): Promise<LevelsAtSpread | null> {
  if (spread?.ratio == null) return null;
  const sizes = spread.groups.map(({ n }) => n);
  const all = sizes.reduce((sum, n) => sum + n, 0);
  const runs = Math.floor(Math.max(200, Math.min(2 * (options.runs ?? 1000), MOST_DRAWS / all)));
  return levelsAtSpread(
    sizes,
    spread.groups.map(({ sd }) => sd as number),
    { alpha: options.alpha, seed: options.seed, runs, ...partOf(step, 0.9, 0.1) },
  );
}

/** A step whose share is a part of the whole. */
function partOf(step: Step | undefined, from: number, share: number): { readonly step?: Step } {
  return step === undefined ? {} : { step: (own) => step(from + share * own) };
}
