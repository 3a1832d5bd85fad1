import type { TableOut } from '../../cells/kind.ts';
import { counted } from '../data/words.ts';
import type { LogEntry, Worksheet } from '../worksheet/format.ts';

/** "28 Nov 2031, 14:05" in the reader's own time zone. */
export function timeWords(when: string): string {
  const date = new Date(when);
  if (Number.isNaN(date.getTime())) return when;
  const options = { day: 'numeric', month: 'short', year: 'numeric', hour: '2-digit', minute: '2-digit' } as const;
  return date.toLocaleString('en-GB', options);
}

/** Whether the conditions were open when an entry was written. */
export const STATE = { blind: 'while hidden', 'opened-early': 'opened early', sealed: 'after sealing' };

/** What the chain proves, and what it does not. */
export const WHAT_IT_PROVES =
  'Each entry holds the hash of the one before it. That shows accidental or careless edits; a determined writer can ' +
  'rebuild the chain, and the clock is the writer\u2019s own. Who keeps the hash of the last entry elsewhere can tell ' +
  'later whether anything up to it was changed.';

/** An entry as one line of text; its time as `time` writes it. */
export function entryText(entry: LogEntry, time: (when: string) => string = timeWords): string {
  const reason = entry.reason === undefined ? '' : ` Reason: ${entry.reason}.`;
  const who = entry.who === '' ? '' : `, ${entry.who}`;
  return `${time(entry.when)}${who} (${STATE[entry.opening]}): ${entry.what}.${reason}`;
}

/** Everyone who signed an entry, by first appearance; '' = nobody's name. */
export function signersOf(log: readonly LogEntry[]): readonly string[] {
  return [...new Set(log.map((entry) => entry.who))];
}

/** The entries that hold these letters, of one signer where one is named. */
export function filtered(log: readonly LogEntry[], letters: string, who: string | null): readonly LogEntry[] {
  const wanted = letters.trim().toLowerCase();
  return log.filter((entry) => (who === null || entry.who === who) && entryText(entry).toLowerCase().includes(wanted));
}

/** The whole log as text, oldest first, with the times as they are recorded. */
export function logText({ title, log }: Pick<Worksheet, 'title' | 'log'>): string {
  const last = log.at(-1);
  const end =
    last === undefined
      ? 'It has no entries yet.'
      : `${counted(log.length, 'entry', 'entries')}; the last has the hash ${last.hash}.`;
  const entries = log.map((entry, i) => `${i + 1}. ${entryText(entry, (when) => when)}`);
  return `${[`Decision log of "${title}"`, WHAT_IT_PROVES, end, '', ...entries].join('\n')}\n`;
}

const COLUMNS = ['entry', 'when', 'who', 'what', 'reason', 'conditions', 'hash_before', 'hash'];

/** The whole log as a table, oldest first: a line an entry, as it is recorded. */
export function logTable(log: readonly LogEntry[]): TableOut {
  const rows = log.map((entry, i) => [
    String(i + 1),
    entry.when,
    entry.who,
    entry.what,
    entry.reason ?? '',
    STATE[entry.opening],
    entry.before,
    entry.hash,
  ]);
  return { title: 'decision log', columns: COLUMNS.map((name) => ({ name, numeric: name === 'entry' })), rows };
}
