import type { DataBlock } from '../worksheet/format.ts';
import { blockFromBytes, nextBlockId } from './data-block.ts';
import type { Page } from './page.ts';

/** Reads bytes into a data block; where they cannot be read, says why and gives null: the worksheet stays as it is. */
export function readBlock(page: Page, bytes: Uint8Array, name: string): DataBlock | null {
  try {
    return blockFromBytes(bytes, name, nextBlockId(page.worksheet));
  } catch (error) {
    page.say(error instanceof Error ? error.message : String(error), true);
    return null;
  }
}
