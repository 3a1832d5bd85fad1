import { describe, expect, it } from 'vitest';
import {
  alphaText,
  bounded,
  count,
  counted,
  decimalsFor,
  degrees,
  fixed,
  levelPercent,
  limits,
  percent,
  plain,
  plural,
  pValue,
  withUnit,
} from '../../cells/numbers.ts';

// How the field writes numbers (APA Publication Manual, 7th ed., 6.36: no leading zero where a value cannot exceed one).
describe('numbers as the field writes them', () => {
  it('by hand: counts have commas and a real minus sign', () => {
    expect([0, 999, 1000, 2120, 1234567, -1500].map(count)).toEqual([
      '0',
      '999',
      '1,000',
      '2,120',
      '1,234,567',
      '\u22121,500',
    ]);
  });

  it('by hand: fixed decimals, thousands, a minus sign, never minus zero', () => {
    expect(fixed(1234.567, 2)).toBe('1,234.57');
    expect(fixed(-0.5, 1)).toBe('\u22120.5');
    expect(fixed(-0.004, 2)).toBe('0.00');
    expect(fixed(1234.5, 0)).toMatch(/^1,23[45]$/);
    expect(fixed(0.0000123, 6)).toBe('0.000012');
  });

  it('by hand: values that cannot exceed one have no leading zero', () => {
    expect([bounded(0.85, 2), bounded(-0.213, 2), bounded(1, 2), bounded(0, 2)]).toEqual([
      '.85',
      '\u2212.21',
      '1.00',
      '.00',
    ]);
  });

  it('by hand: p to three places, its ends in words', () => {
    expect([0.0171, 0.0009999, 0.001, 0.9991, 0.05].map(pValue)).toEqual([
      'p = .017',
      'p < .001',
      'p = .001',
      'p > .999',
      'p = .050',
    ]);
  });

  it('theory: decimals leave two figures of the width of an interval', () => {
    expect([93, 9.3, 0.93, 0.093, 930, 1e9].map(decimalsFor)).toEqual([0, 1, 2, 3, 0, 0]);
    expect([1e-12, 0, -1, Number.NaN, Infinity].map(decimalsFor)).toEqual([6, 2, 2, 2, 2]);
  });

  it('by hand: limits in brackets; an absent one is no limit', () => {
    const write = (value: number) => fixed(value, 0);
    expect(limits([-131.2, -37.9], write)).toBe('[\u2212131, \u221238]');
    expect(limits([null, 4], write)).toBe('[no limit, 4]');
    expect(limits([4, null], write)).toBe('[4, no limit]');
  });

  it('by hand: shares and levels as percentages', () => {
    expect([0.0043, 0.0004, 0, 0.05, 0.996, 1].map(percent)).toEqual([
      '0.4 %',
      '< 0.1 %',
      '0 %',
      '5 %',
      '100 %',
      '100 %',
    ]);
    expect([0.95, 0.995, 1 - 0.05].map(levelPercent)).toEqual(['95 %', '99.5 %', '95 %']);
    expect([alphaText(0.05), alphaText(0.005)]).toEqual(['\u03b1 = .05', '\u03b1 = .005']);
  });

  it('by hand: degrees of freedom, plain numbers, units', () => {
    expect([degrees(21), degrees(21.04), degrees(1.5)]).toEqual(['21', '21.0', '1.5']);
    expect([plain(-2.5), plain(0.1)]).toEqual(['\u22122.5', '0.1']);
    expect([withUnit(150, 'ms'), withUnit(-3, '')]).toEqual(['150 ms', '\u22123']);
  });

  it('by hand: nouns in number', () => {
    expect([counted(1, 'trial'), counted(2, 'trial'), counted(1200, 'score')]).toEqual([
      '1 trial',
      '2 trials',
      '1,200 scores',
    ]);
    expect(['officer', 'box', 'class', 'study', 'day', 'match'].map(plural)).toEqual([
      'officers',
      'boxes',
      'classes',
      'studies',
      'days',
      'matches',
    ]);
  });
});
