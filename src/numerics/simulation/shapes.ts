/** THE LIST of shapes a simulated score can have: how it is drawn, and its mean, median and trimmed mean. */
import { fillContaminated, fillExponential, fillLognormal, fillNormal } from '../draws.ts';
import { portableExp } from '../exp-log.ts';
import type { Rng } from '../rng.ts';
import { chiSquareQuantile } from '../tails/chi-square.ts';
import { gaussLegendre } from '../tails/gauss-legendre.ts';
import { normalLower, normalQuantile } from '../tails/normal.ts';

export type ShapeId =
  | 'normal'
  | 't3'
  | 'lognormal'
  | 'exponential'
  | 'ex-gaussian'
  | 'contaminated'
  | 'g-and-h'
  | 'chi-square-3'
  | 'mixture';

export interface Shape {
  readonly id: ShapeId;
  /** In a sentence: "normal", "t with 3 df". */
  readonly name: string;
  /** What it stands for: one short line. */
  readonly hint: string;
  readonly symmetric: boolean;
  fill(out: Float64Array, random: Rng): void;
  readonly mean: number;
  /** Value below which a share of the scores lies; null where the shape is symmetric about its mean. */
  readonly quantile: ((share: number) => number) | null;
}

const G = 0.5;
const H = 0.1;
const TAU = 2;

/** Squares of three normal draws each, summed. */
function fillChiSquare3(out: Float64Array, random: Rng): void {
  const z = new Float64Array(3 * out.length);
  fillNormal(z, random);
  for (let i = 0; i < out.length; i++) {
    const [a, b, c] = [z[3 * i] as number, z[3 * i + 1] as number, z[3 * i + 2] as number];
    out[i] = a * a + b * b + c * c;
  }
}

function fillT3(out: Float64Array, random: Rng): void {
  const squares = new Float64Array(out.length);
  fillChiSquare3(squares, random);
  fillNormal(out, random);
  for (let i = 0; i < out.length; i++) out[i] = (out[i] as number) / Math.sqrt((squares[i] as number) / 3);
}

function fillExGaussian(out: Float64Array, random: Rng): void {
  const tail = new Float64Array(out.length);
  fillExponential(tail, random);
  fillNormal(out, random);
  for (let i = 0; i < out.length; i++) out[i] = (out[i] as number) + TAU * (tail[i] as number);
}

function gAndH(z: number): number {
  return ((portableExp(G * z) - 1) / G) * portableExp((H * z * z) / 2);
}

function fillGAndH(out: Float64Array, random: Rng): void {
  fillNormal(out, random);
  for (let i = 0; i < out.length; i++) out[i] = gAndH(out[i] as number);
}

/** One in twenty scores lies about 5. */
function fillMixture(out: Float64Array, random: Rng): void {
  fillNormal(out, random);
  for (let i = 0; i < out.length; i++) if (random.uniform() < 0.05) out[i] = (out[i] as number) + 5;
}

/** The value at which a rising function reaches a share, between two bounds. */
function inverted(lower: (x: number) => number, low: number, high: number): (share: number) => number {
  return (share) => {
    let [from, to] = [low, high];
    for (let step = 0; step < 60; step++) {
      const middle = (from + to) / 2;
      if (lower(middle) < share) from = middle;
      else to = middle;
    }
    return (from + to) / 2;
  };
}

function exGaussianLower(x: number): number {
  return normalLower(x) - Math.exp(1 / (2 * TAU * TAU) - x / TAU) * normalLower(x - 1 / TAU);
}

/** Every shape, in the order offered. */
export const SHAPES: readonly Shape[] = [
  { id: 'normal', name: 'normal', hint: 'SD 1', symmetric: true, fill: fillNormal, mean: 0, quantile: null },
  {
    id: 't3',
    name: 't with 3 df',
    hint: 'long tails on both sides, SD 1.73',
    symmetric: true,
    fill: fillT3,
    mean: 0,
    quantile: null,
  },
  {
    id: 'lognormal',
    name: 'lognormal',
    hint: 'long tail upwards, SD of the logs 1',
    symmetric: false,
    fill: fillLognormal,
    mean: Math.exp(0.5),
    quantile: (share) => Math.exp(normalQuantile(share)),
  },
  {
    id: 'exponential',
    name: 'exponential',
    hint: 'tail upwards, SD 1',
    symmetric: false,
    fill: fillExponential,
    mean: 1,
    quantile: (share) => -Math.log1p(-share),
  },
  {
    id: 'ex-gaussian',
    name: 'ex-Gaussian',
    hint: 'as response times often are: normal with SD 1 plus exponential with mean 2',
    symmetric: false,
    fill: fillExGaussian,
    mean: TAU,
    quantile: inverted(exGaussianLower, -10, 60),
  },
  {
    id: 'contaminated',
    name: 'contaminated normal',
    hint: 'one score in ten has ten times the spread',
    symmetric: true,
    fill: (out, random) => fillContaminated(out, random),
    mean: 0,
    quantile: null,
  },
  {
    id: 'g-and-h',
    name: 'g-and-h',
    hint: 'skewed with long tails, g .5, h .1',
    symmetric: false,
    fill: fillGAndH,
    mean: (Math.exp((G * G) / (2 * (1 - H))) - 1) / (G * Math.sqrt(1 - H)),
    quantile: (share) => gAndH(normalQuantile(share)),
  },
  {
    id: 'chi-square-3',
    name: 'chi-square with 3 df',
    hint: 'tail upwards, SD 2.45',
    symmetric: false,
    fill: fillChiSquare3,
    mean: 3,
    quantile: (share) => chiSquareQuantile(share, 3),
  },
  {
    id: 'mixture',
    name: 'normal with 5 % far up',
    hint: 'one score in twenty lies 5 SD higher',
    symmetric: false,
    fill: fillMixture,
    mean: 0.25,
    quantile: inverted((x) => 0.95 * normalLower(x) + 0.05 * normalLower(x - 5), -10, 20),
  },
];

/**
 * The shape of that id.
 * @param id id of the list
 * @returns its drawing and parameters
 * @throws RangeError when there is none
 * @source the list above
 * @checked by hand
 */
export function shapeOf(id: ShapeId): Shape {
  const found = SHAPES.find((shape) => shape.id === id);
  if (found === undefined) throw new RangeError(`*id* must be a shape of the list; got ${id}`);
  return found;
}

/**
 * Population trimmed mean of a shape.
 * @param shape a shape of the list
 * @param trim percentage trimmed at EACH end, 0 to 49
 * @returns mean of the middle 100 - 2 trim percent, in the shape's unit; the mean where nothing is trimmed
 * @source m = int Q(u) du / (1 - 2 trim) from trim to 1 - trim, Gauss-Legendre with 200 nodes
 * @checked by hand: exponential and lognormal in closed form, 1e-9
 */
export function populationTrimmedMean(shape: Shape, trim: number): number {
  if (trim === 0 || shape.quantile === null) return shape.mean;
  const { nodes, weights } = gaussLegendre(200);
  const half = 0.5 - trim / 100;
  let total = 0;
  for (let i = 0; i < nodes.length; i++)
    total += (weights[i] as number) * shape.quantile(0.5 + half * (nodes[i] as number));
  return total / 2;
}
