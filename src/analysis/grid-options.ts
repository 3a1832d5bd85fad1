/** THE LIST of options of the sensitivity grid: what each axis offers, why, and how far it asks the same question. */
import type { Result } from './compare.ts';
import { fittingEstimators } from './compare.ts';
import type { Measure, Scope } from './rules.ts';
import type { ScoreSpec } from './score.ts';

/**
 * How an option stands to the worksheet's question: E equivalent, U uncertain (drawn apart, as exploratory), N not
 * equivalent (left out unless a reason is written, then exploratory).
 */
export type Equivalence = 'E' | 'U' | 'N';

export type AxisName = 'cutoff' | 'measure' | 'scope' | 'trim' | 'row' | 'score';

export interface GridOption {
  /** As settings keep it. */
  readonly value: string;
  readonly label: string;
  readonly mark: Equivalence;
  /** Why it is defensible, or what it changes. */
  readonly why: string;
  /** Why it cannot be run in a grid at all. */
  readonly refused?: string;
}

export interface GridAxis {
  readonly axis: AxisName;
  readonly name: string;
  readonly options: readonly GridOption[];
}

/** What is chosen on each axis. */
export type GridChoice = { readonly [axis in AxisName]: readonly string[] } & {
  /** Written reasons for options that are not equivalent, by "axis:value". */
  readonly reasons: { readonly [option: string]: string };
};

export const NO_CUTOFF = 'none';

const CUTOFFS: readonly GridOption[] = [
  { value: NO_CUTOFF, label: 'none', mark: 'E', why: 'nobody is set aside for being extreme (Karch 2023)' },
  {
    value: '2',
    label: '2',
    mark: 'E',
    why: 'takes the most: about 5 % of normal scores (Leys et al. 2013: poorly conservative)',
  },
  { value: '2.5', label: '2.5', mark: 'E', why: 'the cutoff Leys et al. 2013 suggest' },
  { value: '3', label: '3', mark: 'E', why: 'takes few: .3 % of normal scores (Leys et al. 2013: very conservative)' },
  { value: '3.5', label: '3.5', mark: 'E', why: 'takes the fewest (common practice)' },
];

const MEASURES: readonly GridOption[] = [
  { value: 'MAD', label: 'MAD', mark: 'E', why: 'not moved by the scores it is to find (Leys et al. 2013)' },
  { value: 'SD', label: 'SD', mark: 'E', why: 'in wide use; extreme scores widen it and hide each other' },
  { value: 'fences', label: 'quartile fences', mark: 'U', why: 'counts quartile distances, wider than as many MAD' },
];

const TRIMS: readonly GridOption[] = [
  { value: '0', label: '0 %', mark: 'E', why: 'the mean' },
  { value: '5', label: '5 %', mark: 'E', why: 'little protection, little lost with normal scores' },
  { value: '10', label: '10 %', mark: 'E', why: 'holds against one odd score in ten at each end' },
  { value: '15', label: '15 %', mark: 'E', why: 'between 10 and 20 %' },
  { value: '20', label: '20 %', mark: 'E', why: 'the usual compromise (Wilcox 2012)' },
  { value: '25', label: '25 %', mark: 'E', why: 'the middle half; beyond it a caution stands' },
];

/**
 * The axes a worksheet has: only what can be varied in its design.
 *
 * @param result the worksheet's comparison with its chain
 * @returns axes with every option, its equivalence and why
 * @source Del Giudice & Gangestad 2021: equivalence of options before they are mixed; methods 2.1
 */
export function gridAxes(result: Result): GridAxis[] {
  const axes: GridAxis[] = [
    { axis: 'cutoff', name: 'cutoff', options: CUTOFFS },
    { axis: 'measure', name: 'distance', options: MEASURES },
    { axis: 'scope', name: 'scope', options: scopes(result) },
    { axis: 'trim', name: 'trim', options: TRIMS },
    { axis: 'row', name: 'row', options: rowsFor(result) },
  ];
  if (result.scores.design.roles.rows === 'several trials')
    axes.push({ axis: 'score', name: 'score', options: scoresFor(result.scores.score) });
  return axes;
}

