import type { ClaimValue } from '../../src/analysis/claim.ts';
import {
  type AxisName,
  defaultChoice,
  type GridAxis,
  type GridChoice,
  gridAxes,
} from '../../src/analysis/grid-options.ts';
import { JOINT_STATISTICS, type JointStatistic } from '../../src/analysis/joint.ts';
import { choiceBlank, textBlank } from '../blanks.ts';
import type { Blank, Context, Option, Part } from '../kind.ts';
import { count } from '../numbers.ts';

export type SensitivitySettings = {
  /** Values chosen on each axis of the grid (analysis/grid-options.ts); none = what the strip has in this design. */
  readonly cutoff: readonly string[];
  readonly measure: readonly string[];
  readonly scope: readonly string[];
  readonly trim: readonly string[];
  readonly row: readonly string[];
  readonly score: readonly string[];
  /** Written reasons for options that are not equivalent, by "axis:value". */
  readonly reasons: { readonly [option: string]: string };
  readonly statistic: JointStatistic;
  readonly relabellings: number;
};

const AXES: readonly AxisName[] = ['cutoff', 'measure', 'scope', 'trim', 'row', 'score'];

const MARKS = {
  E: 'same question',
  U: 'perhaps another question: drawn apart',
  N: 'not the same question: needs a written reason, drawn apart',
} as const;

/** What is chosen, with the strip's own where an axis names nothing. */
export function choiceOf(settings: SensitivitySettings, claim: ClaimValue): GridChoice {
  const usual = defaultChoice(claim.result);
  const lists = AXES.map((axis) => [axis, settings[axis].length === 0 ? usual[axis] : settings[axis].map(String)]);
  const reasons = Object.entries(settings.reasons).filter(([, reason]) => typeof reason === 'string');
  return { ...Object.fromEntries(lists), reasons: Object.fromEntries(reasons) } as GridChoice;
}

/** How many combinations the chosen values make. */
export function combinations(settings: SensitivitySettings): number {
  return AXES.reduce((product, axis) => product * Math.max(1, settings[axis].length), 1);
}

/**
 * "Repeat the comparison for cutoffs [none, 2, 2.5, 3] of [MAD, SD] [within participant] x trims [0, 10, 20, 25 %] x
 * [5 rows], scored by [mean], judged by the [average Z], with [1,999] relabellings."
 */
export function sensitivitySentence(settings: SensitivitySettings, context: Context): Part[] {
  const claim = context.given.claim as ClaimValue | undefined;
  const axes = claim?.result === undefined ? [] : gridAxes(claim.result);
  const usual = claim?.result === undefined ? null : defaultChoice(claim.result);
  const blank = (axis: AxisName, label: string, prompt: string) =>
    axisBlank(settings, axes, {
      axis,
      label,
      prompt,
      values: settings[axis].length > 0 ? settings[axis] : (usual?.[axis] ?? []),
    });
  const withScore = axes.length === 0 ? settings.score.length > 0 : axes.some((each) => each.axis === 'score');
  return [
    'Repeat the comparison for cutoffs ',
    blank('cutoff', 'cutoffs of the grid', 'in use'),
    ' of ',
    blank('measure', 'distances of the grid', 'distances in use'),
    ' ',
    blank('scope', 'scopes of the grid', 'in a scope blind to the comparison'),
    ' \u00d7 trims ',
    blank('trim', 'trims of the grid', 'in use'),
    ' \u00d7 ',
    blank('row', 'rows of the grid', 'every row in the outcome\u2019s unit'),
    ...(withScore ? [', scored by ', blank('score', 'scores of the grid', 'the worksheet\u2019s own score')] : []),
    ', judged by the ',
    statisticBlank(settings),
    ', with ',
    relabellingsBlank(settings),
    ' relabellings.',
    ...reasonParts(settings, axes),
  ];
}

function axisBlank(
  settings: SensitivitySettings,
  axes: readonly GridAxis[],
  { axis, label, prompt, values }: { axis: AxisName; label: string; prompt: string; values: readonly string[] },
): Blank {
  const offered = axes.find((each) => each.axis === axis)?.options ?? [];
  const options = offered.map((each): Option => {
    const option = { value: each.value, label: each.label, hint: `${MARKS[each.mark]}; ${each.why}` };
    return each.refused === undefined ? option : { ...option, refused: each.refused };
  });
  const labels = values.map((value) => offered.find((each) => each.value === value)?.label ?? value);
  return {
    key: axis,
    label,
    shown: values.length === 0 ? prompt : shownOf(axis, labels),
    filled: true,
    editor: { type: 'choices', values, options, atLeast: 1, set: (chosen) => ({ ...settings, [axis]: chosen }) },
  };
}

/** "0, 10, 20, 25 %"; rows by name while there are few. */
function shownOf(axis: AxisName, labels: readonly string[]): string {
  if (axis === 'trim') return `${labels.map((label) => label.replace(/ %$/, '')).join(', ')} %`;
  return axis === 'row' && labels.length > 2 ? `${count(labels.length)} rows` : labels.join(', ');
}

function statisticBlank(settings: SensitivitySettings): Blank {
  const hints: Readonly<Record<JointStatistic, string>> = {
    'average Z': 'mean of each row\u2019s own test as a normal deviate; fits rows of any unit',
    'median estimate': 'the middle of the estimates in the outcome\u2019s unit',
    'share significant': 'how many rows reach alpha on the side that has more of them',
  };
  return choiceBlank(
    { key: 'statistic', label: 'joint statistic' },
    settings.statistic,
    JOINT_STATISTICS.map((value) => ({ value, label: value, hint: hints[value] })),
    'which statistic',
    (statistic) => ({ ...settings, statistic }),
  );
}

function relabellingsBlank(settings: SensitivitySettings): Blank {
  return choiceBlank(
    { key: 'relabellings', label: 'number of relabellings' },
    String(settings.relabellings),
    [199, 999, 1999, 4999, 9999].map((value) => {
      const hint = `the smallest p is ${(1 / (value + 1)).toString().replace(/^0/, '')}; where there are fewer in all, each is run once`;
      return { value: String(value), label: count(value), hint };
    }),
    'how many',
    (value) => ({ ...settings, relabellings: Number(value) }),
  );
}

/** " Within condition is in because [reason]." for each option that needs it. */
function reasonParts(settings: SensitivitySettings, axes: readonly GridAxis[]): Part[] {
  return axes.flatMap(({ axis, options }) =>
    options
      .filter((option) => option.mark === 'N' && option.refused === undefined && settings[axis].includes(option.value))
      .flatMap((option): Part[] => {
        const key = `${axis}:${option.value}`;
        const written = settings.reasons[key] ?? '';
        const set = (reason: string) => ({ ...settings, reasons: { ...settings.reasons, [key]: reason } });
        const blank = textBlank({ key, label: `reason for ${option.label}` }, written, 'a reason is needed', set);
        return [` The ${option.label} rules are in because `, blank, '.'];
      }),
  );
}
