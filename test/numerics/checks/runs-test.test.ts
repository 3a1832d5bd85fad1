import { expect, test } from 'vitest';
import { runsTest } from '../../../src/numerics/checks/runs-test.ts';
import { hormone } from './stopping.ts';

test('by hand: 1, 2, 8, 9, 1, 9 around the median 5: three runs below, above; 4 runs', () => {
  const found = runsTest(Float64Array.of(1, 2, 8, 9, 1, 9));
  expect(found).toMatchObject({ runs: 4, atOrAbove: 3, below: 3, z: 0, p: 1 });
});

test('agrees with a transcription in R 4.2: 13 runs of 27 and 21 hormone values, z = -3.4472', () => {
  const found = runsTest(hormone);
  expect(found).toMatchObject({ runs: 13, atOrAbove: 27, below: 21 });
  expect(found.z).toBeCloseTo(-3.447161955276974, 12);
  expect(found.p).toBeCloseTo(0.000566508869341895, 14);
});

test('theory: the correction moves z towards 0 below 50 scores and does nothing from 50 on', () => {
  const plain = runsTest(hormone).z as number;
  expect(runsTest(hormone, { correct: true }).z).toBeGreaterThan(plain);
  const fifty = Float64Array.of(...hormone, 1, 4);
  expect(runsTest(fifty, { correct: true })).toEqual(runsTest(fifty));
});

test('invariance: reversing the order and another unit change nothing', () => {
  expect(runsTest(hormone.map((v) => 100 * v).reverse())).toEqual(runsTest(hormone));
});

test('degenerate: all on one side, or one score each, give a reason', () => {
  expect(runsTest(Float64Array.of(3, 3, 3))).toMatchObject({
    z: null,
    p: null,
    reason: expect.stringContaining('one side'),
  });
  expect(runsTest(Float64Array.of(1, 2))).toMatchObject({ z: null, reason: expect.stringContaining('too few scores') });
  expect(runsTest(Float64Array.of(1, 2, 6), { cutoff: 'mean' })).toMatchObject({ atOrAbove: 1, below: 2 });
});

test('refuses no scores and an unknown cutoff', () => {
  expect(() => runsTest(new Float64Array(0))).toThrow(/at least 1 score/);
  expect(() => runsTest(hormone, { cutoff: 'mode' as 'mean' })).toThrow(/\*cutoff\* must be/);
});
