/** What a part of a formula gives: a number, a yes or no, a text, or a date. */
export type ValueType = 'number' | 'truth' | 'text' | 'date';

export type Comparison = '=' | '<>' | '<' | '<=' | '>' | '>=';
export type Arithmetic = '+' | '-' | '*' | '/' | '^';
export type NumberFunction = 'ln' | 'log10' | 'sqrt' | 'abs' | 'round' | 'min' | 'max' | 'mean' | 'reciprocal';

interface Place {
  readonly type: ValueType;
  /** Where it stands in the formula's text, for sentences. */
  readonly at: number;
  readonly end: number;
}

/** A typed part of a formula. */
export type Node = Place &
  (
    | { readonly kind: 'number'; readonly value: number }
    | { readonly kind: 'text'; readonly value: string }
    | { readonly kind: 'column'; readonly name: string }
    | { readonly kind: 'negative'; readonly of: Node }
    | { readonly kind: 'arithmetic'; readonly mark: Arithmetic; readonly left: Node; readonly right: Node }
    | { readonly kind: 'comparison'; readonly mark: Comparison; readonly left: Node; readonly right: Node }
    | { readonly kind: 'not'; readonly of: Node }
    | { readonly kind: 'and' | 'or'; readonly left: Node; readonly right: Node }
    | { readonly kind: 'call'; readonly name: NumberFunction; readonly args: readonly Node[] }
    | { readonly kind: 'if'; readonly condition: Node; readonly yes: Node; readonly no: Node }
  );

/** Fewest and most arguments of each function. */
export const FUNCTIONS: { readonly [name in NumberFunction | 'if']: readonly [number, number] } = {
  ln: [1, 1],
  log10: [1, 1],
  sqrt: [1, 1],
  abs: [1, 1],
  round: [1, 2],
  min: [1, 100],
  max: [1, 100],
  mean: [1, 100],
  reciprocal: [1, 1],
  if: [3, 3],
};
