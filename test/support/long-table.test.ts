import { expect, test } from 'vitest';
import { longTable, withTable } from './long-table.ts';

const row = { test: 'reads | writes', count: '10 files', outcome: 'none\nlost', passed: true, seconds: 1.26 };

test('by hand: the table has one line a test, with bars and line ends taken care of', () => {
  const table = longTable([row], new Date('2026-03-04T10:00:00Z'), 'Node 22.1.0, 2 cores');
  expect(table).toBe(
    [
      '`npm run test:long` on 2026-03-04 (Node 22.1.0, 2 cores):',
      '',
      '| test | count | outcome | | seconds |',
      '|---|---|---|---|---|',
      '| reads \\| writes | 10 files | none lost | passed | 1.3 |',
    ].join('\n'),
  );
});

test('invariance: writing the same table twice leaves one, and the text around it as it was', () => {
  const once = withTable('# Developers\n\nText.\n', 'TABLE');
  expect(withTable(once, 'TABLE')).toBe(once);
  const between = once.replace('## Long tests', '## Evidence').concat('\n## After\n');
  expect(withTable(between, 'NEW')).toBe(between.replace('TABLE', 'NEW'));
});
