import type { Cell, DataBlock, JsonObject, SharedNumber, Worksheet } from '../../src/worksheet/format.ts';

/** A cell for tests; `from` is one id for a port called "from", or port -> id. */
export function cell(
  id: string,
  kind: string,
  settings: JsonObject = {},
  from: string | { [port: string]: string } = {},
): Cell {
  return { id, kind, version: 1, settings, from: typeof from === 'string' ? { from } : from };
}

export function shared(id: string, value: number | null): SharedNumber {
  return { id, name: id, value, unit: '', min: -100, max: 100, step: 1, none: true };
}

export function dataBlock(id: string, values: readonly (number | null)[]): DataBlock {
  return {
    id,
    name: `${id}.csv`,
    rows: values.length,
    columns: [{ name: 'x', type: 'number', values }],
    fingerprint: { bytes: '0'.repeat(64), table: '1'.repeat(64) },
    warnings: [],
  };
}

export function worksheet(cells: readonly Cell[], more: Partial<Worksheet> = {}): Worksheet {
  return {
    format: 'standfast-worksheet',
    version: 1,
    id: 'w1',
    title: 'A worksheet',
    shared: [],
    cells,
    data: [],
    opening: { state: 'opened-early', reason: 'test data', when: '2026-01-01T00:00:00Z' },
    log: [],
    reference: null,
    seed: 7,
    program: { name: 'standfast', version: '0.1.0' },
    results: {},
    ...more,
  };
}

/** The record with the cell changed. */
export function withCell(record: Worksheet, id: string, change: Partial<Cell>): Worksheet {
  return { ...record, cells: record.cells.map((each) => (each.id === id ? { ...each, ...change } : each)) };
}

/** The record with the shared number set. */
export function withShared(record: Worksheet, id: string, value: number | null): Worksheet {
  return { ...record, shared: record.shared.map((each) => (each.id === id ? { ...each, value } : each)) };
}
