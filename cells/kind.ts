import type { Association } from '../src/analysis/association.ts';
import type { Checks } from '../src/analysis/checks.ts';
import type { ClaimValue } from '../src/analysis/claim.ts';
import type { Result } from '../src/analysis/compare.ts';
import type { Design } from '../src/analysis/design.ts';
import type { Rates } from '../src/analysis/error-rates.ts';
import type { Influence } from '../src/analysis/influence.ts';
import type { Scores } from '../src/analysis/score.ts';
import type { Sweep } from '../src/analysis/sweep.ts';
import type { Table } from '../src/data/table.ts';
import type { JobArgs, JobName, JobResult } from '../src/workers/runner.ts';

export { Refusal } from '../src/data/refusal.ts';

/** What travels between cells: the name of a value type -> its TypeScript type. */
export interface Values {
  readonly table: Table;
  readonly design: Design;
  readonly scores: Scores;
  readonly checks: Checks;
  readonly result: Result;
  readonly claim: ClaimValue;
  readonly influence: Influence;
  readonly rates: Rates;
  readonly sweep: Sweep;
  readonly association: Association;
}
export type ValueType = keyof Values;

export type Json = null | boolean | number | string | readonly Json[] | { readonly [key: string]: Json };
export type Settings = { readonly [key: string]: Json };

/** In settings, a number of its own, null (none), or a shared number by id; the engine resolves it before computing. */
export type Num = number | null | { readonly shared: string };

/** The shared numbers of the worksheet as a sentence needs them. */
export interface SharedNumber {
  readonly id: string;
  readonly name: string;
  readonly value: number | null;
  readonly unit: string;
  readonly min: number;
  readonly max: number;
  readonly step: number;
  readonly none: boolean;
}

// ---------------------------------------------------------------------------------------------- the sentence

export interface Option {
  readonly value: string;
  readonly label: string;
  /** Why it is offered, or what it does: one short line under the label. */
  readonly hint?: string;
  /** A sentence that says why it cannot be chosen here; the option is shown but disabled. */
  readonly refused?: string;
}

/** How a blank is filled. Every `set` is pure: it gives the settings the cell would have. */
export type Editor =
  | {
      readonly type: 'choice';
      readonly value: string | null;
      readonly options: readonly Option[];
      set(value: string): Settings;
    }
  | {
      readonly type: 'choices';
      readonly values: readonly string[];
      readonly options: readonly Option[];
      /** Fewest that may be chosen. */
      readonly atLeast: number;
      set(values: readonly string[]): Settings;
    }
  | {
      readonly type: 'number';
      readonly value: Num;
      readonly min: number;
      readonly max: number;
      readonly step: number;
      readonly unit: string;
      /** Label of "no number" where that is a setting, else null. */
      readonly none: string | null;
      /** Whether the number may become, or be tied to, a shared number. */
      readonly mayShare: boolean;
      set(value: Num): Settings;
    }
  | {
      readonly type: 'text';
      readonly value: string;
      readonly long: boolean;
      /** A sentence about a wrong text, or null. */
      check?(value: string): string | null;
      set(value: string): Settings;
    }
  /** The data file: the page lets the reader open, paste or drop one, or pick a demo file, and passes the data block's id. */
  | { readonly type: 'file'; readonly value: string | null; set(dataId: string): Settings };

export interface Blank {
  /** Stable within the sentence; used for focus and in tests. */
  readonly key: string;
  /** Accessible name: "outcome column". */
  readonly label: string;
  /** What stands in the sentence: "ack_ms", "20 %", or a prompt such as "which column" when `filled` is false. */
  readonly shown: string;
  readonly filled: boolean;
  readonly editor: Editor;
}

export type Part = string | Blank;

/** Plain text of a sentence: page, decision log, scenes, screen reader and report all use this. */
export function plainSentence(parts: readonly Part[]): string {
  return parts.map((part) => (typeof part === 'string' ? part : part.shown)).join('');
}

