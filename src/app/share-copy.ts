import { canonicalTable } from '../data/canonical-table.ts';
import { tableFromStored } from '../data/stored.ts';
import { asLevels, columnOf } from '../data/table.ts';
import { counted, listed } from '../data/words.ts';
import { appendEntry } from '../worksheet/decision-log.ts';
import { sha256 } from '../worksheet/digest.ts';
import type { Cell, DataBlock, JsonObject, LogEntry, StoredColumn, Worksheet } from '../worksheet/format.ts';

export interface ShareChoices {
  /** Columns that are left out, each of one data block. */
  readonly leaveOut: readonly { readonly block: string; readonly column: string }[];
  /** The participant column whose codes are replaced; null = they stay. */
  readonly replace: string | null;
}

export interface ShareAbout {
  /** Id of the copy. */
  readonly id: string;
  readonly when: string;
  readonly who: string;
}

type Codes = ReadonlyMap<string, string>;

/**
 * A copy of a worksheet for sharing, without some columns and with other participant codes. Participants keep their
 * order of first appearance, so every result comes out the same; the results themselves are to be worked out again. The
 * log is a new chain: its first entry says what was done and names the end of the old chain and the new fingerprints,
 * then the old entries follow.
 *
 * @param worksheet whose log and data are whole; not modified
 */
export function copyForSharing(worksheet: Worksheet, choices: ShareChoices, about: ShareAbout): Worksheet {
  const codes = choices.replace === null ? new Map<string, string>() : newCodes(worksheet.data, choices.replace);
  const data = worksheet.data.map((block) => sharedBlock(block, choices, codes));
  const cells = worksheet.cells.map((cell) => renamed(cell, codes));
  const log = newChain(worksheet, choices, { codes, data }, about);
  return { ...worksheet, id: about.id, data, cells, log, results: {} };
}

/** Old code -> new one, numbered in the order in which they first appear: P01, P02, ... */
export function newCodes(data: readonly DataBlock[], column: string): Codes {
  const order = new Set<string>();
  for (const block of data) {
    const texts = textsOf(block, column);
    for (const text of texts ?? []) if (text !== null) order.add(text);
  }
  const width = String(order.size).length;
  return new Map([...order].map((code, i) => [code, `P${String(i + 1).padStart(width, '0')}`]));
}

/** The text of each row in a column, as a design reads participants; null = missing. */
function textsOf(block: DataBlock, name: string): readonly (string | null)[] | null {
  const column = columnOf(tableFromStored(block), name);
  if (column === undefined) return null;
  const { codes, levels } = asLevels(column);
  return Array.from(codes, (code) => levels[code] ?? null);
}

function sharedBlock(block: DataBlock, { leaveOut, replace }: ShareChoices, codes: Codes): DataBlock {
  const gone = new Set(leaveOut.filter((each) => each.block === block.id).map((each) => each.column));
  const texts = replace === null ? null : textsOf(block, replace);
  if (gone.size === 0 && texts === null) return block;
  const columns = block.columns
    .filter((column) => !gone.has(column.name))
    .map((column) => (texts !== null && column.name === replace ? recoded(column.name, texts, codes) : column));
  // What the import said of these columns may name a value in them.
  const told = [...gone, ...(replace === null ? [] : [replace])];
  const warnings = block.warnings.filter((warning) => !told.some((name) => warning.includes(name)));
  const table = sha256(canonicalTable(tableFromStored({ ...block, columns })));
  return { ...block, columns, warnings, fingerprint: { ...block.fingerprint, table } };
}

function recoded(name: string, texts: readonly (string | null)[], codes: Codes): StoredColumn {
  const levels = [...new Set(texts)].flatMap((text) => (text === null ? [] : [codes.get(text) ?? text]));
  const at = new Map(levels.map((level, i) => [level, i]));
  return { name, type: 'text', levels, codes: texts.map((text) => at.get(codes.get(text ?? '') ?? '') ?? -1) };
}

/** A cell that names participants names them by their new codes. */
function renamed(cell: Cell, codes: Codes): Cell {
  const { participants } = cell.settings;
  if (codes.size === 0 || !Array.isArray(participants)) return cell;
  const settings: JsonObject = {
    ...cell.settings,
    participants: participants.map((code: unknown) =>
      typeof code === 'string' ? (codes.get(code) ?? code) : String(code),
    ),
  };
  return { ...cell, settings };
}

interface Made {
  readonly codes: Codes;
  readonly data: readonly DataBlock[];
}

function newChain(worksheet: Worksheet, choices: ShareChoices, made: Made, about: ShareAbout): readonly LogEntry[] {
  const first = {
    when: about.when,
    who: about.who,
    what: whatWasDone(worksheet, choices, made),
    opening: worksheet.opening.state,
  };
  return worksheet.log.reduce(
    (log, { before: _before, hash: _hash, ...entry }) => appendEntry(log, entry),
    appendEntry([], first),
  );
}

function whatWasDone(worksheet: Worksheet, { leaveOut, replace }: ShareChoices, { codes, data }: Made): string {
  const last = worksheet.log.at(-1);
  const prints = data
    .filter((block, i) => block !== worksheet.data[i])
    .map((block) => `the table of ${block.name} now has the fingerprint ${block.fingerprint.table}`);
  const parts = [
    ...(replace === null
      ? []
      : [`${counted(codes.size, 'code')} in ${replace} replaced in the order of first appearance`]),
    ...(leaveOut.length === 0
      ? []
      : [
          `left out ${listed(
            leaveOut.map((each) => each.column),
            50,
          )}`,
        ]),
    last === undefined
      ? 'the log it was made from is empty'
      : `the log it was made from has ${counted(worksheet.log.length, 'entry', 'entries')}, which follow here in a new chain, and ends in ${last.hash}`,
    ...prints,
  ];
  return `copy made for sharing: ${parts.join('; ')}`;
}

/** Texts a person typed in which a code stands as a word: they are not changed, and have to be read. */
export function textsWithCodes(worksheet: Worksheet, codes: Codes): readonly string[] {
  // A bare number stands in many a text that names nobody.
  const telling = [...codes.keys()].filter((code) => /\p{L}/u.test(code) && code.length > 1);
  const names = (text: string): boolean => {
    const words = new Set(text.split(/[^\p{L}\p{N}_-]+/u));
    return telling.some((code) => words.has(code) || (/[^\p{L}\p{N}_-]/u.test(code) && text.includes(code)));
  };
  const places: [string, string][] = [
    ['the title', worksheet.title],
    ...worksheet.cells.map((cell, i): [string, string] => [
      `cell ${i + 1}`,
      JSON.stringify({ ...cell.settings, participants: null }),
    ]),
    ...worksheet.log.map((entry, i): [string, string] => [
      `entry ${i + 1} of the log`,
      `${entry.what} ${entry.who} ${entry.reason ?? ''}`,
    ]),
  ];
  return places.filter(([, text]) => names(text)).map(([place]) => place);
}
