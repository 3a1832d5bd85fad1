import { describe, expect, it } from 'vitest';
import {
  Autosave,
  MemoryStore,
  type SaveState,
  type Store,
  storeSentence,
  type Timers,
} from '../../src/app/storage.ts';
import type { Worksheet } from '../../src/worksheet/format.ts';
import { plainWorksheet } from '../support/plain-registry.ts';

/** Time that only passes when told. */
class HandTimers implements Timers {
  ms = 0;
  #waiting = new Map<number, { at: number; run: () => void }>();
  #next = 1;
  set(run: () => void, ms: number): number {
    this.#waiting.set(this.#next, { at: this.ms + ms, run });
    return this.#next++;
  }
  clear(timer: number): void {
    this.#waiting.delete(timer);
  }
  now(): string {
    return new Date(this.ms).toISOString();
  }
  async pass(ms: number): Promise<void> {
    this.ms += ms;
    for (const [id, { at, run }] of [...this.#waiting]) {
      if (at > this.ms) continue;
      this.#waiting.delete(id);
      run();
    }
    for (let n = 0; n < 10; n++) await Promise.resolve();
  }
}

function titled(title: string): Worksheet {
  return { ...plainWorksheet('c1 data'), title };
}

function begin(store: Store): { autosave: Autosave; timers: HandTimers; told: SaveState[] } {
  const timers = new HandTimers();
  const told: SaveState[] = [];
  return { autosave: new Autosave(store, timers, (state) => told.push(state)), timers, told };
}

describe('saving as one goes', () => {
  it('by hand: saved within 400 ms of the last edit, once for a burst', async () => {
    const store = new MemoryStore();
    let puts = 0;
    const put = store.put.bind(store);
    store.put = (worksheet, when) => {
      puts++;
      return put(worksheet, when);
    };
    const { autosave, timers, told } = begin(store);
    autosave.changed(titled('a'));
    await timers.pass(100);
    autosave.changed(titled('b'));
    expect(await store.get('w1')).toBeNull();
    await timers.pass(399);
    expect((await store.get('w1'))?.title).toBe('b');
    expect(puts).toBe(1);
    expect(told.map((state) => state.state)).toEqual(['pending', 'saved']);
  });

  it('by hand: leaving the page writes at once', async () => {
    const store = new MemoryStore();
    const { autosave } = begin(store);
    autosave.changed(titled('a'));
    await autosave.flush();
    expect((await store.get('w1'))?.title).toBe('a');
  });

  it('refuses silently nothing: a full store is told in words, tried again, and work goes on', async () => {
    const store = new MemoryStore();
    const put = store.put.bind(store);
    let full = true;
    store.put = (worksheet, when) =>
      full ? Promise.reject(new DOMException('no', 'QuotaExceededError')) : put(worksheet, when);
    const { autosave, timers } = begin(store);
    autosave.changed(titled('a'));
    await timers.pass(400);
    expect(autosave.state).toEqual({
      state: 'failed',
      sentence: storeSentence(new DOMException('', 'QuotaExceededError')),
    });
    expect(storeSentence(new DOMException('', 'QuotaExceededError'))).toContain('full');
    full = false;
    await timers.pass(6000);
    expect(autosave.state).toEqual({ state: 'saved' });
    expect((await store.get('w1'))?.title).toBe('a');
  });

  it('by hand: an edit made while a save is under way is saved after it', async () => {
    const store = new MemoryStore();
    const put = store.put.bind(store);
    let finish: () => void = () => undefined;
    store.put = async (worksheet, when) => {
      await new Promise<void>((resolve) => {
        finish = resolve;
      });
      await put(worksheet, when);
    };
    const { autosave, timers } = begin(store);
    autosave.changed(titled('a'));
    await timers.pass(400);
    autosave.changed(titled('b'));
    finish();
    await timers.pass(400);
    finish();
    await timers.pass(0);
    expect((await store.get('w1'))?.title).toBe('b');
  });

  it('by hand: the list has the latest first, and forgets what is removed', async () => {
    const store = new MemoryStore();
    await store.put({ ...titled('old'), id: 'a' }, '2031-01-01T00:00:00Z');
    await store.put({ ...titled('new'), id: 'b' }, '2031-01-02T00:00:00Z');
    expect((await store.list()).map((saved) => saved.title)).toEqual(['new', 'old']);
    await store.remove('b');
    expect((await store.list()).map((saved) => saved.id)).toEqual(['a']);
  });
});
