import { cautionText } from '../../src/analysis/cautions.ts';
import { choiceBlank, choicesBlank } from '../blanks.ts';
import type { Blank, Context, Option, Part } from '../kind.ts';
import { alphaText } from '../numbers.ts';
import {
  type AssumptionsSettings,
  DEPARTURES,
  type Factors,
  FITTED_KS,
  factorsOf,
  hasGroups,
  TESTS,
} from './settings.ts';

/** Between a factor's name and its level in an option's value; neither can contain it. */
const SEPARATOR = '\u0000';

/**
 * "Check what the comparison of [voice] with [tone], [all officers together], assumes, and how often [Shapiro-Wilk] at
 * [alpha .05] would find [an exponential population, a t with 3 df, 10 % contamination] with so many participants."
 */
export function assumptionsSentence(settings: AssumptionsSettings, context: Context): Part[] {
  const factors = factorsOf(context) ?? [];
  const groups = hasGroups(settings, factors);
  return [
    'Check what the comparison of ',
    firstBlank(settings, factors),
    ...(settings.first === '' ? [] : [' with ', secondBlank(settings, factors)]),
    ...byParts(settings, factors),
    ' assumes, and how often ',
    testBlank(settings),
    ...(groups && settings.departures.includes('spread') ? [' or, for the SD, Brown\u2013Forsythe'] : []),
    ' at ',
    alphaBlank(settings),
    ' would find ',
    departuresBlank(settings, groups),
    ' with so many participants.',
  ];
}

function firstBlank(settings: AssumptionsSettings, factors: Factors): Blank {
  const many = factors.length > 1;
  const options: Option[] = factors.flatMap((factor) => [
    ...factor.levels.map((level) => ({
      value: factor.name + SEPARATOR + level,
      label: level,
      ...(many ? { hint: `${factor.name}, ${factor.scope} participants` } : {}),
    })),
    everyOption(factor),
  ]);
  const none = { value: SEPARATOR, label: 'all scores with a fixed value', hint: 'one sample' };
  const value = settings.factor + SEPARATOR + settings.first;
  const offered = factors.length === 0 ? [none] : options;
  return choiceBlank({ key: 'first', label: 'first condition' }, value, offered, 'which', (chosen) => {
    const [name = '', first = ''] = chosen.split(SEPARATOR);
    const factor = factors.find((each) => each.name === name);
    const kept = name === settings.factor && settings.second !== first && settings.second !== '';
    const other = kept ? settings.second : (factor?.levels.find((level) => level !== first) ?? '');
    return {
      ...settings,
      factor: name,
      first,
      second: first === '' ? '' : other,
      by: settings.by === name ? '' : settings.by,
    };
  });
}

function everyOption(factor: Factors[number]): Option {
  const option = { value: factor.name + SEPARATOR, label: `every ${factor.name}` };
  return factor.levels.length > 2
    ? { ...option, hint: factor.scope === 'within' ? 'sphericity with it' : 'all groups' }
    : { ...option, refused: `${factor.name} has two levels only: choose one of them` };
}

function secondBlank(settings: AssumptionsSettings, factors: Factors): Blank {
  const factor = factors.find((each) => each.name === settings.factor);
  const options = (factor?.levels ?? [])
    .filter((level) => level !== settings.first)
    .map((level) => ({ value: level, label: level }));
  return choiceBlank({ key: 'second', label: 'second condition' }, settings.second, options, 'which', (second) => ({
    ...settings,
    second,
  }));
}

/** Offered only where participants differ by something that is not compared. */
function byParts(settings: AssumptionsSettings, factors: Factors): Part[] {
  const others = factors.filter((factor) => factor.scope === 'between' && factor.name !== settings.factor);
  if (others.length === 0 && settings.by === '') return [];
  const options: Option[] = [
    { value: '', label: 'all participants together' },
    ...others.map(({ name }) => ({
      value: name,
      label: `apart by ${name}`,
      hint: 'residuals and spreads of each group, for a design with both',
    })),
  ];
  const blank = choiceBlank(
    { key: 'by', label: 'groups kept apart' },
    settings.by,
    options,
    'together or apart',
    (by) => ({ ...settings, by }),
  );
  return [', ', blank, ','];
}

function testBlank(settings: AssumptionsSettings): Blank {
  const options: Option[] = [
    ...Object.entries(TESTS).map(([value, label]) => ({ value, label })),
    { value: FITTED_KS, label: 'Kolmogorov\u2013Smirnov against the fitted curve', refused: cautionText('R7', {}) },
  ];
  return choiceBlank({ key: 'test', label: 'test of shape' }, settings.test, options, 'which test', (test) => ({
    ...settings,
    test,
  }));
}

function departuresBlank(settings: AssumptionsSettings, groups: boolean): Blank {
  const options = Object.entries(DEPARTURES).map(([value, label]) => ({
    value,
    label,
    ...(value === 'spread' && !groups ? { refused: 'there is one group only, and its spread stands alone' } : {}),
  }));
  const shown = settings.departures.filter((each) => groups || each !== 'spread');
  const labels = shown.map((each) => DEPARTURES[each as keyof typeof DEPARTURES] ?? each);
  const blank = choicesBlank(
    { key: 'departures', label: 'departures that are simulated' },
    settings.departures,
    options,
    { prompt: 'no named departure', atLeast: 0 },
    (departures) => ({ ...settings, departures }),
  );
  return { ...blank, shown: labels.length === 0 ? 'no named departure' : listed(labels) };
}

function alphaBlank(settings: AssumptionsSettings): Blank {
  const options = [0.1, 0.05, 0.01, 0.005, 0.001].map((value) => ({
    value: String(value),
    label: alphaText(value),
    hint: `${Number((100 * (1 - value)).toFixed(2))} % intervals`,
  }));
  return choiceBlank({ key: 'alpha', label: 'alpha' }, String(settings.alpha), options, '\u03b1', (alpha) => ({
    ...settings,
    alpha: Number(alpha),
  }));
}

function listed(words: readonly string[]): string {
  return words.length < 2 ? (words[0] ?? '') : `${words.slice(0, -1).join(', ')} or ${words.at(-1)}`;
}
