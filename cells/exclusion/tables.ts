import { type Design, fullCondition } from '../../src/analysis/design.ts';
import type { TableOut } from '../kind.ts';
import { count, fixed, percent } from '../numbers.ts';
import type { ExclusionDetail } from './kind.ts';

/** Rows read and set aside under each combination of conditions. */
export function countTable(design: Design, detail: ExclusionDetail): TableOut {
  const condition = fullCondition(design);
  const step = new Set(design.steps.at(-1)?.rows ?? []);
  const labels = new Map<number, { label: string; before: number; aside: number }>();
  for (let row = 0; row < condition.length; row++) {
    const code = condition[row] as number;
    if (code < 0 || detail.before.kept[row] !== 1) continue;
    const entry = labels.get(code) ?? { label: conditionLabel(design, row), before: 0, aside: 0 };
    entry.before++;
    if (step.has(row)) entry.aside++;
    labels.set(code, entry);
  }
  const rows = [...labels.entries()].sort((a, b) => a[0] - b[0]).map(([, entry]) => entry);
  return {
    title: 'set aside by condition',
    columns: [
      { name: design.factors.map((factor) => factor.name).join(', '), numeric: false },
      { name: 'before', numeric: true },
      { name: 'set aside', numeric: true },
      { name: 'share', numeric: true },
    ],
    rows: rows.map((each) => [
      each.label,
      count(each.before),
      count(each.aside),
      percent(each.aside / Math.max(1, each.before)),
    ]),
    raw: rows.map((each) => [each.label, each.before, each.aside, each.aside / Math.max(1, each.before)]),
  };
}

function conditionLabel(design: Design, row: number): string {
  return design.factors.map((factor) => factor.levels[factor.codes[row] as number] ?? '').join(', ');
}

/** Every row the rule set aside. */
export function listTable(design: Design): TableOut {
  const rows = Array.from(design.steps.at(-1)?.rows ?? []);
  const outcome = design.roles;
  return {
    title: 'rows set aside',
    columns: [
      { name: 'row in the file', numeric: true },
      { name: outcome.participant, numeric: false },
      ...design.factors.map((factor) => ({ name: factor.name, numeric: false })),
      { name: outcome.outcome + (outcome.unit === '' ? '' : ` (${outcome.unit})`), numeric: true },
    ],
    rows: rows.map((row) => [
      String(design.table.origin[row]),
      design.participants[design.participant[row] as number] ?? '',
      ...design.factors.map((factor) => factor.levels[factor.codes[row] as number] ?? ''),
      fixed(design.outcome[row] as number, Number.isInteger(design.outcome[row]) ? 0 : 2),
    ]),
  };
}
