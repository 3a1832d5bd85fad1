import { readFileSync } from 'node:fs';

/** One case of the outside check data. */
export interface ReferenceCase {
  readonly id: string;
  readonly method: string;
  readonly args: Readonly<Record<string, unknown>>;
  readonly expect: Readonly<Record<string, unknown>>;
}

/** The cases of a data set made by one method whose arguments hold at least these. */
export function casesOf(name: string, method: string, args: Readonly<Record<string, unknown>> = {}): ReferenceCase[] {
  const url = new URL(`../reference/cases/${name}.json`, import.meta.url);
  const { cases } = JSON.parse(readFileSync(url, 'utf8')) as { cases: ReferenceCase[] };
  const found = cases.filter(
    (each) =>
      each.method === method &&
      Object.entries(args).every(([key, value]) => JSON.stringify(each.args[key]) === JSON.stringify(value)),
  );
  if (found.length === 0) throw new Error(`no case ${method} of ${name} with ${JSON.stringify(args)}`);
  return found;
}

/** The expected numbers of the first such case. */
export function expectedOf(name: string, method: string, args: Readonly<Record<string, unknown>> = {}) {
  return (casesOf(name, method, args)[0] as ReferenceCase).expect as Readonly<Record<string, number>>;
}

/** The numbers of each effect of the first such case: "wool", "tension", "wool:tension". */
export function effectsOf(name: string, method: string, args: Readonly<Record<string, unknown>> = {}) {
  const { effects } = (casesOf(name, method, args)[0] as ReferenceCase).expect;
  return effects as Readonly<Record<string, Readonly<Record<string, number>> | undefined>>;
}
