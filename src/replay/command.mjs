// Runs one of the commands of package.json in Node: bundles it into build/ when a source is newer than the bundle, then
// calls its `main`. Nothing of the build is written to stdout, which belongs to the command.

import { existsSync, mkdirSync, readdirSync, renameSync, rmSync, statSync, utimesSync } from 'node:fs';
import { dirname, join } from 'node:path';
import { fileURLToPath, pathToFileURL } from 'node:url';

const root = join(dirname(fileURLToPath(import.meta.url)), '..', '..');

/** Command -> the module that exports `main(argv)`. */
const commands = {
  replay: 'src/replay/replay.ts',
  read: 'src/replay/read.ts',
  serve: 'src/replay/serve.ts',
  'check-reference': 'test/reference/check-reference.ts',
  bench: 'test/bench/bench.ts',
  'demo-data': 'demo-data/make-all.ts',
};

/** What a bundle can be made of. */
const sources = ['src', 'cells', 'demo-data', 'test/bench', 'test/reference', 'test/support', 'package-lock.json'];

/** Read when a command runs, so they are in no bundle. */
const notBundled = ['test/reference/cases', 'test/reference/tails'];

/** Latest change of a source at or below a path. */
function latestChange(path) {
  if (notBundled.includes(path)) return 0;
  const stat = statSync(join(root, path));
  if (!stat.isDirectory()) return /\.(ts|mjs|csv|json)$/.test(path) ? stat.mtimeMs : 0;
  const inside = readdirSync(join(root, path)).map((entry) => latestChange(`${path}/${entry}`));
  return Math.max(stat.mtimeMs, ...inside);
}

function isFresh(bundle) {
  if (!existsSync(bundle)) return false;
  const made = statSync(bundle).mtimeMs;
  return sources.every((path) => !existsSync(join(root, path)) || latestChange(path) < made);
}

/** Writes build/NAME.mjs; another process that does the same at the same moment cannot see half a file. */
async function bundle(entry, target) {
  const { build } = await import('vite');
  const folder = join(root, 'build', `making-${process.pid}`);
  mkdirSync(folder, { recursive: true });
  const started = new Date();
  try {
    await build({
      configFile: false,
      root,
      logLevel: 'error',
      ssr: { noExternal: true, external: ['vite', 'playwright-core', 'axe-core', '@sparticuz/chromium'] },
      worker: { format: 'es' },
      build: {
        ssr: join(root, entry),
        outDir: folder,
        target: 'node20',
        minify: false,
        emptyOutDir: false,
        copyPublicDir: false,
        rolldownOptions: { output: { entryFileNames: 'main.mjs', codeSplitting: false } },
      },
    });
    // A source that changed while it was being bundled is newer than the bundle.
    utimesSync(join(folder, 'main.mjs'), started, started);
    renameSync(join(folder, 'main.mjs'), target);
  } finally {
    rmSync(folder, { recursive: true, force: true });
  }
}

async function run(name, argv) {
  const entry = commands[name];
  if (entry === undefined) throw new Error(`there is no command called ${name}`);
  const target = join(root, 'build', `${name}.mjs`);
  if (!isFresh(target)) await bundle(entry, target);
  const { main } = await import(pathToFileURL(target).href);
  return main(argv);
}

const [name = '', ...argv] = process.argv.slice(2);
run(name, argv).then(
  (code) => {
    process.exitCode = code;
  },
  (error) => {
    process.stderr.write(`${error instanceof Error ? (error.stack ?? error.message) : String(error)}\n`);
    process.exitCode = 1;
  },
);
