import { type RateRow, type Rates, rateOf } from '../../src/analysis/error-rates.ts';
import type { Note, TableOut } from '../kind.ts';
import { alphaText, bounded, count, limits, percent } from '../numbers.ts';

/** ".051 [.045, .057]", to the decimals the number of runs allows. */
export function rateText(times: number, runs: number): string {
  const rate = rateOf(times, runs);
  if (rate === null) return 'not given';
  const write = (value: number) => bounded(value, rate.decimals);
  return `${write(rate.rate)} ${limits([rate.low, rate.high], write)}`;
}

/** What the rates are: the level where nothing is going on, else power. */
export function rateName(value: Rates): string {
  return value.difference === 0 ? 'share that rejects although nothing is going on' : 'share that rejects (power)';
}

/** A line's method with what was done before. */
export function rowLabel(row: RateRow): string {
  return row.cleaning === '' ? row.label : `${row.label} (${row.cleaning})`;
}

/** A line within a sentence: what rejects. Lines of relabelled data are rules before the planned row. */
function subject(value: Rates, row: RateRow): string {
  return value.mode === 'relabel' ? `the planned row with ${row.label}` : rowLabel(row);
}

export function sayRates(value: Rates): string {
  const { rows, alpha, runs, mode } = value;
  const what =
    mode === 'relabel' ? `${count(runs)} relabellings of these data` : `${count(runs)} simulated experiments`;
  const judged = rows.filter((row) => row.judged > 0);
  const rate = (row: RateRow) => row.rejected / row.judged;
  const [first] = judged;
  if (first === undefined) return `In ${what} no method could be judged.`;
  const highest = judged.reduce((best, row) => (rate(row) > rate(best) ? row : best), first);
  const nothing = value.difference === 0 ? ' although nothing is going on' : '';
  const said = (row: RateRow) => `in ${rateText(row.rejected, row.judged)}`;
  const most =
    highest === first ? '' : ` The highest rate is that of ${subject(value, highest)}: ${said(highest).slice(3)}.`;
  return `In ${what} at ${alphaText(alpha)}, ${subject(value, first)} rejects ${said(first)}${nothing}.${most}`;
}

export function ratesNotes(value: Rates): Note[] {
  const notes: Note[] = [];
  if (value.difference === 0) {
    const far = value.rows.filter((row) => (rateOf(row.rejected, row.judged)?.low ?? 0) > 1.5 * value.alpha);
    if (far.length > 0) {
      notes.push({
        type: 'caution',
        text: `${count(far.length)} of ${count(value.rows.length)} ways reject more than one and a half times as often as ${alphaText(value.alpha)} promises: ${far
          .slice(0, 3)
          .map((row) => `${rowLabel(row)} ${rateText(row.rejected, row.judged)}`)
          .join('; ')}.`,
      });
    }
  }
  notes.push({
    type: 'note',
    text: 'Intervals say how far the count of runs leaves the rate open, about two standard errors; no more digits are shown than that allows.',
  });
  if (value.mode === 'relabel') {
    notes.push({
      type: 'note',
      text: 'Each score is taken about the median of its condition first. Relabelling assumes that scores are interchangeable if nothing is going on.',
    });
  } else if (value.exact !== null) {
    const { student, welch } = value.exact;
    notes.push({
      type: 'note',
      text: `By integration, with nobody set aside: Student\u2019s t rejects in ${bounded(student, 4)}, Welch\u2019s t in ${bounded(welch, 4)}.`,
    });
  }
  if (value.aside !== null) {
    notes.push({
      type: 'note',
      text: `The rule set aside ${percent(value.aside[0])} of the simulated scores across conditions, ${percent(value.aside[1])} within them.`,
    });
  }
  return notes;
}

export function ratesTable(value: Rates): TableOut {
  const covers = value.rows.some((row) => row.intervals > 0);
  const names = [
    'way',
    ...(value.mode === 'simulate' ? ['before'] : []),
    rateName(value),
    ...(covers ? ['interval holds the truth'] : []),
    'judged',
  ];
  return {
    title: 'every rate',
    columns: names.map((name) => ({ name, numeric: name === 'judged' })),
    rows: value.rows.map((row) => [
      row.label,
      ...(value.mode === 'simulate' ? [row.cleaning] : []),
      rateText(row.rejected, row.judged),
      ...(covers ? [row.intervals === 0 ? '' : rateText(row.covered, row.intervals)] : []),
      count(row.judged),
    ]),
    raw: value.rows.map((row) => [
      row.label,
      ...(value.mode === 'simulate' ? [row.cleaning] : []),
      row.judged === 0 ? null : row.rejected / row.judged,
      ...(covers ? [row.intervals === 0 ? null : row.covered / row.intervals] : []),
      row.judged,
    ]),
  };
}
