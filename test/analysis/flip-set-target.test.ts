import { describe, expect, test } from 'vitest';
import type { ClaimSpec } from '../../src/analysis/claim.ts';
import type { Finding } from '../../src/analysis/finding.ts';
import { orientedEstimate, pullOf, sideOf } from '../../src/analysis/flip-set-target.ts';
import { aHigher, pairsOf } from '../support/chains.ts';

const own = pairsOf([3, 4, 6, 5], [1, 2, 3, 3]);
const row = own.findings[own.planned] as Finding;
const finding: Finding = {
  ...row,
  estimate: 4,
  se: 2,
  interval: [1, 7],
  nullValue: 0,
  reversed: false,
  sameUnit: true,
};
const pull = (target: Parameters<typeof pullOf>[1], claim: ClaimSpec, from = finding) =>
  pullOf(from, target, claim, 'a', 4, 3);

describe('distance from a change', () => {
  test('by hand: a is higher than b by 4 [1, 7], SE 2', () => {
    expect(pull('loses support', aHigher)).toBeCloseTo(0.5, 12);
    expect(pull('loses support', { ...aHigher, margin: 2 })).toBeCloseTo(-0.5, 12);
    expect(pull('gains support', { ...aHigher, margin: 2 })).toBeCloseTo(0.5, 12);
    expect(pull('changes sign', aHigher)).toBe(4);
    expect(pull('falls below', aHigher)).toBe(1);
  });

  test('by hand: the same row read for a claim of lower, of the other order, and of any difference', () => {
    expect(pull('loses support', { ...aHigher, relation: 'lower' })).toBeCloseTo(-3.5, 12);
    expect(pull('loses support', { ...aHigher, first: 'b', second: 'a', relation: 'lower' })).toBeCloseTo(0.5, 12);
    expect(pull('loses support', { ...aHigher, relation: 'different' })).toBeCloseTo(0.5, 12);
    expect(
      pull('loses support', { ...aHigher, relation: 'different' }, { ...finding, interval: [-7, -1] }),
    ).toBeCloseTo(0.5, 12);
  });

  test('by hand: a probability of being lower counts the other way', () => {
    const chance: Finding = { ...finding, estimate: 0.8, nullValue: 0.5, reversed: true, sameUnit: false };
    expect(sideOf(chance, { ...aHigher, relation: 'lower' }, 'a')).toBe(1);
    expect(orientedEstimate(chance, { ...aHigher, relation: 'lower' }, 'a')).toBeCloseTo(0.3, 12);
  });

  test('degenerate: no interval, no estimate, and a limit exactly on the margin', () => {
    expect(pull('loses support', aHigher, { ...finding, interval: null })).toBe(null);
    expect(pull('changes sign', aHigher, { ...finding, estimate: null })).toBe(null);
    expect(pull('gains support', { ...aHigher, margin: 1 })).toBeGreaterThan(0);
    expect(pull('loses support', { ...aHigher, margin: 1 })).toBe(0);
  });
});
