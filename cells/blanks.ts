/** Blanks as kinds make them: a column, a choice, a number or shared number, a text. */
import { type Column, missingCount, type Table } from '../src/data/table.ts';
import { type Blank, type Context, currentNumber, type Num, type Option, type Settings } from './kind.ts';
import { count, withUnit } from './numbers.ts';

interface Named {
  readonly key: string;
  readonly label: string;
}

/** One of a list; `prompt` stands in the sentence until one is chosen. */
export function choiceBlank(
  named: Named,
  value: string | null,
  options: readonly Option[],
  prompt: string,
  set: (value: string) => Settings,
): Blank {
  const chosen = options.find((option) => option.value === value);
  const shown = chosen?.label ?? (value === null || value === '' ? prompt : value);
  return { ...named, shown, filled: chosen !== undefined, editor: { type: 'choice', value, options, set } };
}

/** Several of a list, written with commas; `prompt` where none is chosen (which may be a setting of its own). */
export function choicesBlank(
  named: Named,
  values: readonly string[],
  options: readonly Option[],
  wording: { readonly prompt: string; readonly atLeast: number },
  set: (values: readonly string[]) => Settings,
): Blank {
  return {
    ...named,
    shown: values.length === 0 ? wording.prompt : values.join(', '),
    filled: values.length >= wording.atLeast,
    editor: { type: 'choices', values, options, atLeast: wording.atLeast, set },
  };
}

interface NumberRange {
  readonly min: number;
  readonly max: number;
  readonly step: number;
  readonly unit: string;
  readonly none?: string;
  readonly mayShare?: boolean;
}

/** A number of the cell's own, or a shared one. */
export function numberBlank(
  named: Named,
  value: Num,
  context: Context,
  range: NumberRange,
  set: (value: Num) => Settings,
): Blank {
  const now = currentNumber(value, context.shared);
  const none = range.none ?? null;
  return {
    ...named,
    shown: now === null ? (none ?? 'how much') : withUnit(now, range.unit),
    filled: now !== null || none !== null,
    editor: {
      type: 'number',
      value,
      min: range.min,
      max: range.max,
      step: range.step,
      unit: range.unit,
      none,
      mayShare: range.mayShare ?? true,
      set,
    },
  };
}

/** Free text; `prompt` stands in the sentence while it is empty. */
export function textBlank(
  named: Named,
  value: string,
  prompt: string,
  set: (value: string) => Settings,
  check?: (value: string) => string | null,
): Blank {
  const editor = { type: 'text' as const, value, long: false, set };
  return {
    ...named,
    shown: value.trim() === '' ? prompt : value,
    filled: value.trim() !== '',
    editor: check ? { ...editor, check } : editor,
  };
}

/**
 * The columns of a table as options, each with its type and missing count; `fits` says why one cannot be chosen. While
 * the conditions are hidden the type alone is told: in a wide file each column is a condition.
 */
export function columnOptions(
  table: Table | undefined,
  fits?: (column: Column) => string | null,
  blind = false,
): Option[] {
  return (table?.columns ?? []).map((column) => {
    const option = { value: column.name, label: column.name, hint: blind ? typeWord(column) : columnHint(column) };
    const refused = fits?.(column) ?? null;
    return refused === null ? option : { ...option, refused };
  });
}

function typeWord(column: Column): string {
  return column.type === 'number' ? 'numbers' : column.type;
}

function columnHint(column: Column): string {
  const missing = missingCount(column);
  const kinds = column.type === 'number' ? 'numbers' : `${column.type}, ${count(column.levels.length)} different`;
  return missing > 0 ? `${kinds}, ${count(missing)} missing` : kinds;
}

/** Refuses columns that are not numbers. */
export function numbersOnly(column: Column): string | null {
  return column.type === 'number' ? null : 'holds no numbers';
}

/** Plain options from words. */
export function words(...values: readonly string[]): Option[] {
  return values.map((value) => ({ value, label: value }));
}
