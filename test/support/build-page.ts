import { execFile } from 'node:child_process';
import { promisify } from 'node:util';

/** Builds dist/ once before the tests of the page, in a process of its own so that nothing of the test mode gets in. */
export async function setup(): Promise<void> {
  const { NODE_ENV: _mode, VITEST: _vitest, ...env } = process.env;
  await promisify(execFile)(process.execPath, ['node_modules/vite/bin/vite.js', 'build', '--logLevel', 'error'], {
    env,
  });
}
