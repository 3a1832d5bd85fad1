import type { Worksheet } from './format.ts';

/** Characters a line may have before what is on it is broken up. */
const WIDTH = 120;
/** Entries on a line of a long list of numbers: a changed number changes one line. */
const ROW = 20;

/** Fields of known parts stand in this order; all other fields follow in the order of the alphabet. */
const ORDER: readonly string[] = [
  'format',
  'version',
  'id',
  'title',
  'name',
  'kind',
  'type',
  'settings',
  'from',
  'leftOut',
  'value',
  'unit',
  'min',
  'max',
  'step',
  'none',
  'program',
  'seed',
  'opening',
  'shared',
  'cells',
  'reference',
  'log',
  'results',
  'data',
];
const RANK = new Map(ORDER.map((key, i) => [key, i]));

/**
 * The worksheet as JSON text: the same record gives the same text, whatever the order in which it was put together, and
 * a small edit changes few lines. Shared numbers and cells come first, data last.
 *
 * @throws RangeError naming the place of a number that is not finite; TypeError for anything that is not JSON
 */
export function writeWorksheet(worksheet: Worksheet): string {
  return `${write(worksheet, '', '')}\n`;
}

function write(value: unknown, indent: string, place: string): string {
  if (Array.isArray(value)) return writeList(value, indent, place);
  if (typeof value === 'object' && value !== null) return writeObject(value, indent, place);
  return writeOne(value, place);
}

function writeOne(value: unknown, place: string): string {
  if (typeof value === 'number' && !Number.isFinite(value)) {
    throw new RangeError(`*worksheet${place}* must be a finite number or null; got ${value}`);
  }
  const text = JSON.stringify(value) as string | undefined;
  if (text === undefined) throw new TypeError(`*worksheet${place}* must be plain JSON data; got ${typeof value}`);
  return text;
}

function writeObject(value: object, indent: string, place: string): string {
  const fields = value as { readonly [key: string]: unknown };
  const keys = Object.keys(fields)
    .filter((key) => fields[key] !== undefined)
    .sort(byOrder);
  const inner = `${indent}  `;
  const lines = keys.map((key) => `${JSON.stringify(key)}: ${write(fields[key], inner, `${place}.${key}`)}`);
  return joinParts(lines, indent, '{ ', ' }', '{', '}');
}

function writeList(values: readonly unknown[], indent: string, place: string): string {
  const inner = `${indent}  `;
  const simple = values.every((each) => typeof each !== 'object' || each === null);
  const parts = simple
    ? values.map((each, i) => writeOne(each, `${place}[${i}]`))
    : values.map((each, i) => write(each, inner, `${place}[${i}]`));
  if (!simple || parts.length <= ROW) return joinParts(parts, indent, '[', ']', '[', ']');
  const rows: string[] = [];
  for (let i = 0; i < parts.length; i += ROW) rows.push(parts.slice(i, i + ROW).join(', '));
  return `[\n${inner}${rows.join(`,\n${inner}`)}\n${indent}]`;
}

/** On one line where that fits and nothing in it needed more than one, else one part a line. */
function joinParts(
  parts: readonly string[],
  indent: string,
  open: string,
  close: string,
  start: string,
  end: string,
): string {
  if (parts.length === 0) return `${start}${end}`;
  const line = `${open}${parts.join(', ')}${close}`;
  if (indent.length + line.length <= WIDTH && !line.includes('\n')) return line;
  return `${start}\n${indent}  ${parts.join(`,\n${indent}  `)}\n${indent}${end}`;
}

function byOrder(a: string, b: string): number {
  const rank = (RANK.get(a) ?? ORDER.length) - (RANK.get(b) ?? ORDER.length);
  if (rank !== 0) return rank;
  return a < b ? -1 : 1;
}
