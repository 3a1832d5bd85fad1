import { describe, expect, it } from 'vitest';
import {
  type BootstrapStatistic,
  leaveOneOut,
  prepare,
  reader,
  studentizedReader,
  valueSorted,
} from '../../src/numerics/bootstrap-statistic.ts';
import { modifiedOneStepM, oneStepM } from '../../src/numerics/m-estimator.ts';
import { mean } from '../../src/numerics/moments.ts';
import { oneSampleT } from '../../src/numerics/one-sample-t.ts';
import { median, sorted } from '../../src/numerics/order.ts';
import { drawCounts } from '../../src/numerics/resample.ts';
import { startState } from '../../src/numerics/rng.ts';
import { medianStandardError } from '../../src/numerics/se-median.ts';
import { trimmedMean, trimmedMeanErrors, trimmedMeanTest } from '../../src/numerics/trimmed-mean.ts';
import { winsorizedMean, winsorizedMeanTest } from '../../src/numerics/winsorized.ts';
import { close, darwin, scores, uneven } from './samples.ts';

const own: Record<BootstrapStatistic, (x: Float64Array) => number> = {
  mean,
  'trimmed-mean': (x) => trimmedMean(x, 20),
  'winsorized-mean': (x) => winsorizedMean(x, 20),
  median,
  'one-step-m': (x) => oneStepM(x).estimate ?? median(x),
  mom: (x) => modifiedOneStepM(x).estimate ?? median(x),
};
const names = Object.keys(own) as BootstrapStatistic[];

function drawn(n: number, seed: number): Int32Array {
  const state = new Int32Array(4);
  startState(state, 0, 0, seed);
  const counts = new Int32Array(n);
  drawCounts(counts, n, state);
  return counts;
}

function expanded(s: Float64Array, counts: Int32Array): Float64Array {
  return Float64Array.from([...counts].flatMap((times, i) => Array(times).fill(s[i]) as number[]));
}

describe('statistics of resamples', () => {
  it('by hand: preparing sorts and centres at the median', () => {
    const group = prepare(scores(5, 1, 9, 3, 7), 20);
    expect(group).toMatchObject({ n: 5, center: 5, g: 1, trim: 20 });
    expect([...group.s]).toEqual([-4, -2, 0, 2, 4]);
  });
  it('agrees with each statistic itself, on the sample and on resamples (rtol 1e-12)', () => {
    const group = prepare(uneven(31), 20);
    const s = sorted(uneven(31));
    for (const name of names) {
      expect(close(valueSorted(name, s, 20), own[name](s), 1e-12)).toBe(true);
      for (let seed = 0; seed < 20; seed++) {
        const counts = drawn(31, seed);
        const plain = own[name](expanded(s, counts));
        expect(close(reader(name, group)(counts) + group.center, plain, 1e-12)).toBe(true);
        expect(counts.every((c) => c === 0)).toBe(true);
      }
    }
  });
  it('agrees with the tests: squared standard errors on resamples (rtol 1e-10)', () => {
    const x = uneven(25);
    const group = prepare(x, 20);
    const s = sorted(x);
    const errors = {
      mean: (y: Float64Array) => oneSampleT(y).se as number,
      'trimmed-mean': (y: Float64Array) => trimmedMeanTest(y).se as number,
      'winsorized-mean': (y: Float64Array) => winsorizedMeanTest(y).se as number,
      median: (y: Float64Array) => medianStandardError(y).se,
    };
    const out = { value: 0, squaredError: 0 };
    for (const [name, se] of Object.entries(errors)) {
      const read = studentizedReader(name as BootstrapStatistic, group, 'one-sample');
      for (let seed = 0; seed < 10; seed++) {
        const counts = drawn(25, seed);
        const plain = expanded(s, counts);
        read?.(counts, out);
        expect(close(Math.sqrt(out.squaredError), se(plain), 1e-10)).toBe(true);
      }
    }
    const counts = drawn(25, 3);
    const plain = expanded(s, counts);
    studentizedReader('trimmed-mean', group, 'yuen')?.(counts, out);
    expect(close(Math.sqrt(out.squaredError), trimmedMeanErrors(plain, 20).yuen as number, 1e-10)).toBe(true);
  });
  it('agrees with removing each score in turn (rtol 1e-10)', () => {
    for (const x of [darwin, uneven(10), uneven(11), scores(1, 5), scores(2, 3, 9)]) {
      const s = sorted(x);
      const group = prepare(x, 20);
      for (const name of names) {
        leaveOneOut(name, group).forEach((value, i) => {
          const rest = s.filter((_, j) => j !== i);
          expect(close(value + group.center, own[name](rest), 1e-10)).toBe(true);
        });
      }
    }
  });
  it('theory: the jackknife of the mean is (sum - x) / (n - 1)', () => {
    const values = leaveOneOut('mean', prepare(scores(0, 3, 6), 0));
    expect([...values]).toEqual([1.5, 0, -1.5]);
  });
  it('degenerate: identical scores give exactly no squared error; M-estimates have none', () => {
    const group = prepare(scores(0.1, 0.1, 0.1, 0.7, 0.9), 20);
    const out = { value: 0, squaredError: 1 };
    studentizedReader('mean', group, 'one-sample')?.(Int32Array.from([0, 0, 0, 5, 0]), out);
    expect(out.squaredError).toBe(0);
    expect(studentizedReader('mom', group, 'yuen')).toBe(null);
    expect(studentizedReader('one-step-m', group, 'yuen')).toBe(null);
    expect(valueSorted('mom', scores(2, 2, 2, 8), 20)).toBe(2);
  });
  it('refuses odd trims', () => {
    expect(() => prepare(darwin, 50)).toThrow('*trim* must be');
  });
});
