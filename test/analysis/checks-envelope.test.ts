import { describe, expect, it } from 'vitest';
import { type Envelope, normalEnvelope, placesOutside, standardise } from '../../src/analysis/checks-envelope.ts';
import type { ResidualShape } from '../../src/analysis/checks-residuals.ts';
import { fillExponential, fillNormal } from '../../src/numerics/draws.ts';
import { rng } from '../../src/numerics/rng.ts';

const shapeOf = (sizes: readonly number[], columns = 1): ResidualShape => ({
  group: Int32Array.from(sizes.flatMap((n, code) => new Array<number>(n).fill(code))),
  groups: sizes.length,
  columns,
});

/** Share of fresh samples that leave the band anywhere. */
function leaving(band: Envelope, shape: ResidualShape, fill: typeof fillNormal, runs: number): number {
  const sample = new Float64Array(shape.group.length * shape.columns);
  let out = 0;
  for (let run = 0; run < runs; run++) {
    fill(sample, rng(99, 7).fork(run));
    if (placesOutside(standardise(sample, shape), band).length > 0) out++;
  }
  return out / runs;
}

describe('normalEnvelope', () => {
  it.each([
    ['one sample of 12', shapeOf([12])],
    ['one sample of 36', shapeOf([36])],
    ['groups of 10 and 30', shapeOf([10, 30])],
    ['8 participants under 4 levels', shapeOf([8], 4)],
  ])('theory: %s: 5 %% of fresh normal samples leave the whole band, within 3.5 SE', async (_, shape) => {
    const band = (await normalEnvelope(shape, { seed: 3 })) as Envelope;
    const runs = 3000;
    const share = leaving(band, shape, fillNormal, runs);
    const se = Math.sqrt(0.05 * 0.95 * (1 / runs + 1 / band.simulations));
    expect(Math.abs(share - 0.05)).toBeLessThan(3.5 * se);
  });

  it('theory: at the middle place it is at least 1.2 times as wide as a band for that place alone', async () => {
    const shape = shapeOf([36]);
    const band = (await normalEnvelope(shape, { seed: 3 })) as Envelope;
    const runs = 400;
    const sample = new Float64Array(36);
    const middle = Array.from({ length: runs }, (_, run) => {
      fillNormal(sample, rng(5, 8).fork(run));
      return standardise(sample, shape)[18] as number;
    }).sort((a, b) => a - b);
    const alone = (middle[Math.floor(0.975 * runs)] as number) - (middle[Math.floor(0.025 * runs)] as number);
    expect((band.high[18] as number) - (band.low[18] as number)).toBeGreaterThan(1.2 * alone);
  });

  it('theory: exponential samples leave it much more often', async () => {
    const shape = shapeOf([36]);
    const band = (await normalEnvelope(shape, { seed: 3 })) as Envelope;
    expect(leaving(band, shape, fillExponential, 300)).toBeGreaterThan(0.8);
  });

  it('invariance: the same seed gives the same band, turned about it is its own mirror image', async () => {
    const [a, b] = await Promise.all([1, 2].map(() => normalEnvelope(shapeOf([15]), { seed: 11 })));
    expect(a).toEqual(b);
    const { low, high, places } = a as Envelope;
    for (let at = 0; at < places.length; at++)
      expect(high[at]).toBeCloseTo(-(low[places.length - 1 - at] as number), 12);
  });

  it('by hand: many residuals are looked at in 300 places, both ends among them', async () => {
    const band = (await normalEnvelope(shapeOf([601]), { seed: 1 })) as Envelope;
    expect(band.places.length).toBe(300);
    expect([band.places[0], band.places[299], band.places[1]]).toEqual([0, 600, 2]);
    expect(new Set(band.places).size).toBe(300);
  });

  it('degenerate: fewer than 4 degrees of freedom have no band', async () => {
    expect(await normalEnvelope(shapeOf([4]), { seed: 1 })).toBeNull();
    expect(await normalEnvelope(shapeOf([3, 3]), { seed: 1 })).not.toBeNull();
  });

  it('by hand: it can be stopped on the way', async () => {
    const stop = new Error('stop');
    const step = (share: number) => (share > 0.1 ? Promise.reject(stop) : Promise.resolve());
    await expect(normalEnvelope(shapeOf([20]), { seed: 1, step })).rejects.toBe(stop);
  });
});

describe('standardise and placesOutside', () => {
  it('by hand: residuals in SDs, ascending', () => {
    const z = standardise(Float64Array.of(1, 5, 3), shapeOf([3]));
    expect(Array.from(z)).toEqual([-1, 0, 1]);
  });

  it('by hand: a place beyond a limit is outside, one on it is not', () => {
    const band: Envelope = {
      places: Int32Array.of(0, 2),
      expected: Float64Array.of(-1, 1),
      low: Float64Array.of(-1, 0),
      high: Float64Array.of(0, 1),
      level: 0.95,
      simulations: 1,
    };
    expect(placesOutside(Float64Array.of(-1, 0, 1.01), band)).toEqual([2]);
  });
});
