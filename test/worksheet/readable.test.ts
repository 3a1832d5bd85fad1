import { describe, expect, test } from 'vitest';
import { readablePart, resultsText } from '../../src/worksheet/readable.ts';
import { dataBlock, shared, worksheet } from '../support/worksheets.ts';

const log = [
  {
    when: '2026-03-01T09:30:00Z',
    who: 'Ada',
    what: 'trim 20 % \u2192 10 %',
    opening: 'blind' as const,
    before: '',
    hash: '',
  },
];
const record = worksheet([], {
  title: 'A < B & C',
  data: [dataBlock('d1', [1.5, null])],
  shared: [shared('trim', 20), shared('cutoff', null)],
  log,
});
const cells = [{ title: 'score', sentence: 'Score by the\n mean.', result: '35 scored.' }];

describe('the part of a saved page that needs no program', () => {
  test('by hand: cells, shared numbers, what was recorded, and the log, as text', () => {
    const text = resultsText(record, cells);
    expect(text).toContain('1. score\n   Score by the mean.\n   35 scored.\n');
    expect(text).toContain('trim: 20\ncutoff: none\n');
    expect(text).toContain('Program: standfast 0.1.0\nSeed of the random numbers: 7\n');
    expect(text).toContain(`SHA-256 of the table: ${'1'.repeat(64)}`);
    expect(text).toContain('1. 2026-03-01T09:30:00Z, Ada (blind): trim 20 % \u2192 10 %.');
  });

  test('by hand: the data stand in it as CSV, and it says what it carries', () => {
    const part = readablePart(record, cells);
    expect(part).toContain('<h2>Data: d1.csv</h2>\n<pre>x\n1.5\n\n</pre>');
    expect(part).toContain('participants\u2019 data and the labels of the conditions');
  });

  test('refuses: nothing of the worksheet becomes markup', () => {
    const part = readablePart({ ...record, title: '</noscript><script>x' }, [
      { title: '<b>', sentence: '</pre>', result: '<!--' },
    ]);
    expect(part.match(/<\/?(?!noscript|h1|h2|p|pre)[a-z!]/gi)).toBeNull();
    expect(part.match(/<\/noscript/g)).toHaveLength(1);
    expect(part.match(/<\/pre/g)).toHaveLength(2);
  });
});
