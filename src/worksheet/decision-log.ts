import { canonicalJson } from './canonical.ts';
import { sha256 } from './digest.ts';
import type { LogEntry } from './format.ts';

/** What stands for the entry before the first one. */
export const NO_ENTRY = '0'.repeat(64);

/**
 * The log with one entry more, chained to the entry before it.
 *
 * @param log is not modified
 * @param entry what is to be told; the hashes are added
 * @returns a new log
 */
export function appendEntry(log: readonly LogEntry[], entry: Omit<LogEntry, 'before' | 'hash'>): readonly LogEntry[] {
  const chained = { ...entry, before: log.at(-1)?.hash ?? NO_ENTRY };
  return [...log, { ...chained, hash: hashOf(chained) }];
}

export type LogCheck =
  | { readonly whole: true }
  /** `at` counts from 0. */
  | { readonly whole: false; readonly at: number; readonly sentence: string };

/**
 * Whether every entry still hashes to what it says and names the entry before it. This shows accidental and careless
 * edits; who rebuilds every hash after an edit is not found out.
 */
export function checkLog(log: readonly LogEntry[]): LogCheck {
  let before = NO_ENTRY;
  for (const [at, entry] of log.entries()) {
    const { hash, ...chained } = entry;
    const where = `Entry ${at + 1} of the decision log ("${entry.what}")`;
    if (entry.before !== before) {
      return {
        whole: false,
        at,
        sentence: `${where} does not follow the entry before it: an entry was removed, added or moved.`,
      };
    }
    if (hashOf(chained) !== hash) {
      return { whole: false, at, sentence: `${where} was changed after it was written.` };
    }
    before = hash;
  }
  return { whole: true };
}

function hashOf(entry: Omit<LogEntry, 'hash'>): string {
  // A field that is there but undefined is not in the file, so it may not count.
  return sha256(canonicalJson(Object.fromEntries(Object.entries(entry).filter(([, value]) => value !== undefined))));
}
