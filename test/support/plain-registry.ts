import { numberBlank, textBlank } from '../../cells/blanks.ts';
import type { Blank, Kind, Registry, Settings, ValueType } from '../../cells/kind.ts';
import type { Cell, SharedNumber, Worksheet } from '../../src/worksheet/format.ts';

/** Kinds that only know their ports and one number: enough to try the page's edits on. */
function plainKind(name: string, takes: { readonly [port: string]: ValueType }, gives: ValueType | null): Kind {
  return {
    name,
    version: 1,
    offer: name === 'standing' ? null : `Then ${name}`,
    takes,
    gives,
    blind: 'same',
    title: () => name,
    defaults: () => ({ cutoff: 2, words: '' }),
    check: () => [],
    compute: () => ({ value: null, detail: null }),
    sentence: (settings, context) => {
      const cutoff: Blank = numberBlank(
        { key: 'cutoff', label: 'cutoff' },
        settings.cutoff as never,
        context,
        { min: 0, max: 5, step: 0.5, unit: '', none: 'none' },
        (value): Settings => ({ ...settings, cutoff: value }),
      );
      const words = textBlank({ key: 'words', label: 'reason' }, String(settings.words ?? ''), 'why', (value) => ({
        ...settings,
        words: value,
      }));
      return [`${name} at `, cutoff, ' because ', words, '.'];
    },
    say: () => name,
    record: () => null,
  };
}

const kinds = [
  plainKind('data', {}, 'table'),
  plainKind('derive', { table: 'table' }, 'table'),
  plainKind('design', { table: 'table' }, 'design'),
  plainKind('exclusion', { design: 'design' }, 'design'),
  plainKind('score', { design: 'design' }, 'scores'),
  plainKind('comparison', { scores: 'scores' }, 'result'),
  plainKind('claim', { result: 'result' }, 'claim'),
  plainKind('note', {}, null),
  plainKind('standing', { claim: 'claim' }, 'sweep'),
];

export const plainRegistry: Registry = Object.fromEntries(kinds.map((kind) => [kind.name, kind]));

export const trim: SharedNumber = {
  id: 'trim',
  name: 'trim',
  value: 20,
  unit: '%',
  min: 0,
  max: 25,
  step: 5,
  none: false,
};

/** A worksheet of such cells, each written "id kind port=source". */
export function plainWorksheet(...cells: readonly string[]): Worksheet {
  return {
    format: 'standfast-worksheet',
    version: 1,
    id: 'w1',
    title: 'a worksheet',
    shared: [trim],
    cells: cells.map(plainCell),
    data: [],
    opening: { state: 'blind' },
    log: [],
    reference: null,
    seed: 1,
    program: { name: 'standfast', version: '0.1.0' },
    results: {},
  };
}

function plainCell(text: string): Cell {
  const [id = '', kind = '', ...ports] = text.split(' ');
  const from = Object.fromEntries(ports.map((port) => port.split('=') as [string, string]));
  return { id, kind, version: 1, settings: { cutoff: 2, words: '' }, from };
}

/** The wiring of a worksheet in the same short form. */
export function wiring(worksheet: Worksheet): readonly string[] {
  return worksheet.cells.map((cell) =>
    [cell.id, cell.kind, ...Object.entries(cell.from).map(([port, id]) => `${port}=${id}`)].join(' '),
  );
}
