import { FormulaError } from './formula-error.ts';

/** A piece of a formula; `at` and `end` are places in its text. */
export interface Token {
  readonly kind: 'number' | 'name' | 'column' | 'text' | 'mark' | 'end';
  /** The word, the mark in its one spelling, or what stands between brackets or quotation marks. */
  readonly text: string;
  readonly at: number;
  readonly end: number;
}

const NUMBER = /(?:\d+\.?\d*|\.\d+)(?:[eE][+-]?\d+)?/y;
const NAME = /[\p{L}_][\p{L}\p{N}_.]*/uy;
const MARK = /<=|>=|<>|!=|==|[-+*/^()<>=,\u2212\u00d7\u00f7\u00b7\u2264\u2265\u2260]/y;
/** Other spellings of one mark. */
const SPELLINGS = new Map([
  ['\u2212', '-'],
  ['\u00d7', '*'],
  ['\u00b7', '*'],
  ['\u00f7', '/'],
  ['\u2264', '<='],
  ['\u2265', '>='],
  ['\u2260', '<>'],
  ['!=', '<>'],
  ['==', '='],
]);
const CLOSERS = new Map([
  ['[', ']'],
  ['`', '`'],
  ['"', '"'],
  ["'", "'"],
]);

/**
 * Cuts a formula into tokens.
 *
 * @param formula the text; columns plain, or in brackets or backticks where their names hold spaces or signs
 * @returns the tokens, the last of kind `end`
 * @throws FormulaError naming the character, for a mark that has no meaning and a bracket that is not closed
 */
export function tokensOf(formula: string): Token[] {
  const tokens: Token[] = [];
  let at = 0;
  for (;;) {
    while (/\s/.test(formula.charAt(at))) at++;
    if (at >= formula.length) break;
    const token =
      enclosed(formula, at) ??
      match(formula, at, NUMBER, 'number') ??
      match(formula, at, NAME, 'name') ??
      match(formula, at, MARK, 'mark');
    if (token === null) {
      const shown = String.fromCodePoint(formula.codePointAt(at) as number);
      throw new FormulaError(`${JSON.stringify(shown)} has no meaning in a formula`, at);
    }
    tokens.push(token);
    at = token.end;
  }
  tokens.push({ kind: 'end', text: '', at: formula.length, end: formula.length });
  return tokens;
}

function match(formula: string, at: number, pattern: RegExp, kind: Token['kind']): Token | null {
  pattern.lastIndex = at;
  const found = pattern.exec(formula)?.[0];
  if (found === undefined) return null;
  return { kind, text: SPELLINGS.get(found) ?? found, at, end: at + found.length };
}

function enclosed(formula: string, at: number): Token | null {
  const opener = formula.charAt(at);
  const closer = CLOSERS.get(opener);
  if (closer === undefined) return null;
  const close = formula.indexOf(closer, at + 1);
  if (close < 0) throw new FormulaError(`${opener} is not closed with ${closer}`, at);
  const kind = closer === ']' || closer === '`' ? 'column' : 'text';
  return { kind, text: formula.slice(at + 1, close), at, end: close + 1 };
}
