import { ESTIMATORS } from '../../src/analysis/estimators.ts';
import type { Scores } from '../../src/analysis/score.ts';
import { choiceBlank, numberBlank } from '../blanks.ts';
import type { Blank, Context, Num, Option, Part } from '../kind.ts';
import { alphaText } from '../numbers.ts';

export type ComparisonSettings = {
  readonly factor: string;
  readonly first: string;
  readonly second: string;
  /** Id of the planned row. */
  readonly estimator: string;
  /** Percent at each end, over participants. */
  readonly trim: Num;
  readonly alternative: 'two-sided' | 'greater' | 'less';
  readonly alpha: number;
  /** Resamples of the bootstrap rows. */
  readonly resamples: number;
};

/** Between a factor's name and its level in an option's value; neither can contain it. */
const SEPARATOR = '\u0000';

/** "Compare [voice] with [tone] on the [20 %] [trimmed mean of differences], [two-sided], at [alpha .05]." */
export function comparisonSentence(settings: ComparisonSettings, context: Context): Part[] {
  const scores = context.given.scores as Scores | undefined;
  const estimator = ESTIMATORS.find((each) => each.id === settings.estimator);
  const trim: Part[] = estimator?.trims
    ? [
        numberBlank(
          { key: 'trim', label: 'trim at each end' },
          settings.trim,
          context,
          { min: 0, max: 25, step: 1, unit: '%' },
          (value) => ({ ...settings, trim: value }),
        ),
        ' ',
      ]
    : [];
  const resamples: Part[] =
    estimator && !estimator.closedForm
      ? [
          ', with ',
          choiceBlank(
            { key: 'resamples', label: 'number of resamples' },
            String(settings.resamples),
            ['999', '1999', '4999', '9999'].map((value) => ({ value, label: Number(value).toLocaleString('en') })),
            'how many',
            (value) => ({ ...settings, resamples: Number(value) }),
          ),
          ' resamples',
        ]
      : [];
  return [
    'Compare ',
    firstBlank(settings, scores),
    ' with ',
    secondBlank(settings, scores),
    ' on the ',
    ...trim,
    estimatorBlank(settings, scores),
    ...resamples,
    ', ',
    alternativeBlank(settings),
    ', at ',
    alphaBlank(settings),
    '.',
  ];
}

function firstBlank(settings: ComparisonSettings, scores: Scores | undefined): Blank {
  const factors = scores?.design.factors ?? [];
  const options: Option[] = factors.flatMap((factor) =>
    factor.levels.map((level) => ({
      value: factor.name + SEPARATOR + level,
      label: level,
      ...(factors.length > 1 ? { hint: `${factor.name}, ${factor.scope} participants` } : {}),
    })),
  );
  const value = settings.factor + SEPARATOR + settings.first;
  return choiceBlank({ key: 'first', label: 'first condition' }, value, options, 'which', (chosen) => {
    const [factorName = '', first = ''] = chosen.split(SEPARATOR);
    const factor = factors.find((each) => each.name === factorName);
    const second =
      factorName === settings.factor && settings.second !== first
        ? settings.second
        : (factor?.levels.find((level) => level !== first) ?? '');
    return {
      ...settings,
      factor: factorName,
      first,
      second,
      estimator: estimatorFor(settings.estimator, factor?.scope),
    };
  });
}

function secondBlank(settings: ComparisonSettings, scores: Scores | undefined): Blank {
  const factor = scores?.design.factors.find((each) => each.name === settings.factor);
  const options = (factor?.levels ?? [])
    .filter((level) => level !== settings.first)
    .map((level) => ({ value: level, label: level }));
  return choiceBlank({ key: 'second', label: 'second condition' }, settings.second, options, 'which', (second) => ({
    ...settings,
    second,
  }));
}

function estimatorBlank(settings: ComparisonSettings, scores: Scores | undefined): Blank {
  const factor = scores?.design.factors.find((each) => each.name === settings.factor);
  const options = ESTIMATORS.filter((each) => each.scope === factor?.scope).map((each) => ({
    value: each.id,
    label: each.name,
    hint: hintOf(each),
  }));
  return choiceBlank(
    { key: 'estimator', label: 'planned quantity' },
    settings.estimator,
    options,
    'which quantity',
    (estimator) => ({
      ...settings,
      estimator,
    }),
  );
}

function hintOf(estimator: (typeof ESTIMATORS)[number]): string {
  const unit = estimator.sameUnit ? 'in the outcome\u2019s unit' : 'another quantity, without a unit';
  return estimator.closedForm ? unit : `${unit}, bootstrap`;
}

function alternativeBlank(settings: ComparisonSettings): Blank {
  return choiceBlank(
    { key: 'alternative', label: 'sides' },
    settings.alternative,
    [
      { value: 'two-sided', label: 'two-sided' },
      { value: 'less', label: `one-sided (${settings.first || 'first'} lower)` },
      { value: 'greater', label: `one-sided (${settings.first || 'first'} higher)` },
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

/** The row that keeps the meaning as far as it can when the factor's scope changes. */
export function estimatorFor(id: string, scope: 'within' | 'between' | undefined): string {
  if (scope === undefined || ESTIMATORS.find((each) => each.id === id)?.scope === scope) return id;
  return scope === 'within' ? 'trimmed-differences' : 'yuen-welch';
}
