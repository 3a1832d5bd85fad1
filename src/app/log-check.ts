import { counted, listed } from '../data/words.ts';
import { breaksOf } from '../replay/check-whole.ts';
import { checkLog } from '../worksheet/decision-log.ts';
import type { Worksheet } from '../worksheet/format.ts';

const kept = new WeakMap<Worksheet['data'], readonly string[]>();

/** Breaks of the data, taken once for each list of data blocks: the digest of many rows takes a while. */
function dataBreaks(worksheet: Worksheet): readonly string[] {
  const before = kept.get(worksheet.data);
  if (before !== undefined) return before;
  const found = breaksOf({ ...worksheet, log: [] });
  kept.set(worksheet.data, found);
  return found;
}

/** Sentences about what is broken in the decision log or in the data; none where all is whole. */
export function brokenIn(worksheet: Worksheet): readonly string[] {
  const log = checkLog(worksheet.log);
  return [...(log.whole ? [] : [log.sentence]), ...dataBreaks(worksheet)];
}

/** What was found whole: the chain, its end, and the data. */
export function wholeWords(worksheet: Worksheet): string {
  const { log, data } = worksheet;
  const last = log.at(-1);
  const chain =
    last === undefined
      ? ''
      : `The chain of ${counted(log.length, 'entry', 'entries')} is whole and ends in ${last.hash}. `;
  const names = listed(data.map((block) => block.name));
  return data.length === 0
    ? chain.trim()
    : `${chain}The data of ${names} still have the fingerprint they were read with.`;
}
