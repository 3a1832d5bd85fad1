import { existsSync, readdirSync, statSync } from 'node:fs';
import { checkCases } from './check-cases.ts';
import { checkTails } from './check-tails.ts';

interface Outcome {
  readonly passed: number;
  readonly failed: number;
  readonly skipped: number;
  readonly lines: readonly string[];
}

function runCases(dir: string): Outcome {
  const { passed, failed, skipped, misses, skippedMethods } = checkCases(dir);
  const lines = [...misses, ...skippedMethods.map((method) => `${method}: skipped, this method is not offered`)];
  return { passed, failed, skipped, lines };
}

function runTails(dir: string): Outcome {
  const { misses, ...counts } = checkTails(dir);
  return { ...counts, lines: misses };
}

/** Cases are a JSON beside each CSV; tail grids are CSV files alone. Null where the folder holds neither. */
function kindOf(dir: string): 'cases' | 'tails' | null {
  const files = readdirSync(dir);
  if (files.some((file) => file.endsWith('.json'))) return 'cases';
  return files.some((file) => file.endsWith('.csv')) ? 'tails' : null;
}

function unusable(sentence: string): number {
  process.stderr.write(`${sentence}\n`);
  return 2;
}

/**
 * `npm run -s check-reference -- DIR`: runs a folder of outside check cases or of tail grids, prints each miss and the
 * counts. Exit 0 where nothing failed, 1 where something did, 2 where the folder cannot be used.
 */
export async function main(argv: readonly string[]): Promise<number> {
  const [dir] = argv;
  if (dir === undefined) return unusable('Name the folder to check: npm run -s check-reference -- DIR');
  if (!existsSync(dir) || !statSync(dir).isDirectory()) return unusable(`There is no folder ${dir}.`);
  const kind = kindOf(dir);
  if (kind === null) return unusable(`${dir} holds neither cases (a JSON beside each CSV) nor tail grids (CSV files).`);
  const { passed, failed, skipped, lines } = kind === 'cases' ? runCases(dir) : runTails(dir);
  for (const line of lines) process.stdout.write(`${line}\n`);
  process.stdout.write(`${passed} passed, ${failed} failed, ${skipped} skipped\n`);
  return failed > 0 ? 1 : 0;
}
