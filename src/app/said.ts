import type { Computed, FlowMark, Kind, Note, Settings, TableOut } from '../../cells/kind.ts';

/** What a kind says of a result beside its picture. */
export interface Said {
  readonly flow: FlowMark | null;
  readonly notes: readonly Note[];
  readonly tables: readonly TableOut[];
}

const kept = new WeakMap<Computed<unknown>, { readonly settings: Settings; readonly said: Said }>();

/** Flow, notes and tables of a result, made once for each result and not at every drawing. */
export function saidOf(kind: Kind, computed: Computed<unknown>, settings: Settings): Said {
  const before = kept.get(computed);
  if (before?.settings === settings) return before.said;
  const said = {
    flow: kind.flow?.(computed, settings) ?? null,
    notes: kind.notes?.(computed, settings) ?? [],
    tables: kind.tables?.(computed, settings) ?? [],
  };
  kept.set(computed, { settings, said });
  return said;
}
