import type { Registry, Settings } from '../../cells/kind.ts';
import { type Cell, type DataBlock, FORMAT, FORMAT_VERSION, type Worksheet } from '../worksheet/format.ts';

/** What a new worksheet is made from; time and chance come from outside. */
export interface NewWorksheet {
  readonly id: string;
  /** A whole number below 2^32. */
  readonly seed: number;
  readonly program: string;
  readonly registry: Registry;
  readonly block: DataBlock | null;
}

/** The settings with the file blank filled, told by the kind's own sentence. */
function withData(registry: Registry, block: DataBlock): Settings | null {
  const kind = registry.data;
  if (kind === undefined) return null;
  const context = { shared: [], given: {}, data: [{ id: block.id, name: block.name }] };
  const settings = kind.defaults(context);
  for (const part of kind.sentence(settings, context)) {
    if (typeof part !== 'string' && part.editor.type === 'file') return part.editor.set(block.id);
  }
  return settings;
}

function titleFrom(name: string): string {
  const bare = name
    .replace(/\.[a-z0-9]{1,5}$/i, '')
    .replace(/[_-]+/g, ' ')
    .trim();
  return bare === '' ? 'Untitled worksheet' : bare.charAt(0).toUpperCase() + bare.slice(1);
}

/** A worksheet with one data cell, its conditions hidden from the first row on. */
export function newWorksheet({ id, seed, program, registry, block }: NewWorksheet): Worksheet {
  const data = registry.data;
  const empty = { shared: [], given: {}, data: [] };
  const settings = block === null ? (data?.defaults(empty) ?? {}) : (withData(registry, block) ?? {});
  const cells: Cell[] =
    data === undefined ? [] : [{ id: 'c1', kind: 'data', version: data.version, settings, from: {} }];
  return {
    format: FORMAT,
    version: FORMAT_VERSION,
    id,
    title: block === null ? 'Untitled worksheet' : titleFrom(block.name),
    shared: [],
    cells,
    data: block === null ? [] : [block],
    opening: { state: 'blind' },
    log: [],
    reference: null,
    seed,
    program: { name: 'standfast', version: program },
    results: {},
  };
}
