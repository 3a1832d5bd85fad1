import { expect, test } from 'vitest';
import { associateRows } from '../../src/analysis/association.ts';
import { slopeRows } from '../../src/analysis/association-slopes.ts';
import { findingOf, pairsOf, referencePairs, spec } from '../support/associations.ts';

const ids = slopeRows.map((each) => each.id);
const stars = referencePairs('stars_cyg', 'log_te', 'log_light');
const ofStars = associateRows({ pairs: stars, spec, rows: ids });
const ofCars = associateRows({ pairs: referencePairs('mtcars', 'wt', 'mpg'), spec, rows: ids });

// test/reference/cases/stars_cyg.json and mtcars.json: R 4.2.2 lm and sandwich formulas, as named there.
test.each([
  ['ols', -0.4133038605870558, 0.28625747639717125, 0.15571643962078519, 0.5591010450993233, 1.2939587013505116e-10],
  ['ols-hc3', -0.4133038605870558, 0.3936590424948312, 0.2993686031740633, 0.7381064462366206, 4.6362634828178224e-8],
  ['ols-hc4', -0.4133038605870558, 0.4705750514611121, 0.3844490920705641, 0.7770879767087809, 1.4012566010406008e-7],
])('agrees with the outside cases: %s', (id, slope, starSe, starP, carSe) => {
  const [star, car] = [findingOf(ofStars, id), findingOf(ofCars, id)];
  expect(star.estimate).toBeCloseTo(slope, 9);
  expect(star.se).toBeCloseTo(starSe, 9);
  expect(star.p).toBeCloseTo(starP, 9);
  expect([star.df, car.df]).toEqual([45, 30]);
  expect(car.estimate).toBeCloseTo(-5.344471572722678, 9);
  expect(car.se).toBeCloseTo(carSe, 9);
});

test('agrees with R confint: least squares of the cars, -6.486308 to -4.202635', () => {
  const ols = findingOf(ofCars, 'ols');
  expect(ols.interval?.[0]).toBeCloseTo(-6.486308237418262, 8);
  expect(ols.interval?.[1]).toBeCloseTo(2 * -5.344471572722678 + 6.486308237418262, 8);
});

// SciPy 1.10 theilslopes and transcriptions, as recorded in the cases; methods 3.5 prints the stars' values.
test('agrees with the outside cases: Theil-Sen 1.72727 [.463, 3.073], cars -5.62649 [-6.982, -4.158]', () => {
  const [star, car] = [findingOf(ofStars, 'theil-sen'), findingOf(ofCars, 'theil-sen')];
  expect(star.estimate).toBeCloseTo(1.7272727272727217, 9);
  expect(star.interval?.[0]).toBeCloseTo(0.4629629629629629, 9);
  expect(star.interval?.[1]).toBeCloseTo(3.0727272727272745, 9);
  expect(car.interval?.[0]).toBeCloseTo(-6.982248520710064, 9);
  expect(car.interval?.[1]).toBeCloseTo(-4.158493526873283, 9);
  // Kendall's test, cases kendall_tau_b.
  expect(star.p).toBeCloseTo(0.013002787628930286, 10);
});

test('agrees with the outside cases: repeated medians 2.5 and -5.75584; Huber -.42852, bisquare -.41798', () => {
  expect(findingOf(ofStars, 'repeated-medians').estimate).toBeCloseTo(2.5, 9);
  expect(findingOf(ofCars, 'repeated-medians').estimate).toBeCloseTo(-5.755835015266779, 9);
  expect(findingOf(ofStars, 'huber-m').estimate).toBeCloseTo(-0.42852317997700695, 6);
  expect(findingOf(ofStars, 'bisquare-m').estimate).toBeCloseTo(-0.417980007260831, 6);
  expect(findingOf(ofCars, 'huber-m').estimate).toBeCloseTo(-5.250311998199433, 6);
});

test('theory: leverage is warned of on the lines that a far x can carry, and on no other', () => {
  const warned = ofStars.filter((finding) => finding.cautions.includes('LEVER')).map((finding) => finding.estimator);
  expect(warned).toEqual(['ols', 'ols-hc3', 'ols-hc4', 'huber-m', 'bisquare-m']);
});

test('by hand: the unit is that of the outcome for one of the other', () => {
  expect(new Set(ofStars.map((finding) => finding.unit))).toEqual(new Set(['y per x']));
  expect(ofStars.every((finding) => finding.sameUnit && finding.group === 'slopes')).toBe(true);
});

test('theory: a one-sided 95 % interval of Theil-Sen is one end of the two-sided 90 % one', () => {
  const run = (more: object) => associateRows({ pairs: stars, spec: { ...spec, ...more }, rows: ['theil-sen', 'ols'] });
  const [two, up, down] = [run({ alpha: 0.1 }), run({ alternative: 'greater' }), run({ alternative: 'less' })];
  for (const id of ['theil-sen', 'ols']) {
    const both = findingOf(two, id).interval;
    expect(findingOf(up, id).interval).toEqual([expect.closeTo(both?.[0] as number, 12), null]);
    expect(findingOf(down, id).interval).toEqual([null, expect.closeTo(both?.[1] as number, 12)]);
  }
});

test('invariance: ten times the unit of x divides every slope by ten', () => {
  const tenth = associateRows({
    pairs: pairsOf(
      stars.x.map((value) => 10 * value),
      stars.y,
    ),
    spec,
    rows: ids,
  });
  for (const id of ids) {
    expect(findingOf(tenth, id).estimate).toBeCloseTo((findingOf(ofStars, id).estimate as number) / 10, 6);
  }
});

test('degenerate: an x that does not vary, points exactly on a line, too few, and more than 500 participants', () => {
  const flat = associateRows({ pairs: pairsOf([3, 3, 3, 3, 3, 3], [1, 2, 4, 3, 5, 6]), spec, rows: ids });
  expect(flat.every((finding) => finding.estimate === null && finding.p === null)).toBe(true);
  const exact = associateRows({ pairs: pairsOf([1, 2, 3, 4, 5, 6], [2, 4, 6, 8, 10, 12]), spec, rows: ids });
  expect(findingOf(exact, 'ols')).toMatchObject({ se: null, p: null, reason: 'the fit is exact: no residual spread' });
  expect(findingOf(exact, 'theil-sen').estimate).toBe(2);
  expect(findingOf(exact, 'huber-m').estimate).toBe(null);
  const two = associateRows({ pairs: pairsOf([1, 2], [2, 1]), spec, rows: ids });
  expect(two.every((finding) => finding.reason === 'fewer than 3 pairs')).toBe(true);
  const many = Float64Array.from({ length: 501 }, (_, i) => (i * 37) % 501);
  const crowd = associateRows({
    pairs: pairsOf(
      many,
      many.map((v, i) => v + (i % 7)),
    ),
    spec,
    rows: ['repeated-medians'],
  });
  expect(findingOf(crowd, 'repeated-medians').reason).toMatch(/more than 500 participants/);
});