/** What a sentence, check and default may look at. Values above are absent until they have been computed. */
export interface Context {
  readonly shared: readonly SharedNumber[];
  /** Port -> value above, where it is there. */
  readonly given: { readonly [port: string]: Values[ValueType] | undefined };
  /** What this cell itself last came to, where it has: counts in a sentence come from here. */
  readonly own?: Computed<unknown> | undefined;
  /** Data blocks of the worksheet: id and file name. */
  readonly data: readonly { readonly id: string; readonly name: string }[];
  /** Whether the conditions are hidden: nothing said then may depend on which condition a row belongs to. */
  readonly blind?: boolean;
  /** The nearest design above that is there, also past cells that are veiled. */
  readonly design?: Design | undefined;
  /** Port -> settings of the cell it reads. */
  readonly above?: { readonly [port: string]: Settings };
}

// ---------------------------------------------------------------------------------------------- stem and margin

/** What a cell says on the stem. */
export interface FlowMark {
  /** A tick with a count: "2,120" over "trials read". Absent where the cell changes no count worth a tick. */
  readonly count?: number;
  readonly label?: string;
  /** A square branch with the number set aside. */
  readonly setAside?: number;
  /** Share of the rows read that is still in after this cell, 0 to 1: the width of the stem below it. */
  readonly share?: number;
}

export interface Note {
  readonly type: 'note' | 'caution';
  /** First words in bold: "Blind.", "Caution."; a caution without a lead gets "Caution." */
  readonly lead?: string;
  readonly text: string;
  /** Id in the table of cautions (methods.md 3.9), where it stands there. */
  readonly id?: string;
}

/** A table a reader may unfold, copy and take away as CSV. Cells are ready to show; `numeric` columns align right. */
export interface TableOut {
  readonly title: string;
  readonly columns: readonly { readonly name: string; readonly numeric: boolean }[];
  readonly rows: readonly (readonly string[])[];
  /** Full-precision values for the CSV, same shape as rows; where absent the CSV has the shown text. */
  readonly raw?: readonly (readonly (string | number | null)[])[];
}

// ---------------------------------------------------------------------------------------------- the contract

export interface Env {
  /** Runs a job in a worker; carries the cell's signal and progress. */
  run<N extends JobName>(name: N, args: JobArgs<N>): Promise<JobResult<N>>;
  readonly signal: AbortSignal;
  progress(share: number): void;
  /** A data block of the worksheet, as stored; undefined where there is none of that id. */
  data(id: string): StoredData | undefined;
  /** The worksheet's seed. */
  readonly seed: number;
  /** Whether the conditions are hidden; only kinds with a blind output of their own may look. */
  readonly blind?: boolean;
}

/** A data block as the worksheet stores it (src/worksheet/format.ts, DataBlock). */
export interface StoredData {
  readonly id: string;
  readonly name: string;
  readonly rows: number;
  readonly columns: readonly (
    | { readonly name: string; readonly type: 'number'; readonly values: readonly (number | null)[] }
    | {
        readonly name: string;
        readonly type: 'text' | 'date';
        readonly levels: readonly string[];
        readonly codes: readonly number[];
      }
  )[];
  readonly warnings: readonly string[];
}

/**
 * What compute gives. `value` flows to the cells that read this one; when it equals the value before, the engine keeps
 * the old object and nothing below recomputes. `detail` is for this cell's own view, notes and record only.
 */
export interface Computed<V, D = unknown> {
  readonly value: V;
  readonly detail: D;
}

/** What happens to a kind's output while the conditions are hidden. */
export type Blind<V, D> =
  /** Its output never depends on the condition. */
  | 'same'
  /** Not computed, not in the page, not saved. */
  | 'veil'
  /** Its blind output, made from the value as if open; must come out byte for byte the same under relabelling. */
  | ((computed: Computed<V, D>) => Computed<V, D>);

export interface KindSpec<
  S extends Settings,
  P extends { readonly [port: string]: ValueType },
  G extends ValueType | null,
  D,
