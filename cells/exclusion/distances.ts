import { type Design, participantNoun } from '../../src/analysis/design.ts';
import { type Measure, OWN_CUTOFF } from '../../src/analysis/rules.ts';
import type { Column } from '../../src/data/table.ts';
import { choiceBlank, choicesBlank, columnOptions, numberBlank, numbersOnly } from '../blanks.ts';
import type { Blank, Context, Option, Part } from '../kind.ts';
import type { ExclusionSettings } from './sentence.ts';

/** "[2.5] [MAD] from the [median] of [the same participant], whatever the alert" */
export function beyondParts(settings: ExclusionSettings, context: Context, design: Design | undefined): Part[] {
  const cutoff = numberBlank(
    { key: 'cutoff', label: 'cutoff' },
    settings.cutoff,
    context,
    { min: 0.5, max: 10, step: 0.1, unit: '', none: 'any number of' },
    (value) => ({ ...settings, cutoff: value }),
  );
  const measure = choiceBlank(
    { key: 'measure', label: 'measure of distance' },
    settings.measure,
    MEASURES.map(({ value, label, hint }) => ({ value, label, hint })),
    'MAD',
    (value) => ({ ...settings, measure: value }),
  );
  const middle = MEASURES.find((each) => each.value === settings.measure)?.middle ?? 'median';
  const blind = settings.scope === 'pooled' || settings.scope === 'participant';
  return [
    ...(OWN_CUTOFF.has(settings.measure) ? [] : [cutoff, ' ']),
    measure,
    ` from the ${middle} of `,
    scopeBlank(settings, design),
    ...(blind ? [`, ${whateverWords(design)}`] : []),
  ];
}

const MEASURES: readonly { value: Measure; label: string; hint: string; middle: string }[] = [
  { value: 'MAD', label: 'MAD', hint: 'from the median; MAD times 1.4826', middle: 'median' },
  {
    value: 'double MAD',
    label: 'MAD of its side',
    hint: 'from the median; one MAD below it, another above (double MAD)',
    middle: 'median',
  },
  { value: 'SD', label: 'SD', hint: 'from the mean; SD with divisor n \u2212 1', middle: 'mean' },
  { value: 'fences', label: 'IQR', hint: 'outside the quartiles (interpolated, type 7)', middle: 'quartiles' },
  { value: 'hinge fences', label: 'hinge distances', hint: 'outside the hinges (Tukey 1977)', middle: 'hinges' },
  {
    value: 'adjusted fences',
    label: 'skew-adjusted hinge distances',
    hint: 'outside the hinges, further on the long tail (medcouple)',
    middle: 'hinges',
  },
  {
    value: 'Carling',
    label: 'Carling\u2019s multiple of the IQR',
    hint: 'from the median; the multiple depends on the number of scores',
    middle: 'median',
  },
  {
    value: 'moving',
    label: 'the moving criterion',
    hint: 'SD from the mean; the cutoff depends on the number of scores (Van Selst & Jolicoeur)',
    middle: 'mean',
  },
  {
    value: 'recursive',
    label: 'the recursive moving criterion',
    hint: 'the same, repeated with the largest score held out (modified recursive)',
    middle: 'mean',
  },
];

/** " whose [ack_ms, age] together lie [further out than] [97.5 %] of normal ones, by MCD distance, whatever the alert" */
export function togetherParts(
  settings: ExclusionSettings,
  how: Blank,
  context: Context,
  design: Design | undefined,
): Part[] {
  const columns = choicesBlank(
    { key: 'columns', label: 'columns judged together' },
    settings.columns ?? [],
    columnOptions(
      design?.table,
      (column) => numbersOnly(column) ?? tellsApart(column, design),
      design?.hidden !== undefined,
    ),
    { prompt: 'which columns', atLeast: 2 },
    (chosen) => ({ ...settings, columns: chosen }),
  );
  const within = numberBlank(
    { key: 'within', label: 'percent of normal participants within the limit' },
    settings.within === undefined ? WITHIN : settings.within,
    context,
    { min: 90, max: 99.9, step: 0.1, unit: '%', none: 'any share' },
    (value) => ({ ...settings, within: value }),
  );
  return [
    ' whose means of ',
    columns,
    ' together lie ',
    how,
    ' ',
    within,
    ` of normal ones, by MCD distance, ${whateverWords(design)}`,
  ];
}

/** The usual share within the limit (common practice). */
export const WITHIN = 97.5;

/** Why a column cannot be judged: it tells participants apart. */
export function tellsApart(column: Column, design: Design | undefined): string | null {
  return column.name === design?.roles.participant ? 'tells participants apart' : null;
}

function scopeBlank(settings: ExclusionSettings, design: Design | undefined): Blank {
  const noun = design ? participantNoun(design.roles) : 'participant';
  const factors = design?.factors.map((factor) => factor.name).join(' and ') || 'condition';
  const options: Option[] =
    settings.what === 'participant'
      ? [
          { value: 'pooled', label: `all ${noun}s`, hint: 'pooled over groups' },
          { value: 'condition', label: 'the same group', hint: 'reads the condition: p and interval are withheld' },
        ]
      : [
          { value: 'participant', label: `the same ${noun}`, hint: `pooled over ${factors}` },
          { value: 'pooled', label: 'all scores', hint: 'pooled over everything' },
          {
            value: 'condition',
            label: `the same ${factors}`,
            hint: 'reads the condition: p and interval are withheld',
          },
          { value: 'participant-condition', label: `the same ${noun} and ${factors}`, hint: 'reads the condition' },
        ];
  return choiceBlank(
    { key: 'scope', label: 'scores the distance is measured among' },
    settings.scope,
    design?.hidden ? options.filter(({ value }) => !value.includes('condition') || value === settings.scope) : options,
    'all scores',
    (scope) => ({
      ...settings,
      scope,
    }),
  );
}

/** "whatever the alert": said of every rule that does not read the condition. */
export function whateverWords(design: Design | undefined): string {
  const factors = design?.factors.map((factor) => factor.name) ?? [];
  return `whatever the ${factors.length === 0 ? 'condition' : factors.join(' and ')}`;
}
