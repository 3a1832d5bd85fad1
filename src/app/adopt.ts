/** Putting the worksheet into the state of one analysis of a sensitivity grid: one edit, which can be undone. */
import type { Registry, Settings } from '../../cells/kind.ts';
import type { Adopted } from '../../cells/sensitivity/walk.ts';
import { estimatorOf } from '../analysis/estimators.ts';
import { type ExtremeRule, onParticipants } from '../analysis/rules.ts';
import type { Cell, Worksheet } from '../worksheet/format.ts';
import { changeSentence, sharedSentence } from './change-sentence.ts';
import { addAfter, setSettings, setShared, usersOf } from './edits.ts';
import type { Page } from './page.ts';
import { cellOf } from './wiring.ts';

/** The cells above `id`, in worksheet order, those left out not counted. */
function above(worksheet: Worksheet, id: string): readonly Cell[] {
  const found = new Set<string>();
  const queue = [id];
  for (let next = queue.pop(); next !== undefined; next = queue.pop()) {
    for (const from of Object.values(cellOf(worksheet, next)?.from ?? {})) {
      if (!found.has(from)) queue.push(from);
      found.add(from);
    }
  }
  return worksheet.cells.filter((cell) => found.has(cell.id) && cell.leftOut !== true);
}

/** Sets a number of a cell: through its shared number where it follows one that can hold the value, else its own. */
function withNumber(worksheet: Worksheet, id: string, key: string, value: number | null): Worksheet {
  const cell = cellOf(worksheet, id);
  if (cell === undefined) return worksheet;
  const now = cell.settings[key] as { readonly shared?: unknown } | number | null | undefined;
  const named = typeof now === 'object' && now !== null ? now.shared : undefined;
  const shared = worksheet.shared.find((each) => each.id === named);
  const fits = shared !== undefined && (value === null ? shared.none : value >= shared.min && value <= shared.max);
  if (shared !== undefined && fits) return shared.value === value ? worksheet : setShared(worksheet, shared.id, value);
  return now === value ? worksheet : setSettings(worksheet, id, { ...cell.settings, [key]: value });
}

function withSettings(worksheet: Worksheet, id: string, wanted: Settings): Worksheet {
  const cell = cellOf(worksheet, id);
  const same = cell === undefined || Object.entries(wanted).every(([key, value]) => cell.settings[key] === value);
  return same ? worksheet : setSettings(worksheet, id, { ...cell.settings, ...wanted });
}

function isExtremity({ kind, settings }: Cell): boolean {
  return kind === 'exclusion' && settings.what !== 'named' && settings.how === 'beyond';
}

/** The cell with an extremity rule, or with none where the rule is null. */
function withRule(worksheet: Worksheet, cell: Cell, rule: ExtremeRule | null, outcome: string): Worksheet {
  if (rule === null) return withNumber(worksheet, cell.id, 'cutoff', null);
  const own = cell.settings.column === '' || cell.settings.column === undefined ? outcome : cell.settings.column;
  const wanted: { [key: string]: string | boolean } = {
    what: rule.on,
    how: 'beyond',
    measure: rule.measure,
    sides: rule.sides,
    scope: rule.scope,
  };
  if (own !== rule.column) wanted.column = rule.column === outcome ? '' : rule.column;
  if (cell.settings.repeated !== undefined) wanted.repeated = rule.repeated === true;
  const changed = withSettings(worksheet, cell.id, wanted);
  return withNumber(withUnit(changed, cell, rule.measure), cell.id, 'cutoff', rule.cutoff);
}

/** A shared cutoff is counted in the distance of its one cell. */
function withUnit(worksheet: Worksheet, cell: Cell, measure: string): Worksheet {
  const now = cell.settings.cutoff as { readonly shared?: unknown } | number | null;
  const id = typeof now === 'object' && now !== null && typeof now.shared === 'string' ? now.shared : null;
  const shared = worksheet.shared.find((each) => each.id === id);
  if (shared === undefined || shared.unit !== cell.settings.measure || shared.unit === measure) return worksheet;
  if (usersOf(worksheet, shared.id).length !== 1) return worksheet;
  return {
    ...worksheet,
    shared: worksheet.shared.map((each) => (each === shared ? { ...each, unit: measure } : each)),
  };
}

