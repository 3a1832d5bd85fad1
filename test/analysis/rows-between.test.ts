import { describe, expect, it } from 'vitest';
import { compareSamples } from '../../src/analysis/compare.ts';
import { args, row, toothSamples } from '../support/samples.ts';

describe('rows between participants', () => {
  const findings = compareSamples(args(toothSamples, { estimator: 'yuen-welch' }));

  it('agrees with methods 3.1, ToothGrowth OJ against VC: Student p .060393, Welch t(55.309) = 1.91527, p .060635', () => {
    expect(row(findings, 'student').p).toBeCloseTo(0.060393, 6);
    expect(row(findings, 'welch').df).toBeCloseTo(55.309, 3);
    expect(row(findings, 'welch').statistic?.value).toBeCloseTo(1.91527, 5);
    expect(row(findings, 'welch').p).toBeCloseTo(0.060635, 6);
  });

  it('agrees with methods 3.1, ToothGrowth: Yuen 20 % t(33.491) = 2.28734, p .028621', () => {
    const found = row(findings, 'yuen-welch');
    expect(found.df).toBeCloseTo(33.491, 3);
    expect(found.statistic?.value).toBeCloseTo(2.28734, 5);
    expect(found.p).toBeCloseTo(0.028621, 6);
  });

  it('degenerate: an empty group, one score each, all equal: rows with reasons, no NaN, no exception', () => {
    const shapes: [number[], number[]][] = [
      [[], [1, 2]],
      [[1], [2]],
      [
        [3, 3, 3, 3, 3],
        [3, 3, 3, 3, 3],
      ],
      [
        [1e149, -1e149, 1e148, 5, 6],
        [1e149, 2, 3, 4, 1e-320],
      ],
    ];
    for (const [x, y] of shapes) {
      for (const scope of ['between', 'within'] as const) {
        if (scope === 'within' && x.length !== y.length) continue;
        const made = compareSamples(args({ ...toothSamples, scope, x: Float64Array.from(x), y: Float64Array.from(y) }));
        expect(
          JSON.stringify(made, (_, value) =>
            typeof value === 'number' && !Number.isFinite(value) ? 'NOT A NUMBER' : value,
          ),
        ).not.toContain('NOT A NUMBER');
        for (const found of made) if (found.p === null) expect(found.reason, found.label).toMatch(/\w/);
      }
    }
  });

  it('refuses a p where fewer than four scores are left (methods R22)', () => {
    const few = compareSamples(args({ ...toothSamples, x: Float64Array.of(1, 2, 3), y: Float64Array.of(2, 4, 7) }));
    expect(row(few, 'welch').p).toBeNull();
    expect(row(few, 'welch').estimate).toBeCloseTo(2 - 13 / 3, 12);
    expect(row(few, 'welch').cautions).toContain('R22');
  });
});
