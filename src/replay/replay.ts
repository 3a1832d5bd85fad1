import { basename } from 'node:path';
import { registry } from '../../cells/registry.ts';
import { inlineRunner } from '../workers/inline.ts';
import { nodePool } from '../workers/node-pool.ts';
import type { Worksheet } from '../worksheet/format.ts';
import { openWorksheetFile } from './open-file.ts';
import { replayJson, replayText } from './replay-report.ts';
import { exitOf, replayWorksheet } from './replay-worksheet.ts';

const USE = 'Use: npm run -s replay -- FILE [--json], where FILE is a .standfast.json or .standfast.html file.';

/**
 * The command `replay`: computes a saved worksheet again and says whether every number came out again.
 *
 * @param argv the file, and `--json` for a report that programs read
 * @returns exit code: 0 everything came out again, 2 the file is unusable, 3 something differs or a kind is unknown,
 *   4 the decision log or the data are broken
 */
export async function main(argv: readonly string[]): Promise<number> {
  const json = argv.includes('--json');
  const files = argv.filter((each) => each !== '--json');
  const [file] = files;
  const strange = files.find((each) => each.startsWith('-'));
  if (file === undefined || files.length > 1 || strange !== undefined) {
    return unusable(json, strange === undefined ? USE : `There is no option ${strange}. ${USE}`, file);
  }
  const opened = await openWorksheetFile(file);
  if (!opened.ok) return unusable(json, opened.sentence, file);
  return replay(file, opened.worksheet, json);
}

async function replay(file: string, worksheet: Worksheet, json: boolean): Promise<number> {
  // A thread can load the bundled command, but not its sources, from which the tests run it.
  const runner = import.meta.url.endsWith('.ts') ? inlineRunner() : nodePool();
  try {
    const replayed = await replayWorksheet(worksheet, registry, runner);
    const exit = exitOf(replayed);
    const about = { file: basename(file), worksheet, replayed, exit };
    process.stdout.write(json ? replayJson(about) : replayText(about));
    return exit;
  } finally {
    runner.close();
  }
}

function unusable(json: boolean, sentence: string, file: string | undefined): number {
  if (json)
    process.stdout.write(
      `${JSON.stringify({ file: file === undefined ? null : basename(file), exit: 2, sentence })}\n`,
    );
  else process.stderr.write(`${sentence}\n`);
  return 2;
}
