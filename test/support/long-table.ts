import { existsSync, readFileSync, writeFileSync } from 'node:fs';
import { availableParallelism } from 'node:os';
import type { Reporter, TestModule } from 'vitest/node';
import type { LongRun } from './long-run.ts';

const FILE = 'DEVELOPERS.md';
const START = '<!-- long tests: start -->';
const END = '<!-- long tests: end -->';

export interface LongRow extends LongRun {
  readonly test: string;
  readonly passed: boolean;
  readonly seconds: number;
}

function cell(text: string): string {
  return text.replace(/\s+/g, ' ').replaceAll('|', '\\|');
}

/** The dated table of one run. */
export function longTable(rows: readonly LongRow[], when: Date, where: string): string {
  const lines = rows.map(
    (row) =>
      `| ${cell(row.test)} | ${cell(row.count)} | ${cell(row.outcome)} | ${row.passed ? 'passed' : 'FAILED'} | ${row.seconds.toFixed(1)} |`,
  );
  return [
    `\`npm run test:long\` on ${when.toISOString().slice(0, 10)} (${where}):`,
    '',
    '| test | count | outcome | | seconds |',
    '|---|---|---|---|---|',
    ...lines,
  ].join('\n');
}

/** A text with its part between the two marks replaced, or with the marks and the part added at its end. */
export function withTable(text: string, table: string): string {
  const block = `${START}\n${table}\n${END}`;
  const from = text.indexOf(START);
  const to = text.indexOf(END);
  if (from < 0 || to < from) return `${text.trimEnd()}\n\n## Long tests\n\n${block}\n`;
  return text.slice(0, from) + block + text.slice(to + END.length);
}

/** Writes what the tests with raised counts came to into DEVELOPERS.md when the run ends. */
export class LongTable implements Reporter {
  onTestRunEnd(modules: readonly TestModule[]): void {
    const rows = modules.flatMap((each) =>
      [...each.children.allTests()].flatMap((test): LongRow[] => {
        const run = test.meta().longRun;
        if (run === undefined) return [];
        const seconds = (test.diagnostic()?.duration ?? 0) / 1000;
        return [{ ...run, test: test.name, passed: test.result().state === 'passed', seconds }];
      }),
    );
    if (rows.length === 0 || !existsSync(FILE)) return;
    const where = `Node ${process.versions.node}, ${availableParallelism()} cores`;
    writeFileSync(FILE, withTable(readFileSync(FILE, 'utf8'), longTable(rows, new Date(), where)));
  }
}
