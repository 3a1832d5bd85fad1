import { describe, expect, test } from 'vitest';
import { associateRows } from '../../src/analysis/association.ts';
import { correlationRows } from '../../src/analysis/association-rows.ts';
import { pearsonCorrelation } from '../../src/numerics/correlation/pearson.ts';
import { findingOf, pairsOf, referencePairs, spec } from '../support/associations.ts';

const ids = correlationRows.map((each) => each.id);
const stars = referencePairs('stars_cyg', 'log_te', 'log_light');
const cars = referencePairs('mtcars', 'wt', 'mpg');
const ofStars = associateRows({ pairs: stars, spec, rows: ids });
const ofCars = associateRows({ pairs: cars, spec, rows: ids });

// test/reference/cases/stars_cyg.json and mtcars.json: R 4.2.2 cor.test, SciPy 1.10 and transcriptions, as named there.
describe('agrees with the outside cases', () => {
  test.each([
    ['pearson', -0.21041326983429132, 45, 0.15571643962078463, -0.8676593765172278, 30, 1.2939587013505163e-10],
    ['spearman', 0.29514952401557304, 45, 0.04400200275538472, -0.8864220332702979, 30, 1.487594858127433e-11],
    ['kendall', 0.2560849320442852, null, 0.013002787628930286, -0.727832149528431, null, 6.705770405595863e-9],
    ['winsorized', 0.3444762236262325, 27, 0.020513705356403643, -0.8643263635805282, 18, 2.2468034746572207e-8],
    ['percentage-bend', 0.30630760708991295, 45, 0.03625829617185224, -0.9056757814389403, 30, 1.0469923932792708e-12],
  ])('agrees with the outside cases: %s', (id, starR, starDf, starP, carR, carDf, carP) => {
    const [star, car] = [findingOf(ofStars, id), findingOf(ofCars, id)];
    expect([star.df, car.df]).toEqual([starDf, carDf]);
    expect(star.estimate).toBeCloseTo(starR, 10);
    expect((star.p as number) / starP).toBeCloseTo(1, 8);
    expect(car.estimate).toBeCloseTo(carR, 10);
    expect((car.p as number) / carP).toBeCloseTo(1, 8);
  });

  test('agrees with the outside cases: Fisher\u2019s interval of the stars, -.469228 to .081690, and SE from t', () => {
    const pearson = findingOf(ofStars, 'pearson');
    expect(pearson.interval?.[0]).toBeCloseTo(-0.4692276094769064, 10);
    expect(pearson.interval?.[1]).toBeCloseTo(0.08168952582520697, 10);
    expect(pearson.se).toBeCloseTo(0.21041326983429132 / 1.443818571269779, 10);
  });

  test('agrees with the outside cases: biweight midcorrelation .596886 and -.893525', () => {
    expect(findingOf(ofStars, 'biweight').estimate).toBeCloseTo(0.5968861735598796, 10);
    expect(findingOf(ofCars, 'biweight').estimate).toBeCloseTo(-0.8935245580108009, 10);
  });
});

test('agrees with methods 3.5: Pearson -.2104 of all stars is .6054 without the giants 11, 20, 30, 34', () => {
  const rest = [...stars.x.keys()].filter((i) => ![10, 19, 29, 33].includes(i));
  const [x, y] = [rest.map((i) => stars.x[i] as number), rest.map((i) => stars.y[i] as number)];
  const found = findingOf(associateRows({ pairs: pairsOf(x, y), spec, rows: ['pearson'] }), 'pearson');
  expect(found.estimate).toBeCloseTo(0.6054453100624604, 10);
});

