import { isoMoment } from '../iso-date.ts';
import { needColumn } from '../need-column.ts';
import type { Table } from '../table.ts';
import { type Fault, FaultNote } from './faults.ts';
import type { Comparison, Node } from './syntax.ts';
import { arithmetic, functionOf } from './undefined-where.ts';

/** The value of a numeric, yes-or-no (1, 0) or date (ms) part in a row; NaN where it is missing. */
type NumberAt = (row: number) => number;
/** The value of a text part in a row; null where it is missing. */
type TextAt = (row: number) => string | null;

/** A formula ready to be asked row by row, and where it was found not to be defined. */
export interface Evaluation {
  readonly number: NumberAt;
  readonly text: TextAt;
  faults(): readonly Fault[];
}

interface Setting {
  readonly table: Table;
  readonly formula: string;
  readonly notes: FaultNote[];
}

/**
 * Prepares a typed formula for the rows of a table. Only the branch of an `if` that is chosen is looked at, and `and`
 * and `or` stop at the first part that settles them, so that a guard keeps what it guards from being undefined.
 *
 * @param node the formula
 * @param formula its text, for sentences
 * @param table where its columns are
 * @returns functions of the row; the one that does not fit the formula's type throws
 */
export function evaluation(node: Node, formula: string, table: Table): Evaluation {
  const setting: Setting = { table, formula, notes: [] };
  const isText = node.type === 'text';
  const never = () => {
    throw new TypeError(`*formula* must be asked for its ${isText ? 'text' : 'number'}; got a question for the other`);
  };
  return {
    number: isText ? never : numberOf(node, setting),
    text: isText ? textOf(node, setting) : never,
    faults: () => setting.notes.flatMap((note) => note.faults()),
  };
}

function numberOf(node: Node, setting: Setting): NumberAt {
  switch (node.kind) {
    case 'number':
      return () => node.value;
    case 'column':
      return columnNumbers(node.name, setting.table);
    case 'negative': {
      const of = numberOf(node.of, setting);
      return (row) => 0 - of(row);
    }
    case 'arithmetic':
      return arithmetic(node.mark, numberOf(node.left, setting), numberOf(node.right, setting), noteFor(node, setting));
    case 'call':
      return functionOf(
        node.name,
        node.args.map((arg) => numberOf(arg, setting)),
        noteFor(node, setting),
      );
    case 'if': {
      const condition = numberOf(node.condition, setting);
      const [yes, no] = [numberOf(node.yes, setting), numberOf(node.no, setting)];
      return (row) =>
        choose(
          condition(row),
          () => yes(row),
          () => no(row),
          Number.NaN,
        );
    }
    default:
      return truthOf(node, setting);
  }
}

function choose<T>(condition: number, yes: () => T, no: () => T, missing: T): T {
  if (Number.isNaN(condition)) return missing;
  return condition === 1 ? yes() : no();
}

function truthOf(node: Node, setting: Setting): NumberAt {
  if (node.kind === 'not') {
    const of = numberOf(node.of, setting);
    return (row) => 1 - of(row);
  }
  if (node.kind === 'and' || node.kind === 'or') {
    const [left, right] = [numberOf(node.left, setting), numberOf(node.right, setting)];
    // "no and missing" is no, "yes or missing" is yes: what settles the whole does so whatever the other part is.
    const settles = node.kind === 'and' ? 0 : 1;
    return (row) => {
      const first = left(row);
      if (first === settles) return settles;
      const second = right(row);
      return second === settles ? settles : first + second - second;
    };
  }
  if (node.kind === 'comparison') return comparisonOf(node, setting);
  throw new TypeError(`*node* must be a yes or no; got ${node.kind}`);
}

function comparisonOf(node: Node & { kind: 'comparison' }, setting: Setting): NumberAt {
  if (node.left.type === 'text') {
    const [left, right] = [textOf(node.left, setting), textOf(node.right, setting)];
    const wanted = node.mark === '=';
    return (row) => {
      const [a, b] = [left(row), right(row)];
      if (a === null || b === null) return Number.NaN;
      return (a === b) === wanted ? 1 : 0;
    };
  }
  const [left, right] = [numberOf(node.left, setting), numberOf(node.right, setting)];
  const test = TESTS[node.mark];
  return (row) => {
    const [a, b] = [left(row), right(row)];
    return Number.isNaN(a) || Number.isNaN(b) ? Number.NaN : Number(test(a, b));
  };
}

const TESTS: { readonly [mark in Comparison]: (a: number, b: number) => boolean } = {
  '=': (a, b) => a === b,
  '<>': (a, b) => a !== b,
  '<': (a, b) => a < b,
  '<=': (a, b) => a <= b,
  '>': (a, b) => a > b,
  '>=': (a, b) => a >= b,
};

function textOf(node: Node, setting: Setting): TextAt {
  if (node.kind === 'text') return () => node.value;
  if (node.kind === 'if') {
    const condition = numberOf(node.condition, setting);
    const [yes, no] = [textOf(node.yes, setting), textOf(node.no, setting)];
    return (row) =>
      choose(
        condition(row),
        () => yes(row),
        () => no(row),
        null,
      );
  }
  const column = node.kind === 'column' ? needColumn(setting.table, node.name) : null;
  if (column === null || column.type === 'number') throw new TypeError(`*node* must be text; got ${node.kind}`);
  return (row) => column.levels[column.codes[row] as number] ?? null;
}

function columnNumbers(name: string, table: Table): NumberAt {
  const column = needColumn(table, name);
  if (column.type === 'number') return (row) => column.values[row] as number;
  const moments = column.levels.map((level) => isoMoment(level) ?? Number.NaN);
  return (row) => moments[column.codes[row] as number] ?? Number.NaN;
}

function noteFor(node: Node, { formula, notes }: Setting): FaultNote {
  const note = new FaultNote(formula.slice(node.at, node.end));
  notes.push(note);
  return note;
}
