import { computedParts, type SavedParts, savedParts } from '../replay/saved-parts.ts';
import type { Worksheet } from '../worksheet/format.ts';
import { pageWithWorksheet } from '../worksheet/html.ts';
import { readablePart } from '../worksheet/readable.ts';
import { writeWorksheet } from '../worksheet/write.ts';
import { download, safeName } from './download.ts';
import type { Page } from './page.ts';
import { PROGRAM_VERSION } from './program-version.ts';
import { pageAsBuilt } from './save-page.ts';

/** One file that opens by itself, or the worksheet alone. */
export type CopyType = 'html' | 'json';

/** What goes into the file, from the page's own engine; worked out again where that shows another worksheet by now. */
async function partsOf(page: Page, worksheet: Worksheet): Promise<SavedParts> {
  const { registry, runner, engine } = page.parts;
  if (page.worksheet === worksheet) {
    const parts = await savedParts(engine, worksheet, registry, PROGRAM_VERSION);
    if (page.worksheet === worksheet) return parts;
  }
  return computedParts(worksheet, registry, runner, PROGRAM_VERSION);
}

function fileOf({ worksheet, cells }: SavedParts, type: CopyType): Blob {
  const json = writeWorksheet(worksheet);
  if (type === 'json') return new Blob([json], { type: 'application/json' });
  const page = pageAsBuilt();
  if (page === null) throw new Error('the program is not inside this page');
  return new Blob([pageWithWorksheet(page, readablePart(worksheet, cells), json)], { type: 'text/html' });
}

/** Saves a worksheet with its results: the open one, or one made from it for sharing. */
export async function saveCopy(page: Page, worksheet: Worksheet, type: CopyType): Promise<void> {
  page.show({ sheet: null });
  page.say('Working out the results that go into the file \u2026');
  try {
    const parts = await partsOf(page, worksheet);
    const name = `${safeName(worksheet.title)}.standfast.${type}`;
    download(fileOf(parts, type), name);
    page.say(`Saved as ${name}.`);
  } catch (error) {
    page.say(`The file could not be saved: ${error instanceof Error ? error.message : String(error)}`, true);
  }
}
