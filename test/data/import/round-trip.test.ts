import { describe, expect, it } from 'vitest';
import { importBytes } from '../../../src/data/import/import-bytes.ts';
import { type Column, textAt } from '../../../src/data/table.ts';

/** A small generator with a fixed seed (linear congruential; its quality does not matter here). */
function generator(seed: number) {
  let state = seed >>> 0;
  const below = (n: number) => {
    state = (Math.imul(state, 1664525) + 1013904223) >>> 0;
    return Math.floor((state / 2 ** 32) * n);
  };
  const pick = <T>(items: readonly T[]) => items[below(items.length)] as T;
  return { below, pick };
}
type Generator = ReturnType<typeof generator>;

const HOSTILE = [
  ...[
    'a',
    'tone',
    '"',
    '""',
    ',',
    ';',
    '\t',
    '|',
    '\n',
    '\r\n',
    '\r',
    ' ',
    "'",
    '\\',
    '`',
    '$'.concat('{x}'),
    '=1+1',
    '<script>',
  ],
  ...[
    '\u00e9',
    '\u00fc',
    '\u4e2d',
    '\u{1d6fc}',
    '\ufeff',
    '\u2212',
    '\u00a0',
    '0',
    '12',
    '.',
    'NA',
    '#',
    '//',
    '--',
    '__proto__',
  ],
];

function hostile({ below, pick }: Generator): string {
  return Array.from({ length: 1 + below(4) }, () => pick(HOSTILE)).join('');
}

function number({ below, pick }: Generator): number {
  const mantissa = pick([0, 1, below(1000), below(1e9) / 1000, below(2 ** 32) / 2 ** 32, Number.MAX_SAFE_INTEGER]);
  const value = mantissa * 10 ** (below(3) === 0 ? below(600) - 300 : 0) * (below(2) === 0 ? 1 : -1);
  return Number.isFinite(value) ? value + 0 : 0;
}

interface Written {
  readonly text: string;
  readonly names: readonly string[];
  readonly columns: readonly { readonly isText: boolean; readonly cells: readonly string[] }[];
}

/** A file with hostile names and values, written as RFC 4180 says, with every freedom a writer has. */
function write(random: Generator): Written {
  const { below, pick } = random;
  const delimiter = pick([',', ';', '\t', '|']);
  const lineEnd = pick(['\n', '\r\n', '\r']);
  const rows = 1 + below(12);
  const names = Array.from({ length: 2 + below(4) }, (_, i) => `${i === 0 ? 'n' : ''}${hostile(random).trim()}${i}`);
  const columns = names.map((_, i) => {
    const isText = i === 0 || below(2) === 0;
    const cells = Array.from({ length: rows }, () => {
      if (below(5) === 0) return '';
      return isText ? hostile(random) : String(number(random));
    });
    // A letter in front keeps a text column from looking like numbers or missing codes.
    if (isText) cells[0] = `q${hostile(random)}`;
    return { isText, cells };
  });
  const quote = (cell: string, force: boolean) => {
    const needed = force || /[",;\t|\r\n\s]/.test(cell) || /^\s|\s$/.test(cell) || below(4) === 0;
    return needed ? `"${cell.replaceAll('"', '""')}"` : cell;
  };
  const lines = [names.map((name) => quote(name, true)).join(delimiter)];
  for (let row = 0; row < rows; row++) {
    lines.push(columns.map(({ cells }) => quote(cells[row] as string, false)).join(delimiter));
    if (below(6) === 0) lines.push('');
  }
  return { text: lines.join(lineEnd) + pick(['', lineEnd]), names, columns };
}

const cellsOf = (column: Column | undefined, rows: number) =>
  column === undefined ? [] : Array.from({ length: rows }, (_, row) => textAt(column, row));

describe('writing and reading', () => {
  it('invariance: 300 files with hostile names and values come back exactly', () => {
    for (let seed = 1; seed <= 300; seed++) {
      const { text, names, columns } = write(generator(seed));
      const { table } = importBytes(new TextEncoder().encode(text), 'hostile.csv');
      expect([seed, table.columns.map((column) => column.name)]).toEqual([seed, names]);
      for (const [i, { isText, cells }] of columns.entries()) {
        const column = table.columns[i];
        const empty = cells.every((cell) => cell === '');
        expect([seed, i, column?.type]).toEqual([seed, i, isText && !empty ? 'text' : 'number']);
        expect([seed, i, cellsOf(column, cells.length)]).toEqual([seed, i, cells]);
      }
    }
  });

  it('invariance: reading ends with a table or a Refusal, whatever the bytes (600 mutilated files)', () => {
    const refusals = new Set<string>();
    for (let seed = 1; seed <= 600; seed++) {
      const random = generator(seed);
      const bytes = new TextEncoder().encode(write(random).text);
      for (let k = 0; k <= random.below(3); k++) {
        bytes[random.below(bytes.length)] = random.pick([0, 10, 13, 34, 34, 34, 44, 59, 9, 128, 200, 65]);
      }
      const cut = bytes.slice(0, random.below(2) === 0 ? bytes.length : random.below(bytes.length + 1));
      try {
        const { table } = importBytes(cut, 'm.csv');
        for (const column of table.columns) expect(cellsOf(column, table.rows)).toHaveLength(table.rows);
      } catch (error) {
        if (!(error instanceof Error) || error.name !== 'Refusal') throw new Error(`seed ${seed}`, { cause: error });
        refusals.add(error.message.replace(/[\d,]+/g, '#').slice(0, 40));
      }
    }
    expect(refusals.size).toBeGreaterThan(5);
  });

  it('invariance: the arguments are not modified, and two readings give the same table', () => {
    const bytes = new TextEncoder().encode(write(generator(3)).text);
    const before = bytes.slice();
    const first = importBytes(bytes, 'x.csv');
    expect(importBytes(bytes, 'x.csv')).toEqual(first);
    expect(bytes).toEqual(before);
  });
});
