/** The rules of the rooms, as functions of a list of files, so that each can be shown to catch what it is for. */
export interface SourceFile {
  /** From the top of the repository: "src/data/table.ts". */
  readonly path: string;
  readonly text: string;
}

/** Room -> rooms it may import from (architecture of the project: imports only point down). */
const MAY_IMPORT: { readonly [room: string]: readonly string[] } = {
  numerics: [],
  data: ['numerics'],
  analysis: ['data', 'numerics'],
  worksheet: [],
  workers: ['analysis', 'data', 'numerics'],
  cells: ['analysis', 'data', 'numerics', 'workers (types)'],
  engine: ['cells/kind.ts', 'worksheet', 'workers'],
  report: ['cells', 'engine', 'worksheet', 'analysis', 'data'],
  // `read` imports a data file, and `replay` checks the fingerprint of the data: both need the data room.
  replay: ['cells', 'engine', 'worksheet', 'workers', 'report', 'data'],
  app: ['cells', 'engine', 'worksheet', 'workers', 'report', 'replay', 'analysis', 'data', 'numerics'],
};

/** Packages a room may use; rooms that are not named may use any. */
const PACKAGES: { readonly [room: string]: readonly string[] } = {
  numerics: ['jstat'],
  data: ['arquero'],
  analysis: [],
  worksheet: [],
  workers: ['node:'],
  engine: ['@observablehq/runtime'],
};

