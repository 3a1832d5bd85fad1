import { describe, expect, it } from 'vitest';
import { ESTIMATORS } from '../../src/analysis/estimators.ts';
import { type GridRow, isPair, plainRow, setRunner } from '../../src/analysis/joint-rows.ts';
import type { Samples } from '../../src/analysis/samples.ts';
import { rng } from '../../src/numerics/rng.ts';

const draw = rng(31);
const skewed = (n: number) => Float64Array.from({ length: n }, () => 300 - 200 * Math.log(1 - draw.uniform()));

function samplesOf(scope: 'within' | 'between', x: number[], y: number[]): Samples {
  const none = { xParticipants: [], yParticipants: [], left: [] };
  return { scope, factor: 'f', first: 'a', second: 'b', x: Float64Array.from(x), y: Float64Array.from(y), ...none };
}

const rowsFor = (scope: string): GridRow[] =>
  ESTIMATORS.filter((each) => each.scope === scope && each.closedForm).flatMap(({ id, trims }) =>
    (trims ? [0, 10, 25] : [0]).map((trim) => ({ estimator: id, trim })),
  );

describe('setRunner', () => {
  it.each(['within', 'between'] as const)(
    'agrees with the estimators themselves: every closed-form row %s, 1e-9',
    (scope) => {
      const shape = { scope, first: 'a', second: 'b', factor: 'f', unit: 'ms', direction: 'lower' } as const;
      const [a, b] = [skewed(22), scope === 'within' ? skewed(22) : new Float64Array(0)];
      a[4] = Number.NaN;
      const rows = rowsFor(scope);
      expect(rows.length).toBeGreaterThan(6);
      const runner = setRunner(a, b, rows, shape);
      const [estimates, z] = [new Float64Array(rows.length), new Float64Array(rows.length)];
      for (let k = 0; k < 5; k++) {
        const labels = Uint8Array.from(a, () => draw.below(2));
        runner.run(labels, estimates, z, 0);
        const entered = [...a.keys()].filter((i) => i !== 4);
        const x = entered.flatMap((i) =>
          labels[i] === 0 ? [a[i] as number] : scope === 'within' ? [b[i] as number] : [],
        );
        const y = entered.flatMap((i) =>
          labels[i] === 1 ? [a[i] as number] : scope === 'within' ? [b[i] as number] : [],
        );
        rows.forEach((row, i) => {
          const plain = plainRow(row, samplesOf(scope, x, y), shape);
          expect(Math.abs((z[i] as number) - plain.z)).toBeLessThan(1e-9);
          // Rows on logs keep the log of their ratio.
          const own = /ratio/.test(row.estimator) ? Math.exp(estimates[i] as number) : (estimates[i] as number);
          expect(Math.abs(own - plain.estimate)).toBeLessThan(1e-9 * Math.max(1, Math.abs(plain.estimate)));
        });
      }
    },
  );

  it('degenerate: logs of scores that are not positive are given under no labels', () => {
    const shape = { scope: 'between', first: 'a', second: 'b', factor: 'f', unit: '', direction: 'lower' } as const;
    const runner = setRunner(
      Float64Array.of(1, 2, 3, 4, 0, 6, 7, 8),
      new Float64Array(0),
      [{ estimator: 'group-ratio', trim: 0 }],
      shape,
    );
    const [estimates, z] = [new Float64Array(1), Float64Array.of(5)];
    runner.run(Uint8Array.of(0, 1, 0, 1, 0, 1, 0, 1), estimates, z, 0);
    expect(estimates[0]).toBeNaN();
    expect(z[0]).toBe(0);
  });

  it('refuses a row that is not in the list', () => {
    const samples = samplesOf('within', [1, 2], [2, 3]);
    expect(() => plainRow({ estimator: 'none such', trim: 0 }, samples, { unit: '', direction: 'lower' })).toThrow(
      /must be a row of the list/,
    );
  });
});

describe('isPair', () => {
  it('by hand: a comparison without a further question is of one pair', () => {
    expect(isPair({})).toBe(true);
    expect(isPair({ effect: { type: 'value', value: 1 } })).toBe(false);
  });
});
