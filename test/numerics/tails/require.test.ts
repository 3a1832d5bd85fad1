import { describe, expect, test } from 'vitest';
import {
  requireFinite,
  requireInteger,
  requireNumber,
  requirePositive,
  requireProbability,
} from '../../../src/numerics/tails/require.ts';

describe('require', () => {
  test('refuses with the name of the argument and what it got', () => {
    expect(() => requireNumber('x', Number.NaN)).toThrow('*x* must be a number; got NaN');
    expect(() => requireFinite('t', -Infinity)).toThrow('*t* must be finite; got -Infinity');
    expect(() => requirePositive('df', 0)).toThrow('*df* must be above 0; got 0');
    expect(() => requirePositive('df', Number.NaN)).toThrow(RangeError);
    expect(() => requireProbability('p', 1.5)).toThrow('*p* must be between 0 and 1; got 1.5');
    expect(() => requireInteger('n', 2.5, 1)).toThrow('*n* must be a whole number of at least 1; got 2.5');
    expect(() => requireInteger('n', 9, 1, 8)).toThrow('*n* must be a whole number of at least 1 and at most 8; got 9');
  });

  test('degenerate: limits of the ranges pass', () => {
    requireNumber('x', Infinity);
    requirePositive('df', Infinity);
    requireProbability('p', 0);
    requireProbability('p', 1);
    requireInteger('n', 1, 1, 1);
    expect(() => requireInteger('n', Infinity, 1)).toThrow(RangeError);
  });
});
