import type { Page } from 'playwright-core';
import { serveFolder } from '../../src/replay/serve.ts';
import { setup as buildPage } from '../support/build-page.ts';
import { launchBrowser } from '../support/launch-browser.ts';
import { waitForIdle } from '../support/wait-for-idle.ts';
import type { BenchRow } from './bench-row.ts';

const CHANGES = 60;
const GOALS = { comparison: 100, strip: 1000 };

/** Shared number -> the key that goes to one end of the stretch that is walked to and fro, and how many steps it has. */
const walks = [
  { shared: 'trim', home: 'Home', steps: 25 },
  { shared: 'cutoff', home: 'Home', steps: 15 },
] as const;

/** From a key on the ruler to what it changed being on the screen, ms. */
interface Painted {
  readonly comparison: number;
  readonly strip: number;
}

interface Watched {
  drawn: WeakMap<HTMLCanvasElement, number>;
  standfast: { engine: { idle(): Promise<void>; counts(): ReadonlyMap<string, number> } };
}

/** Runs in the page before anything else: remembers when each canvas was last drawn on. */
function watchDrawing(): void {
  const drawn = new WeakMap<HTMLCanvasElement, number>();
  (globalThis as unknown as Watched).drawn = drawn;
  const prototype = CanvasRenderingContext2D.prototype;
  for (const name of ['stroke', 'fill', 'fillText', 'fillRect'] as const) {
    const own = prototype[name] as (this: CanvasRenderingContext2D, ...args: unknown[]) => void;
    Object.defineProperty(prototype, name, {
      value(this: CanvasRenderingContext2D, ...args: unknown[]) {
        drawn.set(this.canvas, performance.now());
        own.apply(this, args);
      },
    });
  }
}

/** Runs in the page: presses a key on a ruler and waits until the comparison and then the strip are painted. */
async function change([shared, key]: readonly [string, string]): Promise<Painted> {
  const { drawn, standfast } = globalThis as unknown as Watched;
  const canvases = ['[data-kind="comparison"] canvas', '[data-part="strip-chart"] canvas'];
  const painted = (): Promise<number> =>
    new Promise((done) =>
      requestAnimationFrame(() => {
        // A task queued in a frame runs after that frame is painted.
        const channel = new MessageChannel();
        channel.port1.onmessage = () => done(performance.now());
        channel.port2.postMessage(null);
      }),
    );
  const slider = document.querySelector(`[data-shared="${shared}"] [role="slider"]`);
  if (slider === null) throw new Error(`there is no ruler of ${shared}`);
  const start = performance.now();
  slider.dispatchEvent(new KeyboardEvent('keydown', { key, bubbles: true, cancelable: true }));
  const times: number[] = [];
  for (const selector of canvases) {
    for (let now = start; ; now = await painted()) {
      const canvas = document.querySelector<HTMLCanvasElement>(selector);
      if (canvas !== null && (drawn.get(canvas) ?? 0) > start && now > start) {
        times.push(now - start);
        break;
      }
      if (now - start > 10_000) throw new Error(`${key} on ${shared} did not draw ${selector} within 10 s`);
    }
  }
  // The relabellings behind the joint p go on for longer; the next change may come before they end.
  await Promise.race([standfast.engine.idle(), new Promise((go) => setTimeout(go, 300))]);
  await painted();
  return { comparison: times[0] ?? 0, strip: times[1] ?? 0 };
}

function p95(values: readonly number[]): number {
  const sorted = [...values].sort((a, b) => a - b);
  return sorted[Math.ceil(0.95 * sorted.length) - 1] ?? Number.NaN;
}

async function walk(page: Page, shared: string, home: string, steps: number): Promise<Painted[]> {
  await page.locator(`[data-shared="${shared}"] [role="slider"]`).first().press(home);
  await waitForIdle(page);
  const all: Painted[] = [];
  for (let i = 0; i < CHANGES; i++) {
    const forth = Math.floor(i / steps) % 2 === 0;
    all.push(await page.evaluate(change, [shared, forth ? 'ArrowRight' : 'ArrowLeft'] as const));
  }
  return all;
}

/** On the first demo in the built page: a change of a shared number to the painted comparison and to the whole strip. */
export async function rows(): Promise<BenchRow[]> {
  await buildPage();
  const served = await serveFolder('dist', 0);
  const browser = await launchBrowser();
  const all: BenchRow[] = [];
  try {
    const page = await browser.newPage({ viewport: { width: 1440, height: 900 } });
    await page.addInitScript(watchDrawing);
    await page.goto(served.address);
    await waitForIdle(page);
    for (const { shared, home, steps } of walks) {
      const painted = await walk(page, shared, home, steps);
      for (const what of ['comparison', 'strip'] as const) {
        all.push({
          id: 'page',
          case: `${shared} to painted ${what}, p95 of ${CHANGES}`,
          ours_ms: p95(painted.map((each) => each[what])),
          peer: '-',
          peer_ms: null,
          ratio: null,
          goal: `<= ${GOALS[what]} ms`,
        });
      }
    }
  } finally {
    await browser.close();
    await served.close();
  }
  return all;
}
