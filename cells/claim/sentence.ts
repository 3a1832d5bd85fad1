import type { ClaimSpec } from '../../src/analysis/claim.ts';
import type { Result } from '../../src/analysis/compare.ts';
import { choiceBlank, numberBlank, textBlank } from '../blanks.ts';
import type { Context, Num, Part } from '../kind.ts';

export type ClaimSettings = {
  readonly first: string;
  readonly relation: ClaimSpec['relation'];
  readonly second: string;
  readonly margin: Num;
  readonly title: string;
};

/** The two conditions of the comparison above; where it is veiled or not there yet, as its sentence names them. */
export function comparedPair(
  context: Context,
  otherwise: { readonly first: string; readonly second: string } = { first: '', second: '' },
): readonly [string, string] {
  const result = context.given.result as Result | undefined;
  if (result !== undefined) return [result.comparison.first, result.comparison.second];
  const { first, second, effect } = context.above?.result ?? {};
  const named = typeof first === 'string' && typeof second === 'string' && first !== '' && second !== '';
  return named && effect === undefined ? [first, second] : [otherwise.first, otherwise.second];
}

/** "The claim: [voice] is [lower] than [tone] on ack_ms by more than [0]; in own words: [...]." */
export function claimSentence(settings: ClaimSettings, context: Context): Part[] {
  const result = context.given.result as Result | undefined;
  const pair = comparedPair(context, settings);
  const roles = result?.scores.design.roles ?? context.design?.roles;
  const first = choiceBlank(
    { key: 'first', label: 'condition the claim is about' },
    settings.first,
    pair.map((level) => ({ value: level, label: level })),
    'which',
    (value) => ({ ...settings, first: value, second: pair.find((level) => level !== value) ?? settings.second }),
  );
  const relation = choiceBlank(
    { key: 'relation', label: 'claimed direction' },
    settings.relation,
    [
      { value: 'lower', label: 'lower than' },
      { value: 'higher', label: 'higher than' },
      { value: 'different', label: 'different from' },
    ],
    'lower than',
    (value) => ({ ...settings, relation: value }),
  );
  return [
    'The claim: ',
    first,
    ' is ',
    relation,
    ` ${settings.second || 'the other'} on ${roles?.outcome ?? 'the outcome'} by more than `,
    numberBlank(
      { key: 'margin', label: 'margin' },
      settings.margin,
      context,
      { min: 0, max: 1e9, step: 1, unit: roles?.unit ?? '' },
      (margin) => ({ ...settings, margin }),
    ),
    '; in own words: ',
    textBlank({ key: 'title', label: 'the claim in own words' }, settings.title, 'as it stands', (title) => ({
      ...settings,
      title,
    })),
    ...(/[.!?]$/.test(settings.title.trim()) ? [] : ['.']),
  ];
}
