import { describe, expect, it } from 'vitest';
import {
  type Asked,
  askedFactors,
  isOmnibus,
  proceduresFor,
  refusalOf,
  setWords,
  sidesOf,
} from '../../src/analysis/asked.ts';

const alert = { name: 'alert', scope: 'within', levels: ['tone', 'voice', 'seat pulse'] } as const;
const training = { name: 'training', scope: 'between', levels: ['standard', 'refreshed'] } as const;

describe('what can be asked', () => {
  it('by hand: two levels alone are a pair, beside another condition a main effect', () => {
    const asked: Asked = { type: 'levels', factor: 'training', pairs: 'none' };
    expect(refusalOf([training], asked)).toMatch(/two levels only: compare standard with refreshed directly/);
    expect(refusalOf([training, alert], asked)).toBeNull();
    expect(refusalOf([alert], { ...asked, factor: 'alert' })).toBeNull();
  });

  it('refuses a condition that is not in the design, and levels that are not its own, naming those that are', () => {
    expect(refusalOf([alert], { type: 'interaction', factors: ['alert', 'load'] })).toMatch(
      /no condition called "load".*alert/,
    );
    const contrast: Asked = { type: 'contrast', factor: 'alert', first: ['voice'], second: ['bell'] };
    expect(refusalOf([alert], contrast)).toMatch(
      /"bell" is not a level of alert. Its levels are: tone, voice, seat pulse/,
    );
    expect(refusalOf([alert], { ...contrast, second: ['voice'] })).toMatch(/both sides/);
    expect(refusalOf([alert], { ...contrast, second: [] })).toMatch(/each side/);
    expect(refusalOf([alert], { type: 'interaction', factors: ['alert', 'alert'] })).toMatch(/two different/);
    expect(refusalOf([], { type: 'value', value: null })).toMatch(/which value/);
  });

  it('refuses a procedure for groups where every participant met every level', () => {
    expect(refusalOf([alert], { type: 'levels', factor: 'alert', pairs: 'tukey' })).toMatch(/Holm or Hochberg/);
    expect(proceduresFor('within')).not.toContain('tukey');
    expect(proceduresFor('between')).toContain('games-howell');
  });

  it('by hand: the sides of a contrast and of a value in words', () => {
    expect(setWords(['tone', 'seat pulse'])).toBe('the mean of tone and seat pulse');
    expect(setWords(['a', 'b', 'c'])).toBe('the mean of a, b and c');
    const contrast = { type: 'contrast', factor: 'alert', first: ['voice'], second: ['tone', 'seat pulse'] } as const;
    expect(sidesOf(contrast, 'ms')).toEqual(['voice', 'the mean of tone and seat pulse']);
    expect(sidesOf({ type: 'value', value: -50 }, 'ms')).toEqual(['every score', '\u221250 ms']);
  });

  it('by hand: levels and interactions are about several levels at once, contrasts and values are not', () => {
    expect(isOmnibus({ type: 'levels', factor: 'alert', pairs: 'none' })).toBe(true);
    expect(isOmnibus({ type: 'value', value: 1 })).toBe(false);
    expect(isOmnibus(undefined)).toBe(false);
    expect(askedFactors([alert, training], { type: 'interaction', factors: ['training', 'alert'] })).toEqual([
      training,
      alert,
    ]);
  });
});
