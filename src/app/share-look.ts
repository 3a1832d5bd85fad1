import type { Registry } from '../../cells/kind.ts';
import type { Cell, DataBlock, Json, StoredColumn, Worksheet } from '../worksheet/format.ts';

/** A column of the data as it matters before a file is given away. */
export interface ColumnLook {
  readonly block: string;
  readonly file: string;
  readonly column: string;
  /** Why it looks identifying: "its name says e-mail"; null where it does not. */
  readonly why: string | null;
  /** The cell that uses it, so that it cannot be left out; null where none does. */
  readonly usedBy: string | null;
}

const NAMES: readonly (readonly [RegExp, string])[] = [
  [/e_?mail|^mail$/, 'an e-mail address'],
  [/phone|^tel$|^mobile$|^cell_?phone$|^fax$/, 'a telephone number'],
  [/birth|^dob$|^born$/, 'a date of birth'],
  [
    /^name$|(first|last|sur|fore|family|given|full|middle|maiden|participant|person|patient|user|nick)_?names?$|^initials$/,
    'a name',
  ],
  [/address|^street$|post_?code|^zip(_?code)?$|^city$|^ip$/, 'an address'],
  [/latitude|longitude|^lat$|^lon$|^lng$|^gps$/, 'a place'],
  [
    /^ssn$|social_security|passport|national_id|insurance_(no|number|id)|student_(no|number|id)|patient_(no|number|id)/,
    'an official number',
  ],
];
const VALUES: readonly (readonly [RegExp, string])[] = [
  [/^[^\s@]+@[^\s@]+\.[^\s@]+$/, 'e-mail addresses'],
  [/^\+?\(?\d[\d\s()/.-]{6,}\d$/, 'telephone numbers'],
];
/** Texts of which this many differ, and this share of the rows, can tell people apart. */
const MANY = 10;
const MANY_SHARE = 0.5;

/** Settings whose texts are choices, levels or a person's own words, never columns: "trial" is one of their values, too. */
const NOT_COLUMNS: ReadonlySet<string> = new Set([
  ...['row', 'rows', 'unit', 'direction', 'what', 'how', 'measure', 'sides', 'scope', 'reason', 'participants'],
  ...[
    'to',
    'make',
    'fn',
    'op',
    'statistic',
    'estimator',
    'alternative',
    'first',
    'second',
    'relation',
    'title',
    'text',
  ],
]);

/** The column that tells participants apart, as the designs name it: one, none, or several. */
export function participantColumns(worksheet: Worksheet): readonly string[] {
  const stored = new Set(worksheet.data.flatMap((block) => block.columns.map((column) => column.name)));
  const named = worksheet.cells.filter((cell) => cell.kind === 'design').map((cell) => cell.settings.participant);
  return [...new Set(named)].filter((name): name is string => typeof name === 'string' && stored.has(name));
}

/** Every column of the data, those that look identifying first; the participant column is not among them. */
export function columnLooks(worksheet: Worksheet, registry: Registry): readonly ColumnLook[] {
  const participants = new Set(participantColumns(worksheet));
  const looks = worksheet.data.flatMap((block) =>
    block.columns
      .filter((column) => !participants.has(column.name))
      .map((column) => lookOf(worksheet, registry, block, column)),
  );
  return [...looks.filter(({ why }) => why !== null), ...looks.filter(({ why }) => why === null)];
}

function lookOf(worksheet: Worksheet, registry: Registry, block: DataBlock, column: StoredColumn): ColumnLook {
  const user = worksheet.cells.find((cell) => uses(cell.settings, column.name));
  const usedBy = user === undefined ? null : titleOf(user, registry);
  return { block: block.id, file: block.name, column: column.name, why: whyOf(column, block.rows), usedBy };
}

function titleOf(cell: Cell, registry: Registry): string {
  return Object.hasOwn(registry, cell.kind) ? (registry[cell.kind]?.title(cell.settings) ?? cell.kind) : cell.kind;
}

/** Why a column looks identifying, or null. */
function whyOf(column: StoredColumn, rows: number): string | null {
  const words = column.name
    .replace(/([a-z])([A-Z])/g, '$1_$2')
    .toLowerCase()
    .replace(/[^\p{L}\p{N}]+/gu, '_');
  const named = NAMES.find(([pattern]) => pattern.test(words));
  if (named !== undefined) return `its name says ${named[1]}`;
  if (column.type === 'number') return null;
  const { levels, codes } = column;
  const held = VALUES.find(
    ([pattern]) => levels.length > 0 && levels.filter((text) => pattern.test(text)).length * 2 >= levels.length,
  );
  if (column.type === 'text' && held !== undefined) return `it holds ${held[1]}`;
  if (column.type === 'date')
    return manyYears(levels) ? 'its dates lie more than ten years apart, as dates of birth do' : null;
  const present = codes.filter((code) => code >= 0).length;
  const many = levels.length >= MANY && levels.length > MANY_SHARE * Math.min(present, rows);
  return many ? `nearly every text in it is different (${levels.length} of ${present})` : null;
}

function manyYears(dates: readonly string[]): boolean {
  const years = dates.map((date) => Number(date.slice(0, 4))).filter((year) => Number.isFinite(year));
  return years.length > 1 && Math.max(...years.slice(0, 10_000)) - Math.min(...years.slice(0, 10_000)) > 10;
}

/** Whether settings name a column anywhere, also within a formula. */
export function uses(settings: Json, column: string, key = ''): boolean {
  if (typeof settings === 'string') return settings === column || (key === 'formula' && settings.includes(column));
  if (Array.isArray(settings)) return settings.some((each: Json) => uses(each, column, key));
  if (typeof settings !== 'object' || settings === null) return false;
  return Object.entries(settings).some(([name, each]) => !NOT_COLUMNS.has(name) && uses(each as Json, column, name));
}

/** The cell that uses the participant column for more than telling participants apart; null where none does. */
export function usedOtherwise(worksheet: Worksheet, registry: Registry, column: string): string | null {
  const roles = new Set(['participant', 'id']);
  const user = worksheet.cells.find((cell) =>
    Object.entries(cell.settings).some(([key, each]) => !roles.has(key) && uses({ [key]: each }, column)),
  );
  return user === undefined ? null : titleOf(user, registry);
}