function scopes({ scores }: Result): GridOption[] {
  const trials = scores.design.roles.rows === 'several trials';
  const seen = 'looks at each condition separately, so it is not blind to the comparison (Andr\u00e9 2022)';
  const pooled: GridOption = {
    value: 'pooled',
    label: trials ? 'all trials pooled' : 'all scores pooled',
    mark: trials ? 'U' : 'E',
    why: trials
      ? 'takes more from slow participants: another selection of trials'
      : 'blind to the condition (Andr\u00e9 2022)',
  };
  const condition: GridOption = { value: 'condition', label: 'within condition', mark: 'N', why: seen };
  if (!trials) return [pooled, condition];
  return [
    {
      value: 'participant',
      label: 'within participant',
      mark: 'E',
      why: 'each trial against the same participant\u2019s own, whatever the condition',
    },
    pooled,
    { value: 'participant-condition', label: 'within participant and condition', mark: 'N', why: seen },
    condition,
  ];
}

function rowsFor(result: Result): GridOption[] {
  if (result.scope === 'omnibus') return [];
  return fittingEstimators(result.scope).map((estimator): GridOption => {
    const option = { value: estimator.id, label: estimator.name };
    if (!estimator.closedForm) {
      const refused = 'It resamples, which inside each relabelling would take hours.';
      return { ...option, mark: 'N', why: 'resamples', refused };
    }
    return estimator.sameUnit
      ? { ...option, mark: 'E', why: 'a difference in the outcome\u2019s unit' }
      : { ...option, mark: 'U', why: 'another quantity, on a scale of its own' };
  });
}

const SCORES: readonly { readonly value: string; readonly score: ScoreSpec; readonly why: string }[] = [
  { value: 'mean', score: { statistic: 'mean', trim: 0 }, why: 'every kept trial counts the same' },
  {
    value: 'median',
    score: { statistic: 'median', trim: 0 },
    why: 'the middle trial: biased with few skewed trials (Miller 1988)',
  },
  {
    value: 'trimmed mean 10',
    score: { statistic: 'trimmed mean', trim: 10 },
    why: 'without a tenth of the trials at each end',
  },
  {
    value: 'trimmed mean 20',
    score: { statistic: 'trimmed mean', trim: 20 },
    why: 'without a fifth of the trials at each end',
  },
];

/** The word of a score among settings: "mean", "trimmed mean 20". */
export function scoreValue({ statistic, trim }: ScoreSpec): string {
  return statistic === 'trimmed mean' ? `${statistic} ${trim}` : statistic;
}

/** The score of such a word, or undefined. */
export function scoreOf(value: string): ScoreSpec | undefined {
  const trimmed = /^trimmed mean (\d+)$/.exec(value);
  if (trimmed !== null) return { statistic: 'trimmed mean', trim: Number(trimmed[1]) };
  return value === 'mean' || value === 'median' ? { statistic: value, trim: 0 } : undefined;
}

function scoresFor(own: ScoreSpec): GridOption[] {
  const value = scoreValue(own);
  const label = (each: string) => each.replace(/ (\d+)$/, ', $1 %');
  const others = SCORES.filter((each) => each.value !== value);
  return [
    { value, label: label(value), mark: 'E', why: 'the worksheet\u2019s own score' },
    ...others.map((each): GridOption => ({ value: each.value, label: label(each.value), mark: 'U', why: each.why })),
  ];
}

/**
 * What a new grid takes: the strip's own.
 *
 * @param result the worksheet's comparison with its chain
 */
export function defaultChoice(result: Result): GridChoice {
  const equivalent = (axis: AxisName) =>
    gridAxes(result)
      .find((each) => each.axis === axis)
      ?.options.filter((each) => each.mark === 'E')
      .map((each) => each.value) ?? [];
  return {
    cutoff: [NO_CUTOFF, '2', '2.5', '3'],
    measure: ['MAD', 'SD'],
    scope: equivalent('scope').slice(0, 1),
    trim: ['0', '10', '20', '25'],
    row: equivalent('row'),
    score: [scoreValue(result.scores.score)],
    reasons: {},
  };
}

/** Whether a word of settings is a distance or scope a rule knows. */
export function isMeasure(value: string): value is Extract<Measure, 'MAD' | 'SD' | 'fences'> {
  return value === 'MAD' || value === 'SD' || value === 'fences';
}

export function isScope(value: string): value is Scope {
  return value === 'pooled' || value === 'participant' || value === 'condition' || value === 'participant-condition';
}
