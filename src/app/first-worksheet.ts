import { registry } from '../../cells/registry.ts';
import type { Worksheet } from '../worksheet/format.ts';
import { demoWorksheets } from './demos.ts';
import { newWorksheet } from './new-worksheet.ts';
import { namedId, wantedId, worksheetFrom } from './open-worksheet.ts';
import { PROGRAM_VERSION } from './program-version.ts';
import { type Store, storeSentence } from './storage.ts';

export interface First {
  readonly worksheet: Worksheet;
  /** What went wrong on the way, as a sentence. */
  readonly problem: string | null;
}

/**
 * The worksheet to begin with: what was edited here before where the address names it, else the one this page carries
 * (beside a demo as it came), else the one open last, else the first demo, else an empty one.
 *
 * @param carried text of the worksheet the page carries, or null
 */
export async function firstWorksheet(store: Store, carried: string | null): Promise<First> {
  if (carried === null) return keptOrDemo(store, wantedId());
  const opened = worksheetFrom(carried, 'This page');
  if ('problem' in opened) return { worksheet: (await keptOrDemo(store, null)).worksheet, problem: opened.problem };
  if (isDemo(opened.worksheet)) return keptOrDemo(store, wantedId());
  const named = namedId();
  try {
    const kept = named === null ? null : await store.get(named);
    if (kept !== null) return { worksheet: kept, problem: null };
    // What this browser keeps under the same id may have gone another way: neither may overwrite the other.
    const taken = (await store.get(opened.worksheet.id)) !== null;
    const id = taken ? crypto.randomUUID() : opened.worksheet.id;
    return { worksheet: { ...opened.worksheet, id }, problem: null };
  } catch (error) {
    return { worksheet: opened.worksheet, problem: storeSentence(error) };
  }
}

/** Whether it is a demo as it came: a page that carries that is the program, not somebody's worksheet. */
function isDemo(worksheet: Worksheet): boolean {
  const text = JSON.stringify(worksheet);
  return demos().some((demo) => demo.id === worksheet.id && JSON.stringify(demo) === text);
}

function demos(): readonly Worksheet[] {
  return demoWorksheets().flatMap((demo) => {
    const opened = worksheetFrom(demo.text, demo.name);
    return 'worksheet' in opened ? [opened.worksheet] : [];
  });
}

async function keptOrDemo(store: Store, id: string | null): Promise<First> {
  const all = demos();
  const seed = crypto.getRandomValues(new Uint32Array(1))[0] as number;
  const empty = { id: crypto.randomUUID(), seed, program: PROGRAM_VERSION, registry, block: null };
  const fallback = all[0] ?? newWorksheet(empty);
  if (id === null) return { worksheet: fallback, problem: null };
  try {
    const kept = await store.get(id);
    return { worksheet: kept ?? all.find((demo) => demo.id === id) ?? fallback, problem: null };
  } catch (error) {
    return { worksheet: all.find((demo) => demo.id === id) ?? fallback, problem: storeSentence(error) };
  }
}
