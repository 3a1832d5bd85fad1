import { cautionText } from '../../src/analysis/cautions.ts';
import type { Note } from '../kind.ts';
import { count, fixed } from '../numbers.ts';
import type { DeriveDetail } from './kind.ts';
import type { DeriveSettings } from './sentence.ts';

/** What a test on the transformed column asks: another question each time. */
const ASKS: Readonly<Record<string, (of: string) => string>> = {
  'natural log': (of) =>
    `A test on it compares geometric means of ${of}: a difference of mean logs is the log of their ratio, and e to its power says how many times larger. It says nothing about a difference in the unit of ${of}.`,
  log10: (of) =>
    `A test on it compares geometric means of ${of}: a difference of mean logs is the log of their ratio, and 10 to its power says how many times larger. It says nothing about a difference in the unit of ${of}.`,
  'square root': (of) =>
    `A test on it compares mean roots of ${of}; squared they lie between the geometric and the arithmetic mean. A difference of mean roots has no plain unit.`,
  reciprocal: (of) =>
    `A test on it compares mean rates, 1 / ${of}: differences between harmonic means, in which large values count little. The order turns round: a larger rate is a smaller ${of}.`,
  rank: (of) =>
    `A test on it asks whether ${of} tends to be larger under one condition, not by how much, nor whether means or medians differ.`,
  'Box-Cox power': (of) =>
    `A test on it compares power means of ${of} with that exponent, not arithmetic means; a difference has no plain unit. Exponent 1 leaves the values, .5 is the root, 0 the log, \u22121 the reciprocal.`,
  'Yeo-Johnson power': (of) =>
    `A test on it compares means of bent values of ${of}; a difference has no plain unit and no plain way back to it. Exponent 1 leaves the values, 0 is the log of ${of} + 1 from zero on.`,
};

const SOURCES: Readonly<Record<string, string>> = {
  'Box-Cox power': 'Box & Cox 1964',
  'Yeo-Johnson power': 'Yeo & Johnson 2000',
};

/** What the margin says beside a function of one column: the question a test on it asks, and on which scale. */
export function scaleNotes(settings: DeriveSettings, detail: DeriveDetail): Note[] {
  const ask = settings.make === 'function' ? ASKS[settings.fn] : undefined;
  if (ask === undefined) return [];
  const notes: Note[] = [{ type: 'note', lead: 'Another question.', text: ask(settings.of) }];
  if (detail.power !== undefined) {
    notes.push({
      type: 'note',
      text: `Exponent \u03bb = ${fixed(detail.power.lambda, 3)}, the likeliest for normal values (${SOURCES[settings.fn]}), estimated from all ${count(detail.power.n)} values of ${settings.of} together, whatever the condition. Tests below take it as known. Where each condition has a column of its own, reshape first, so that all get one exponent.`,
    });
  }
  notes.push({ type: 'note', id: 'R19', text: cautionText('R19', { unit: settings.of }) });
  return notes;
}
