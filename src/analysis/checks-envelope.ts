import { fillNormal } from '../numerics/draws.ts';
import { quantileSorted } from '../numerics/order.ts';
import { rng } from '../numerics/rng.ts';
import { normalQuantile } from '../numerics/tails/normal.ts';
import { centre, type ResidualShape, residualDf } from './checks-residuals.ts';

/** Tells the share done and lets messages through; rejects when the work is to stop. */
export type Step = (share: number) => Promise<void>;

/** A band that normal residuals of the same design stay inside of as a whole in `level` of samples. */
export interface Envelope {
  /** Places in the ordered residuals that are looked at, ascending; every one, or evenly chosen where there are many. */
  readonly places: Int32Array;
  /** Expected place of each in SDs: the normal quantile of (place + 5/8) / (N + 1/4). */
  readonly expected: Float64Array;
  /** Limits of the ordered residuals, in SDs of the residuals. */
  readonly low: Float64Array;
  readonly high: Float64Array;
  readonly level: number;
  readonly simulations: number;
}

/** Stream of random numbers of the band; the other simulations of the checks have their own. */
const STREAM = 201;
const MOST_SIMULATIONS = 4000;
const FEWEST_SIMULATIONS = 500;
const MOST_DRAWS = 3e6;
const MOST_PLACES = 300;
/** Fewest residuals and degrees of freedom with a band of any use. */
const LEAST = 4;

/**
 * A simultaneous band for a normal quantile plot: the share of normal samples that leave it ANYWHERE is 1 - level.
 *
 * Samples of normal scores of this very design are centred and standardised as the residuals are; each place has its own
 * spread above and below its median, and one factor widens all of them alike until the band as a whole has its level.
 *
 * @param shape groups and columns of the design
 * @param options seed; level of the whole band (.95); step, told the share done
 * @returns the band in SDs; null for fewer than 4 residuals or degrees of freedom
 * @source Myllymaki, Mrkvicka, Grabarnik, Seijo & Hahn 2017, J. R. Stat. Soc. B 79, 381-404, directional quantile
 *   envelope: low_i = m_i - c (m_i - q.025_i), high_i = m_i + c (q.975_i - m_i), c = level quantile of the largest ratio
 * @checked theory: simultaneous coverage of fresh normal samples within 3.5 SE
 */
export async function normalEnvelope(
  shape: ResidualShape,
  options: { readonly seed: number; readonly level?: number; readonly step?: Step },
): Promise<Envelope | null> {
  const { seed, level = 0.95, step } = options;
  const size = shape.group.length * shape.columns;
  if (size < LEAST || residualDf(shape) < LEAST) return null;
  const simulations = Math.floor(Math.max(FEWEST_SIMULATIONS, Math.min(MOST_SIMULATIONS, MOST_DRAWS / size)));
  const places = placesOf(size);
  const drawn = new Float64Array(simulations * places.length);
  const random = rng(seed, STREAM);
  const sample = new Float64Array(size);
  for (let run = 0; run < simulations; run++) {
    fillNormal(sample, random.fork(run));
    standardise(sample, shape);
    for (let at = 0; at < places.length; at++) drawn[run * places.length + at] = sample[places[at] as number] as number;
    if (step !== undefined && run % 50 === 0) await step(run / simulations);
  }
  const { middle, below, above } = spreadOfPlaces(drawn, places.length);
  const factor = factorFor(level, drawn, { middle, below, above });
  return {
    places,
    expected: Float64Array.from(places, (place) => normalQuantile((place + 0.625) / (size + 0.25))),
    low: middle.map((value, at) => value - factor * (below[at] as number)),
    high: middle.map((value, at) => value + factor * (above[at] as number)),
    level,
    simulations,
  };
}

/**
 * Centres values as the design does, divides them by their SD and sorts them, in place.
 *
 * @param values participants x columns; overwritten (the one argument that is)
 * @param shape groups and columns of the design
 * @returns the same vector, ascending, in SDs of the residuals
 */
export function standardise(values: Float64Array, shape: ResidualShape): Float64Array {
  centre(values, shape);
  let squares = 0;
  for (let i = 0; i < values.length; i++) squares += (values[i] as number) ** 2;
  const sd = Math.sqrt(squares / residualDf(shape));
  for (let i = 0; i < values.length; i++) values[i] = (values[i] as number) / sd;
  return values.sort();
}

/**
 * Which places of ordered residuals lie outside a band.
 *
 * @param z ascending, in SDs, as many as the band was made for
 * @param band the envelope
 * @returns places into z
 */
export function placesOutside(z: Float64Array, band: Envelope): number[] {
  return Array.from(band.places).filter((place, at) => {
    const value = z[place] as number;
    return value < (band.low[at] as number) || value > (band.high[at] as number);
  });
}

/** Every place, or so many evenly spread ones; always both ends, and the same from either end. */
function placesOf(size: number): Int32Array {
  if (size <= MOST_PLACES) return Int32Array.from({ length: size }, (_, place) => place);
  const half = Array.from({ length: MOST_PLACES / 2 }, (_, at) => Math.floor((at * (size / 2)) / (MOST_PLACES / 2)));
  return Int32Array.from([...half, ...half.map((place) => size - 1 - place).reverse()]);
}

/** Median and reach to the outer 2.5 % of each place; a place and its mirror image share what was drawn for both. */
function spreadOfPlaces(drawn: Float64Array, places: number) {
  const runs = drawn.length / places;
  const [middle, below, above] = [0, 1, 2].map(() => new Float64Array(places)) as [
    Float64Array,
    Float64Array,
    Float64Array,
  ];
  const both = new Float64Array(2 * runs);
  for (let at = 0; at < Math.ceil(places / 2); at++) {
    const mirror = places - 1 - at;
    for (let run = 0; run < runs; run++) {
      both[run] = drawn[run * places + at] as number;
      both[runs + run] = -(drawn[run * places + mirror] as number);
    }
    both.sort();
    const [low, mid, high] = [0.025, 0.5, 0.975].map((p) => quantileSorted(both, p, 7)) as [number, number, number];
    [middle[at], below[at], above[at]] = [mid, mid - low, high - mid];
    [middle[mirror], below[mirror], above[mirror]] = [-mid, high - mid, mid - low];
  }
  return { middle, below, above };
}

function factorFor(
  level: number,
  drawn: Float64Array,
  { middle, below, above }: { middle: Float64Array; below: Float64Array; above: Float64Array },
): number {
  const places = middle.length;
  const largest = new Float64Array(drawn.length / places);
  for (let run = 0; run < largest.length; run++) {
    for (let at = 0; at < places; at++) {
      const off = (drawn[run * places + at] as number) - (middle[at] as number);
      const ratio = off > 0 ? off / (above[at] as number) : -off / (below[at] as number);
      if (ratio > (largest[run] as number)) largest[run] = ratio;
    }
  }
  largest.sort();
  return quantileSorted(largest, level, 6);
}
