/// <reference types="vite/client" />

/** Demo worksheets and demo files, carried inside the page. */
const worksheets = import.meta.glob<string>('../../demo-data/*.standfast.json', {
  query: '?raw',
  import: 'default',
  eager: true,
});
const files = import.meta.glob<string>('../../demo-data/*.csv', { query: '?raw', import: 'default', eager: true });

/** The one a first visit opens on comes first. */
const FIRST = 'bridge-alerts';

function nameOf(path: string): string {
  return path.slice(path.lastIndexOf('/') + 1);
}

function byName(a: string, b: string): number {
  return Number(b.startsWith(FIRST)) - Number(a.startsWith(FIRST)) || a.localeCompare(b);
}

export interface Demo {
  readonly name: string;
  readonly title: string;
  readonly text: string;
}

/** The title in a worksheet's text, without reading its data. */
function titleIn(text: string, fallback: string): string {
  const quoted = /"title":\s*("(?:[^"\\]|\\.)*")/.exec(text)?.[1];
  return quoted === undefined ? fallback : (JSON.parse(quoted) as string);
}

/** The demo worksheets, the one to open first in front. */
export function demoWorksheets(): readonly Demo[] {
  const demos = Object.entries(worksheets).map(([path, text]) => ({
    name: nameOf(path),
    title: titleIn(text, nameOf(path)),
    text,
  }));
  return demos.sort((a, b) => byName(a.name, b.name));
}

export function demoFiles(): readonly string[] {
  return Object.keys(files).map(nameOf).sort(byName);
}

/** The text of a demo file. */
export function demoFile(name: string): string | undefined {
  return Object.entries(files).find(([path]) => nameOf(path) === name)?.[1];
}
