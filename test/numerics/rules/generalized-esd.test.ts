import { expect, test } from 'vitest';
import { generalizedEsd } from '../../../src/numerics/rules/generalized-esd.ts';
import { grubbsTest } from '../../../src/numerics/rules/grubbs.ts';

// Data of Rosner 1983, as printed in the NIST/SEMATECH e-Handbook 1.3.5.17.3.
const rosner = Float64Array.of(
  -0.25,
  0.68,
  0.94,
  1.15,
  1.2,
  1.26,
  1.26,
  1.34,
  1.38,
  1.43,
  1.49,
  1.49,
  1.55,
  1.56,
  1.58,
  1.65,
  1.69,
  1.7,
  1.76,
  1.77,
  1.81,
  1.91,
  1.94,
  1.96,
  1.99,
  2.06,
  2.09,
  2.1,
  2.14,
  2.15,
  2.23,
  2.24,
  2.26,
  2.35,
  2.37,
  2.4,
  2.47,
  2.54,
  2.62,
  2.64,
  2.9,
  2.92,
  2.92,
  2.93,
  3.21,
  3.26,
  3.3,
  3.59,
  3.68,
  4.3,
  4.64,
  5.34,
  5.42,
  6.01,
);

test('agrees with the NIST/SEMATECH e-Handbook: ten statistics and critical values, three extreme scores', () => {
  const found = generalizedEsd(rosner, { most: 10 });
  const r = [3.118, 2.942, 3.179, 2.81, 2.815, 2.848, 2.279, 2.31, 2.101, 2.067];
  const critical = [3.158, 3.151, 3.143, 3.136, 3.128, 3.12, 3.111, 3.103, 3.094, 3.085];
  r.forEach((value, i) => {
    expect(found.r?.[i]).toBeCloseTo(value, 2);
  });
  critical.forEach((value, i) => {
    expect(found.critical?.[i]).toBeCloseTo(value, 2);
  });
  expect(found.count).toBe(3);
  expect([...found.indices].map((i) => rosner[i])).toEqual([6.01, 5.42, 5.34]);
});

test('by hand: in 0, 0, 0, 4 one statistic exists, then the rest is equal', () => {
  const found = generalizedEsd(Float64Array.of(0, 0, 0, 4), { most: 2 });
  expect(found.r?.length).toBe(1);
  expect(found.r?.[0]).toBeCloseTo(1.5, 15);
});

test('theory: with one score looked for it is the two-sided test of the most extreme score', () => {
  const one = generalizedEsd(rosner, { most: 1 });
  const grubbs = grubbsTest(rosner);
  expect(one.r?.[0]).toBeCloseTo(grubbs.g as number, 13);
  expect(one.critical?.[0]).toBeCloseTo(grubbs.critical as number, 12);
});

test('invariance: another unit changes nothing', () => {
  const found = generalizedEsd(
    rosner.map((score) => 100 - 7 * score),
    { most: 10 },
  );
  expect([...found.flags]).toEqual([...generalizedEsd(rosner, { most: 10 }).flags]);
});

test('degenerate: few or equal scores give a reason', () => {
  expect(generalizedEsd(Float64Array.of(1, 2), { most: 1 }).reason).toBe('fewer than 3 scores');
  expect(generalizedEsd(Float64Array.of(2, 2, 2), { most: 1 })).toMatchObject({
    r: null,
    reason: 'all scores are equal',
  });
});

test('refuses more scores than n - 2, none, and a wrong alpha', () => {
  expect(() => generalizedEsd(Float64Array.of(1, 2, 3, 4), { most: 3 })).toThrow(/\*most\* must be at most n - 2 = 2/);
  expect(() => generalizedEsd(rosner, { most: 0 })).toThrow(/\*most\* must be a whole number/);
  expect(() => generalizedEsd(rosner, { most: 2, alpha: 1 })).toThrow(/\*alpha\* must be/);
});
