import { cautionText } from '../../src/analysis/cautions.ts';
import type { CheckTarget } from '../../src/analysis/checks-layout.ts';
import type { Departure } from '../../src/analysis/checks-power.ts';
import type { ShapeTestId } from '../../src/analysis/checks-shape.ts';
import type { Scores } from '../../src/analysis/score.ts';
import type { Context } from '../kind.ts';

export type AssumptionsSettings = {
  /** Name of the factor; empty for the scores of one sample. */
  readonly factor: string;
  /** The two levels; both empty for every level. */
  readonly first: string;
  readonly second: string;
  /** A between factor whose groups stay apart; empty for none. */
  readonly by: string;
  /** The test of shape that is told with its power. */
  readonly test: string;
  readonly departures: readonly string[];
  readonly alpha: number;
};

export type Factors = Scores['design']['factors'];

/** Tests of shape that may be told. */
export const TESTS: Readonly<Record<ShapeTestId, string>> = {
  'shapiro-wilk': 'Shapiro\u2013Wilk',
  lilliefors: 'Lilliefors',
  'anderson-darling': 'Anderson\u2013Darling',
};

/** Named in a list but refused: the distance with tables for a curve fixed beforehand (R7). */
export const FITTED_KS = 'kolmogorov-smirnov';

/** Departures as they stand in sentences. */
export const DEPARTURES: Readonly<Record<Departure, string>> = {
  exponential: 'an exponential population',
  t3: 'a t with 3 df',
  contaminated: '10 % contamination',
  spread: 'twice the SD',
};

/** The factors of the scores above, as far as they have been computed. */
export function factorsOf(context: Context): Factors | undefined {
  return (context.given.scores as Scores | undefined)?.design.factors;
}

/** What the settings look at. */
export function targetOf({ factor, first, second, by }: AssumptionsSettings): CheckTarget {
  return { factor, levels: first === '' ? [] : [first, second], by };
}

/** Whether groups of participants are compared, or kept apart. */
export function hasGroups(settings: AssumptionsSettings, factors: Factors): boolean {
  return settings.by !== '' || factors.find((each) => each.name === settings.factor)?.scope === 'between';
}

/** The first pair, as a new comparison has it. */
export function defaultSettings(context: Context): AssumptionsSettings {
  const factor = factorsOf(context)?.[0];
  return {
    factor: factor?.name ?? '',
    first: factor?.levels[1] ?? '',
    second: factor?.levels[0] ?? '',
    by: '',
    test: 'shapiro-wilk',
    departures: Object.keys(DEPARTURES),
    alpha: 0.05,
  };
}

/** Sentences about wrong or missing settings. */
export function checkSettings(settings: AssumptionsSettings, context: Context): string[] {
  const factors = factorsOf(context);
  const { factor, first, second, test, departures } = settings;
  if (factors !== undefined && factors.length > 0 && factor === '') return ['Say which comparison is looked at.'];
  if ((first === '') !== (second === '')) return ['Say which two conditions are compared.'];
  if (test === FITTED_KS) return [`Kolmogorov\u2013Smirnov against the fitted curve: ${cautionText('R7', {})}`];
  if (!Object.hasOwn(TESTS, test)) return ['Say by which test the shape is told.'];
  const unknown = departures.find((each) => !Object.hasOwn(DEPARTURES, each));
  return unknown === undefined ? [] : [`No departure is called "${unknown}". Choose the departures again.`];
}
