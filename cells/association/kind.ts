import { ASSOCIATIONS, type AssociationSpec, associationOf, takePairs } from '../../src/analysis/association.ts';
import { leveragePairs } from '../../src/analysis/association-diagnostics.ts';
import { findingRecord } from '../../src/analysis/finding.ts';
import type { Table } from '../../src/data/table.ts';
import { type Context, defineKind, numberOf, Refusal } from '../kind.ts';
import { associationNotes } from './notes.ts';
import { type AssociationSettings, associationSentence, estimatorNamed, guessParticipant } from './sentence.ts';
import { diagnosticTable, findingTable, methodTable, sayAssociation } from './words.ts';

/** Rows that are computed together: the parts run beside each other. */
const PARTS: readonly (readonly string[])[] = [
  ASSOCIATIONS.filter((each) => each.group === 'correlations' && !each.id.startsWith('skipped')).map(({ id }) => id),
  ['skipped-projection'],
  ['skipped-mcd'],
  ASSOCIATIONS.filter((each) => each.group === 'slopes').map(({ id }) => id),
];

/** Relates two scores of every participant by every row that fits; the plan names one of them. */
export const associationKind = defineKind<AssociationSettings, { readonly table: 'table' }, 'association', null>({
  name: 'association',
  version: 1,
  title: () => 'association',
  offer: 'Relate one score of every participant to another',
  takes: { table: 'table' },
  gives: 'association',
  blind: 'veil',
  defaults: (context) => defaultSettings(context),
  check: (settings) => checkSettings(settings),
  async compute(settings, { table }, env) {
    const spec: AssociationSpec = { ...settings, trim: numberOf(settings.trim) ?? 0, seed: env.seed };
    const pairs = takePairs(table, spec);
    if (pairs.x.length === 0) {
      throw new Refusal(
        `Nobody has a value in both ${spec.x} and ${spec.y}, so there is nothing to relate. Choose other columns, or look at the missing values.`,
      );
    }
    const parts = await Promise.all(PARTS.map((rows) => env.run('associate', { pairs, spec, rows })));
    return { value: associationOf(pairs, spec, parts.flat()), detail: null };
  },
  sentence: associationSentence,
  say: ({ value }) => sayAssociation(value),
  flow: ({ value }) => ({ count: value.pairs.x.length, label: 'related' }),
  notes: ({ value }) => associationNotes(value),
  tables: ({ value }) => [findingTable(value), methodTable(value), diagnosticTable(value)],
  record: ({ value }) => ({
    planned: value.planned,
    findings: value.findings.map(findingRecord),
    leverage: leveragePairs(value.diagnostics).map((i) => value.pairs.participants[i] as string),
    left: value.pairs.left.map((each) => each.participant),
  }),
});

function checkSettings(settings: AssociationSettings): string[] {
  if (settings.x === '' || settings.y === '') return ['Say which two columns are related.'];
  if (settings.x === settings.y) return ['A column is not related to itself: choose two different columns.'];
  if (settings.participant === settings.x || settings.participant === settings.y) {
    return ['The column that tells participants apart is no score: choose another one.'];
  }
  const estimator = estimatorNamed(settings.estimator);
  if (!estimator) return ['Say which correlation or slope the plan names.'];
  return estimator.trims && settings.trim === null ? ['Say how much is winsorized at each end.'] : [];
}

function defaultSettings(context: Context): AssociationSettings {
  const table = context.given.table as Table | undefined;
  const participant = table ? guessParticipant(table) : null;
  const numbers = (table?.columns ?? []).filter((each) => each.type === 'number' && each.name !== participant);
  return {
    x: numbers[0]?.name ?? '',
    y: numbers[1]?.name ?? '',
    participant,
    estimator: 'percentage-bend',
    trim: 20,
    alternative: 'two-sided',
    alpha: 0.05,
    resamples: 999,
  };
}
