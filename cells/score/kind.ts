import { participantNoun } from '../../src/analysis/design.ts';
import { type Scores, scoreDesign } from '../../src/analysis/score.ts';
import { defineKind, type Note, numberOf, type TableOut } from '../kind.ts';
import { counted, decimalsFor, fixed } from '../numbers.ts';
import { type ScoreSettings, scoreSentence } from './sentence.ts';

/** One score for each participant under each combination of conditions. */
export const scoreKind = defineKind<ScoreSettings, { readonly design: 'design' }, 'scores', null>({
  name: 'score',
  version: 1,
  title: () => 'score',
  offer: 'Score each participant in each condition',
  takes: { design: 'design' },
  gives: 'scores',
  blind: 'veil',
  defaults: () => ({ statistic: 'mean', trim: 0 }),
  check: (settings) =>
    settings.statistic === 'trimmed mean' && settings.trim === null ? ['Say how much is trimmed.'] : [],
  compute(settings, { design }) {
    const trim = settings.statistic === 'trimmed mean' ? (numberOf(settings.trim) ?? 0) : 0;
    return { value: scoreDesign(design, { statistic: settings.statistic, trim }), detail: null };
  },
  sentence: scoreSentence,
  say: ({ value }) => `${counted(value.participants.length, participantNoun(value.design.roles))} scored.`,
  flow: ({ value }) => ({ count: value.participants.length, label: 'scored' }),
  notes: ({ value }) => scoreNotes(value),
  tables: ({ value }) => [scoreTable(value)],
  record: ({ value }) => ({
    participants: value.participants,
    conditions: value.conditions.map((each) => each.label),
    values: Array.from(value.values, (each) => (Number.isNaN(each) ? null : each)),
    trials: Array.from(value.trials),
  }),
});

function scoreNotes(scores: Scores): Note[] {
  const counts = Array.from(scores.trials).filter((n) => n > 0);
  if (counts.length === 0) return [];
  const least = Math.min(...counts);
  const most = Math.max(...counts);
  if (most <= 1) return [];
  const notes: Note[] = [
    { type: 'note', text: `Each score is made from ${least === most ? least : `${least} to ${most}`} kept trials.` },
  ];
  if (scores.score.statistic === 'median' && least < 20) {
    notes.push({
      type: 'caution',
      text: `The median of few skewed times is biased upward, more so with fewer trials (Miller 1988); conditions with unequal counts of trials are then compared unfairly. The fewest trials here: ${least}.`,
    });
  }
  return notes;
}

function scoreTable(scores: Scores): TableOut {
  const spread = range(scores.values);
  const decimals = Math.max(0, decimalsFor(spread / 20));
  const unit = scores.design.roles.unit;
  const width = scores.conditions.length;
  const label = (text: string) =>
    (text === '' ? scores.design.roles.outcome : text) + (unit === '' ? '' : ` (${unit})`);
  return {
    title: 'scores',
    columns: [
      { name: scores.design.roles.participant, numeric: false },
      ...scores.groups.map((group) => ({ name: group.factor, numeric: false })),
      ...scores.conditions.map((condition) => ({ name: label(condition.label), numeric: true })),
    ],
    rows: scores.participants.map((participant, index) => [
      participant,
      ...scores.groups.map((group) => group.levels[group.codes[index] as number] ?? ''),
      ...scores.conditions.map((_, column) => {
        const value = scores.values[index * width + column] as number;
        return Number.isNaN(value) ? '' : fixed(value, decimals);
      }),
    ]),
    raw: scores.participants.map((participant, index) => [
      participant,
      ...scores.groups.map((group) => group.levels[group.codes[index] as number] ?? ''),
      ...scores.conditions.map((_, column) => {
        const value = scores.values[index * width + column] as number;
        return Number.isNaN(value) ? null : value;
      }),
    ]),
  };
}

function range(values: Float64Array): number {
  let low = Infinity;
  let high = -Infinity;
  for (const value of values) {
    if (value < low) low = value;
    if (value > high) high = value;
  }
  return high - low;
}
