import { type Design, declareDesign, participantNoun } from '../../src/analysis/design.ts';
import { hideConditions, leakWords } from '../../src/analysis/hidden-design.ts';
import { asLevels, type Column, type Table } from '../../src/data/table.ts';
import { type Context, defineKind, type Note, type TableOut } from '../kind.ts';
import { count, counted, plural } from '../numbers.ts';
import { type DesignSettings, designSentence } from './sentence.ts';

/** States who was measured on what under which conditions, and checks that the rows bear it out. */
export const designKind = defineKind<DesignSettings, { readonly table: 'table' }, 'design', null>({
  name: 'design',
  version: 1,
  title: () => 'design',
  offer: 'State the design: participants, conditions, outcome',
  takes: { table: 'table' },
  gives: 'design',
  blind: ({ value, detail }) => ({ value: hideConditions(value), detail }),
  defaults: (context) => guess(context),
  check(settings) {
    if (settings.participant === '') return ['Say which column tells participants apart.'];
    if (settings.outcome === '') return ['Say which column is the outcome: it has to hold numbers.'];
    return settings.within.length + settings.between.length === 0
      ? ['Say which column is the condition: one that every participant met, or one that differs between participants.']
      : [];
  },
  compute: (settings, { table }, env) => ({ value: declareDesign(table, settings, env.blind), detail: null }),
  sentence: designSentence,
  say: ({ value }) =>
    `${counted(value.participants.length, participantNoun(value.roles))} with ${counted(value.table.rows - value.missingRows, 'complete row')}.`,
  flow: ({ value }) => ({
    count: value.participants.length,
    label: plural(participantNoun(value.roles)),
    share: (value.table.rows - value.missingRows) / Math.max(1, value.table.rows),
  }),
  notes: ({ value }) => designNotes(value),
  tables: ({ value }) => (value.missingCells.length > 0 ? [missingTable(value)] : []),
  record: ({ value }) => ({
    participants: value.participants.length,
    rows: value.table.rows,
    missingRows: value.missingRows,
    factors: value.factors.map((factor) => ({ name: factor.name, scope: factor.scope, levels: factor.levels })),
    missingCells: value.missingCells.map((each) => [each.participant, each.condition]),
  }),
});

function designNotes(design: Design): Note[] {
  const noun = participantNoun(design.roles);
  const notes: Note[] = [];
  if (design.roles.rows === 'several trials') {
    notes.push({
      type: 'note',
      text: `The unit of analysis is the ${noun}: trials are scored per ${noun} before any test.`,
      id: 'R10',
    });
  }
  for (const factor of design.factors) {
    if (factor.scope === 'between')
      notes.push({ type: 'note', text: `No ${noun} stands in two ${factor.name} groups.` });
  }
  if (design.missingRows > 0) {
    notes.push({
      type: 'caution',
      text: `${counted(design.missingRows, 'row')} without ${noun}, condition or outcome ${design.missingRows === 1 ? 'is' : 'are'} left out.`,
    });
  }
  if (design.missingCells.length > 0) {
    const named = design.missingCells
      .slice(0, 4)
      .map((each) => `${noun} ${each.participant}${each.condition === '' ? '' : ` under ${each.condition}`}`);
    const more = design.missingCells.length - named.length;
    notes.push({
      type: 'caution',
      text: `Without any row${design.hidden ? ' under one of the conditions' : ''}: ${named.join('; ')}${more > 0 ? `; and ${more} more` : ''}. A comparison that needs such a score leaves that ${noun} out.`,
    });
  }
  for (const text of leakWords(design)) notes.push({ type: 'note', lead: 'Hidden.', text });
  return notes;
}

function missingTable(design: Design): TableOut {
  return {
    title: `${count(design.missingCells.length)} combinations without rows`,
    columns: [
      { name: design.roles.participant, numeric: false },
      ...(design.hidden ? [] : [{ name: 'condition', numeric: false }]),
    ],
    rows: design.missingCells.map((each) => (design.hidden ? [each.participant] : [each.participant, each.condition])),
  };
}

/** The best guess from names and levels: it fills the blanks, and every one of them is shown. */
function guess(context: Context): DesignSettings {
  const table = context.given.table as Table | undefined;
  const settings: DesignSettings = {
    participant: '',
    within: [],
    between: [],
    outcome: '',
    unit: '',
    direction: 'neither',
    rows: 'several trials',
  };
  if (!table) return settings;
  const who = guessParticipant(table);
  const outcome = table.columns
    .filter((c) => c.type === 'number' && c !== who && !/^(trial|block|order|age|row)/i.test(c.name))
    .at(-1);
  const labels = table.columns.filter(
    (c) => c !== who && c.type === 'text' && c.levels.length >= 2 && c.levels.length <= 12,
  );
  const between = who ? labels.filter((column) => isConstantIn(column, who)) : [];
  const within = labels.filter((column) => !between.includes(column));
  return {
    ...settings,
    participant: who?.name ?? '',
    within: within.slice(0, 2).map((column) => column.name),
    between: between.slice(0, 2).map((column) => column.name),
    outcome: outcome?.name ?? '',
    unit: /(^|[_ (])(ms|s|mm|cm|db|points)\)?$/i.exec(outcome?.name ?? '')?.[2] ?? '',
    rows: who && repeats(who, within.slice(0, 2)) ? 'several trials' : 'one score',
  };
}

function guessParticipant(table: Table): Column | undefined {
  const named =
    /^(participant|officer|listener|wearer|subject|subj|person|patient|pupil|student|volunteer|ppt|pid|id|code)/i;
  return table.columns.find((column) => named.test(column.name)) ?? table.columns.find((c) => c.type === 'text');
}

function isConstantIn(column: Column, who: Column): boolean {
  const people = asLevels(who);
  const level = asLevels(column);
  const first = new Map<number, number>();
  return level.codes.every((code, row) => {
    const person = people.codes[row] as number;
    if (code < 0 || person < 0) return true;
    const seen = first.get(person);
    if (seen === undefined) first.set(person, code);
    return seen === undefined || seen === code;
  });
}

function repeats(who: Column, within: readonly Column[]): boolean {
  const seen = new Set<string>();
  const people = asLevels(who).codes;
  const factors = within.map((column) => asLevels(column).codes);
  for (let row = 0; row < people.length; row++) {
    const key = [people[row], ...factors.map((codes) => codes[row])].join('.');
    if (seen.has(key)) return true;
    seen.add(key);
  }
  return false;
}
