import { type DBSchema, type IDBPDatabase, openDB } from 'idb';
import type { DataBlock, Worksheet } from '../worksheet/format.ts';
import type { Saved, Store } from './storage.ts';

interface KeptWorksheet extends Saved {
  /** The record; its data blocks' columns stand in the other store, so that an edit does not write them again. */
  readonly record: Worksheet;
}

interface Schema extends DBSchema {
  worksheets: { key: string; value: KeptWorksheet };
  blocks: { key: [string, string]; value: { worksheet: string; block: DataBlock } };
}

function bare(block: DataBlock): DataBlock {
  return { ...block, columns: [] };
}

/** A browser that refuses a store may throw at once: that too is told at the first use. */
async function opened(name: string): Promise<IDBPDatabase<Schema>> {
  return openDB<Schema>(name, 1, {
    upgrade(db) {
      db.createObjectStore('worksheets', { keyPath: 'id' });
      db.createObjectStore('blocks', { keyPath: ['worksheet', 'block.id'] });
    },
  });
}

/** Worksheets in the browser's own database, under their ids. */
export class IdbStore implements Store {
  readonly #open: Promise<IDBPDatabase<Schema>>;
  /** Blocks known to be written, by identity. */
  readonly #written = new Map<string, ReadonlySet<DataBlock>>();

  constructor(name = 'standfast') {
    this.#open = opened(name);
    // told at the first use; without this a blocked store would also be reported as unhandled
    this.#open.catch(() => undefined);
  }

  async put(worksheet: Worksheet, when: string): Promise<void> {
    const db = await this.#open;
    const known = this.#written.get(worksheet.id);
    const transaction = db.transaction(['worksheets', 'blocks'], 'readwrite');
    const record = { ...worksheet, data: worksheet.data.map(bare) };
    const writes: Promise<unknown>[] = [
      transaction.objectStore('worksheets').put({ id: worksheet.id, title: worksheet.title, when, record }),
    ];
    for (const block of worksheet.data) {
      if (known?.has(block)) continue;
      writes.push(transaction.objectStore('blocks').put({ worksheet: worksheet.id, block }));
    }
    // the page may be gone before the browser would commit of itself
    transaction.commit();
    await Promise.all([...writes, transaction.done]);
    this.#written.set(worksheet.id, new Set(worksheet.data));
  }

  async get(id: string): Promise<Worksheet | null> {
    const db = await this.#open;
    const kept = await db.get('worksheets', id);
    if (kept === undefined) return null;
    const blocks = await Promise.all(kept.record.data.map((block) => db.get('blocks', [id, block.id])));
    const data = kept.record.data.map((block, i) => blocks[i]?.block ?? block);
    this.#written.set(id, new Set(data));
    return { ...kept.record, data };
  }

  async list(): Promise<readonly Saved[]> {
    const db = await this.#open;
    const kept = await db.getAll('worksheets');
    return kept.map(({ id, title, when }) => ({ id, title, when })).sort((a, b) => (a.when < b.when ? 1 : -1));
  }

  async remove(id: string): Promise<void> {
    const db = await this.#open;
    this.#written.delete(id);
    const transaction = db.transaction(['worksheets', 'blocks'], 'readwrite');
    const range = IDBKeyRange.bound([id], [id, []]);
    await Promise.all([
      transaction.objectStore('worksheets').delete(id),
      transaction.objectStore('blocks').delete(range),
      transaction.done,
    ]);
  }
}
