export type Theme = 'light' | 'dark';

/** The page's colours as figures use them. */
export interface Colours {
  readonly paper: string;
  readonly sheet: string;
  readonly ink: string;
  readonly soft: string;
  readonly rule: string;
  readonly axis: string;
  readonly hold: string;
  readonly loose: string;
  readonly aside: string;
  readonly band: string;
  readonly font: string;
}

const KEY = 'standfast.theme';

/** What the reader chose, else what the system says. */
export function firstTheme(): Theme {
  try {
    const kept = localStorage.getItem(KEY);
    if (kept === 'light' || kept === 'dark') return kept;
  } catch {
    // a browser that keeps nothing still says what it prefers
  }
  return matchMedia('(prefers-color-scheme: dark)').matches ? 'dark' : 'light';
}

/** Sets the colours of the page; `kept` remembers the choice. */
export function applyTheme(theme: Theme, kept: boolean): void {
  document.documentElement.dataset.theme = theme;
  window.dispatchEvent(new Event('sf-theme'));
  if (!kept) return;
  try {
    localStorage.setItem(KEY, theme);
  } catch {
    // the choice then lasts as long as the page
  }
}

/** Calls back when the system changes its mind and the reader has not chosen. */
export function followSystem(changed: (theme: Theme) => void): void {
  matchMedia('(prefers-color-scheme: dark)').addEventListener('change', () => changed(firstTheme()));
}

const known = new Map<Theme, Colours>();

/** The colours of the theme in force, or of another one. */
export function coloursOf(theme: Theme = themeNow()): Colours {
  const before = known.get(theme);
  if (before !== undefined) return before;
  const probe = document.createElement('div');
  probe.dataset.theme = theme;
  probe.hidden = true;
  document.body.append(probe);
  const colours = read(probe);
  probe.remove();
  known.set(theme, colours);
  return colours;
}

function themeNow(): Theme {
  return document.documentElement.dataset.theme === 'dark' ? 'dark' : 'light';
}

function read(element: Element): Colours {
  const style = getComputedStyle(element);
  const value = (name: string): string => style.getPropertyValue(`--${name}`).trim();
  return {
    paper: value('paper'),
    sheet: value('sheet'),
    ink: value('ink'),
    soft: value('soft'),
    rule: value('rule'),
    axis: value('axis'),
    hold: value('hold'),
    loose: value('loose'),
    aside: value('aside'),
    band: value('band'),
    font: value('sans'),
  };
}
