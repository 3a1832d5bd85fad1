import './style/base.css';
import './style/page.css';
import './style/cell.css';
import './style/output.css';
import './style/sensitivity.css';
import './style/editor.css';
import './style/foot.css';
import './style/sheet.css';
import './app-view.ts';
import { registry } from '../../cells/registry.ts';
import { views } from '../../cells/views.ts';
import { Engine } from '../engine/engine.ts';
import { workerPool } from '../workers/pool.ts';
import { appendEntry } from '../worksheet/decision-log.ts';
import type { AppView } from './app-view.ts';
import { WorksheetDocument } from './document.ts';
import { firstWorksheet } from './first-worksheet.ts';

import { opensConditions } from './hidden-conditions.ts';
import { IdbStore } from './idb-store.ts';
import { makeWorker } from './make-worker.ts';
import { remember, sayBroken } from './open-worksheet.ts';
import { listenToOtherTabs } from './other-tabs.ts';
import { Page, type PageView } from './page.ts';
import { listenToPage } from './page-events.ts';
import { carriedText, keepPage } from './save-page.ts';
import { signedAs } from './signed-as.ts';
import { Autosave, type Timers } from './storage.ts';
import { applyTheme, firstTheme, followSystem, type Theme } from './theme.ts';

const timers: Timers = {
  set: (run: () => void, ms: number) => window.setTimeout(run, ms),
  clear: (timer: number) => window.clearTimeout(timer),
  now: () => new Date().toISOString(),
};

/** What is open at the start. */
function firstView(theme: Theme, problem: string | null): PageView {
  return {
    blank: null,
    panel: null,
    sheet: null,
    banner: problem === null ? null : { text: problem, wrong: true },
    theme,
    save: { state: 'saved' },
    pointed: null,
    incoming: null,
    foot: window.innerWidth >= 700 && window.innerHeight >= 560,
  };
}

async function start(): Promise<void> {
  keepPage();
  const theme = firstTheme();
  applyTheme(theme, false);
  const store = new IdbStore();
  const { worksheet, problem } = await firstWorksheet(store, carriedText());
  let page: Page | null = null;
  const document_ = new WorksheetDocument({
    worksheet,
    now: () => new Date().toISOString(),
    clock: () => performance.now(),
    who: signedAs,
    append: appendEntry,
    opens: opensConditions,
    ask: () => page?.show({ sheet: 'opens', blank: null }),
  });
  const runner = workerPool({ create: makeWorker });
  const engine = new Engine({ registry, runner, onState: (cellId) => page?.stateChanged(cellId) });
  const autosave = new Autosave(store, timers, (save) => page?.show({ save }));
  page = new Page({ registry, views, document: document_, engine, runner, store, autosave }, firstView(theme, problem));
  const shown = page;
  followSystem((changed) => {
    applyTheme(changed, false);
    shown.show({ theme: changed });
  });
  remember(worksheet.id);
  listenToPage(shown);
  listenToOtherTabs(shown);
  Object.assign(globalThis, { standfast: { engine, document: document_ } });
  const app = document.createElement('sf-app') as AppView;
  app.page = shown;
  document.querySelector('#page')?.replaceChildren(app);
  void sayBroken(shown);
}

start().catch((error: unknown) => {
  const place = document.querySelector('#page');
  const words = error instanceof Error ? error.message : String(error);
  if (place !== null) place.textContent = `Standfast could not open: ${words}. What was saved in this browser is kept.`;
});
