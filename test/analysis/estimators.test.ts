import { describe, expect, it } from 'vitest';
import { compareSamples } from '../../src/analysis/compare.ts';
import { ESTIMATORS, estimatorOf } from '../../src/analysis/estimators.ts';
import { args, sleepSamples, toothSamples } from '../support/samples.ts';

describe('the list of rows', () => {
  it('theory: ids are unique, and each row turns into one that is there when nobody is trimmed', () => {
    expect(new Set(ESTIMATORS.map((each) => each.id)).size).toBe(ESTIMATORS.length);
    for (const each of ESTIMATORS) expect(estimatorOf(each.untrimmed)?.scope).toBe(each.scope);
  });

  it('by hand: within rows are never offered between, and the other way round', () => {
    expect(compareSamples(args(sleepSamples)).map((each) => each.estimator)).toEqual(
      ESTIMATORS.filter((each) => each.scope === 'within').map((each) => each.id),
    );
    expect(compareSamples(args(toothSamples)).map((each) => each.estimator)).toEqual(
      ESTIMATORS.filter((each) => each.scope === 'between').map((each) => each.id),
    );
  });
});
