import { type Design, fullCondition, participantNoun } from '../../src/analysis/design.ts';
import { applyRule } from '../../src/analysis/exclusion.ts';
import type { Flagged } from '../../src/analysis/flagging.ts';
import type { Rule } from '../../src/analysis/rules.ts';
import { defineKind, type Num, numberOf, type TableOut } from '../kind.ts';
import { count, counted, fixed, percent, plural } from '../numbers.ts';
import { exclusionNotes } from './notes.ts';
import { type ExclusionSettings, exclusionSentence } from './sentence.ts';

/** What the exclusion cell shows of its rule; the cells below read only what is kept. */
export interface ExclusionDetail {
  readonly rule: Rule;
  readonly flagged: Flagged;
  /** The design the rule was applied to. */
  readonly before: Design;
}

/** Sets rows or participants aside by one stated rule. */
export const exclusionKind = defineKind<ExclusionSettings, { readonly design: 'design' }, 'design', ExclusionDetail>({
  name: 'exclusion',
  version: 1,
  title: (settings) =>
    `exclusion rule \u00b7 ${settings.what === 'named' ? 'by name' : settings.what === 'trial' ? 'trials' : 'participants'}`,
  offer: 'Set aside trials or participants by a rule, or by name with a reason',
  takes: { design: 'design' },
  gives: 'design',
  blind: 'same',
  defaults: () => ({
    what: 'trial',
    how: 'beyond',
    participants: [],
    reason: '',
    column: '',
    limit: null,
    measure: 'MAD',
    cutoff: null,
    sides: 'both',
    scope: 'participant',
    least: 70,
  }),
  check: (settings) => checkSettings(settings),
  compute(settings, { design }) {
    const rule = ruleOf(settings, design);
    const applied = applyRule(design, rule);
    return { value: applied.design, detail: { rule, flagged: applied.flagged, before: design } };
  },
  // The cutoff itself is not compared: a cutoff that keeps the same rows changes nothing below.
  same: (a, b) =>
    a.table === b.table &&
    a.roles === b.roles &&
    a.participants === b.participants &&
    sameMarks(a.kept, b.kept) &&
    a.rules.length === b.rules.length &&
    a.rules.slice(0, -1).every((rule, index) => rule === b.rules[index]) &&
    sameReading(a.rules.at(-1), b.rules.at(-1)),
  sentence: exclusionSentence,
  say({ value, detail }) {
    const step = value.steps.at(-1);
    const rows = step?.rows.length ?? 0;
    const noun = value.roles.rows === 'one score' ? 'score' : 'trial';
    const whole =
      step && step.participants.length > 0
        ? `, all of ${step.participants.length === 1 ? participantNoun(value.roles) : `${step.participants.length} ${plural(participantNoun(value.roles))}`} ${detail.rule.rule === 'named' ? step.participants.join(', ') : ''}`.trimEnd()
        : '';
    return rows === 0
      ? 'The rule sets nothing aside.'
      : `${counted(rows, noun)} set aside${whole}; ${count(keptRows(value))} kept.`;
  },
  flow({ value }) {
    const rows = value.steps.at(-1)?.rows.length ?? 0;
    const noun = value.roles.rows === 'one score' ? 'scores kept' : 'trials kept';
    return {
      setAside: rows,
      count: keptRows(value),
      label: noun,
      share: keptRows(value) / Math.max(1, value.table.rows),
    };
  },
  notes: ({ value, detail }) => exclusionNotes(value, detail),
  tables: ({ value, detail }) => [...(value.factors.length > 0 ? [countTable(value, detail)] : []), listTable(value)],
  record({ value, detail }) {
    const step = value.steps.at(-1);
    return {
      setAside: Array.from(step?.rows ?? [], (row) => value.table.origin[row] as number),
      participants: step?.participants ?? [],
      kept: keptRows(value),
      limits: detail.flagged.limits.map((each) => [each.scope, each.lower, each.upper]),
    };
  },
});

/** Rows still in. */
function keptRows(design: Design): number {
  let kept = 0;
  for (const mark of design.kept) kept += mark;
  return kept;
}

function sameMarks(a: Uint8Array, b: Uint8Array): boolean {
  return a.length === b.length && a.every((mark, row) => mark === b[row]);
}

/** Whether two rules look at the scores in the same way, so that the cautions below stay the same. */
function sameReading(a: Rule | undefined, b: Rule | undefined): boolean {
  if (a?.rule !== b?.rule) return false;
  if (a?.rule !== 'extreme' || b?.rule !== 'extreme') return true;
  return (
    a.scope === b.scope && a.on === b.on && a.column === b.column && a.measure === b.measure && a.sides === b.sides
  );
}

function checkSettings(settings: ExclusionSettings): string[] {
  if (settings.what === 'named') {
    if (settings.participants.length === 0) return ['Say who is set aside.'];
    return settings.reason.trim() === '' ? ['Give the reason: nobody is set aside by name without one.'] : [];
  }
  if (settings.how === 'kept-share')
    return settings.what === 'trial' ? ['A share of kept trials judges participants.'] : [];
  if (settings.how === 'beyond') return [];
  if (isEmpty(settings.limit)) return ['Say the limit: a number in the column\u2019s unit.'];
  return settings.reason.trim() === ''
    ? ['Give the reason for the limit, for example that faster presses are anticipations.']
    : [];
}

function isEmpty(value: Num): boolean {
  return value === null;
}

/** The rule that the sentence states. */
function ruleOf(settings: ExclusionSettings, design: Design): Rule {
  const column = settings.column === '' ? design.roles.outcome : settings.column;
  if (settings.what === 'named') return { rule: 'named', participants: settings.participants, reason: settings.reason };
  if (settings.how === 'kept-share') return { rule: 'kept-share', least: numberOf(settings.least) };
  if (settings.how === 'beyond') {
    return {
      rule: 'extreme',
      on: settings.what,
      column,
      measure: settings.measure,
      cutoff: numberOf(settings.cutoff),
      scope: settings.scope,
      sides: settings.sides,
    };
  }
  return {
    rule: 'limit',
    on: settings.what,
    column,
    side: settings.how,
    limit: numberOf(settings.limit),
    reason: settings.reason,
  };
}

/** Rows read and set aside under each combination of conditions. */
function countTable(design: Design, detail: ExclusionDetail): TableOut {
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
function listTable(design: Design): TableOut {
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
