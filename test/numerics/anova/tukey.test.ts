import { describe, expect, it } from 'vitest';
import { tukeyHsd } from '../../../src/numerics/anova/tukey.ts';
import { studentT } from '../../../src/numerics/student.ts';
import { expectAll, expectClose } from './expect-close.ts';
import { plantGrowth, threeByThree } from './published-scores.ts';

describe('tukeyHsd', () => {
  // MSw 1, n 3: se sqrt(2/3); q(.95; 3, 6) = 4.339 in printed tables (from memory): limits -1 -+ 4.339 / sqrt(3)
  it('by hand: three of three (1e-3, the digits of the table)', () => {
    const { pairs } = tukeyHsd(threeByThree);
    expectAll(pairs![0]!, { first: 0, second: 1, difference: -1, se: Math.sqrt(2 / 3) }, 1e-14);
    expectClose(pairs![0]!.lower, -1 - 4.339 / Math.sqrt(3), 1e-3);
    expectClose(pairs![0]!.upper, -1 + 4.339 / Math.sqrt(3), 1e-3);
  });

  // R 4.2.2 TukeyHSD(aov(weight ~ group, PlantGrowth))
  it('agrees with R on PlantGrowth (p 1e-7, limits 1e-6)', () => {
    const { pairs } = tukeyHsd(plantGrowth);
    [0.3908711442021072, 0.19799599129957068, 0.012006423979493142].forEach((p, i) => {
      expectClose(pairs![i]!.p, p, 1e-7);
    });
    expectClose(pairs![2]!.upper, -0.17378394859713842, 1e-6);
  });

  it("theory: with two conditions it is Student's test with its interval (1e-7)", () => {
    const [a, b] = plantGrowth as [Float64Array, Float64Array];
    const student = studentT(a, b.subarray(0, 6), { level: 0.9 });
    const pair = tukeyHsd([a, b.subarray(0, 6)], { level: 0.9 }).pairs![0]!;
    expectAll(pair, { p: student.p!, lower: student.interval![0]!, upper: student.interval![1]! }, 1e-7);
  });

  it('invariance: reversing the conditions turns every difference round (1e-11)', () => {
    const base = tukeyHsd(plantGrowth).pairs!;
    const turned = tukeyHsd([...plantGrowth].reverse()).pairs!;
    expectAll(turned[0]!, { difference: -base[2]!.difference, lower: -base[2]!.upper, p: base[2]!.p }, 1e-11);
  });

  it('degenerate: no spread within conditions', () => {
    const flat = tukeyHsd([Float64Array.of(1, 1), Float64Array.of(2, 2)]);
    expect(flat).toEqual({ pairs: null, reason: 'scores do not vary within conditions' });
  });

  it('refuses a level outside 0 to 1', () => {
    expect(() => tukeyHsd(plantGrowth, { level: 95 })).toThrow('*level* must be between 0 and 1; got 95');
  });
});
