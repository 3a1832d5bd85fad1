import { describe, expect, it } from 'vitest';
import { superiority } from '../../src/analysis/superiority.ts';
import { toothSamples } from '../support/samples.ts';

const context = {
  trim: 0,
  alternative: 'two-sided',
  level: 0.95,
  resamples: 99,
  seed: 1,
  unit: '',
  first: 'OJ',
  second: 'VC',
} as const;

describe('superiority', () => {
  it('by hand: 1 and 4 against 2 and 3: two of four pairs either way', () => {
    const samples = { ...toothSamples, x: Float64Array.of(1, 4), y: Float64Array.of(2, 3) };
    expect(superiority(samples, { ...context, direction: 'lower' }).value).toBe(0.5);
  });

  it('invariance: lower and higher add to one, and are named', () => {
    const [low, high] = (['lower', 'higher'] as const).map((direction) =>
      superiority(toothSamples, { ...context, direction }),
    );
    expect((low?.value as number) + (high?.value as number)).toBeCloseTo(1, 12);
    expect([low?.name, high?.name]).toEqual(['P(OJ lower)', 'P(OJ higher)']);
  });

  it('degenerate: complete separation keeps the value', () => {
    const apart = { ...toothSamples, y: toothSamples.y.map((v) => v + 1000) };
    expect(superiority(apart, { ...context, direction: 'lower' }).value).toBe(1);
  });
});
