import { expect, test } from 'vitest';
import { newtonOnLog } from '../../../src/numerics/tails/newton-on-log.ts';
import { expectRelative } from './expect-relative.ts';

test('by hand: log of the exponential distribution at 3, on the scale log x, from both sides, 1e-14', () => {
  const target = Math.log(-Math.expm1(-3));
  const at = (w: number) => {
    const x = Math.exp(w);
    const tail = -Math.expm1(-x);
    return { value: Math.log(tail) - target, slope: (x * Math.exp(-x)) / tail };
  };
  expectRelative(newtonOnLog(at, -700, true), Math.log(3), 1e-14);
  expectRelative(newtonOnLog(at, 6, true), Math.log(3), 1e-14);
});

test('by hand: a falling function, 1e-14', () => {
  expectRelative(
    newtonOnLog((w) => ({ value: 5 - Math.exp(w), slope: -Math.exp(w) }), -3, false),
    Math.log(5),
    1e-14,
  );
});

test('degenerate: a start where the tail underflows or the slope is 0 is left by doubling steps', () => {
  const cut = (w: number) => (w < 10 ? { value: -Infinity, slope: 0 } : { value: Math.log(w / 20), slope: 1 / w });
  expectRelative(newtonOnLog(cut, -50, true), 20, 1e-13);
  const flat = (w: number) => (w > 2 ? { value: 1, slope: 0 } : { value: w - 1, slope: 1 });
  expect(newtonOnLog(flat, 40, true)).toBe(1);
});
