import type { Json, Worksheet } from '../worksheet/format.ts';
import type { CellReplay, Replay } from './replay-worksheet.ts';

export interface ReplayAbout {
  readonly file: string;
  readonly worksheet: Worksheet;
  readonly replayed: Replay;
  readonly exit: number;
}

/** The replay in words, every finding named. */
export function replayText({ file, worksheet, replayed, exit }: ReplayAbout): string {
  const { breaks, cells, gone } = replayed;
  const lines = [`${file}: "${worksheet.title}", recorded by Standfast ${worksheet.program.version}`];
  lines.push(...(breaks.length === 0 ? [wholeWords(worksheet)] : breaks.map((sentence) => `BROKEN  ${sentence}`)));
  for (const cell of cells) lines.push(...cellLines(cell, worksheet));
  lines.push(...gone.map((id) => `DIFFERS  A result is recorded for "${id}", but there is no such cell.`));
  const compared = cells.reduce((sum, cell) => sum + cell.compared, 0);
  const same = cells.filter((cell) => cell.came === 'same').length;
  if (exit === 0) lines.push(`Everything came out again: ${counted(same, 'cell')}, ${counted(compared, 'value')}.`);
  else lines.push(`${same} of ${counted(cells.length, 'cell')} came out again; see above.`);
  return `${lines.join('\n')}\n`;
}

function wholeWords({ log, data }: Worksheet): string {
  const last = log.at(-1);
  const count = `${log.length} ${log.length === 1 ? 'entry' : 'entries'}`;
  const chain =
    last === undefined ? 'The decision log is empty' : `The decision log is whole (${count}, the last ${last.hash})`;
  return data.length === 0 ? `${chain}.` : `${chain}, and the data are those that were read.`;
}

/** The replay as JSON for programs. */
export function replayJson({ file, worksheet, replayed, exit }: ReplayAbout): string {
  const { breaks, cells, gone } = replayed;
  const report = {
    file,
    exit,
    title: worksheet.title,
    recordedBy: worksheet.program.version,
    breaks,
    gone,
    cells: cells.map((cell) => ({
      ...cell,
      differences: cell.differences.map(({ path, recorded, recomputed }) => ({
        path,
        recorded: shownInJson(recorded),
        recomputed: shownInJson(recomputed),
      })),
    })),
  };
  return `${JSON.stringify(report, null, 2)}\n`;
}

function cellLines(cell: CellReplay, worksheet: Worksheet): readonly string[] {
  if (cell.came === 'same') return [];
  if (cell.came === 'unknown-kind') {
    return [`UNKNOWN  ${cell.id}: this program does not know cells of the kind "${cell.kind}".`];
  }
  const head = `DIFFERS  ${cell.id} (${cell.kind}): ${cell.sentence.replace(/\s+/g, ' ').trim()}`;
  if (!Object.hasOwn(worksheet.results, cell.id)) return [head, '    nothing is recorded for it'];
  const lines = cell.differences.map(({ path, recorded, recomputed }) => {
    return `    ${path === '' ? 'result' : path}: recorded ${shown(recorded)}, recomputed ${shown(recomputed)}`;
  });
  return [head, ...lines];
}

function shown(value: Json | undefined): string {
  if (value === undefined) return 'nothing';
  const text = typeof value === 'number' ? String(value) : JSON.stringify(value);
  return text.length > 200 ? `${text.slice(0, 200)}...` : text;
}

/** undefined has no JSON; a part that is not there is told by leaving the field out. */
function shownInJson(value: Json | undefined): Json | undefined {
  return typeof value === 'number' && !Number.isFinite(value) ? String(value) : value;
}

function counted(n: number, word: string): string {
  return `${n} ${word}${n === 1 ? '' : 's'}`;
}
