import { createHash } from 'node:crypto';
import { readFileSync } from 'node:fs';
import { gzipSync } from 'node:zlib';
import { type Plugin, type Rolldown, runnerImport } from 'vite';
import { defineConfig, type ViteUserConfig } from 'vitest/config';
import { pageWithWorksheet } from './src/worksheet/html.ts';
import { LongTable } from './test/support/long-table.ts';

type Bundle = Rolldown.OutputBundle;
type Asset = Rolldown.OutputAsset;
type Chunk = Rolldown.OutputChunk;

/**
 * The policy of the page. `unsafe-eval` is for one fenced module of src/data that sees internal column names only;
 * the one script is named by its hash, and nothing may be fetched from anywhere.
 */
function policyFor(script: string): string {
  const hash = createHash('sha256').update(script).digest('base64');
  return [
    "default-src 'none'",
    `script-src 'sha256-${hash}' 'unsafe-eval'`,
    'worker-src blob:',
    "style-src 'unsafe-inline'",
    'img-src data: blob:',
    'font-src data:',
    "connect-src 'none'",
    "base-uri 'none'",
    "form-action 'none'",
  ].join('; ');
}

/** Script text that can stand inside a script element: the two sequences that would end it or hide it are escaped. */
function inlineScript(code: string): string {
  return code.replace(/<\/(script)/gi, '<\\/$1').replace(/<!--/g, '\\x3C!--');
}

/**
 * The script as one that unpacks itself: a page of half the size, its whole text under the hash of the policy. What is
 * evaluated is this constant and nothing else.
 */
function selfUnpacking(code: string): string {
  const packed = gzipSync(`"use strict";${code}\n//# sourceURL=standfast.js`, { level: 9 }).toString('base64');
  return [
    `const packed = Uint8Array.from(atob('${packed}'), (letter) => letter.charCodeAt(0));`,
    "const unpacked = new Blob([packed]).stream().pipeThrough(new DecompressionStream('gzip'));",
    '(0, eval)(await new Response(unpacked).text());',
  ].join('\n');
}

function onlyChunk(bundle: Bundle): Chunk {
  const chunks = Object.values(bundle).filter((each): each is Chunk => each.type === 'chunk');
  if (chunks.length !== 1) throw new Error(`the page must be one script chunk; got ${chunks.length}`);
  const chunk = chunks[0] as Chunk;
  if (chunk.imports.length + chunk.exports.length > 0) throw new Error('the script must be one without imports');
  return chunk;
}

function assetsEnding(bundle: Bundle, ending: string): Asset[] {
  return Object.values(bundle).filter((each): each is Asset => each.type === 'asset' && each.fileName.endsWith(ending));
}

function textOf(asset: Asset): string {
  return typeof asset.source === 'string' ? asset.source : new TextDecoder().decode(asset.source);
}

interface Parts {
  readonly script: string;
  readonly styles: string;
  /** The licences of what the script is made of: one file travels alone, so it carries them. */
  readonly licences: string;
}

/** The worksheet the single file carries, so that it can be replayed as it is. */
const FIRST_DEMO = 'demo-data/bridge-alerts.standfast.json';

/** The single file: the page with a worksheet in it, which is loaded only here so that a test needs no whole program. */
async function withWorksheet(page: string, json: string): Promise<string> {
  const { module } = await runnerImport<{ readableOf(json: string): Promise<string> }>('./src/replay/demo-words.ts');
  return pageWithWorksheet(page, await module.readableOf(json), json);
}

/** The page with its script, styles and licences inside it, under the policy. */
function inlinedPage(html: string, { script, styles, licences }: Parts): string {
  const bare = html
    .replace(/\s*<script\b[^>]*\bsrc=[^>]*><\/script>/g, '')
    .replace(/\s*<link\b[^>]*\brel="(?:stylesheet|modulepreload)"[^>]*>/g, '')
    .replace(/\s*<meta\b[^>]*Content-Security-Policy[^>]*>/g, '');
  const policy = `<meta http-equiv="Content-Security-Policy" content="${policyFor(script)}">`;
  const style = styles === '' ? '' : `<style>${styles}</style>\n`;
  const legal = `<script type="text/plain" id="licences">\n${licences}</script>\n`;
  const inside = bare.indexOf('<head>') + '<head>'.length;
  const end = bare.indexOf('</head>');
  if (end < inside || inside < '<head>'.length)
    throw new Error('src/index.html must have plain <head> and </head> tags');
  return [
    bare.slice(0, inside),
    `\n    ${policy}`,
    bare.slice(inside, end),
    `${style}${legal}<script type="module">${script}</script>\n  `,
    bare.slice(end),
  ].join('');
}

/** Writes the page as one file: script and styles inside it, the script's SHA-256 in its policy. */
function onePage(): Plugin {
  return {
    name: 'standfast-one-page',
    apply: 'build',
    enforce: 'post',
    generateBundle: {
      order: 'post',
      async handler(_options, bundle) {
        const pages = assetsEnding(bundle, '.html');
        const page = pages[0];
        if (page === undefined) return;
        const chunk = onlyChunk(bundle);
        const sheets = assetsEnding(bundle, '.css');
        const source = inlinedPage(textOf(page), {
          script: selfUnpacking(chunk.code),
          styles: sheets.map(textOf).join('\n'),
          licences: inlineScript(assetsEnding(bundle, 'licences.md').map(textOf).join('\n')),
        });
        for (const file of [chunk, ...sheets]) delete bundle[file.fileName];
        page.source = source;
        const single = await withWorksheet(source, readFileSync(FIRST_DEMO, 'utf8'));
        this.emitFile({ type: 'asset', fileName: 'standfast.html', source: single });
      },
    },
  };
}

/** Vitest mode "long" (npm run test:long) raises the counts of the tests that read STANDFAST_LONG. */
function testsFor(long: boolean): NonNullable<ViteUserConfig['test']> {
  return {
    root: '.',
    env: long ? { STANDFAST_LONG: '1' } : {},
    reporters: long ? ['default', new LongTable()] : ['default'],
    maxWorkers: 2,
    projects: [
      {
        extends: true,
        test: {
          name: 'unit',
          include: ['test/**/*.test.ts'],
          exclude: ['test/browser/**', 'node_modules/**'],
          testTimeout: long ? 900_000 : 20_000,
          sequence: { groupOrder: 0 },
        },
      },
      {
        extends: true,
        test: {
          name: 'browser',
          include: ['test/browser/**/*.test.ts'],
          globalSetup: ['test/support/build-page.ts'],
          testTimeout: long ? 900_000 : 60_000,
          hookTimeout: 120_000,
          fileParallelism: false,
          sequence: { groupOrder: 1 },
        },
      },
    ],
  };
}

export default defineConfig(({ mode }) => ({
  root: 'src',
  base: './',
  plugins: [onePage()],
  worker: { format: 'iife' },
  build: {
    outDir: '../dist',
    emptyOutDir: true,
    target: 'es2022',
    modulePreload: false,
    cssCodeSplit: false,
    assetsInlineLimit: Number.MAX_SAFE_INTEGER,
    chunkSizeWarningLimit: 4_000,
    reportCompressedSize: false,
    license: { fileName: 'licences.md' },
    rolldownOptions: { output: { codeSplitting: false } },
  },
  test: testsFor(mode === 'long'),
}));
