import type { BenchRow } from './bench-row.ts';

type BenchModule = { readonly rows: () => Promise<readonly BenchRow[]> };

/** Every workload: b1.ts, b2.ts, ... and page.ts; each exports `rows`. */
const workloads = import.meta.glob<BenchModule>(['./b[0-9]*.ts', './page.ts', '!./*.test.ts', '!./*-*.ts']);

function number(value: number | null): string {
  if (value === null) return '-';
  return value >= 100 ? value.toFixed(0) : value.toPrecision(3);
}

function table(rows: readonly BenchRow[]): string {
  const head = ['', 'case', 'ours, ms', 'peer', 'peer, ms', 'ratio', 'goal', ''];
  const lines = rows.map((row) => [
    row.id,
    row.case,
    number(row.ours_ms),
    row.peer,
    number(row.peer_ms),
    number(row.ratio),
    row.goal,
    row.note ?? '',
  ]);
  const widths = head.map((_, i) => Math.max(...[head, ...lines].map((line) => (line[i] ?? '').length)));
  const rightAligned = new Set([2, 4, 5]);
  const written = [head, ...lines].map((line) =>
    line.map((cell, i) => (rightAligned.has(i) ? cell.padStart(widths[i] ?? 0) : cell.padEnd(widths[i] ?? 0))),
  );
  return `${written.map((line) => line.join('  ').trimEnd()).join('\n')}\n`;
}

/**
 * `npm run -s bench -- [B1 B2 page ...] [--json]`: runs the workloads beside their peers and prints one table, or one
 * JSON array. What is under way is said on stderr.
 */
export async function main(argv: readonly string[]): Promise<number> {
  const wanted = argv.filter((each) => !each.startsWith('-')).map((each) => each.toLowerCase());
  const rows: BenchRow[] = [];
  for (const [path, load] of Object.entries(workloads)) {
    const name = path.replace(/^\.\/|\.ts$/g, '');
    if (wanted.length > 0 && !wanted.includes(name)) continue;
    process.stderr.write(`${name} ...\n`);
    rows.push(...(await (await load()).rows()));
  }
  process.stdout.write(argv.includes('--json') ? `${JSON.stringify(rows, null, 1)}\n` : table(rows));
  return 0;
}
