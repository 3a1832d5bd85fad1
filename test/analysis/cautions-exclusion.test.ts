import { expect, test } from 'vitest';
import { EXCLUSION_CAUTIONS } from '../../src/analysis/cautions-exclusion.ts';

test('by hand: the numbers of methods R13 stand in the caution, with those of the case', () => {
  expect(EXCLUSION_CAUTIONS.R13.sentence({ first: '3 trials', total: '5', passes: 2 })).toMatch(
    /here 3 trials in the first pass, 5 in 2 passes.*21 % of normal and 44 % of lognormal.*\(simulated\)\.$/,
  );
});

test('by hand: every sentence ends as one and names its source', () => {
  for (const entry of Object.values(EXCLUSION_CAUTIONS)) {
    expect(entry.sentence({})).toMatch(/\.$/);
    expect(entry.source.length).toBeGreaterThan(8);
  }
});
