import { canonicalTable } from '../data/canonical-table.ts';
import { tableFromStored } from '../data/stored.ts';
import { checkLog } from '../worksheet/decision-log.ts';
import { sha256 } from '../worksheet/digest.ts';
import type { DataBlock, Worksheet } from '../worksheet/format.ts';

/**
 * Whether the decision log and the data are still what they were when they were written.
 *
 * @returns a sentence for each break; none when all is whole
 */
export function breaksOf(worksheet: Worksheet): readonly string[] {
  const log = checkLog(worksheet.log);
  return [...(log.whole ? [] : [log.sentence]), ...worksheet.data.flatMap(dataBreaks)];
}

function dataBreaks(block: DataBlock): readonly string[] {
  const digest = sha256(canonicalTable(tableFromStored(block)));
  if (digest === block.fingerprint.table) return [];
  return [
    `The data of ${block.name} are not those that were read: their fingerprint is ${digest}, recorded is ${block.fingerprint.table}.`,
  ];
}
