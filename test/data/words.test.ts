import { describe, expect, it } from 'vitest';
import { isoMoment } from '../../src/data/iso-date.ts';
import { counted, grouped, listed, quoted } from '../../src/data/words.ts';

describe('words of sentences', () => {
  it('by hand: counts and numbers', () => {
    expect([counted(1, 'row'), counted(2120, 'row'), counted(0, 'entry', 'entries')]).toEqual([
      '1 row',
      '2,120 rows',
      '0 entries',
    ]);
    expect([1234567, -99, 1234.5678, 0.0001, 1e21, -1e-7].map(grouped)).toEqual([
      '1,234,567',
      '\u221299',
      '1,234.5678',
      '0.0001',
      '1e+21',
      '\u22121e-7',
    ]);
  });

  it('by hand: lists and quotations', () => {
    expect([listed([]), listed(['a']), listed(['a', 'b']), listed(['a', 'b', 'c'])]).toEqual([
      '',
      'a',
      'a and b',
      'a, b and c',
    ]);
    expect(listed(['a', 'b', 'c', 'd'], 2)).toBe('a, b and 2 more');
    expect(quoted(`a\n\u0007b${'x'.repeat(50)}`)).toBe(`"a b${'x'.repeat(36)}\u2026"`);
  });
});

describe('isoMoment', () => {
  it('agrees with Date.parse on dates and times with a zone, exactly', () => {
    for (const text of [
      '1970-01-01',
      '2024-02-29',
      '0099-12-31',
      '2024-01-31T10:00Z',
      '2024-01-31T10:00:05.25-03:30',
    ]) {
      expect([text, isoMoment(text)]).toEqual([text, Date.parse(text)]);
    }
  });

  it('by hand: a time without a zone is UTC; what is not on the calendar is no date', () => {
    expect(isoMoment('2024-01-31 10:00')).toBe(Date.UTC(2024, 0, 31, 10));
    for (const text of [
      '2023-02-29',
      '2100-02-29',
      '2024-00-10',
      '2024-04-31',
      '2024-01-00',
      '2024-01-01T24:00',
      '24-01-01',
    ]) {
      expect([text, isoMoment(text)]).toEqual([text, null]);
    }
  });
});
