import type { DataBlock, StoredColumn } from './format.ts';

/**
 * The rows of a data block as CSV: comma, lines ended by LF, numbers in their shortest form that reads back the same, an
 * empty field for a missing value. Values stand as they were read.
 *
 * @source RFC 4180 (Shafranovich 2005), section 2: fields with quotation marks, commas or line breaks are quoted
 * @checked read back by the importer, the same table, exactly
 */
export function dataCsv(block: Pick<DataBlock, 'rows' | 'columns'>): string {
  const lines = [block.columns.map((column) => quoted(column.name)).join(',')];
  const texts = block.columns.map(textOf);
  for (let row = 0; row < block.rows; row++) lines.push(texts.map((text) => text(row)).join(','));
  return `${lines.join('\n')}\n`;
}

function textOf(column: StoredColumn): (row: number) => string {
  if (column.type === 'number') {
    return (row) => {
      const value = column.values[row] ?? null;
      return value === null ? '' : String(value);
    };
  }
  const levels = column.levels.map(quoted);
  return (row) => levels[column.codes[row] ?? -1] ?? '';
}

function quoted(text: string): string {
  return /[",\r\n]|^\s|\s$/.test(text) ? `"${text.replaceAll('"', '""')}"` : text;
}
