import { recordResults } from '../replay/record.ts';
import { writeWorksheet } from '../worksheet/write.ts';
import { download, safeName } from './download.ts';
import type { Page } from './page.ts';
import { PROGRAM_VERSION } from './program-version.ts';

/** Saves the worksheet with every cell's result to full precision. */
export async function saveCopy(page: Page): Promise<void> {
  page.show({ sheet: null });
  page.say('Working out the results that go into the file \u2026');
  const { registry, runner } = page.parts;
  const recorded = await recordResults(page.worksheet, registry, runner, PROGRAM_VERSION);
  const name = `${safeName(recorded.title)}.standfast.json`;
  download(new Blob([writeWorksheet(recorded)], { type: 'application/json' }), name);
  page.say(`Saved as ${name}.`);
}
