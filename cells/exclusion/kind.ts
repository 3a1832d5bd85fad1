import { type Design, participantNoun } from '../../src/analysis/design.ts';
import { applyFlagged, applyRule, extremeScores } from '../../src/analysis/exclusion.ts';
import type { Flagged } from '../../src/analysis/flagging.ts';
import { OWN_CUTOFF, type Rule } from '../../src/analysis/rules.ts';
import { defineKind, type Num, numberOf } from '../kind.ts';
import { count, counted, plural } from '../numbers.ts';
import { WITHIN } from './distances.ts';
import { hiddenProblems, hiddenRecord, keptRows } from './hidden.ts';
import { exclusionNotes } from './notes.ts';
import { type ExclusionSettings, exclusionSentence } from './sentence.ts';
import { countTable, listTable } from './tables.ts';

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
  check: (settings, context) => [...hiddenProblems(settings, context), ...checkSettings(settings)],
  compute(settings, { design }, env) {
    const rule = ruleOf(settings, design);
    if (rule.rule === 'extreme' && rule.measure === 'MCD') {
      // The search for the subset takes long enough to be felt: it is left to a worker.
      const marks = env.run('flagExtreme', { scores: extremeScores(design, rule), rule });
      return marks.then((flagged) => ({
        value: applyFlagged(design, rule, flagged).design,
        detail: { rule, flagged, before: design },
      }));
    }
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
  tables: ({ value, detail }) =>
    value.hidden ? [] : [...(value.factors.length > 0 ? [countTable(value, detail)] : []), listTable(value)],
  record({ value, detail }) {
    const step = value.steps.at(-1);
    if (value.hidden) return hiddenRecord(value);
    return {
      setAside: Array.from(step?.rows ?? [], (row) => value.table.origin[row] as number),
      participants: step?.participants ?? [],
      kept: keptRows(value),
      limits: detail.flagged.limits.map((each) => [each.scope, each.lower, each.upper]),
    };
  },
});

function sameMarks(a: Uint8Array, b: Uint8Array): boolean {
  return a.length === b.length && a.every((mark, row) => mark === b[row]);
}

/** Whether two rules look at the scores in the same way, so that the cautions below stay the same. */
function sameReading(a: Rule | undefined, b: Rule | undefined): boolean {
  if (a?.rule !== b?.rule) return false;
  if (a?.rule !== 'extreme' || b?.rule !== 'extreme') return true;
  const same = (['scope', 'on', 'column', 'measure', 'sides', 'repeated'] as const).every((key) => a[key] === b[key]);
  return same && (a.columns ?? []).join('\n') === (b.columns ?? []).join('\n');
}

function checkSettings(settings: ExclusionSettings): string[] {
  if (settings.what === 'named') {
    if (settings.participants.length === 0) return ['Say who is set aside.'];
    return settings.reason.trim() === '' ? ['Give the reason: nobody is set aside by name without one.'] : [];
  }
  if (settings.how === 'kept-share')
    return settings.what === 'trial' ? ['A share of kept trials judges participants.'] : [];
  if (settings.how === 'together') return checkTogether(settings);
  if (settings.how === 'beyond') return checkBeyond(settings);
  if (isEmpty(settings.limit)) return ['Say the limit: a number in the column\u2019s unit.'];
  return settings.reason.trim() === ''
    ? ['Give the reason for the limit, for example that faster presses are anticipations.']
    : [];
}

function checkTogether(settings: ExclusionSettings): string[] {
  if (settings.what === 'trial') return ['Several columns at once judge participants.'];
  return (settings.columns ?? []).length < 2 ? ['Say which columns are judged together: two or more.'] : [];
}

function checkBeyond({ measure, sides, repeated }: ExclusionSettings): string[] {
  const moving = measure === 'moving' || measure === 'recursive';
  if (moving && repeated === true) {
    return [
      'The moving criterion is made for one pass, and its recursive form repeats by itself: choose "further than".',
    ];
  }
  if (measure === 'recursive' && sides !== 'both') {
    return ['The recursive moving criterion tests both ends: choose "further than", or the moving criterion.'];
  }
  return [];
}

function isEmpty(value: Num): boolean {
  return value === null;
}

/** The rule that the sentence states. */
function ruleOf(settings: ExclusionSettings, design: Design): Rule {
  const column = settings.column === '' ? design.roles.outcome : settings.column;
  if (settings.what === 'named') return { rule: 'named', participants: settings.participants, reason: settings.reason };
  if (settings.how === 'kept-share') return { rule: 'kept-share', least: numberOf(settings.least) };
  if (settings.how === 'together') {
    const columns = settings.columns ?? [];
    const cutoff = settings.within === undefined ? WITHIN : numberOf(settings.within);
    const first = columns[0] ?? column;
    return {
      rule: 'extreme',
      on: 'participant',
      column: first,
      columns,
      measure: 'MCD',
      cutoff,
      scope: 'pooled',
      sides: 'both',
    };
  }
  if (settings.how === 'beyond') {
    return {
      rule: 'extreme',
      on: settings.what,
      column,
      measure: settings.measure,
      cutoff: OWN_CUTOFF.has(settings.measure) ? 1 : numberOf(settings.cutoff),
      scope: settings.scope,
      sides: settings.sides,
      ...(settings.repeated === true ? { repeated: true } : {}),
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
