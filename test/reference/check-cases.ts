/** Runs a folder of outside check cases (form: test/reference/cases/README.md, "Form") against the numerics room. */
import { readdirSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { caseMethods } from './methods/adapters.ts';
import { type CaseArgs, type CaseData, type CaseMethods, parseCaseCsv } from './methods/case-data.ts';

interface Tolerance {
  readonly rtol: number;
  readonly atol: number;
  readonly rtol_by_key?: Readonly<Record<string, number>>;
  readonly atol_by_key?: Readonly<Record<string, number>>;
}

interface Case extends Tolerance {
  readonly id: string;
  readonly method: string;
  readonly args: CaseArgs;
  readonly expect: Readonly<Record<string, unknown>>;
}

export interface CheckResult {
  readonly passed: number;
  readonly failed: number;
  readonly skipped: number;
  /** One line a failed case: id, method, arguments, first difference. */
  readonly misses: string[];
  /** Methods the cases ask for and `offered` does not have (or `methods` left out). */
  readonly skippedMethods: string[];
}

const infinities = new Set(['Infinity', '-Infinity']);

function plain(value: unknown): unknown {
  return ArrayBuffer.isView(value) ? Array.from(value as Float64Array) : value;
}

function compareNumber(want: number, got: unknown, key: string, tolerance: Tolerance): string | null {
  if (typeof got !== 'number' || !Number.isFinite(got)) return `${key}: expected ${want}, got ${String(got)}`;
  const atol = tolerance.atol_by_key?.[key] ?? tolerance.atol;
  const rtol = tolerance.rtol_by_key?.[key] ?? tolerance.rtol;
  return Math.abs(want - got) <= atol + rtol * Math.abs(want) ? null : `${key}: expected ${want}, got ${got}`;
}

function compareList(want: readonly unknown[], got: unknown, key: string, tolerance: Tolerance): string | null {
  const list = plain(got);
  if (!Array.isArray(list) || list.length !== want.length) {
    return `${key}: expected ${want.length} values, got ${JSON.stringify(list)}`;
  }
  for (const [i, one] of want.entries()) {
    const miss = compareValue(one, list[i], key, tolerance);
    if (miss !== null) return `[${i}] ${miss}`;
  }
  return null;
}

function compareRecord(want: object, got: unknown, tolerance: Tolerance): string | null {
  for (const [key, one] of Object.entries(want)) {
    const own = typeof got === 'object' && got !== null ? (got as Record<string, unknown>)[key] : undefined;
    const miss = compareValue(one, own, key, tolerance);
    if (miss !== null) return miss;
  }
  return null;
}

/** Null when `got` agrees with `want`, else a line that says where it does not. */
export function compareValue(want: unknown, got: unknown, key: string, tolerance: Tolerance): string | null {
  if (typeof want === 'number') return compareNumber(want, got, key, tolerance);
  if (Array.isArray(want)) return compareList(want, got, key, tolerance);
  if (typeof want === 'object' && want !== null) return compareRecord(want, got, tolerance);
  const same = want === got || (typeof want === 'string' && infinities.has(want) && Number(want) === got);
  return same ? null : `${key}: expected ${String(want)}, got ${JSON.stringify(got)}`;
}

function missOf(one: Case, data: CaseData, method: CaseMethods[string]): string | null {
  try {
    const got = method(data, one.args);
    return compareValue(one.expect, got, '', one);
  } catch (error) {
    return `threw ${String(error)}`;
  }
}

/**
 * Runs every case of a folder (one CSV and one JSON per data set).
 * @param dir folder of cases
 * @param methods only these methods (default: all)
 * @param offered adapters by method name (default: every adapter there is)
 */
export function checkCases(dir: string, methods?: Set<string>, offered: CaseMethods = caseMethods): CheckResult {
  const misses: string[] = [];
  const skippedMethods = new Set<string>();
  let passed = 0;
  let skipped = 0;
  for (const file of readdirSync(dir).sort()) {
    if (!file.endsWith('.json') || file === 'index.json') continue;
    const { cases } = JSON.parse(readFileSync(join(dir, file), 'utf8')) as { cases: Case[] };
    const data = parseCaseCsv(readFileSync(join(dir, file.replace(/\.json$/, '.csv')), 'utf8'));
    for (const one of cases) {
      const method = methods === undefined || methods.has(one.method) ? offered[one.method] : undefined;
      if (method === undefined) {
        skipped++;
        skippedMethods.add(one.method);
        continue;
      }
      const miss = missOf(one, data, method);
      if (miss === null) passed++;
      else misses.push(`${one.id} ${one.method} ${JSON.stringify(one.args)}: ${miss}`);
    }
  }
  return { passed, failed: misses.length, skipped, misses, skippedMethods: [...skippedMethods].sort() };
}
