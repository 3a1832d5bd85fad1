import { recordResults, resultsOf } from '../replay/record.ts';
import type { Worksheet } from '../worksheet/format.ts';
import { writeWorksheet } from '../worksheet/write.ts';
import { download, safeName } from './download.ts';
import type { Page } from './page.ts';
import { PROGRAM_VERSION } from './program-version.ts';

/** The worksheet with every cell's result to full precision, as the engine has them; worked out again if it was edited meanwhile. */
async function recorded(page: Page): Promise<Worksheet> {
  const { registry, runner, engine } = page.parts;
  const { worksheet } = page;
  const results = await resultsOf(engine, worksheet, registry);
  if (page.worksheet !== worksheet) return recordResults(page.worksheet, registry, runner, PROGRAM_VERSION);
  return { ...worksheet, results, program: { name: 'standfast', version: PROGRAM_VERSION } };
}

/** Saves the worksheet with its results. */
export async function saveCopy(page: Page): Promise<void> {
  page.show({ sheet: null });
  page.say('Working out the results that go into the file \u2026');
  try {
    const whole = await recorded(page);
    const name = `${safeName(whole.title)}.standfast.json`;
    download(new Blob([writeWorksheet(whole)], { type: 'application/json' }), name);
    page.say(`Saved as ${name}.`);
  } catch (error) {
    page.say(`The file could not be saved: ${error instanceof Error ? error.message : String(error)}`, true);
  }
}
