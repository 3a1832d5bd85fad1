import { type Design, participantNoun } from '../../src/analysis/design.ts';
import { choiceBlank, numberBlank } from '../blanks.ts';
import type { Context, Num, Part } from '../kind.ts';

export type ScoreSettings = {
  readonly statistic: 'mean' | 'median' | 'trimmed mean';
  /** Trim of trials, percent at each end. */
  readonly trim: Num;
};

/** "Score each officer under each alert by the [mean] of the kept trials." */
export function scoreSentence(settings: ScoreSettings, context: Context): Part[] {
  const design = context.given.design as Design | undefined;
  const noun = design ? participantNoun(design.roles) : 'participant';
  const within = design?.factors.filter((factor) => factor.scope === 'within').map((factor) => factor.name) ?? [];
  const statistic = choiceBlank(
    { key: 'statistic', label: 'statistic of the kept trials' },
    settings.statistic,
    [
      { value: 'mean', label: 'mean' },
      { value: 'median', label: 'median', hint: 'biased for skewed times when trials are few' },
      { value: 'trimmed mean', label: 'trimmed mean', hint: 'with a trim of trials of its own' },
    ],
    'mean',
    (value) => ({ ...settings, statistic: value }),
  );
  const trim: Part[] =
    settings.statistic === 'trimmed mean'
      ? [
          numberBlank(
            { key: 'trim', label: 'trim of trials at each end' },
            settings.trim,
            context,
            { min: 0, max: 25, step: 1, unit: '%' },
            (value) => ({ ...settings, trim: value }),
          ),
          ' ',
        ]
      : [];
  const where = within.length === 0 ? '' : ` under each ${within.join(' and ')}`;
  const rows = design?.roles.rows === 'one score' ? 'kept scores' : 'kept trials';
  return [`Score each ${noun}${where} by the `, ...trim, statistic, ` of the ${rows}.`];
}
