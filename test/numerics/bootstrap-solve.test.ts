import { describe, expect, it } from 'vitest';
import {
  type BootstrapProblem,
  influencesOf,
  rounding,
  settle,
  shifted,
  solve,
} from '../../src/numerics/bootstrap-solve.ts';
import { scores } from './samples.ts';

const settled = settle({ seed: 1, B: 99 });

function problem(part: Partial<BootstrapProblem>): BootstrapProblem {
  return {
    sizes: [4],
    estimate: 0,
    nullValue: 0,
    grain: 0,
    read: ([counts]) => {
      const value = (counts as Int32Array)[0] as number;
      counts?.fill(0);
      return value;
    },
    studentized: null,
    influences: () => scores(0, 1, -1, 0),
    ...part,
  };
}

describe('solving a bootstrap problem', () => {
  it('by hand: defaults, influences, shift', () => {
    expect(settle({ seed: 1 })).toEqual({ B: 2000, method: 'percentile', level: 0.95, alternative: 'two-sided' });
    expect([...influencesOf(scores(1, 2, 6), -2)]).toEqual([-4, -2, 6]);
    const result = { estimate: 1, se: 2, p: 0.1, interval: [null, 3] as const, B: 9, method: 'bca' as const };
    expect(shifted(result, 10)).toEqual({ ...result, estimate: 11, interval: [null, 13] });
  });
  it('theory: the count of one score among four draws has SD sqrt(3/4) (within 4 SE, seed 1)', () => {
    const { se } = solve(problem({ estimate: 1 }), 'mean', 1, settle({ seed: 1, B: 4000 }));
    expect(Math.abs((se as number) - Math.sqrt(0.75))).toBeLessThan((4 * Math.sqrt(0.75)) / Math.sqrt(2 * 4000));
  });
  it('invariance: the same seed gives the same result, another seed another', () => {
    const run = (seed: number) => solve(problem({ estimate: 1 }), 'mean', seed, settled);
    expect(run(5)).toEqual(run(5));
    expect(run(5).se).not.toBe(run(6).se);
  });
  it('degenerate: a group of one, constant values, BCa of a median, no standard error', () => {
    expect(solve(problem({ sizes: [1, 4] }), 'mean', 1, settled).reason).toBe('a condition has only one score');
    const constant = ([counts]: readonly Int32Array[]) => {
      counts?.fill(0);
      return 3;
    };
    expect(solve(problem({ read: constant }), 'mean', 1, settled).reason).toBe('all resamples give the same value');
    expect(solve(problem({}), 'median', 1, { ...settled, method: 'bca' }).reason).toBe(
      'the BCa interval does not exist for a median',
    );
    expect(solve(problem({}), 'mom', 1, { ...settled, method: 't-symmetric' }).reason).toBe(
      'the bootstrap-t needs a standard error of the estimate',
    );
    expect(rounding(0, 0)).toBe(0);
  });
  it('refuses levels and numbers of resamples out of range', () => {
    expect(() => settle({ seed: 1, level: 95 })).toThrow('*level* must be');
    expect(() => solve(problem({}), 'mean', 1, { ...settled, B: 2.5 })).toThrow('*B* must be');
    expect(() => solve(problem({}), 'mean', -1, settled)).toThrow('*seed* must be');
  });
});
