import type { TableOut } from '../../cells/kind.ts';

function quoted(text: string): string {
  return /[",\r\n]/.test(text) ? `"${text.replace(/"/g, '""')}"` : text;
}

/** A text that a spreadsheet would take for a formula gets an apostrophe in front; numbers stay numbers. */
function harmless(text: string): string {
  return /^[=+@\t\r]/.test(text) || (text.startsWith('-') && !/^-[\d.]/.test(text)) ? `'${text}` : text;
}

/** A table as CSV with full-precision numbers, lines ended by CR LF (RFC 4180). */
export function csvOf(table: TableOut): string {
  const rows = (table.raw ?? table.rows).map((row) =>
    row.map((value) => (value === null ? '' : typeof value === 'number' ? String(value) : quoted(harmless(value)))),
  );
  const header = table.columns.map((column) => quoted(harmless(column.name)));
  return [header, ...rows].map((row) => `${row.join(',')}\r\n`).join('');
}

/** A table as it is shown, values separated by tabs: what is pasted into a document becomes a table. */
export function tabbedOf(table: TableOut): string {
  const header = table.columns.map((column) => column.name);
  return [header, ...table.rows].map((row) => row.map((text) => text.replace(/[\t\r\n]+/g, ' ')).join('\t')).join('\n');
}
