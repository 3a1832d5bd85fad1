import { describe, expect, it } from 'vitest';
import { COMMA, DOT } from '../../../src/data/import/bytes.ts';
import { losesDigits, parseNumber, scanNumber } from '../../../src/data/import/parse-number.ts';

const encode = (text: string) => new TextEncoder().encode(text);
const parse = (text: string, mark = DOT) => parseNumber(encode(text), 0, encode(text).length, mark);

function scan(text: string): number | null {
  const bytes = encode(`${text},`);
  const stops = new Uint8Array(256);
  stops[COMMA] = 1;
  const values = new Float64Array(1);
  const end = scanNumber(bytes, 0, stops, DOT, values, 0);
  return end === 0 ? null : (values[0] as number);
}

describe('parseNumber', () => {
  it('agrees with Number on 4,000 random decimals, exactly', () => {
    let state = 5;
    const below = (n: number) => {
      state = (Math.imul(state, 1664525) + 1013904223) >>> 0;
      return Math.floor((state / 2 ** 32) * n);
    };
    const digits = (n: number) => Array.from({ length: n }, () => below(10)).join('');
    const wrong: string[] = [];
    for (let k = 0; k < 4_000; k++) {
      const fraction = below(2) === 0 ? `.${digits(below(12))}` : '';
      const exponent = below(3) === 0 ? `e${['', '-', '+'][below(3)]}${below(330)}` : '';
      const text = `${['', '-', '+'][below(3)]}${digits(1 + below(12))}${fraction}${exponent}`;
      const expected = Number(text);
      const due = Number.isFinite(expected) ? expected + 0 : Number.NaN;
      const scanned = scan(text) ?? due;
      if (!Object.is(parse(text), due) || !Object.is(scanned, due)) wrong.push(text);
    }
    expect(wrong).toEqual([]);
  });

  it('by hand: hard cases of rounding (from memory: halfway cases of double precision)', () => {
    for (const text of [
      '9007199254740993',
      '2.2250738585072011e-308',
      '1.7976931348623157e308',
      '0.500000000000000166',
    ]) {
      expect(parse(text)).toBe(Number(text));
    }
  });

  it('by hand: the mark is a dot or a comma, never both', () => {
    expect([parse('1,5', COMMA), parse('1.5', COMMA), parse('1,5'), parse('\u22121.5')]).toEqual([1.5, NaN, NaN, -1.5]);
  });

  it.each(['', '-', '.', '1e', '1e+', 'e1', '1..2', '1.2.3', '0x1', 'NaN', 'Infinity', '1e400', ' 1', '1 ', '\u2212'])(
    'degenerate: %j is no number',
    (text) => expect(parse(text)).toBeNaN(),
  );
});

describe('scanNumber', () => {
  it.each(['1', '-2', '0', '0.5', '-0', '123456789012345', '.5', '5.', '1.25'])('by hand: reads %s', (text) => {
    expect(scan(text)).toBe(Number(text) + 0);
  });

  it('agrees with Number on 20,000 random decimals of 16 to 19 digits, exactly', () => {
    let state = 9;
    const next = () => {
      state = (Math.imul(state, 1664525) + 1013904223) >>> 0;
      return state / 2 ** 32;
    };
    let wrong = 0;
    let unsettled = 0;
    for (let k = 0; k < 20_000; k++) {
      const digits = Array.from({ length: 16 + Math.floor(next() * 4) }, () => Math.floor(next() * 10)).join('');
      const at = 1 + Math.floor(next() * 12);
      const text = `${digits.slice(0, at).replace(/^0+(?=\d)/, '')}.${digits.slice(at)}`;
      const value = scan(text);
      if (value === null) unsettled++;
      else if (value !== Number(text)) wrong++;
    }
    expect([wrong, unsettled]).toEqual([0, 0]);
  });

  it('degenerate: halfway between two doubles is left to a closer look, and read right there', () => {
    const half = '4503599627370497.5';
    expect(scan(half)).toBeNull();
    expect(parse(half)).toBe(Number(half));
    expect(scan('0.10000000000000001')).toBe(0.1);
  });

  it.each(['', '-', '.', '007', '-01', '+1', '1e3', '1234567890123456', '"1"', ' 1', '1 ', '1x', 'x'])(
    'by hand: leaves %j to a closer look',
    (text) => expect(scan(text)).toBeNull(),
  );
});

describe('losesDigits', () => {
  it('by hand: only whole numbers that do not come back as they were written', () => {
    const loses = (text: string) => losesDigits(encode(text), 0, text.length, Number(text));
    expect(['9007199254740993', '-9007199254740993', '12345678901234567891'].map(loses)).toEqual([true, true, true]);
    const kept = ['9007199254740991', '-9007199254740992', '90071992547409900', '1e20', '9007199254740993.0', 'x'];
    expect(kept.map(loses)).toEqual([false, false, false, false, false, false]);
  });
});
