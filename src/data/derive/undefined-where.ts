import type { FaultNote } from './faults.ts';
import type { Arithmetic, NumberFunction } from './syntax.ts';

type NumberAt = (row: number) => number;

const TOO_LARGE = 'the result is beyond the largest number';
/** Why a function is not defined, as it stands after "where". */
export const WHY = {
  log: 'what it is taken of is zero or negative',
  root: 'what it is taken of is negative',
  division: 'the divisor is zero',
  power: 'the base is negative and the exponent no whole number, or the base is zero and the exponent negative',
  large: TOO_LARGE,
} as const;

/**
 * An arithmetic operation that notes the rows in which it is not defined.
 *
 * @param mark which operation
 * @param left one side, NaN = missing
 * @param right the other side
 * @param note gets the rows without a result
 * @returns the result in a row; NaN where a side is missing or there is no result
 */
export function arithmetic(mark: Arithmetic, left: NumberAt, right: NumberAt, note: FaultNote): NumberAt {
  switch (mark) {
    case '+':
      return (row) => finite(left(row) + right(row), note, row);
    case '-':
      return (row) => finite(left(row) - right(row), note, row);
    case '*':
      return (row) => finite(left(row) * right(row), note, row);
    case '/':
      return (row) => {
        const [a, b] = [left(row), right(row)];
        return b === 0 && !Number.isNaN(a) ? note.add(WHY.division, row) : finite(a / b, note, row);
      };
    default:
      return (row) => power(left(row), right(row), note, row);
  }
}

function finite(value: number, note: FaultNote, row: number): number {
  return value === Infinity || value === -Infinity ? note.add(TOO_LARGE, row) : value;
}

function power(base: number, exponent: number, note: FaultNote, row: number): number {
  // ECMAScript gives 1 for a missing base to the power of zero.
  if (Number.isNaN(base) || Number.isNaN(exponent)) return Number.NaN;
  if ((base < 0 && !Number.isInteger(exponent)) || (base === 0 && exponent < 0)) return note.add(WHY.power, row);
  return finite(base ** exponent, note, row);
}

/**
 * A function of numbers that notes the rows in which it is not defined.
 *
 * @param name which function; min, max and mean are missing where any of their values is
 * @param args its arguments, NaN = missing
 * @param note gets the rows without a result
 * @returns the result in a row; NaN where an argument is missing or there is no result
 */
export function functionOf(name: NumberFunction, args: readonly NumberAt[], note: FaultNote): NumberAt {
  const [of = () => Number.NaN, digits = () => 0] = args;
  switch (name) {
    case 'ln':
      return (row) => logarithm(Math.log, of(row), note, row);
    case 'log10':
      return (row) => logarithm(Math.log10, of(row), note, row);
    case 'sqrt':
      return (row) => {
        const x = of(row);
        return x < 0 ? note.add(WHY.root, row) : Math.sqrt(x);
      };
    case 'abs':
      return (row) => Math.abs(of(row));
    case 'round':
      return (row) => rounded(of(row), digits(row));
    case 'reciprocal':
      return arithmetic('/', () => 1, of, note);
    case 'min':
      return (row) => Math.min(...args.map((arg) => arg(row)));
    case 'max':
      return (row) => Math.max(...args.map((arg) => arg(row)));
    default:
      return (row) => args.reduce((sum, arg) => finite(sum + arg(row), note, row), 0) / args.length;
  }
}

function logarithm(log: (x: number) => number, x: number, note: FaultNote, row: number): number {
  return x <= 0 ? note.add(WHY.log, row) : log(x);
}

/** Half away from zero, as scores are rounded by hand: common practice. */
function rounded(x: number, digits: number): number {
  if (Number.isNaN(digits)) return digits;
  const scale = 10 ** Math.max(-300, Math.min(300, Math.round(digits)));
  const scaled = Math.abs(x) * scale;
  if (!Number.isFinite(scaled) || scaled >= 2 ** 52) return x;
  const value = Math.round(scaled) / scale;
  return x < 0 ? 0 - value : value;
}
