/**
 * The saved worksheet: plain JSON data, immutable in memory. Every edit makes a new record that shares what did not
 * change with the old one, so undo is a list of records and the engine can tell by identity what was edited.
 */

export type Json = null | boolean | number | string | readonly Json[] | { readonly [key: string]: Json };
export type JsonObject = { readonly [key: string]: Json };

export const FORMAT = 'standfast-worksheet';
export const FORMAT_VERSION = 1;

/** In a cell's settings, `{ "shared": "trim" }` stands for the shared number of that id. */
export interface SharedReference {
  readonly shared: string;
}

export interface SharedNumber {
  readonly id: string;
  readonly name: string;
  /** null = none (only where `none` is allowed). */
  readonly value: number | null;
  readonly unit: string;
  readonly min: number;
  readonly max: number;
  readonly step: number;
  /** Whether "none" is a setting of it (an exclusion cutoff that is not applied). */
  readonly none: boolean;
}

export interface Cell {
  readonly id: string;
  /** A kind's name; unknown kinds are kept as they are and shown as such. */
  readonly kind: string;
  /** The version of the kind that wrote the settings. */
  readonly version: number;
  readonly settings: JsonObject;
  /** Port -> id of the cell it reads. */
  readonly from: { readonly [port: string]: string };
  readonly leftOut?: boolean;
}

export type StoredColumn =
  | { readonly name: string; readonly type: 'number'; readonly values: readonly (number | null)[] }
  | {
      readonly name: string;
      readonly type: 'text' | 'date';
      readonly levels: readonly string[];
      readonly codes: readonly number[];
    };

/** A data file as read: its columns, and the SHA-256 of the original bytes and of the parsed table. */
export interface DataBlock {
  readonly id: string;
  /** The file's name. */
  readonly name: string;
  readonly rows: number;
  readonly columns: readonly StoredColumn[];
  readonly fingerprint: { readonly bytes: string; readonly table: string };
  /** What the import did that a reader should know, as sentences. */
  readonly warnings: readonly string[];
}

export type Opening =
  | { readonly state: 'blind' }
  | { readonly state: 'opened-early'; readonly reason: string; readonly when: string }
  | { readonly state: 'sealed'; readonly hash: string; readonly when: string };

export interface LogEntry {
  readonly when: string;
  readonly who: string;
  /** What was done, as a sentence. */
  readonly what: string;
  readonly opening: Opening['state'];
  readonly reason?: string;
  /** SHA-256 of the entry before it, and of this one. */
  readonly before: string;
  readonly hash: string;
}

/** What a cell came to when the worksheet was saved: full precision, no NaN (null with a reason beside it). */
export interface RecordedResult {
  readonly status: 'value' | 'failed' | 'veiled' | 'left-out';
  /** For 'value': the kind's own record of its value. For 'failed': the sentence. */
  readonly value: Json;
}

/** A remembered state that later states are shown against. */
export interface Held {
  readonly when: string;
  readonly label: string;
  readonly shared: { readonly [id: string]: number | null };
  /** The held Finding of the planned row, as plain data. */
  readonly finding: JsonObject | null;
}

export interface Worksheet {
  readonly format: typeof FORMAT;
  readonly version: typeof FORMAT_VERSION;
  readonly id: string;
  readonly title: string;
  readonly shared: readonly SharedNumber[];
  readonly cells: readonly Cell[];
  readonly data: readonly DataBlock[];
  readonly opening: Opening;
  readonly log: readonly LogEntry[];
  readonly reference: Held | null;
  /** Seed of every stream of random numbers, a whole number below 2^32. */
  readonly seed: number;
  readonly program: { readonly name: 'standfast'; readonly version: string };
  readonly results: { readonly [cellId: string]: RecordedResult };
}
