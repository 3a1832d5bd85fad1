import { type PairProcedure, proceduresFor, setWords } from '../../src/analysis/asked.ts';
import type { Scores } from '../../src/analysis/score.ts';
import { choiceBlank, choicesBlank, numberBlank } from '../blanks.ts';
import type { Blank, Context, Part } from '../kind.ts';
import { alphaText } from '../numbers.ts';
import { questionBlank } from './question.ts';
import { type ComparisonSettings, type EffectSettings, type Factors, rowOfId, rowsFor } from './settings.ts';

/**
 * "Compare [voice] with [tone] on the [20 %] [trimmed mean of differences], [two-sided], at [alpha .05]."
 * "Compare [every alert] on the [20 %] [trimmed means], with all pairs by [Holm], at [alpha .05]."
 */
export function comparisonSentence(settings: ComparisonSettings, context: Context): Part[] {
  const scores = context.given.scores as Scores | undefined;
  // While scores are veiled or not there yet, the design above still names its levels.
  const design = scores?.design ?? context.design;
  const factors = design?.factors ?? [];
  const planned = rowOfId(settings.estimator);
  const omnibus = settings.effect?.type === 'levels' || settings.effect?.type === 'interaction';
  return [
    ...questionParts(settings, factors, context, design?.roles.unit ?? ''),
    ' on the ',
    ...(planned?.trims ? [trimBlank(settings, context), ' '] : []),
    plannedBlank(settings, factors),
    ...(planned?.resampled ? [', with ', resamplesBlank(settings), ' resamples'] : []),
    ...pairParts(settings, factors),
    ...(omnibus ? [] : [', ', alternativeBlank(settings)]),
    ', at ',
    alphaBlank(settings),
    '.',
  ];
}

function questionParts(settings: ComparisonSettings, factors: Factors, context: Context, unit: string): Part[] {
  const question = questionBlank(settings, factors);
  const { effect } = settings;
  if (effect === undefined) return ['Compare ', question, ' with ', secondBlank(settings, factors)];
  if (effect.type === 'contrast') {
    const side = (key: 'first' | 'second') => sideBlank(settings, effect, factors, key);
    return ['Compare, among ', question, ', ', side('first'), ' with ', side('second')];
  }
  if (effect.type !== 'value') return ['Compare ', question];
  const value = numberBlank(
    { key: 'value', label: 'value the scores are compared with' },
    effect.value,
    context,
    { min: -1e9, max: 1e9, step: 1, unit },
    (chosen) => ({ ...settings, effect: { ...effect, value: chosen } }),
  );
  return ['Compare ', question, ' with ', value];
}

function secondBlank(settings: ComparisonSettings, factors: Factors): Blank {
  const factor = factors.find((each) => each.name === settings.factor);
  const options = (factor?.levels ?? [])
    .filter((level) => level !== settings.first)
    .map((level) => ({ value: level, label: level }));
  return choiceBlank({ key: 'second', label: 'second condition' }, settings.second, options, 'which', (second) => ({
    ...settings,
    second,
  }));
}

/** One side of a contrast; a level taken here leaves the other side. */
function sideBlank(
  settings: ComparisonSettings,
  effect: Extract<EffectSettings, { type: 'contrast' }>,
  factors: Factors,
  key: 'first' | 'second',
): Blank {
  const other = key === 'first' ? 'second' : 'first';
  const levels = factors.find((factor) => factor.name === effect.factor)?.levels ?? effect[key];
  const blank = choicesBlank(
    { key: `${key}-levels`, label: `levels on the ${key} side` },
    effect[key],
    levels.map((level) => ({ value: level, label: level })),
    { prompt: 'which levels', atLeast: 1 },
    (values) => ({
      ...settings,
      effect: { ...effect, [key]: values, [other]: effect[other].filter((level) => !values.includes(level)) },
    }),
  );
  return effect[key].length === 0 ? blank : { ...blank, shown: setWords(effect[key]) };
}

function trimBlank(settings: ComparisonSettings, context: Context): Blank {
  const range = { min: 0, max: 25, step: 1, unit: '%' };
  return numberBlank({ key: 'trim', label: 'trim at each end' }, settings.trim, context, range, (trim) => ({
    ...settings,
    trim,
  }));
}

function plannedBlank(settings: ComparisonSettings, factors: Factors): Blank {
  const options = rowsFor(factors, settings).map(({ id, name, hint }) => ({ value: id, label: name, hint }));
  const blank = choiceBlank(
    { key: 'estimator', label: 'planned quantity' },
    settings.estimator,
    options,
    'which quantity',
    (estimator) => ({ ...settings, estimator }),
  );
  return blank.filled ? blank : { ...blank, shown: rowOfId(settings.estimator)?.name ?? blank.shown };
}

function resamplesBlank(settings: ComparisonSettings): Blank {
  return choiceBlank(
    { key: 'resamples', label: 'number of resamples' },
    String(settings.resamples),
    ['999', '1999', '4999', '9999'].map((value) => ({ value, label: Number(value).toLocaleString('en') })),
    'how many',
    (value) => ({ ...settings, resamples: Number(value) }),
  );
}

const PROCEDURES: Readonly<Record<PairProcedure, { readonly label: string; readonly hint: string }>> = {
  none: { label: 'without pairs', hint: 'only whether they differ at all' },
  'games-howell': { label: 'Games\u2013Howell', hint: 'means, each group\u2019s own spread' },
  tukey: { label: 'Tukey\u2013Kramer', hint: 'means, one spread for all groups' },
  dunn: { label: 'Dunn', hint: 'mean ranks, Holm' },
  holm: { label: 'Holm', hint: 'trimmed where the plan trims, any dependence' },
  hochberg: { label: 'Hochberg', hint: 'trimmed where the plan trims, no negative dependence' },
};

/** ", with all pairs by [Holm]", or ", [without pairs]". */
function pairParts(settings: ComparisonSettings, factors: Factors): Part[] {
  const { effect } = settings;
  if (effect?.type !== 'levels') return [];
  const scope = factors.find((factor) => factor.name === effect.factor)?.scope ?? 'within';
  const blank = choiceBlank(
    { key: 'pairs', label: 'procedure for all pairs' },
    effect.pairs,
    proceduresFor(scope).map((value) => ({ value, ...PROCEDURES[value] })),
    'which procedure',
    (pairs) => ({ ...settings, effect: { ...effect, pairs: pairs as PairProcedure } }),
  );
  return effect.pairs === 'none' ? [', ', blank] : [', with all pairs by ', blank];
}

function alternativeBlank(settings: ComparisonSettings): Blank {
  const { effect } = settings;
  const first =
    effect?.type === 'contrast' ? setWords(effect.first) : effect?.type === 'value' ? 'scores' : settings.first;
  return choiceBlank(
    { key: 'alternative', label: 'sides' },
    settings.alternative,
    [
      { value: 'two-sided', label: 'two-sided' },
      { value: 'less', label: `one-sided (${first || 'first'} lower)` },
      { value: 'greater', label: `one-sided (${first || 'first'} higher)` },
    ],
    'two-sided',
    (alternative) => ({ ...settings, alternative }),
  );
}

function alphaBlank(settings: ComparisonSettings): Blank {
  return choiceBlank(
    { key: 'alpha', label: 'alpha' },
    String(settings.alpha),
    [0.1, 0.05, 0.01, 0.005, 0.001].map((value) => ({
      value: String(value),
      label: alphaText(value),
      hint: `${Number((100 * (1 - value)).toFixed(2))} % intervals`,
    })),
    '\u03b1',
    (alpha) => ({ ...settings, alpha: Number(alpha) }),
  );
}