> {
  /** Kebab-case word in saved files; never renamed or reused. */
  readonly name: string;
  /** Rises when a setting changes meaning. */
  readonly version: number;
  /** The quiet word over the cell: "exclusion rule". May depend on settings: "exclusion rule · trials". */
  title(settings: S): string;
  /** The sentence of the "Then ..." list: "Set aside trials or participants by a rule". null = never offered. */
  readonly offer: string | null;
  /** Port -> value type it reads. */
  readonly takes: P;
  readonly gives: G;
  readonly blind: Blind<G extends ValueType ? Values[G] : null, D>;
  /** Settings of a new cell, the best guess from what is above. */
  defaults(context: Context): S;
  /** Sentences about wrong or missing settings; instant and pure. Anything here stops compute and is shown in the cell. */
  check(settings: S, context: Context): readonly string[];
  /** Pure. Settings come with shared numbers already resolved (every Num is a number or null). */
  compute(
    settings: S,
    given: { readonly [K in keyof P]: Values[P[K]] },
    env: Env,
  ): Promise<Computed<G extends ValueType ? Values[G] : null, D>> | Computed<G extends ValueType ? Values[G] : null, D>;
  /** Whether two values are the same to the cells below; default: equal in every part. */
  same?(a: G extends ValueType ? Values[G] : null, b: G extends ValueType ? Values[G] : null): boolean;
  sentence(settings: S, context: Context): readonly Part[];
  /** The result in one plain sentence. */
  say(computed: Computed<G extends ValueType ? Values[G] : null, D>, settings: S): string;
  flow?(computed: Computed<G extends ValueType ? Values[G] : null, D>, settings: S): FlowMark;
  notes?(computed: Computed<G extends ValueType ? Values[G] : null, D>, settings: S): readonly Note[];
  tables?(computed: Computed<G extends ValueType ? Values[G] : null, D>, settings: S): readonly TableOut[];
  /** Full-precision plain data for the saved record and for replay; no NaN or Infinity. */
  record(computed: Computed<G extends ValueType ? Values[G] : null, D>): Json;
  migrate?(settings: Settings, version: number): Settings;
}

/** A kind as the engine and the page hold it, its types erased. */
export interface Kind {
  readonly name: string;
  readonly version: number;
  readonly offer: string | null;
  readonly takes: { readonly [port: string]: ValueType };
  readonly gives: ValueType | null;
  readonly blind: Blind<never, never>;
  title(settings: Settings): string;
  defaults(context: Context): Settings;
  check(settings: Settings, context: Context): readonly string[];
  compute(
    settings: Settings,
    given: { readonly [port: string]: unknown },
    env: Env,
  ): Promise<Computed<unknown>> | Computed<unknown>;
  same?(a: unknown, b: unknown): boolean;
  sentence(settings: Settings, context: Context): readonly Part[];
  say(computed: Computed<unknown>, settings: Settings): string;
  flow?(computed: Computed<unknown>, settings: Settings): FlowMark;
  notes?(computed: Computed<unknown>, settings: Settings): readonly Note[];
  tables?(computed: Computed<unknown>, settings: Settings): readonly TableOut[];
  record(computed: Computed<unknown>): Json;
  migrate?(settings: Settings, version: number): Settings;
}

export type Registry = { readonly [name: string]: Kind };

/** Checks a kind's types against its ports and erases them, so that every kind fits one registry. */
export function defineKind<
  S extends Settings,
  const P extends { readonly [port: string]: ValueType },
  G extends ValueType | null,
  D,
>(spec: KindSpec<S, P, G, D>): Kind {
  return spec as unknown as Kind;
}

/** A resolved number of settings; null = none. */
export function numberOf(value: Num): number | null {
  if (value !== null && typeof value === 'object') throw new Error(`shared number ${value.shared} was not resolved`);
  return value;
}

/** The number a setting stands for now, looked up among the shared numbers. */
export function currentNumber(value: Num, shared: readonly SharedNumber[]): number | null {
  if (value === null || typeof value === 'number') return value;
  return shared.find((each) => each.id === value.shared)?.value ?? null;
}

// ---------------------------------------------------------------------------------------------- views

/** What a view gets beside the computed value. Views are Lit template functions in cells/KIND/view.ts. */
export interface ViewContext {
  readonly cellId: string;
  readonly settings: Settings;
  readonly shared: readonly SharedNumber[];
  readonly theme: 'light' | 'dark';
  /** Width in px the figure may take. */
  readonly width: number;
  /** The reference analysis, if one is held: its finding as plain data. */
  readonly reference: { readonly label: string; readonly finding: Settings | null } | null;
  /** The sweep of the standing strip, where it is there. */
  readonly sweep: Sweep | null;
}