// NumPy corrcoef of the stars that a transcription in Python leaves (test/numerics/correlation/skipped.test.ts).
test('agrees with NumPy: skipped .682195 (42 of 47 left) and .731301 (40 left); p by resamples, never the textbook one', () => {
  const [projection, mcd] = [findingOf(ofStars, 'skipped-projection'), findingOf(ofStars, 'skipped-mcd')];
  expect(projection.estimate).toBeCloseTo(0.6821947163723936, 10);
  expect(mcd.estimate).toBeCloseTo(0.731301472951175, 10);
  expect([projection.counts[0]?.h, mcd.counts[0]?.h]).toEqual([42, 40]);
  for (const row of [projection, mcd]) {
    expect(row.pHow).toMatch(/^percentile bootstrap, B = 99/);
    expect(row.statistic).toBe(null);
    expect(row.cautions).toContain('SKIP');
    // With 99 resamples the smallest two-sided p is .02; the textbook p of 42 pairs with r .68 is 6e-7.
    expect(row.p as number).toBeGreaterThanOrEqual(0.02);
  }
});

test('theory: a direction halves p or doubles its rest, and leaves one limit', () => {
  const [up, down] = (['greater', 'less'] as const).map((alternative) =>
    associateRows({ pairs: cars, spec: { ...spec, alternative }, rows: ids }),
  );
  for (const id of ['pearson', 'spearman', 'kendall', 'winsorized', 'percentage-bend']) {
    const [plus, minus] = [findingOf(up ?? [], id), findingOf(down ?? [], id)];
    expect((plus.p as number) + (minus.p as number)).toBeCloseTo(1, 10);
    expect(plus.interval?.[1]).toBe(null);
    expect(minus.interval?.[0]).toBe(null);
  }
});

test('invariance: x and y change places without changing a correlation', () => {
  const turned = associateRows({ pairs: pairsOf(cars.y, cars.x), spec, rows: ids });
  for (const id of ids) {
    expect(findingOf(turned, id).estimate).toBeCloseTo(findingOf(ofCars, id).estimate as number, 10);
  }
});

test('invariance: another seed moves bootstrap intervals only', () => {
  const again = associateRows({ pairs: stars, spec: { ...spec, seed: 8 }, rows: ['pearson', 'percentage-bend'] });
  expect(findingOf(again, 'pearson')).toEqual(findingOf(ofStars, 'pearson'));
  expect(findingOf(again, 'percentage-bend').p).toBe(findingOf(ofStars, 'percentage-bend').p);
  expect(findingOf(again, 'percentage-bend').interval).not.toEqual(findingOf(ofStars, 'percentage-bend').interval);
});

test('agrees with R: nine tuna lots without ties count orders: tau .444 with p .119, rho .6 with p .0968', () => {
  // Hollander & Wolfe 1973, p. 187; R 4.2 cor.test on the same scores.
  const tuna = pairsOf(
    [44.4, 45.9, 41.9, 53.3, 44.7, 44.1, 50.7, 45.2, 60.1],
    [2.6, 3.1, 2.5, 5, 3.6, 4, 5.2, 2.8, 3.8],
  );
  const found = associateRows({ pairs: tuna, spec, rows: ['kendall', 'spearman'] });
  expect(findingOf(found, 'kendall').p).toBeCloseTo(0.1194389329805996, 12);
  expect(findingOf(found, 'spearman').p).toBeCloseTo(0.09679783950617284, 12);
  expect(findingOf(found, 'spearman').pHow).toBe('all orders counted');
  expect(findingOf(found, 'spearman').cautions).toEqual(['FEWPAIRS']);
});

test('degenerate: fewer than 5 pairs describe only; an outcome that does not vary has no correlation', () => {
  const four = associateRows({ pairs: pairsOf([1, 2, 3, 4], [2, 1, 4, 3]), spec, rows: ids });
  expect(findingOf(four, 'pearson')).toMatchObject({ p: null, interval: null, se: null, cautions: ['NOP'] });
  expect(findingOf(four, 'pearson').estimate).toBeCloseTo(
    pearsonCorrelation(Float64Array.of(1, 2, 3, 4), Float64Array.of(2, 1, 4, 3)).r as number,
    14,
  );
  const flat = associateRows({ pairs: pairsOf([1, 2, 3, 4, 5, 6], [7, 7, 7, 7, 7, 7]), spec, rows: ids });
  for (const finding of flat) {
    expect(finding.estimate, finding.estimator).toBe(null);
    expect((finding.reason ?? '').length, finding.estimator).toBeGreaterThan(8);
    expect(finding.interval, finding.estimator).toBe(null);
  }
});
