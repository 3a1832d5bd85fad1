import { readFile, stat } from 'node:fs/promises';
import { findWorksheetBlock } from '../worksheet/html.ts';
import { MAX_TEXT, type Parsed, parseWorksheet } from '../worksheet/parse.ts';

/** Largest file that is read, in bytes: a worksheet of the largest size and the program around it. */
const MAX_FILE = MAX_TEXT + 64 * 1024 * 1024;

/** Reads a `.standfast.json` or `.standfast.html` file, told apart by what is in them; nothing in it is run. */
export async function openWorksheetFile(path: string): Promise<Parsed> {
  let bytes: Uint8Array;
  try {
    const about = await stat(path);
    if (!about.isFile()) return unusable('it is not a file');
    if (about.size > MAX_FILE) return unusable(`it is larger than ${MAX_FILE / 1024 / 1024} MiB`);
    bytes = await readFile(path);
  } catch (error) {
    return unusable(reasonOf(error));
  }
  let text: string;
  try {
    text = new TextDecoder('utf-8', { fatal: true }).decode(bytes);
  } catch {
    return unusable('it is not text in UTF-8');
  }
  if (!/^\s*</.test(text)) return parseWorksheet(text);
  const found = findWorksheetBlock(text);
  return found.ok ? parseWorksheet(found.text) : { ok: false, place: '', sentence: found.sentence };
}

function unusable(why: string): Parsed {
  return { ok: false, place: '', sentence: `This file cannot be opened as a worksheet: ${why}.` };
}

function reasonOf(error: unknown): string {
  const code = (error as { readonly code?: unknown }).code;
  if (code === 'ENOENT' || code === 'ENOTDIR') return 'there is no such file';
  if (code === 'EACCES' || code === 'EPERM') return 'reading it is not permitted';
  return error instanceof Error ? error.message : String(error);
}