const PURE = ['numerics', 'data', 'analysis', 'worksheet'];
const IMPURE =
  /(?<![\w$.'"`-])(?:document|window)\s*[.[]|(?<![\w$.])fetch\s*\(|\bMath\s*\.\s*random\b|\bDate\s*\.\s*now\b|\bnew\s+Date\s*\(\s*\)/;

const CEILINGS: { readonly [room: string]: number } = { numerics: 300, cells: 250, app: 350, test: 400 };
const CEILING = 300;
/** The contract of the cells stands in one file. */
const CONTRACT = 'cells/kind.ts';
const CONTRACT_CEILING = 350;

interface Import {
  /** Path of the imported file, or the package's name. */
  readonly target: string;
  readonly inside: boolean;
  readonly typeOnly: boolean;
}

/** Every breach of every rule, as sentences that name the file. */
export function breachesOf(files: readonly SourceFile[]): readonly string[] {
  return [
    ...importBreaches(files),
    ...kindBreaches(files),
    ...cycleBreaches(files),
    ...impureBreaches(files),
    ...ceilingBreaches(files),
    ...untestedBreaches(files),
  ];
}

/** Imports that the table does not allow. */
export function importBreaches(files: readonly SourceFile[]): readonly string[] {
  return files.filter(isSource).flatMap(({ path, text }) => {
    const room = roomOf(path);
    if (room === null) return [];
    return importsOf(path, text).flatMap((each) => {
      const allowed = each.inside ? insideAllowed(room, each) : packageAllowed(room, each.target);
      return allowed ? [] : [`${path} imports ${each.target}, which ${room} may not`];
    });
  });
}

/** A kind's folder may import its own files and the shared files directly in cells/, never another kind. */
export function kindBreaches(files: readonly SourceFile[]): readonly string[] {
  return files.filter(isSource).flatMap(({ path, text }) => {
    const kind = kindFolder(path);
    if (kind === null) return [];
    return importsOf(path, text)
      .filter(({ target }) => kindFolder(target) !== null && kindFolder(target) !== kind)
      .map(({ target }) => `${path} imports ${target}: a kind may not import another kind`);
  });
}

/** Circles of imports at run time; types may refer to each other. */
export function cycleBreaches(files: readonly SourceFile[]): readonly string[] {
  const sources = files.filter(isSource);
  const known = new Set(sources.map(({ path }) => path));
  const edges = new Map(
    sources.map(({ path, text }) => [
      path,
      importsOf(path, text)
        .filter(({ target, typeOnly }) => known.has(target) && !typeOnly)
        .map(({ target }) => target),
    ]),
  );
  const done = new Set<string>();
  const breaches: string[] = [];
  const visit = (path: string, way: readonly string[]): void => {
    const at = way.indexOf(path);
    if (at >= 0) breaches.push(`imports run in a circle: ${[...way.slice(at), path].join(' -> ')}`);
    if (at >= 0 || done.has(path)) return;
    for (const target of edges.get(path) ?? []) visit(target, [...way, path]);
    done.add(path);
  };
  for (const path of edges.keys()) visit(path, []);
  return breaches;
}

/** Page, network, clock and chance in rooms that may know none of them. */
export function impureBreaches(files: readonly SourceFile[]): readonly string[] {
  return files.filter(isSource).flatMap(({ path, text }) => {
    if (!PURE.includes(roomOf(path) ?? '') && path !== 'src/workers/jobs.ts') return [];
    const found = IMPURE.exec(withoutComments(text));
    return found === null ? [] : [`${path} uses ${found[0].trim()}: the room must be pure`];
  });
}

/** Files longer than their room allows. */
export function ceilingBreaches(files: readonly SourceFile[]): readonly string[] {
  return files
    .filter(({ path }) => isSource({ path, text: '' }) || isTest(path))
    .flatMap(({ path, text }) => {
      const room = isTest(path) ? 'test' : (roomOf(path) ?? '');
      const ceiling = path === CONTRACT ? CONTRACT_CEILING : (CEILINGS[room] ?? CEILING);
      const lines = text.replace(/\n$/, '').split('\n').length;
      return lines <= ceiling ? [] : [`${path} has ${lines} lines; the ceiling is ${ceiling}`];
    });
}

/** Files of numerics and analysis that have values to test, and no test in the same place below test/. */
export function untestedBreaches(files: readonly SourceFile[]): readonly string[] {
  const tests = files.map(({ path }) => path).filter((path) => path.endsWith('.test.ts'));
  return files.filter(isSource).flatMap(({ path, text }) => {
    const room = roomOf(path);
    if ((room !== 'numerics' && room !== 'analysis') || !hasValues(text)) return [];
    const place = path.replace(/^src\//, 'test/').replace(/\.ts$/, '');
    // A long test may be cut by its evidence: welch.test.ts, welch.reference.test.ts, or a folder welch/.
    const tested = tests.some((test) => test.startsWith(`${place}.`) || test.startsWith(`${place}/`));
    return tested ? [] : [`${path} has no test: ${place}.test.ts`];
  });
}

function isSource({ path }: SourceFile): boolean {
  return /^(src|cells)\//.test(path) && path.endsWith('.ts') && !path.endsWith('.d.ts');
}

function isTest(path: string): boolean {
  return path.startsWith('test/') && path.endsWith('.test.ts');
}

function roomOf(path: string): string | null {
  if (path.startsWith('cells/')) return 'cells';
  return /^src\/([^/]+)\//.exec(path)?.[1] ?? null;
}

function kindFolder(path: string): string | null {
  return /^cells\/([^/]+)\//.exec(path)?.[1] ?? null;
}

function insideAllowed(room: string, { target, typeOnly }: Import): boolean {
  const other = roomOf(target);
  // The manifest holds the program's version; a demo's text is built into the page.
  if (other === null) return room === 'app' && /^(package\.json$|demo-data\/)/.test(target);
  if (other === room) return true;
  const allowed = MAY_IMPORT[room] ?? [];
  return allowed.includes(other) || allowed.includes(target) || (typeOnly && allowed.includes(`${other} (types)`));
}

function packageAllowed(room: string, name: string): boolean {
  const allowed = PACKAGES[room];
  return (
    allowed === undefined || allowed.some((each) => name === each || (each.endsWith(':') && name.startsWith(each)))
  );
}

const IMPORT =
  /^[ \t]*(import|export)\b([^;'"]*?)\bfrom\s*['"]([^'"]+)['"]|^[ \t]*import\s*['"]([^'"]+)['"]|\bimport\s*\(\s*['"]([^'"]+)['"]/gm;

function importsOf(path: string, text: string): readonly Import[] {
  return [...withoutComments(text).matchAll(IMPORT)].map((match) => {
    const name = (match[3] ?? match[4] ?? match[5] ?? '').replace(/\?.*$/, '');
    const inside = name.startsWith('.');
    return { target: inside ? resolve(path, name) : name, inside, typeOnly: isTypeOnly(match[2]) };
  });
}

/** `import type ...`, or braces in which every name is marked as a type. */
function isTypeOnly(clause: string | undefined): boolean {
  if (clause === undefined) return false;
  if (/^\s*type\b/.test(clause)) return true;
  const names = /^\s*\{([^}]*)\}\s*$/.exec(clause)?.[1];
  if (names === undefined) return false;
  const each = names.split(',').filter((name) => name.trim() !== '');
  return each.length > 0 && each.every((name) => /^\s*type\s/.test(name));
}

function resolve(from: string, name: string): string {
  const parts = from.split('/').slice(0, -1);
  for (const part of name.split('/')) {
    if (part === '..') parts.pop();
    else if (part !== '.') parts.push(part);
  }
  return parts.join('/');
}

/** Whether a module has anything at run time, beside types. */
function hasValues(text: string): boolean {
  return /^export\s+(?:default\b|const\b|let\b|var\b|(?:async\s+)?function\b|(?:abstract\s+)?class\b|\{(?!\s*type\b)|\*)/m.test(
    withoutComments(text),
  );
}

/** The text with comments and the insides of plain strings of more than one word blanked; enough for these rules. */
function withoutComments(text: string): string {
  return text.replace(/\/\*[\s\S]*?\*\/|(^|[^:'"`])\/\/[^\n]*/g, (comment, before: string | undefined) => {
    return (before ?? '') + comment.slice((before ?? '').length).replace(/[^\n]/g, ' ');
  });
}
