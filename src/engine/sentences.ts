import type { Registry, ValueType } from '../../cells/kind.ts';
import type { Worksheet } from '../worksheet/format.ts';

/** A cell as the reader knows it: its place from the top and the quiet word over it, "cell 4 (score)". */
export function cellName(worksheet: Worksheet, registry: Registry, cellId: string): string {
  const index = worksheet.cells.findIndex((cell) => cell.id === cellId);
  const cell = worksheet.cells[index];
  if (cell === undefined) return `"${cellId}"`;
  const kind = Object.hasOwn(registry, cell.kind) ? registry[cell.kind] : undefined;
  return `cell ${index + 1} (${kind === undefined ? cell.kind : kind.title(cell.settings)})`;
}

/** "a table", "scores": a value type in a sentence. */
export function typeInWords(type: ValueType): string {
  return type.endsWith('s') ? type : `a ${type}`;
}

/** The cells that give `type`, for "choose ...": never the cell itself. */
export function fittingCells(worksheet: Worksheet, registry: Registry, cellId: string, type: ValueType): string {
  const fitting = worksheet.cells.filter(
    (cell) => cell.id !== cellId && Object.hasOwn(registry, cell.kind) && registry[cell.kind]?.gives === type,
  );
  if (fitting.length === 0) return `No cell of this worksheet gives ${typeInWords(type)}: add one above.`;
  const names = fitting.slice(0, 5).map((cell) => cellName(worksheet, registry, cell.id));
  return `${fitting.length === 1 ? 'The cell that fits is' : 'Cells that fit are'} ${names.join(', ')}.`;
}

/** A defect of the program, told to the reader. */
export function defectSentence(error: unknown): string {
  const message = error instanceof Error ? error.message : String(error);
  return (
    `Something in Standfast itself went wrong here: ${message.replace(/\.+$/, '')}. ` +
    'Your worksheet is kept; change this cell or leave it out to go on, and the other cells keep working.'
  );
}
