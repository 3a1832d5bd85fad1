import type { Json } from '../worksheet/format.ts';

/** A part that did not come out again. */
export interface Difference {
  /** Such as "findings[2].interval[0]"; empty for the record as a whole. */
  readonly path: string;
  /** undefined = there is no such part. */
  readonly recorded: Json | undefined;
  readonly recomputed: Json | undefined;
}

/** Engines differ in the last digits of exp, log and pow; what is built of them may differ by this, relatively. */
const RELATIVE = 1e-9;
/** Numbers that are small only because larger ones cancelled may differ by this, in the scale of those around them. */
const OF_SCALE = 1e-12;

/**
 * Compares what was recorded with what came out: whole numbers, texts, true or false, null and the lengths of lists
 * exactly; other numbers by |a - b| <= 1e-9 max(|a|, |b|) + 1e-12 times their scale, which is the largest of the
 * numbers in the same part that are not whole; numbers called p on their logarithm, too.
 *
 * @returns every difference, in the order of the record
 */
export function compareRecords(recorded: Json, recomputed: Json): { differences: Difference[]; compared: number } {
  const differences: Difference[] = [];
  const comparing: Comparing = { differences, compared: 0 };
  compare(comparing, recorded, recomputed, { path: '', name: '', scale: 0 });
  return { differences, compared: comparing.compared };
}

interface Comparing {
  readonly differences: Difference[];
  compared: number;
}

interface At {
  readonly path: string;
  /** Name of the field it stands in, also for the entries of a list. */
  readonly name: string;
  readonly scale: number;
}

function compare(comparing: Comparing, a: Json | undefined, b: Json | undefined, at: At): void {
  if (isList(a) && isList(b)) {
    const scale = Math.max(at.scale, scaleOf(a), scaleOf(b));
    for (let i = 0; i < Math.max(a.length, b.length); i++) {
      compare(comparing, a[i], b[i], { path: `${at.path}[${i}]`, name: at.name, scale });
    }
    return;
  }
  if (isObject(a) && isObject(b)) {
    const scale = Math.max(scaleOf(Object.values(a)), scaleOf(Object.values(b)));
    for (const key of new Set([...Object.keys(a), ...Object.keys(b)])) {
      compare(comparing, own(a, key), own(b, key), {
        path: at.path === '' ? key : `${at.path}.${key}`,
        name: key,
        scale,
      });
    }
    return;
  }
  comparing.compared++;
  if (!sameOne(a, b, at)) comparing.differences.push({ path: at.path, recorded: a, recomputed: b });
}

function sameOne(a: Json | undefined, b: Json | undefined, { name, scale }: At): boolean {
  if (typeof a !== 'number' || typeof b !== 'number') return a === b;
  if (Number.isInteger(a) && Number.isInteger(b)) return a === b;
  const near = Math.abs(a - b) <= RELATIVE * Math.max(Math.abs(a), Math.abs(b)) + OF_SCALE * scale;
  return near && (name !== 'p' || nearOnLog(a, b));
}

function nearOnLog(a: number, b: number): boolean {
  if (!(a > 0 && b > 0)) return a === b;
  const [left, right] = [Math.log(a), Math.log(b)];
  return Math.abs(left - right) <= RELATIVE * Math.max(1, Math.abs(left), Math.abs(right));
}

/** Largest magnitude of the numbers in it, and in the lists in it, that are not whole; 0 where there are none. */
function scaleOf(parts: readonly (Json | undefined)[]): number {
  let scale = 0;
  for (const part of parts) {
    if (typeof part === 'number' && Number.isFinite(part) && !Number.isInteger(part))
      scale = Math.max(scale, Math.abs(part));
    else if (isList(part)) scale = Math.max(scale, scaleOf(part.filter((each) => typeof each === 'number')));
  }
  return scale;
}

function isList(value: Json | undefined): value is readonly Json[] {
  return Array.isArray(value);
}

function isObject(value: Json | undefined): value is { readonly [key: string]: Json } {
  return typeof value === 'object' && value !== null && !Array.isArray(value);
}

function own(value: { readonly [key: string]: Json }, key: string): Json | undefined {
  return Object.hasOwn(value, key) ? value[key] : undefined;
}
