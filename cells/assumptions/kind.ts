import type { Checks } from '../../src/analysis/checks.ts';
import { takeCheckLayout } from '../../src/analysis/checks-layout.ts';
import type { Departure } from '../../src/analysis/checks-power.ts';
import type { ShapeTestId } from '../../src/analysis/checks-shape.ts';
import { defineKind } from '../kind.ts';
import { checkNotes } from './notes.ts';
import { checksRecord } from './record.ts';
import { assumptionsSentence } from './sentence.ts';
import { type AssumptionsSettings, checkSettings, DEPARTURES, defaultSettings, targetOf } from './settings.ts';
import { checkTables } from './tables.ts';
import { sayChecks } from './words.ts';

/** Looks at what a comparison assumes, on the quantity the assumption is about; it chooses no test. */
export const assumptionsKind = defineKind<AssumptionsSettings, { readonly scores: 'scores' }, 'checks', null>({
  name: 'assumptions',
  version: 1,
  title: () => 'assumptions',
  offer: 'Check what a comparison assumes',
  takes: { scores: 'scores' },
  gives: 'checks',
  blind: 'veil',
  defaults: defaultSettings,
  check: checkSettings,
  async compute(settings, { scores }, env) {
    const layout = takeCheckLayout(scores, targetOf(settings));
    const value: Checks = await env.run('checks', {
      layout,
      options: {
        test: settings.test as ShapeTestId,
        // In one order whatever order they were chosen in.
        departures: (Object.keys(DEPARTURES) as Departure[]).filter((each) => settings.departures.includes(each)),
        alpha: settings.alpha,
        seed: env.seed,
      },
    });
    return { value, detail: null };
  },
  sentence: assumptionsSentence,
  say: ({ value }) => sayChecks(value),
  notes: ({ value }) => checkNotes(value),
  tables: ({ value }) => checkTables(value),
  record: ({ value }) => checksRecord(value),
});
