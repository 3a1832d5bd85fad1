import { describe, expect, it } from 'vitest';
import {
  pageSteps,
  placeOf,
  readNumber,
  snap,
  stepBy,
  stepByKey,
  tickCount,
  valueAt,
} from '../../src/app/number-step.ts';

const trim = { min: 0, max: 25, step: 5, none: false };
const cutoff = { min: 1.5, max: 4, step: 0.1, none: true };

describe('stepping a number', () => {
  it('by hand: steps stay on the ruler and carry no binary dust', () => {
    expect(stepBy(2.5, 1, cutoff)).toBe(2.6);
    expect(stepBy(2.9, 1, cutoff)).toBe(3);
    expect(stepBy(0, -1, trim)).toBe(0);
    expect(stepBy(25, 1, trim)).toBe(25);
  });

  it('by hand: past the upper end lies none, and back', () => {
    expect(stepBy(4, 1, cutoff)).toBeNull();
    expect(stepBy(null, -1, cutoff)).toBe(4);
    expect(stepBy(null, 1, cutoff)).toBeNull();
  });

  it('by hand: a number between two steps goes to the next one in that direction', () => {
    expect(stepBy(12, 1, trim)).toBe(15);
    expect(stepBy(12, -1, trim)).toBe(10);
    expect(stepBy(14, 1, trim)).toBe(15);
    expect(stepBy(14, -1, trim)).toBe(10);
  });

  it('by hand: the keys', () => {
    expect(stepByKey('ArrowUp', 10, trim)).toBe(15);
    expect(stepByKey('ArrowLeft', 10, trim)).toBe(5);
    expect(stepByKey('PageUp', 0, trim)).toBe(5 * pageSteps(trim));
    expect(stepByKey('Home', 10, trim)).toBe(0);
    expect(stepByKey('End', 2, cutoff)).toBeNull();
    expect(stepByKey('a', 10, trim)).toBeUndefined();
  });

  it('invariance: a step\u2019s place on the ruler gives the step again', () => {
    for (const range of [trim, cutoff, { min: -1, max: 1, step: 0.05, none: false }]) {
      const steps = Math.round((range.max - range.min) / range.step);
      for (let n = 0; n <= steps; n++) {
        const value = snap(range.min + n * range.step, range);
        expect(valueAt(placeOf(value, range), range)).toBe(value);
      }
      if (range.none) expect(valueAt(placeOf(null, range), range)).toBeNull();
    }
  });

  it('degenerate: a range of one number stands at its start', () => {
    expect(placeOf(3, { min: 3, max: 3, step: 1, none: false })).toBe(0);
  });

  it('by hand: ticks stand on steps, at most a dozen', () => {
    expect(tickCount(trim)).toBe(5);
    expect(tickCount(cutoff)).toBe(5);
    expect(tickCount({ min: 0, max: 1000, step: 10, none: false })).toBe(10);
  });
});

describe('reading a typed number', () => {
  it('by hand: point, comma, unit and real minus sign', () => {
    expect(readNumber('2,5', cutoff, 'MAD')).toEqual({ value: 2.5 });
    expect(readNumber(' 15 %', trim, '%')).toEqual({ value: 15 });
    expect(readNumber('\u22120.5', { min: -1, max: 1, step: 0.1, none: false }, '')).toEqual({ value: -0.5 });
    expect(readNumber('None', cutoff, '')).toEqual({ value: null });
  });

  it('refuses what is no number or lies outside, with a sentence', () => {
    expect(readNumber('two', trim, '%')).toEqual({ problem: '\u201ctwo\u201d is not a number.' });
    expect(readNumber('', trim, '%')).toEqual({ problem: '\u201c\u201d is not a number.' });
    expect(readNumber('26', trim, '%')).toEqual({ problem: 'It must lie between 0 and 25 %.' });
    expect(readNumber('1e400', trim, '')).toEqual({ problem: 'It must lie between 0 and 25.' });
  });
});
