import type { Blank, Context, Kind, Part, Settings } from '../../cells/kind.ts';
import type { SharedNumber, Worksheet } from '../worksheet/format.ts';
import { sharedText } from './shared-text.ts';

function blanksOf(parts: readonly Part[]): Map<string, Blank> {
  const blanks = new Map<string, Blank>();
  for (const part of parts) if (typeof part !== 'string') blanks.set(part.key, part);
  return blanks;
}

/** Every participant code that a value above carries: those never enter the log. */
function codesIn(context: Context): ReadonlySet<string> {
  const codes = new Set<string>();
  for (const value of Object.values(context.given)) {
    const participants = (value as { participants?: readonly string[] } | undefined)?.participants;
    for (const code of participants ?? []) codes.add(code);
  }
  return codes;
}

function namesParticipants(blank: Blank, codes: ReadonlySet<string>): boolean {
  if (blank.editor.type === 'choices') return blank.editor.values.some((value) => codes.has(value));
  return blank.editor.type === 'choice' && blank.editor.value !== null && codes.has(blank.editor.value);
}

function chosen(blank: Blank): string {
  if (blank.editor.type === 'choices') return `${blank.editor.values.length} chosen`;
  return 'one chosen';
}

function change(before: Blank, after: Blank, codes: ReadonlySet<string>): string {
  if (after.editor.type === 'text' && after.editor.long) return `${after.label} rewritten`;
  const hidden = namesParticipants(before, codes) || namesParticipants(after, codes);
  const was = hidden ? chosen(before) : before.filled ? before.shown : 'open';
  const is = hidden ? chosen(after) : after.filled ? after.shown : 'open';
  return was === is ? `${after.label} changed` : `${after.label} ${was} \u2192 ${is}`;
}

/**
 * What changed in a cell, as the decision log writes it: "exclusion rule: cutoff 2.5 -> 3", from the kind's own
 * sentence; null where the settings come to the same sentence. Participant codes are counted, not named.
 */
export function changeSentence(kind: Kind, before: Settings, after: Settings, context: Context): string | null {
  if (JSON.stringify(before) === JSON.stringify(after)) return null;
  const was = blanksOf(kind.sentence(before, context));
  const is = blanksOf(kind.sentence(after, context));
  const codes = codesIn(context);
  const changes: string[] = [];
  for (const [key, blank] of is) {
    const old = was.get(key);
    if (old === undefined) continue;
    const tie = tied(old, blank, context);
    if (tie !== null) {
      changes.push(tie);
      continue;
    }
    const same = old.shown === blank.shown && old.filled === blank.filled;
    if (!same || longText(old) !== longText(blank)) changes.push(change(old, blank, codes));
  }
  const title = kind.title(after);
  return changes.length === 0 ? `${title}: settings changed` : `${title}: ${changes.join('; ')}`;
}

/** What changed where a number was tied to a shared one, or freed from it; null where neither. */
function tied(before: Blank, after: Blank, context: Context): string | null {
  const was = sharedIdOf(before);
  const is = sharedIdOf(after);
  if (was === is) return null;
  if (is === null) return `${after.label} ${after.shown}, a number of its own`;
  const name = context.shared.find((each) => each.id === is)?.name ?? is;
  return `${after.label} follows the shared number ${name}, ${after.shown}`;
}

function sharedIdOf(blank: Blank): string | null {
  if (blank.editor.type !== 'number') return null;
  const { value } = blank.editor;
  return value !== null && typeof value === 'object' ? value.shared : null;
}

function longText(blank: Blank): string | null {
  return blank.editor.type === 'text' ? blank.editor.value : null;
}

/** "trim 20 % -> 10 %"; null where the number stands as it stood. */
export function sharedSentence(before: Worksheet, after: Worksheet, id: string): string | null {
  const find = (worksheet: Worksheet): SharedNumber | undefined => worksheet.shared.find((each) => each.id === id);
  const was = find(before);
  const is = find(after);
  if (was === undefined || is === undefined || was.value === is.value) return null;
  return `${is.name} ${sharedText(was)} \u2192 ${sharedText(is)}`;
}
