import { existsSync, mkdtempSync, renameSync, rmSync, statSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { delimiter, join } from 'node:path';
import { type Browser, chromium } from 'playwright-core';

type Environment = { [name: string]: string };

interface FoundBrowser {
  readonly executablePath: string;
  /** What the browser needs in its environment beside our own. */
  readonly env: Environment;
}

const names = ['chromium', 'chromium-browser', 'google-chrome', 'google-chrome-stable', 'chrome', 'microsoft-edge'];

const otherPlaces = [
  '/Applications/Google Chrome.app/Contents/MacOS/Google Chrome',
  '/Applications/Chromium.app/Contents/MacOS/Chromium',
  '/Applications/Microsoft Edge.app/Contents/MacOS/Microsoft Edge',
  'C:\\Program Files\\Google\\Chrome\\Application\\chrome.exe',
  'C:\\Program Files (x86)\\Microsoft\\Edge\\Application\\msedge.exe',
];

/** Flags of every browser the tests start; the profile is always a fresh one. */
const browserFlags = [
  '--headless',
  '--no-sandbox',
  '--disable-gpu',
  '--disable-quic',
  '--no-first-run',
  '--disable-background-networking',
  '--disable-component-update',
  '--disable-sync',
];

function isFile(path: string): boolean {
  return existsSync(path) && statSync(path).isFile();
}

function installedBrowser(): string | undefined {
  const folders = (process.env.PATH ?? '').split(delimiter).filter((each) => each !== '');
  const places = folders.flatMap((folder) => names.map((name) => join(folder, name)));
  return [...places, ...otherPlaces].find(isFile);
}

/** What the package reads from the environment; it is put back afterwards. */
const readByPackage = ['TMPDIR', 'AWS_EXECUTION_ENV', 'LD_LIBRARY_PATH', 'FONTCONFIG_PATH', 'HOME'];

async function unpackInto(folder: string): Promise<void> {
  const before = readByPackage.map((name) => [name, process.env[name]] as const);
  // The package unpacks into the temporary folder, and its libraries only where it believes to be in this place.
  process.env.TMPDIR = folder;
  process.env.AWS_EXECUTION_ENV = 'AWS_Lambda_nodejs20.x';
  try {
    const { default: packaged } = await import('@sparticuz/chromium');
    await packaged.executablePath();
  } finally {
    for (const [name, value] of before) {
      if (value === undefined) delete process.env[name];
      else process.env[name] = value;
    }
  }
}

/** The browser inside the npm package with the libraries it needs, unpacked once into the temporary folder. */
async function packagedBrowser(): Promise<FoundBrowser> {
  if (process.platform !== 'linux' || process.arch !== 'x64') {
    throw new Error('no browser was found: install Chromium, Chrome or Edge, or set CHROMIUM_PATH');
  }
  const kept = join(tmpdir(), 'standfast-chromium-147');
  const executablePath = join(kept, 'chromium');
  if (!isFile(executablePath)) {
    const making = mkdtempSync(join(tmpdir(), 'standfast-unpack-'));
    await unpackInto(making);
    if (!existsSync(kept)) renameSync(making, kept);
    else rmSync(making, { recursive: true, force: true });
  }
  const libraries = [process.env.LD_LIBRARY_PATH, join(kept, 'al2023', 'lib')];
  return {
    executablePath,
    env: {
      LD_LIBRARY_PATH: libraries.filter((each) => each !== undefined).join(':'),
      FONTCONFIG_PATH: join(kept, 'fonts'),
    },
  };
}

function start({ executablePath, env }: FoundBrowser): Promise<Browser> {
  return chromium.launch({ executablePath, args: browserFlags, env: { ...process.env, ...env } as Environment });
}

/**
 * Starts the browser to test with, under a fresh profile: CHROMIUM_PATH ("packaged" for the one inside the npm package),
 * else an installed one that starts, else the one inside the npm package (Linux x64).
 */
export async function launchBrowser(): Promise<Browser> {
  const named = process.env.CHROMIUM_PATH ?? '';
  if (named !== '' && named !== 'packaged') {
    if (!isFile(named)) throw new Error(`CHROMIUM_PATH names no file: ${named}`);
    return start({ executablePath: named, env: {} });
  }
  const installed = named === 'packaged' ? undefined : installedBrowser();
  if (installed === undefined) return start(await packagedBrowser());
  try {
    return await start({ executablePath: installed, env: {} });
  } catch {
    // Some systems put a stand-in under the browser's name that only says how to install it.
    return start(await packagedBrowser());
  }
}
