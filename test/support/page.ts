import type { Browser, Page } from 'playwright-core';
import { afterAll, afterEach, beforeAll, expect } from 'vitest';
import { type Served, serveFolder } from '../../src/replay/serve.ts';
import { launchBrowser } from './launch-browser.ts';
import { waitForIdle } from './wait-for-idle.ts';

export interface OpenOptions {
  /** What follows the address: "#id", "standfast.html". */
  readonly path?: string;
  readonly width?: number;
  readonly height?: number;
  readonly scheme?: 'light' | 'dark';
  readonly reducedMotion?: boolean;
  /** Whether to wait until the worksheet is there and computed; default true. */
  readonly wait?: boolean;
}

export interface OpenedPage {
  readonly page: Page;
  /** Console errors and warnings, thrown errors, policy violations and requests to anywhere else, in order; a test takes out its own. */
  readonly problems: string[];
  /** Resolves when every cell is settled and the picture of it is painted. */
  idle(): Promise<void>;
}

export interface PageHarness {
  open(options?: OpenOptions): Promise<OpenedPage>;
  /** Opens any address, such as a file, with the same watch. */
  openAddress(address: string, options?: OpenOptions): Promise<OpenedPage>;
  readonly browser: Browser;
  readonly address: string;
}

async function watch(page: Page, origin: string, problems: string[]): Promise<void> {
  page.on('console', (message) => {
    if (['error', 'warning'].includes(message.type())) problems.push(`console: ${message.text()}`);
  });
  page.on('pageerror', (error) => problems.push(`thrown: ${error.message}`));
  page.on('crash', () => problems.push('the page crashed'));
  page.on('request', (request) => {
    const url = request.url();
    if (!/^(data|blob|file|about):/.test(url) && !url.startsWith(origin)) problems.push(`request: ${url}`);
  });
  await page.addInitScript(() => {
    document.addEventListener('securitypolicyviolation', (event) => {
      console.error(`policy: ${event.effectiveDirective} ${event.blockedURI} ${event.sourceFile}:${event.lineNumber}`);
    });
  });
}

async function openIn(browser: Browser, address: string, origin: string, options: OpenOptions): Promise<OpenedPage> {
  const context = await browser.newContext({
    viewport: { width: options.width ?? 1440, height: options.height ?? 900 },
    colorScheme: options.scheme ?? 'light',
    reducedMotion: options.reducedMotion === true ? 'reduce' : 'no-preference',
    acceptDownloads: true,
  });
  const page = await context.newPage();
  const problems: string[] = [];
  await watch(page, origin, problems);
  await page.goto(address);
  if (options.wait !== false) await waitForIdle(page);
  return { page, problems, idle: () => waitForIdle(page) };
}

/**
 * The built page, served under its real policy, in a real browser: call once at the top of a test file. Every page a
 * test opened is closed after it, and the test fails where the page had a problem.
 */
export function usePage(): PageHarness {
  let browser: Browser | undefined;
  let served: Served | undefined;
  const opened: OpenedPage[] = [];
  const running = (): Browser => {
    if (browser === undefined) throw new Error('the browser is open only while the tests of the file run');
    return browser;
  };
  beforeAll(async () => {
    served = await serveFolder('dist', 0);
    browser = await launchBrowser();
  });
  afterEach(async () => {
    const all = opened.splice(0);
    for (const each of all) await each.page.context().close();
    expect(all.flatMap((each) => each.problems)).toEqual([]);
  });
  afterAll(async () => {
    await browser?.close();
    await served?.close();
  });
  const openAddress = async (address: string, options: OpenOptions = {}): Promise<OpenedPage> => {
    const page = await openIn(running(), address, served?.address ?? '', options);
    opened.push(page);
    return page;
  };
  return {
    open: (options = {}) => openAddress(`${served?.address ?? ''}${options.path ?? ''}`, options),
    openAddress,
    get browser() {
      return running();
    },
    get address() {
      return served?.address ?? '';
    },
  };
}
