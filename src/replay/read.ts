import { readFile, stat } from 'node:fs/promises';
import { basename } from 'node:path';
import { importBytes } from '../data/import/import-bytes.ts';
import { refuseSize } from '../data/import/source-text.ts';
import { Refusal } from '../data/refusal.ts';
import { missingCount, type Table } from '../data/table.ts';
import { counted, grouped } from '../data/words.ts';

/** What `--json` prints. */
interface Summary {
  readonly rows: number;
  readonly columns: readonly { readonly name: string; readonly type: string; readonly missing: number }[];
  readonly warnings: readonly string[];
}

const USAGE = 'Name one data file, and --json for JSON: npm run -s read -- FILE [--json]';

/**
 * `npm run -s read -- FILE [--json]`: reads a data file as the page does and prints rows, columns, types, missing values
 * and warnings.
 *
 * @param argv what follows the command
 * @returns exit code: 0, or 2 where the file is unusable, with a sentence on stderr
 */
export async function main(argv: readonly string[]): Promise<number> {
  try {
    const asJson = argv.includes('--json');
    const files = argv.filter((each) => each !== '--json' && each !== '--');
    const [file = ''] = files;
    const unknown = files.find((each) => each.startsWith('--'));
    if (unknown !== undefined) throw new Refusal(`There is no option ${unknown}. ${USAGE}`);
    if (files.length !== 1 || file === '') throw new Refusal(USAGE);
    const { table, warnings } = importBytes(await bytesOf(file), basename(file));
    const summary = summaryOf(table, warnings);
    process.stdout.write(asJson ? `${JSON.stringify(summary)}\n` : asText(basename(file), summary));
    return 0;
  } catch (error) {
    if (!(error instanceof Refusal)) throw error;
    process.stderr.write(`${error.message}\n`);
    return 2;
  }
}

async function bytesOf(file: string): Promise<Uint8Array> {
  const name = basename(file);
  try {
    const found = await stat(file);
    if (found.isDirectory()) throw new Refusal(`${name} is a folder: name a data file in it.`);
    if (found.isFile()) refuseSize(found.size, name);
    const buffer = await readFile(file);
    return new Uint8Array(buffer.buffer, buffer.byteOffset, buffer.byteLength);
  } catch (error) {
    if (error instanceof Refusal) throw error;
    const code = error instanceof Error && 'code' in error ? String(error.code) : '';
    if (code === 'ENOENT' || code === 'ENOTDIR') throw new Refusal(`There is no file called ${file}: check the path.`);
    if (code === 'EACCES' || code === 'EPERM') throw new Refusal(`${name} may not be read: check its permissions.`);
    throw new Refusal(`${name} could not be read${code === '' ? '' : ` (${code})`}: check the file and its disk.`);
  }
}

function summaryOf(table: Table, warnings: readonly string[]): Summary {
  const columns = table.columns.map((column) => ({
    name: column.name,
    type: column.type,
    missing: missingCount(column),
  }));
  return { rows: table.rows, columns, warnings };
}

function asText(name: string, { rows, columns, warnings }: Summary): string {
  const width = Math.max(...columns.map((column) => column.name.length));
  const lines = columns.map(
    ({ name: column, type, missing }) =>
      `  ${column.padEnd(width)}  ${type.padEnd(6)}  ${missing === 0 ? 'none missing' : `${grouped(missing)} missing`}`,
  );
  const heard = warnings.length === 0 ? ['No warnings.'] : ['Warnings:', ...warnings.map((each) => `  ${each}`)];
  return `${[`${name}: ${counted(rows, 'row')}, ${counted(columns.length, 'column')}`, ...lines, ...heard].join('\n')}\n`;
}
