import { isoMoment } from '../iso-date.ts';
import { quoted } from '../words.ts';
import { FormulaError } from './formula-error.ts';
import { type Comparison, FUNCTIONS, type Node, type NumberFunction, type ValueType } from './syntax.ts';

const WORDS: { readonly [type in ValueType]: string } = {
  number: 'a number',
  truth: 'a comparison',
  text: 'text',
  date: 'a date',
};

/**
 * Refuses a part of a formula that is of the wrong type.
 *
 * @param node the part
 * @param type what it has to be
 * @param mark the mark or function that needs it
 * @throws FormulaError
 */
export function needType(node: Node, type: ValueType, mark: string): void {
  if (node.type === type) return;
  throw new FormulaError(`${quoted(mark)} needs ${WORDS[type]}, but ${nameOf(node)} is ${WORDS[node.type]}`, node.at);
}

function nameOf(node: Node): string {
  if (node.kind === 'column') return `column ${node.name}`;
  return node.kind === 'text' ? quoted(node.value) : 'what stands here';
}

/**
 * The two sides of a comparison, a text that writes a date made a date where it is compared with one.
 *
 * @param left one side
 * @param mark the comparison
 * @param right the other side
 * @returns both sides, of one type
 * @throws FormulaError where their types differ or have no order
 */
export function compared(left: Node, mark: Comparison, right: Node): { left: Node; right: Node } {
  const sides = { left: asDate(left, right), right: asDate(right, left) };
  if (sides.left.type !== sides.right.type) {
    throw new FormulaError(
      `${quoted(mark)} compares ${WORDS[sides.left.type]} with ${WORDS[sides.right.type]}`,
      right.at,
    );
  }
  const ordered = sides.left.type === 'number' || sides.left.type === 'date';
  if (!ordered && mark !== '=' && mark !== '<>') {
    throw new FormulaError(`${quoted(mark)} needs numbers or dates; text can only be equal or not`, left.at);
  }
  return sides;
}

function asDate(node: Node, other: Node): Node {
  if (node.kind !== 'text' || other.type !== 'date') return node;
  const moment = isoMoment(node.value);
  if (moment === null) throw new FormulaError(`${quoted(node.value)} is not a date such as 2024-01-31`, node.at);
  return { kind: 'number', type: 'date', value: moment, at: node.at, end: node.end };
}

/**
 * A function call, its name and arguments checked.
 *
 * @param name as written
 * @param args its arguments
 * @param place where it stands
 * @returns the call
 * @throws FormulaError for an unknown function, a wrong number of arguments or an argument of the wrong type
 */
export function callOf(name: string, args: readonly Node[], place: { at: number; end: number }): Node {
  const fn = name.toLowerCase();
  if (!Object.hasOwn(FUNCTIONS, fn)) {
    const hint =
      fn === 'log'
        ? 'Write ln for the natural logarithm or log10'
        : `There is no function called ${name}; there are ${Object.keys(FUNCTIONS).join(', ')}`;
    throw new FormulaError(hint, place.at);
  }
  const [least, most] = FUNCTIONS[fn as NumberFunction | 'if'];
  if (args.length < least || args.length > most) {
    const due = least === most ? String(least) : `${least} to ${most}`;
    throw new FormulaError(
      `${fn} takes ${due} ${due === '1' ? 'value' : 'values'} in its parentheses, not ${args.length}`,
      place.at,
    );
  }
  if (fn !== 'if') {
    for (const arg of args) needType(arg, 'number', fn);
    return { kind: 'call', type: 'number', name: fn as NumberFunction, args, ...place };
  }
  const [condition, yes, no] = args as [Node, Node, Node];
  needType(condition, 'truth', 'if');
  if (yes.type !== no.type) {
    throw new FormulaError(`if gives ${WORDS[yes.type]} or ${WORDS[no.type]}; both must be of one type`, no.at);
  }
  return { kind: 'if', type: yes.type, condition, yes, no, ...place };
}
