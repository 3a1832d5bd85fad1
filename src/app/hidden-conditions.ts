import type { Settings } from '../../cells/kind.ts';
import type { Cell, Worksheet } from '../worksheet/format.ts';
import { readersOf } from './wiring.ts';

/**
 * Why a change made while the conditions are hidden would open them, as a sentence; null where it would not. Removing a
 * design that cells read, taking a condition out of it, and keeping rows by a condition all count as opening.
 *
 * @param before while hidden
 * @param after the record it would become
 */
export function opensConditions(before: Worksheet, after: Worksheet): string | null {
  if (before.opening.state !== 'blind' || after.opening.state !== 'blind') return null;
  const now = conditionNames(after);
  const lost = declaredAndRead(before).filter((name) => !now.has(name));
  if (lost.length > 0) {
    return `${lost.join(' and ')} would be hidden no longer: the design that says it is a condition is removed or changed.`;
  }
  const old = new Map(filtersOnConditions(before, conditionNames(before)).map(({ id, column }) => [id, column]));
  const fresh = filtersOnConditions(after, now).find(({ id, column }) => old.get(id) !== column);
  return fresh === undefined
    ? null
    : `Keeping rows by ${fresh.column} looks at the condition: what is shown below would depend on it.`;
}

/** Columns that are conditions: those the designs name, the columns turned into rows, and what is made from either. */
export function conditionNames(worksheet: Worksheet): ReadonlySet<string> {
  const names = new Set<string>();
  for (const cell of inUse(worksheet)) {
    if (cell.kind === 'design') for (const name of designNames(cell.settings)) names.add(name);
    if (cell.kind === 'reshape' && cell.settings.to === 'long')
      for (const name of texts(cell.settings.columns)) names.add(name);
  }
  for (let size = -1; size !== names.size; ) {
    size = names.size;
    for (const cell of inUse(worksheet)) {
      const made = cell.kind === 'derive' ? madeFrom(cell.settings, names) : null;
      if (made !== null) names.add(made);
    }
  }
  return names;
}

/** Conditions named by designs that some cell reads: before that nothing has been shown of them. */
function declaredAndRead(worksheet: Worksheet): string[] {
  return inUse(worksheet)
    .filter((cell) => cell.kind === 'design' && readersOf(worksheet, cell.id).length > 0)
    .flatMap((cell) => designNames(cell.settings));
}

function filtersOnConditions(worksheet: Worksheet, names: ReadonlySet<string>): { id: string; column: string }[] {
  return inUse(worksheet).flatMap(({ id, kind, settings }) => {
    const column = settings.of;
    const filters = kind === 'derive' && settings.make === 'filter';
    return filters && typeof column === 'string' && names.has(column) ? [{ id, column }] : [];
  });
}

/** The column a cell makes, where it makes it from a condition; else null. */
function madeFrom(settings: Settings, names: ReadonlySet<string>): string | null {
  const { make, name, of, formula } = settings;
  if (make === 'filter' || typeof name !== 'string' || name === '') return null;
  if (make !== 'formula') return typeof of === 'string' && names.has(of) ? name : null;
  if (typeof formula !== 'string') return null;
  return [...names].some((each) => each !== '' && formula.includes(each)) ? name : null;
}

function designNames(settings: Settings): string[] {
  return [...texts(settings.within), ...texts(settings.between)];
}

function texts(value: unknown): string[] {
  return Array.isArray(value) ? value.filter((each) => typeof each === 'string') : [];
}

function inUse(worksheet: Worksheet): readonly Cell[] {
  return worksheet.cells.filter((cell) => cell.leftOut !== true);
}
