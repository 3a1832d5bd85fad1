import { describe, expect, test } from 'vitest';
import { canonicalJson } from '../../src/worksheet/canonical.ts';

// The examples of RFC 8785 are quoted from memory.
describe('canonicalJson', () => {
  test('agrees with RFC 8785 section 3.2.2: literals, numbers and strings', () => {
    const source = String.raw`{
      "numbers": [333333333.33333329, 1E30, 4.50, 2e-3, 0.000000000000000000000000001],
      "string": "\u20ac$\u000F\u000aA'\u0042\u0022\u005c\\\"\/",
      "literals": [null, true, false]
    }`;
    expect(canonicalJson(JSON.parse(source))).toBe(
      `{"literals":[null,true,false],"numbers":[333333333.3333333,1e+30,4.5,0.002,1e-27],"string":"\u20ac$\\u000f\\nA'B\\"\\\\\\\\\\"/"}`,
    );
  });

  test('agrees with RFC 8785 section 3.2.3: names sorted by UTF-16 code units', () => {
    const source = {
      '\u20ac': 'Euro Sign',
      '\r': 'Carriage Return',
      '\ufb33': 'Hebrew Letter Dalet With Dagesh',
      '1': 'One',
      '\ud83d\ude00': 'Grinning Face',
      '\u0080': 'Control',
      '\u00f6': 'Latin Small Letter O With Diaeresis',
    };
    const values = [...canonicalJson(source).matchAll(/:"([^"]*)"/g)].map((match) => match[1]);
    expect(values).toEqual([
      'Carriage Return',
      'One',
      'Control',
      'Latin Small Letter O With Diaeresis',
      'Euro Sign',
      'Grinning Face',
      'Hebrew Letter Dalet With Dagesh',
    ]);
  });

  // RFC 8785 appendix B: doubles by their bits, and how they are written.
  test.each([
    ['0000000000000000', '0'],
    ['8000000000000000', '0'],
    ['0000000000000001', '5e-324'],
    ['7fefffffffffffff', '1.7976931348623157e+308'],
    ['4340000000000000', '9007199254740992'],
    ['4430000000000000', '295147905179352830000'],
    ['44b52d02c7e14af5', '9.999999999999997e+22'],
    ['44b52d02c7e14af6', '1e+23'],
    ['444b1ae4d6e2ef4f', '999999999999999900000'],
    ['444b1ae4d6e2ef50', '1e+21'],
    ['3eb0c6f7a0b5ed8c', '9.999999999999997e-7'],
    ['3eb0c6f7a0b5ed8d', '0.000001'],
    ['41b3de4355555553', '333333333.3333332'],
    ['becbf647612f3696', '-0.0000033333333333333333'],
  ])('agrees with RFC 8785 appendix B: %s', (bits, written) => {
    const view = new DataView(new ArrayBuffer(8));
    view.setBigUint64(0, BigInt(`0x${bits}`));
    expect(canonicalJson(view.getFloat64(0))).toBe(written);
  });

  test('invariance: the order in which fields were added does not matter, the order of a list does', () => {
    expect(canonicalJson({ b: { d: 1, c: 2 }, a: [] })).toBe('{"a":[],"b":{"c":2,"d":1}}');
    expect(canonicalJson([2, 1])).not.toBe(canonicalJson([1, 2]));
  });

  test.each([
    [{ a: [1, Number.NaN] }, '*value.a[1]* must be plain JSON data; got NaN'],
    [{ a: Number.POSITIVE_INFINITY }, 'got Infinity'],
    [{ a: undefined }, '*value.a* must be plain JSON data; got a undefined'],
    [[() => 1], '*value[0]* must be plain JSON data; got a function'],
    [new Date(0), 'got a object'],
    ['\ud800', 'half a character'],
    [{ '\udc00x': 1 }, 'half a character'],
  ])('refuses: what is not JSON (case %#)', (value, message) => {
    expect(() => canonicalJson(value)).toThrow(message);
  });
});
