import { canonicalTable } from '../data/canonical-table.ts';
import { importBytes } from '../data/import/import-bytes.ts';
import { Refusal } from '../data/refusal.ts';
import { storedFromTable } from '../data/stored.ts';
import { Fault } from '../worksheet/check-part.ts';
import { sha256 } from '../worksheet/digest.ts';
import type { DataBlock, Worksheet } from '../worksheet/format.ts';
import { MAX_TEXT } from '../worksheet/parse.ts';
import { checkDataBlock } from '../worksheet/schema.ts';

/** An id for a data block that the worksheet does not have yet: d1, d2, ... */
export function nextBlockId(worksheet: Worksheet): string {
  const used = new Set(worksheet.data.map((block) => block.id));
  let n = worksheet.data.length + 1;
  while (used.has(`d${n}`)) n++;
  return `d${n}`;
}

/**
 * Reads a data file into a block with both fingerprints.
 *
 * @throws Refusal with a sentence where it cannot be read, or where a worksheet with it could not be opened again
 */
export function blockFromBytes(bytes: Uint8Array, name: string, id: string): DataBlock {
  const { table, warnings } = importBytes(bytes, name);
  const block: DataBlock = {
    id,
    name,
    rows: table.rows,
    columns: storedFromTable(table),
    fingerprint: { bytes: sha256(bytes), table: sha256(canonicalTable(table)) },
    warnings,
  };
  refuseUnkept(block, bytes.length);
  return block;
}

function refuseUnkept(block: DataBlock, size: number): void {
  const refusal = (why: string) =>
    new Refusal(`${block.name} is more than a worksheet can hold: ${why}. Leave out columns or rows, or shorten them.`);
  try {
    checkDataBlock(block, '');
  } catch (error) {
    throw error instanceof Fault ? refusal(`${error.place} ${error.message}`.trim()) : error;
  }
  // Written out, a number takes a few times its length in the data file at most, so a small file needs no look.
  if (size < MAX_TEXT / 16) return;
  const length = JSON.stringify(block).length;
  if (length > MAX_TEXT / 2) throw refusal(`written out it has ${length} characters; at most ${MAX_TEXT / 2} are kept`);
}
