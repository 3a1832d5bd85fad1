import { plainNumber } from '../plain-number.ts';
import type { ColumnType } from '../table.ts';
import { listed, quoted } from '../words.ts';
import { FormulaError } from './formula-error.ts';
import { callOf, compared, needType } from './formula-types.ts';
import type { Arithmetic, Comparison, Node } from './syntax.ts';
import { type Token, tokensOf } from './tokens.ts';

/** A column a formula may read. */
export interface Readable {
  readonly name: string;
  readonly type: ColumnType;
}

const LONGEST = 2000;
const DEEPEST = 100;

/** How tightly each mark binds what stands on its two sides: the larger number first. ^ groups from the right. */
const BINDING = new Map<string, readonly [number, number]>([
  ['or', [1, 2]],
  ['and', [3, 4]],
  ...['=', '<>', '<', '<=', '>', '>='].map((mark) => [mark, [6, 7]] as const),
  ['+', [8, 9]],
  ['-', [8, 9]],
  ['*', [10, 11]],
  ['/', [10, 11]],
  ['^', [15, 14]],
]);
const NOT = 5;
/** Looser than ^, so that -x^2 is -(x^2). */
const MINUS = 12;

/**
 * Parses a formula into a typed tree. Nothing is evaluated, and only the names of these columns mean anything.
 *
 * @param formula the text
 * @param columns the columns it may read
 * @returns the tree
 * @throws FormulaError with a sentence that says what is wrong and where
 * @source V. R. Pratt 1973, Top down operator precedence: each mark has a binding power to its left and right
 */
export function parseFormula(formula: string, columns: readonly Readable[]): Node {
  if (formula.length > LONGEST)
    throw new FormulaError('The formula is too long: split it into several columns', LONGEST);
  const parser: Parser = { formula, tokens: tokensOf(formula), next: 0, depth: 0, columns };
  const node = expression(parser, 0);
  const rest = peek(parser);
  if (rest.kind !== 'end') {
    const what =
      rest.text === ')'
        ? 'a parenthesis is closed that was not opened'
        : `${quoted(source(parser, rest))} does not fit`;
    throw new FormulaError(`After ${before(parser, rest)} ${what}`, rest.at);
  }
  return node;
}

interface Parser {
  readonly formula: string;
  readonly tokens: readonly Token[];
  readonly columns: readonly Readable[];
  next: number;
  depth: number;
}

function peek(parser: Parser): Token {
  return parser.tokens[Math.min(parser.next, parser.tokens.length - 1)] as Token;
}

function take(parser: Parser): Token {
  const token = peek(parser);
  parser.next++;
  return token;
}

function source(parser: Parser, place: { at: number; end: number }): string {
  return parser.formula.slice(place.at, place.end);
}

/** The formula up to a token, as a sentence shows it. */
function before(parser: Parser, token: Token): string {
  const text = parser.formula.slice(0, token.at).trim();
  return text === '' ? 'the beginning' : quoted(text.length > 30 ? `\u2026${text.slice(-29)}` : text);
}

function expression(parser: Parser, least: number): Node {
  if (++parser.depth > DEEPEST) throw new FormulaError('The formula is nested too deeply', peek(parser).at);
  let left = prefix(parser);
  for (;;) {
    const token = peek(parser);
    const binding = BINDING.get(operatorOf(token));
    if (binding === undefined || binding[0] < least) break;
    take(parser);
    left = joined(left, token, expression(parser, binding[1]));
    const again = operatorOf(peek(parser));
    if (left.kind === 'comparison' && BINDING.get(again)?.[0] === 6) {
      throw new FormulaError('Two comparisons in a row: join them with and, as in 1 < x and x < 5', peek(parser).at);
    }
  }
  parser.depth--;
  return left;
}

function operatorOf(token: Token): string {
  if (token.kind === 'mark') return token.text;
  const word = token.kind === 'name' ? token.text.toLowerCase() : '';
  return word === 'and' || word === 'or' ? word : '';
}

function joined(left: Node, token: Token, right: Node): Node {
  const mark = operatorOf(token);
  const place = { at: left.at, end: right.end };
  if (mark === 'and' || mark === 'or') {
    for (const side of [left, right]) needType(side, 'truth', mark);
    return { kind: mark, type: 'truth', left, right, ...place };
  }
  if (BINDING.get(mark)?.[0] === 6) {
    return {
      kind: 'comparison',
      type: 'truth',
      mark: mark as Comparison,
      ...compared(left, mark as Comparison, right),
      ...place,
    };
  }
  for (const side of [left, right]) needType(side, 'number', mark);
  return { kind: 'arithmetic', type: 'number', mark: mark as Arithmetic, left, right, ...place };
}

function prefix(parser: Parser): Node {
  const token = take(parser);
  const { at, end } = token;
  if (token.kind === 'number') return { kind: 'number', type: 'number', value: literal(token), at, end };
  if (token.kind === 'text') return { kind: 'text', type: 'text', value: token.text, at, end };
  if (token.kind === 'column') return column(parser, token);
  if (token.kind === 'name') return named(parser, token);
  if (token.text === '-' || token.text === '+') {
    const of = expression(parser, MINUS);
    needType(of, 'number', token.text);
    return token.text === '+' ? of : { kind: 'negative', type: 'number', of, at, end: of.end };
  }
  if (token.text === '(') {
    const inside = expression(parser, 0);
    return { ...inside, at, end: close(parser, token) };
  }
  throw new FormulaError(`After ${before(parser, token)} a value is missing`, at);
}

function literal(token: Token): number {
  const value = plainNumber(token.text);
  if (value === null) throw new FormulaError(`${token.text} is too large a number`, token.at);
  return value;
}

function named(parser: Parser, token: Token): Node {
  if (token.text.toLowerCase() === 'not') {
    const of = expression(parser, NOT);
    needType(of, 'truth', 'not');
    return { kind: 'not', type: 'truth', of, at: token.at, end: of.end };
  }
  if (operatorOf(token) !== '') throw new FormulaError(`After ${before(parser, token)} a value is missing`, token.at);
  if (peek(parser).text !== '(' || peek(parser).kind !== 'mark') return column(parser, token);
  const open = take(parser);
  const args: Node[] = [];
  if (peek(parser).text !== ')') {
    args.push(expression(parser, 0));
    while (peek(parser).kind === 'mark' && peek(parser).text === ',') {
      take(parser);
      args.push(expression(parser, 0));
    }
  }
  return callOf(token.text, args, { at: token.at, end: close(parser, open) });
}

function close(parser: Parser, open: Token): number {
  const token = take(parser);
  if (token.kind === 'mark' && token.text === ')') return token.end;
  if (token.kind === 'end') throw new FormulaError('The parenthesis opened here is not closed', open.at);
  throw new FormulaError(`After ${before(parser, token)} ${quoted(source(parser, token))} does not fit`, token.at);
}

function column(parser: Parser, token: Token): Node {
  const found = parser.columns.find((each) => each.name === token.text);
  if (found === undefined) {
    const near = parser.columns.filter((each) => each.name.startsWith(token.text)).map((each) => `[${each.name}]`);
    const hint = near.length > 0 ? `; names with spaces or signs stand in brackets: ${listed(near, 3)}` : '';
    throw new FormulaError(`There is no column called ${quoted(token.text)}${hint}`, token.at);
  }
  return { kind: 'column', type: found.type, name: found.name, at: token.at, end: token.end };
}
