import { describe, expect, it } from 'vitest';
import { fillContaminated, fillExponential, fillLognormal, fillNormal } from '../../src/numerics/draws.ts';
import { rng } from '../../src/numerics/rng.ts';

const n = 40_000;

function moments(x: Float64Array): { mean: number; variance: number } {
  const mean = x.reduce((all, v) => all + v, 0) / x.length;
  return { mean, variance: x.reduce((all, v) => all + (v - mean) ** 2, 0) / x.length };
}

describe('draws for simulations', () => {
  it('theory: normal mean, variance, share beyond 1.96 (within 4 SE, seed 1)', () => {
    const x = new Float64Array(n);
    fillNormal(x, rng(1));
    const { mean, variance } = moments(x);
    expect(Math.abs(mean)).toBeLessThan(4 / Math.sqrt(n));
    expect(Math.abs(variance - 1)).toBeLessThan(4 * Math.sqrt(2 / n));
    const beyond = x.filter((v) => Math.abs(v) > 1.959963984540054).length / n;
    expect(Math.abs(beyond - 0.05)).toBeLessThan(4 * Math.sqrt((0.05 * 0.95) / n));
  });
  it('theory: exponential and contaminated moments (within 4 SE, seeds 2 and 3)', () => {
    const x = new Float64Array(n);
    fillExponential(x, rng(2));
    const own = moments(x);
    expect(Math.abs(own.mean - 1)).toBeLessThan(4 / Math.sqrt(n));
    expect(Math.abs(own.variance - 1)).toBeLessThan(4 * Math.sqrt(8 / n));
    fillContaminated(x, rng(3));
    // Variance .9 + .1 * 100 = 10.9 (methods 5.6); fourth moment 3 (.9 + .1 * 10^4) = 3002.7
    expect(Math.abs(moments(x).variance - 10.9)).toBeLessThan(4 * Math.sqrt((3002.7 - 10.9 ** 2) / n));
  });
  it('theory: logs of lognormal draws are normal with the SD asked for (within 4 SE, seed 4)', () => {
    const x = new Float64Array(n);
    fillLognormal(x, rng(4), 0.5);
    const own = moments(x.map(Math.log));
    expect(Math.abs(own.mean)).toBeLessThan((4 * 0.5) / Math.sqrt(n));
    expect(Math.abs(own.variance - 0.25)).toBeLessThan(4 * 0.25 * Math.sqrt(2 / n));
  });
  it('invariance: the same seed gives the same digits; odd lengths take the same pairs', () => {
    const seven = new Float64Array(7);
    const eight = new Float64Array(8);
    fillNormal(seven, rng(5));
    fillNormal(eight, rng(5));
    expect(eight.subarray(0, 7)).toEqual(seven);
  });
  it('by hand: a share of 0 leaves normal draws, a share of 1 scales all', () => {
    const [plain, none, all] = [new Float64Array(4), new Float64Array(4), new Float64Array(4)];
    fillNormal(plain, rng(6));
    fillContaminated(none, rng(6), 0, 3);
    fillContaminated(all, rng(6), 1, 4);
    expect([none, all]).toEqual([plain, plain.map((v) => 4 * v)]);
  });
  it('degenerate: nothing to fill', () => {
    const none = new Float64Array(0);
    fillNormal(none, rng(1));
    expect(none).toHaveLength(0);
  });
  it('refuses odd settings', () => {
    const x = new Float64Array(2);
    expect(() => fillLognormal(x, rng(1), 0)).toThrow('*sigma* must be');
    expect(() => fillContaminated(x, rng(1), 1.1)).toThrow('*share* must be');
    expect(() => fillContaminated(x, rng(1), 0.1, -1)).toThrow('*sd* must be');
  });
});
