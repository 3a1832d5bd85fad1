import type { Page } from './page.ts';

/** Tells other tabs of this browser when a worksheet is edited here, and the reader when one was edited there. */
export function listenToOtherTabs(page: Page): void {
  if (typeof BroadcastChannel === 'undefined') return;
  const channel = new BroadcastChannel('standfast');
  page.parts.document.subscribe((change) => {
    if (change.type !== 'open') channel.postMessage({ edited: change.record.id });
  });
  channel.onmessage = (event: MessageEvent<{ readonly edited?: unknown }>) => {
    if (event.data?.edited !== page.worksheet.id) return;
    page.say(
      'This worksheet is being edited in another tab too. Reload to see what was done there; an edit made here is saved over it.',
      true,
    );
  };
}
