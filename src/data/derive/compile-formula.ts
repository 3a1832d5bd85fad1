import type { Table } from '../table.ts';
import { type Evaluation, evaluation } from './evaluate.ts';
import { parseFormula, type Readable } from './parse-formula.ts';
import type { Node, ValueType } from './syntax.ts';

/** A formula that has been read and found in order. */
export interface Formula {
  readonly type: ValueType;
  /** The columns it reads, each once, in the order they are named. */
  readonly reads: readonly string[];
  /** Prepares it for the rows of a table that has these columns. */
  on(table: Table): Evaluation;
}

/**
 * Reads a formula: + - * / ^, parentheses, comparisons, and, or, not, and the functions ln, log10, sqrt, abs, round,
 * min, max, mean, reciprocal and if(condition, yes, no). Nothing in it is ever run as code.
 *
 * @param text the formula
 * @param columns the columns it may read
 * @returns the formula
 * @throws FormulaError (a Refusal) with a sentence that says what is wrong and where
 */
export function compileFormula(text: string, columns: readonly Readable[]): Formula {
  const node = parseFormula(text, columns);
  const reads = new Set<string>();
  collect(node, reads);
  return { type: node.type, reads: [...reads], on: (table) => evaluation(node, text, table) };
}

function collect(node: Node, reads: Set<string>): void {
  if (node.kind === 'column') reads.add(node.name);
  for (const part of partsOf(node)) collect(part, reads);
}

function partsOf(node: Node): readonly Node[] {
  switch (node.kind) {
    case 'negative':
    case 'not':
      return [node.of];
    case 'arithmetic':
    case 'comparison':
    case 'and':
    case 'or':
      return [node.left, node.right];
    case 'call':
      return node.args;
    case 'if':
      return [node.condition, node.yes, node.no];
    default:
      return [];
  }
}
