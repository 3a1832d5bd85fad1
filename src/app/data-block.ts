import { canonicalTable } from '../data/canonical-table.ts';
import { importBytes } from '../data/import/import-bytes.ts';
import { storedFromTable } from '../data/stored.ts';
import { sha256 } from '../worksheet/digest.ts';
import type { DataBlock, Worksheet } from '../worksheet/format.ts';

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
 * @throws Refusal with a sentence where it cannot be read
 */
export function blockFromBytes(bytes: Uint8Array, name: string, id: string): DataBlock {
  const { table, warnings } = importBytes(bytes, name);
  return {
    id,
    name,
    rows: table.rows,
    columns: storedFromTable(table),
    fingerprint: { bytes: sha256(bytes), table: sha256(canonicalTable(table)) },
    warnings,
  };
}
