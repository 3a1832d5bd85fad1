import { describe, expect, it } from 'vitest';
import { takeLayout } from '../../src/analysis/layout.ts';
import { levelsOf } from '../../src/analysis/levels.ts';
import { scoresOf } from '../support/designs.ts';
import { everyLevel } from '../support/omnibus.ts';

const plants = scoresOf('plant_growth', { between: ['group'], outcome: 'weight' });
const layout = takeLayout(plants, everyLevel('group'));
const options = { trim: 20, alpha: 0.05 };

describe('levelsOf', () => {
  it('agrees with the means of plant_growth: ctrl 5.032, trt1 4.661, trt2 5.526, with n and h', () => {
    const found = levelsOf(layout, 'mean', options);
    expect(found.map((each) => each.label)).toEqual(['ctrl', 'trt1', 'trt2']);
    expect(found[0]?.estimate).toBeCloseTo(5.032, 10);
    expect(found[1]?.estimate).toBeCloseTo(4.661, 10);
    expect(found[2]?.estimate).toBeCloseTo(5.526, 10);
    expect(levelsOf(layout, 'trimmed mean', options)[0]).toMatchObject({ n: 10, h: 6 });
  });

  it('by hand: the trimmed mean of the controls is that of 4.53, 4.61, 5.14, 5.17, 5.18 and 5.33', () => {
    const [control] = levelsOf(layout, 'trimmed mean', options);
    expect(control?.estimate).toBeCloseTo(29.96 / 6, 10);
    expect(control?.interval?.[0]).toBeLessThan(29.96 / 6);
  });

  it('by hand: the median of the ten controls lies between the fifth and the sixth, its interval on scores', () => {
    const [control] = levelsOf(layout, 'median', options);
    expect(control?.estimate).toBeCloseTo(5.155, 10);
    expect(control?.interval).toEqual([4.5, 5.58]);
  });

  it('degenerate: a level without anybody has no estimate', () => {
    const none = {
      ...layout,
      groups: layout.groups.map((group, i) => (i === 0 ? { ...group, scores: [new Float64Array(0)] } : group)),
    };
    expect(levelsOf(none, 'mean', options)[0]).toEqual({ label: 'ctrl', estimate: null, interval: null, n: 0, h: 0 });
  });
});
