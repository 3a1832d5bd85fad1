import { describe, expect, it } from 'vitest';
import { hashOf, LevelTable } from '../../../src/data/import/level-table.ts';

const encode = (text: string) => new TextEncoder().encode(text);

describe('LevelTable', () => {
  it('agrees with Map on 10,000 texts of 2,000 levels, exactly', () => {
    const table = new LevelTable();
    const known = new Map<string, number>();
    const wrong: string[] = [];
    for (let i = 0; i < 10_000; i++) {
      const text = `p${(i * 7919) % 2000}${i % 3 === 0 ? '\u00e9' : ''}`.slice(0, 2 + (i % 5));
      const code = known.get(text) ?? known.size;
      known.set(text, code);
      const bytes = encode(text);
      if (table.codeOf(bytes, 0, bytes.length, hashOf(bytes)) !== code) wrong.push(text);
    }
    expect(wrong).toEqual([]);
    expect(table.levels()).toEqual([...known.keys()]);
  });

  it('degenerate: equal hashes, a byte order mark and long texts are told apart', () => {
    const table = new LevelTable();
    const texts = ['\ufeffa', 'a', 'b', 'x'.repeat(10_000), `${'x'.repeat(9999)}y`];
    const codes = texts.map((text) => table.codeOf(encode(text), 0, encode(text).length, 1));
    expect(codes).toEqual([0, 1, 2, 3, 4]);
    expect(table.levels()).toEqual(texts);
  });
});