/** A new exclusion cell after the rules on trials, where the grid's rule stands. */
function added(
  worksheet: Worksheet,
  registry: Registry,
  chain: readonly Cell[],
): { worksheet: Worksheet; id: string } | null {
  const kind = registry.exclusion;
  const onTrials = chain.filter((cell) => cell.kind === 'exclusion' && cell.settings.what !== 'participant');
  const after = onTrials.at(-1) ?? chain.findLast((cell) => cell.kind === 'design');
  if (kind === undefined || after === undefined) return null;
  return addAfter(worksheet, registry, after.id, kind, () => ({
    shared: worksheet.shared,
    given: {},
    data: worksheet.data,
  }));
}

/**
 * The worksheet in the state of an analysis of the grid that the cell `id` shows: its extremity rules, the planned row
 * with its trim, and the score of the trials. Rules by name, limits and shares stay as they are.
 *
 * @param outcome name of the outcome column
 * @returns the same record where nothing changes
 */
export function adoptedWorksheet(
  worksheet: Worksheet,
  registry: Registry,
  id: string,
  target: Adopted & { readonly outcome: string },
): Worksheet {
  const chain = above(worksheet, id);
  const comparison = chain.findLast((cell) => cell.kind === 'comparison');
  const score = chain.findLast((cell) => cell.kind === 'score');
  if (comparison === undefined || score === undefined) return worksheet;
  let next = withSettings(worksheet, comparison.id, { estimator: target.estimator });
  if (estimatorOf(target.estimator)?.trims === true) next = withNumber(next, comparison.id, 'trim', target.trim);
  next = withSettings(next, score.id, { statistic: target.score.statistic });
  if (target.score.statistic === 'trimmed mean') next = withNumber(next, score.id, 'trim', target.score.trim);
  const rules = target.rules.filter((rule) => rule.rule === 'extreme');
  const cells = chain.filter(isExtremity);
  cells.forEach((cell, i) => {
    next = withRule(next, cell, rules[i] ?? null, target.outcome);
  });
  for (const rule of rules.slice(cells.length)) {
    if (onParticipants(rule)) continue;
    const put = added(next, registry, above(next, id));
    const cell = put === null ? undefined : cellOf(put.worksheet, put.id);
    if (put !== null && cell !== undefined) next = withRule(put.worksheet, cell, rule, target.outcome);
  }
  return next;
}

/** What the decision log says of it: every change in the words of its own cell. */
function sentenceOf(page: Page, before: Worksheet, after: Worksheet): string | null {
  const { registry, engine } = page.parts;
  const changes = after.cells.flatMap((cell) => {
    const kind = registry[cell.kind];
    const was = cellOf(before, cell.id);
    if (kind === undefined) return [];
    if (was === undefined) return [`${kind.title(cell.settings)} added`];
    const context = { ...engine.context(cell.id), shared: after.shared };
    return changeSentence(kind, was.settings, cell.settings, context) ?? [];
  });
  const numbers = after.shared.flatMap(({ id }) => sharedSentence(before, after, id) ?? []);
  const all = [...changes, ...numbers];
  return all.length === 0 ? null : `state of an analysis of the grid taken over: ${all.join('; ')}`;
}

/** Takes an analysis over from the sensitivity cell it was chosen in. */
export function adopt(page: Page, id: string, target: Adopted): void {
  const { document: open, registry } = page.parts;
  const design = above(page.worksheet, id).find((cell) => cell.kind === 'design');
  const { outcome } = design?.settings ?? {};
  const whole = { ...target, outcome: typeof outcome === 'string' ? outcome : '' };
  const changed = open.edit(
    (before, after) => sentenceOf(page, before, after),
    (worksheet) => adoptedWorksheet(worksheet, registry, id, whole),
  );
  page.say(
    changed ? 'The worksheet stands as that analysis. Undo takes it back.' : 'The worksheet stands there already.',
  );
}

/** What a figure asks for: the cell it stands in, and the state. */
export function adoptFrom(page: Page, event: Event): void {
  const cell = event.target instanceof Element ? event.target.closest<HTMLElement>('[data-cell]') : null;
  const id = cell?.dataset.cell;
  if (id !== undefined && event instanceof CustomEvent) adopt(page, id, event.detail as Adopted);
}
