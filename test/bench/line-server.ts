import { type ChildProcessWithoutNullStreams, spawn, spawnSync } from 'node:child_process';
import { createInterface } from 'node:readline';

/** A peer that answers one line for each line: started once, so that start-up is in no measurement. */
export interface LineServer {
  readonly name: string;
  ask(line: string): Promise<string>;
  close(): void;
}

function answers(command: string, check: readonly string[]): boolean {
  const result = spawnSync(command, check, { stdio: 'ignore', timeout: 60_000 });
  return result.status === 0;
}

function serve(name: string, child: ChildProcessWithoutNullStreams): LineServer {
  const waiting: { done(line: string): void; fail(error: Error): void }[] = [];
  let errors = '';
  child.stderr.on('data', (chunk) => {
    errors = (errors + String(chunk)).slice(-2000);
  });
  child.on('exit', () => {
    for (const each of waiting.splice(0)) each.fail(new Error(`${name} ended: ${errors}`));
  });
  createInterface({ input: child.stdout }).on('line', (line) => waiting.shift()?.done(line));
  return {
    name,
    ask: (line) =>
      new Promise((done, fail) => {
        waiting.push({ done, fail });
        child.stdin.write(`${line}\n`);
      }),
    close: () => child.kill(),
  };
}

/** Python with NumPy, SciPy and pandas running test/bench/peers.py; null where it is not installed. */
export function pythonServer(): LineServer | null {
  const commands = [process.env.PYTHON, '/usr/bin/python3', 'python3', 'python'].filter((each) => each !== undefined);
  const found = commands.find((each) => answers(each, ['-c', 'import numpy, scipy.stats, pandas']));
  return found === undefined ? null : serve('Python', spawn(found, ['test/bench/peers.py'], { stdio: 'pipe' }));
}

/** R running test/bench/peers.R; null where it, or its package boot, is not installed. */
export function rServer(): LineServer | null {
  if (!answers('Rscript', ['-e', 'library(boot)'])) return null;
  return serve('R', spawn('Rscript', ['--vanilla', 'test/bench/peers.R'], { stdio: 'pipe' }));
}
