import type { Result } from '../../src/analysis/compare.ts';
import type { Measure } from '../../src/analysis/rules.ts';
import { SHAPES, type ShapeId } from '../../src/numerics/simulation/shapes.ts';
import { choiceBlank, numberBlank } from '../blanks.ts';
import type { Blank, Context, Num, Part } from '../kind.ts';
import { count } from '../numbers.ts';

export type RatesSettings = {
  readonly mode: 'relabel' | 'simulate';
  readonly runs: number;
  readonly measure: Measure;
  /** null = no rule; relabelled data always have one. */
  readonly cutoff: Num;
  readonly shape: ShapeId;
  readonly first: Num;
  readonly second: Num;
  /** Spread under the first condition in spreads of the second. */
  readonly ratio: Num;
  /** Within: percent of a score's variance that is the participant's own. */
  readonly own: Num;
  /** First minus second, in spreads of the second. */
  readonly difference: Num;
  readonly equal: 'means' | 'trimmed means';
  /** Resamples and relabellings in each simulated experiment. */
  readonly resamples: number;
};

const RUNS = { relabel: [500, 1000, 2000, 5000], simulate: [1000, 5000, 10_000, 20_000] } as const;

/** "Relabel these data [2,000] times ..." or "Simulate [5,000] experiments like this one: ...". */
export function ratesSentence(settings: RatesSettings, context: Context): Part[] {
  const mode = choiceBlank(
    { key: 'mode', label: 'where the experiments come from' },
    settings.mode,
    [
      { value: 'relabel', label: 'Relabel these data', hint: 'the scores as they are, the labels dealt out anew' },
      { value: 'simulate', label: 'Simulate experiments', hint: 'scores drawn from a stated shape' },
    ],
    'which',
    (value) => ({ ...settings, mode: value, runs: value === 'relabel' ? 2000 : 5000 }),
  );
  const runs = choiceBlank(
    { key: 'runs', label: 'how many' },
    String(settings.runs),
    RUNS[settings.mode].map((value) => ({ value: String(value), label: count(value) })),
    'how many',
    (value) => ({ ...settings, runs: Number(value) }),
  );
  return settings.mode === 'relabel'
    ? [
        mode,
        ' ',
        runs,
        ' times through the whole chain, with everyone in, with scores further than ',
        ...ruleBlanks(settings, context),
        ' set aside across and within conditions, and by the rules above.',
      ]
    : [mode, ' like this one, ', runs, ' of them: ', ...simulated(settings, context)];
}

function ruleBlanks(settings: RatesSettings, context: Context): Part[] {
  return [
    numberBlank(
      { key: 'cutoff', label: 'cutoff of the rule' },
      settings.cutoff,
      context,
      { min: 0.5, max: 10, step: 0.5, unit: '', ...(settings.mode === 'simulate' ? { none: 'no cutoff' } : {}) },
      (cutoff) => ({ ...settings, cutoff }),
    ),
    ' ',
    choiceBlank(
      { key: 'measure', label: 'unit of the cutoff' },
      settings.measure,
      [
        { value: 'MAD', label: 'MAD', hint: 'from the median' },
        { value: 'SD', label: 'SD', hint: 'from the mean' },
        { value: 'fences', label: 'quartile distances', hint: 'from the quartiles' },
      ],
      'which',
      (measure) => ({ ...settings, measure }),
    ),
  ];
}

function simulated(settings: RatesSettings, context: Context): Part[] {
  const result = context.given.result as Result | undefined;
  const within = result?.scope === 'within';
  const { first: a = 'the first', second: b = 'the second' } = result?.comparison ?? {};
  const number = (
    key: keyof RatesSettings,
    label: string,
    range: { min: number; max: number; step: number; unit?: string },
  ): Blank =>
    numberBlank({ key, label }, settings[key] as Num, context, { unit: '', ...range }, (value) => ({
      ...settings,
      [key]: value,
    }));
  const people = { min: 3, max: 200, step: 1 };
  const shape = choiceBlank(
    { key: 'shape', label: 'shape of the scores' },
    settings.shape,
    SHAPES.map((each) => ({ value: each.id, label: each.name, hint: each.hint })),
    'which shape',
    (value) => ({ ...settings, shape: value }),
  );
  const equal = choiceBlank(
    { key: 'equal', label: 'what differs' },
    settings.equal,
    [
      { value: 'means', label: 'means' },
      { value: 'trimmed means', label: 'trimmed means' },
    ],
    'which',
    (value) => ({ ...settings, equal: value }),
  );
  const resamples = choiceBlank(
    { key: 'resamples', label: 'resamples in each' },
    String(settings.resamples),
    [
      { value: '0', label: 'no resampling' },
      ...['199', '399', '599'].map((value) => ({ value, label: `${value} resamples` })),
    ],
    'how many',
    (value) => ({ ...settings, resamples: Number(value) }),
  );
  const who: Part[] = within
    ? [
        ' scores of ',
        number('first', 'participants', people),
        ' participants under both conditions, ',
        number('own', 'share of the participant', { min: 0, max: 95, step: 5, unit: '%' }),
        ' of their variance the participant\u2019s own',
      ]
    : [
        ' scores of ',
        number('first', `participants in ${a}`, people),
        ` participants in ${a} and `,
        number('second', `participants in ${b}`, people),
        ` in ${b}`,
      ];
  return [
    shape,
    ...who,
    `, the spread in ${a} `,
    number('ratio', 'ratio of the spreads', { min: 0.1, max: 10, step: 0.1 }),
    ` times that in ${b}, a true difference of `,
    number('difference', 'true difference in spreads', { min: -5, max: 5, step: 0.1 }),
    ' spreads between the ',
    equal,
    '; scores further than ',
    ...ruleBlanks(settings, context),
    ' set aside across or within conditions; ',
    resamples,
    ' in each.',
  ];
}
