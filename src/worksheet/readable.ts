import { dataCsv } from './data-csv.ts';
import type { LogEntry, Opening, SharedNumber, Worksheet } from './format.ts';
import { READABLE_ID } from './html.ts';

/** A cell in words: the quiet word over it, its sentence, and what it came to. */
export interface CellWords {
  readonly title: string;
  readonly sentence: string;
  readonly result: string;
}

/**
 * What a saved page shows where scripts are not run, and what a text editor finds in it: the cells and their results as
 * sentences, what was recorded, the decision log, and the data as CSV.
 *
 * @param cells the visible cells in their order
 * @returns one HTML element without anything that runs
 */
export function readablePart(worksheet: Worksheet, cells: readonly CellWords[]): string {
  const data = worksheet.data.map(
    (block) => `<h2>Data: ${escaped(block.name)}</h2>\n<pre>${escaped(dataCsv(block))}</pre>`,
  );
  return [
    `<noscript id="${READABLE_ID}">`,
    `<h1>${escaped(worksheet.title)}</h1>`,
    '<p>This file carries participants\u2019 data and the labels of the conditions. Give it only to those who may have them.</p>',
    `<pre>${escaped(resultsText(worksheet, cells))}</pre>`,
    ...data,
    '</noscript>',
  ].join('\n');
}

/** The cells, their results, and what was recorded, as text. */
export function resultsText(worksheet: Worksheet, cells: readonly CellWords[]): string {
  const sections = [
    ['Cells and results', ...cells.map(cellText)],
    ['Shared numbers', ...worksheet.shared.map(sharedText)],
    ['Conditions', openingText(worksheet.opening)],
    ['Recorded', ...recordedLines(worksheet)],
    ['Decision log', ...worksheet.log.map(entryText)],
  ];
  return `${sections
    .filter((lines) => lines.length > 1)
    .map((lines) => lines.join('\n'))
    .join('\n\n')}\n`;
}

function cellText({ title, sentence, result }: CellWords, at: number): string {
  return [`${at + 1}. ${title}`, sentence, result]
    .filter((line) => line !== '')
    .map((line, i) => (i === 0 ? line : `   ${line.replace(/\s+/g, ' ').trim()}`))
    .join('\n');
}

function sharedText({ name, value, unit }: SharedNumber): string {
  return `${name}: ${value === null ? 'none' : `${value} ${unit}`.trim()}`;
}

function openingText(opening: Opening): string {
  if (opening.state === 'blind') return 'Hidden on the page; the data below carry their labels.';
  if (opening.state === 'sealed') return `Plan sealed ${opening.hash}, opened ${opening.when}.`;
  return `Opened early ${opening.when}: ${opening.reason}`;
}

function recordedLines({ program, seed, data }: Worksheet): readonly string[] {
  const prints = data.flatMap(({ name, rows, fingerprint }) => [
    `Data ${name}, ${rows} rows`,
    `  SHA-256 of the bytes that were read: ${fingerprint.bytes}`,
    `  SHA-256 of the table: ${fingerprint.table}`,
  ]);
  return [
    `Program: ${program.name} ${program.version}`,
    `Seed of the random numbers: ${seed}`,
    'Trimming takes floor(percent x n / 100) scores from each end; excluded rows are named by the cells above.',
    'A replay compares whole numbers and texts exactly, other numbers to 1e-9 of their size.',
    ...prints,
  ];
}

function entryText(entry: LogEntry, at: number): string {
  const who = entry.who === '' ? '' : `, ${entry.who}`;
  const reason = entry.reason === undefined ? '' : ` Reason: ${entry.reason}.`;
  return `${at + 1}. ${entry.when}${who} (${entry.opening}): ${entry.what}.${reason}`;
}

function escaped(text: string): string {
  return text.replaceAll('&', '&amp;').replaceAll('<', '&lt;').replaceAll('>', '&gt;');
}
