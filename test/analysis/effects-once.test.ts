import { describe, expect, it } from 'vitest';
import { pairedEffects, robustEffect, robustPairedEffect, welchEffect } from '../../src/analysis/effects.ts';
import { robustGroups, robustPaired, standardizedGroups, standardizedPairs } from '../../src/analysis/effects-once.ts';
import { differences } from '../../src/numerics/scores.ts';
import { sleepSamples, toothSamples } from '../support/samples.ts';

const context = {
  trim: 20,
  alternative: 'two-sided',
  level: 0.95,
  resamples: 199,
  seed: 1,
  unit: '',
  direction: 'higher',
  first: 'a',
  second: 'b',
} as const;

describe('shared effect sizes', () => {
  it('theory: they are those of effects.ts, digit for digit, on every call', () => {
    const { x, y } = sleepSamples;
    for (let call = 0; call < 2; call++) {
      expect(robustPaired(sleepSamples, context)).toEqual([robustPairedEffect(differences(x, y), 20, context)]);
      expect(standardizedPairs(sleepSamples, context)).toEqual(pairedEffects(x, y, context));
      expect(robustGroups(toothSamples, context)).toEqual([robustEffect(toothSamples.x, toothSamples.y, 20, context)]);
      expect(standardizedGroups(toothSamples, context)).toEqual([welchEffect(toothSamples.x, toothSamples.y, context)]);
    }
  });

  it('theory: another trim, seed or level is another effect size', () => {
    const one = robustPaired(sleepSamples, context)[0];
    expect(robustPaired(sleepSamples, { ...context, trim: 10 })[0]?.value).not.toBe(one?.value);
    expect(robustPaired(sleepSamples, { ...context, seed: 2 })[0]?.interval).not.toEqual(one?.interval);
    expect(robustPaired(sleepSamples, { ...context, level: 0.8 })[0]?.interval).not.toEqual(one?.interval);
  });
});
