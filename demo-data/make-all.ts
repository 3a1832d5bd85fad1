import { readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { registry } from '../cells/registry.ts';
import { PROGRAM_VERSION } from '../src/app/program-version.ts';
import { recordResults } from '../src/replay/record.ts';
import { inlineRunner } from '../src/workers/inline.ts';
import { writeWorksheet } from '../src/worksheet/write.ts';
import { csvFiles } from './csv-files.ts';
import { demoWorksheet, plans } from './worksheets.ts';

const FOLDER = 'demo-data';

/** `npm run demo-data`: writes every demo data file and every demo worksheet again. */
export async function main(): Promise<number> {
  for (const { name, make } of csvFiles) {
    writeFileSync(join(FOLDER, name), make());
    process.stdout.write(`${name}\n`);
  }
  for (const plan of plans) {
    const worksheet = demoWorksheet(plan, readFileSync(join(FOLDER, plan.file), 'utf8'));
    const recorded = await recordResults(worksheet, registry, inlineRunner(), PROGRAM_VERSION);
    const failed = Object.entries(recorded.results).filter(([, result]) => result.status !== 'value');
    for (const [id, result] of failed) process.stderr.write(`${plan.name} ${id}: ${String(result.value)}\n`);
    if (failed.length > 0) return 1;
    writeFileSync(join(FOLDER, `${plan.name}.standfast.json`), writeWorksheet(recorded));
    process.stdout.write(`${plan.name}.standfast.json\n`);
  }
  return 0;
}
