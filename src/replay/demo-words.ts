import { registry } from '../../cells/registry.ts';
import { inlineRunner } from '../workers/inline.ts';
import { parseWorksheet } from '../worksheet/parse.ts';
import { readablePart } from '../worksheet/readable.ts';
import { computedParts } from './saved-parts.ts';

/** The readable part for a worksheet that the build puts into a page. */
export async function readableOf(json: string): Promise<string> {
  const parsed = parseWorksheet(json);
  if (!parsed.ok) throw new Error(parsed.sentence);
  const { cells } = await computedParts(parsed.worksheet, registry, inlineRunner(), parsed.worksheet.program.version);
  return readablePart(parsed.worksheet, cells);
}
