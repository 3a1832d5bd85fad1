import { expect, test } from 'vitest';
import { ASSOCIATION_CAUTIONS } from '../../src/analysis/cautions-association.ts';
import { mRegression } from '../../src/numerics/regression/m-regression.ts';
import { theilSen } from '../../src/numerics/regression/theil-sen.ts';
import { columnIn, referenceColumns } from '../support/reference-columns.ts';

test('agrees with its own numbers: the stars\u2019 Huber slope -.43 and Theil-Sen 1.73', () => {
  const stars = referenceColumns('stars_cyg');
  const [x, y] = [columnIn(stars, 'log_te'), columnIn(stars, 'log_light')];
  const sentence = ASSOCIATION_CAUTIONS.LEVER.sentence({});
  expect(sentence).toContain((theilSen(x, y).slope as number).toFixed(2));
  expect(sentence).toContain(
    Math.abs(mRegression(y, [x], {}).coefficients?.[1] as number)
      .toFixed(2)
      .slice(1),
  );
});

test('by hand: every sentence ends as one and names its source', () => {
  for (const entry of Object.values(ASSOCIATION_CAUTIONS)) {
    expect(entry.sentence({})).toMatch(/\.$/);
    expect(entry.source.length).toBeGreaterThan(8);
  }
});
