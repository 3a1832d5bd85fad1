import { describe, expect, it } from 'vitest';
import { bands, stripBox, stripSvg, tickLabels, xAt } from '../../src/app/points-geometry.ts';
import { type PointStrip, pointScale } from '../../src/app/points-scale.ts';

function strip(change: Partial<PointStrip> = {}): PointStrip {
  return {
    x: Float64Array.of(50, 100, 2000),
    row: Int32Array.of(0, 1, 1),
    mark: Uint8Array.of(1, 0, 0),
    rows: 2,
    log: true,
    unit: 'ms',
    axis: 'ack_ms (ms) \u00b7 one row per officer \u00b7 conditions not shown',
    limits: { from: Float64Array.of(80), to: null },
    ...change,
  };
}

describe('the axis of a strip of scores', () => {
  it('by hand: a log axis has ticks at 1, 2 and 5 of each power of ten', () => {
    expect(pointScale(strip()).ticks).toEqual([50, 100, 200, 500, 1000, 2000]);
  });

  it('by hand: a plain axis has ticks at round numbers', () => {
    const scale = pointScale(strip({ log: false, x: Float64Array.of(0, 10), limits: { from: null, to: null } }));
    expect(scale.ticks).toEqual([0, 2, 4, 6, 8, 10]);
  });

  it('invariance: every score and the limit lie inside, in order', () => {
    const made = strip();
    const scale = pointScale(made);
    const box = stripBox(made, 600);
    const xs = [50, 80, 100, 2000].map((value) => xAt(value, scale, box));
    expect([...xs].sort((a, b) => a - b)).toEqual(xs);
    expect(Math.min(...xs)).toBeGreaterThan(box.left);
    expect(Math.max(...xs)).toBeLessThan(box.right);
  });

  it('degenerate: one score, no score, and a log axis with a score of zero', () => {
    const none = { limits: { from: null, to: null } };
    expect(pointScale(strip({ x: Float64Array.of(7), ...none })).low).toBeLessThan(7);
    expect(pointScale(strip({ x: Float64Array.of(), ...none })).ticks.length).toBeGreaterThan(0);
    const zero = strip({ x: Float64Array.of(0, 10), ...none });
    expect(xAt(0, pointScale(zero), stripBox(zero, 600))).toBe(10);
  });

  it('by hand: tick labels keep clear of each other', () => {
    const made = strip();
    const labels = tickLabels(pointScale(made), stripBox(made, 180));
    expect(labels.length).toBeLessThan(6);
    for (let i = 1; i < labels.length; i++) {
      expect(labels[i]!.x - labels[i - 1]!.x).toBeGreaterThan(20);
    }
  });

  it('by hand: the words below break between their parts where the strip is narrow', () => {
    expect(stripBox(strip(), 600).words).toHaveLength(1);
    expect(stripBox(strip(), 200).words).toEqual(['ack_ms (ms)', 'one row per officer', 'conditions not shown']);
  });
});

describe('what is kept', () => {
  it('by hand: one band for one limit, open to the right', () => {
    const made = strip();
    const scale = pointScale(made);
    const box = stripBox(made, 600);
    const [band, ...others] = bands(made, scale, box);
    expect(others).toEqual([]);
    expect(band).toMatchObject({ x: xAt(80, scale, box), y: box.top, from: true, to: false });
    expect(band!.x + band!.width).toBe(box.right);
  });

  it('by hand: a band a row where each has its limits; none where a row has none', () => {
    const limits = { from: Float64Array.of(60, Number.NaN), to: Float64Array.of(90, Number.NaN) };
    const made = strip({ limits });
    const rows = bands(made, pointScale(made), stripBox(made, 600));
    expect(rows).toHaveLength(1);
    expect(rows[0]).toMatchObject({ from: true, to: true });
  });

  it('by hand: the picture to keep has a circle for every score, and no markup from its words', () => {
    const made = strip({ axis: '<script>' });
    const colours = { ink: '#000', soft: '#555', aside: '#808', band: '#eee', axis: '#999', font: 'sans-serif' };
    const svg = stripSvg(made, pointScale(made), stripBox(made, 600), colours);
    expect(svg.match(/<circle/g)).toHaveLength(3);
    expect(svg).not.toContain('<script>');
  });
});
