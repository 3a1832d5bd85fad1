import { expect, test } from 'vitest';
import { claimKind } from '../../cells/claim/kind.ts';
import { comparisonKind } from '../../cells/comparison/kind.ts';
import { plainSentence } from '../../cells/kind.ts';
import { declareDesign } from '../../src/analysis/design.ts';
import { hideConditions } from '../../src/analysis/hidden-design.ts';
import { contextOf } from '../support/kind-run.ts';
import { tableOf } from '../support/tables.ts';

const design = hideConditions(
  declareDesign(tableOf({ who: ['1', '1', '2', '2'], alert: ['voice', 'tone', 'voice', 'tone'], ms: [4, 9, 3, 7] }), {
    participant: 'who',
    within: ['alert'],
    between: [],
    outcome: 'ms',
    unit: 'ms',
    direction: 'lower',
    rows: 'one score',
  }),
);

test('by hand: a comparison added while its scores are veiled takes its levels from the design above', () => {
  const context = contextOf({}, { blind: true, design });
  const settings = comparisonKind.defaults(context);
  expect(settings).toMatchObject({ factor: 'alert', first: 'voice', second: 'tone', estimator: 'trimmed-differences' });
  expect(plainSentence(comparisonKind.sentence(settings, context))).toContain('Compare voice with tone on the 20 %');
});

test('by hand: a claim added while its comparison is veiled is about the two conditions compared', () => {
  const above = { result: comparisonKind.defaults(contextOf({}, { blind: true, design })) };
  const context = contextOf({}, { blind: true, design, above });
  const settings = claimKind.defaults(context);
  expect(settings).toMatchObject({ first: 'voice', relation: 'lower', second: 'tone', margin: 0 });
  expect(plainSentence(claimKind.sentence(settings, context))).toContain(
    'The claim: voice is lower than tone on ms by more than 0 ms',
  );
});

test('degenerate: nothing above leaves the blanks open', () => {
  expect(claimKind.defaults(contextOf())).toMatchObject({ first: '', relation: 'different', second: '' });
  expect(comparisonKind.defaults(contextOf())).toMatchObject({ first: '', second: '' });
});
