import { expect, test } from 'vitest';
import { associationFinding, tooManyForPairs } from '../../src/analysis/association-finding.ts';
import { pairsOf, spec } from '../support/associations.ts';

const words = { id: 'w', group: 'correlations', name: 'row', quantity: 'q', method: 'm', trims: true } as const;
const numbers = { estimate: 0.4, se: 0.1, p: 0.03, pHow: 't distribution', interval: [0.1, 0.6] } as const;

test('by hand: a trimmed row is labelled with its share, and what is absent is null', () => {
  const pairs = pairsOf(
    Float64Array.from({ length: 12 }, (_, i) => i),
    new Float64Array(12),
  );
  expect(associationFinding(words, pairs, spec, numbers)).toMatchObject({
    label: '20 % row',
    trim: 20,
    unit: '',
    sameUnit: false,
    df: null,
    statistic: null,
    p: 0.03,
    level: 0.95,
    n: 12,
    cautions: [],
  });
});

test('degenerate: below 5 pairs p and interval are withheld with a reason, below 10 a caution stands', () => {
  const of = (n: number) =>
    pairsOf(
      Float64Array.from({ length: n }, (_, i) => i),
      new Float64Array(n),
    );
  expect(associationFinding(words, of(4), spec, numbers)).toMatchObject({
    estimate: 0.4,
    p: null,
    interval: null,
    reason: 'fewer than 5 participants: described only',
    cautions: ['NOP'],
  });
  expect(associationFinding(words, of(5), spec, numbers)).toMatchObject({ p: 0.03, cautions: ['FEWPAIRS'] });
  expect(associationFinding(words, of(10), spec, numbers).cautions).toEqual([]);
});

test('by hand: 500 participants are still resampled, 501 are not', () => {
  const of = (n: number) => pairsOf(new Float64Array(n), new Float64Array(n));
  expect(tooManyForPairs(of(500))).toBe(null);
  expect(tooManyForPairs(of(501))?.reason).toMatch(/more than 500 participants/);
});
