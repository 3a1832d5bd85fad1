import type { Computed } from '../../cells/kind.ts';

/** Why a cell above gives nothing: it failed, it is not a cell this program knows, its blanks are unset, it is veiled, it is left out. */
export type Why = 'failed' | 'missing' | 'unset' | 'veiled' | 'left-out';

export interface WaitingFor {
  readonly cellId: string;
  readonly why: Why;
}

/** What a cell is at now. `last` is what it came to before, `count` how often it has been computed since the start. */
export type CellState =
  | { readonly status: 'fresh'; readonly computed: Computed<unknown>; readonly count: number }
  | {
      readonly status: 'computing';
      /** Share done, 0 to 1. */
      readonly progress: number;
      readonly last?: Computed<unknown>;
      readonly count: number;
    }
  | { readonly status: 'waiting'; readonly for: readonly WaitingFor[]; readonly last?: Computed<unknown> }
  | { readonly status: 'failed'; readonly sentence: string; readonly last?: Computed<unknown> }
  | { readonly status: 'veiled' }
  | { readonly status: 'left-out' }
  | { readonly status: 'unknown-kind'; readonly kind: string };

/** What flows from a cell to the cells that read it: its value, or the cells that must first give something. */
export type Outcome = { readonly value: unknown } | { readonly waiting: readonly WaitingFor[] };
