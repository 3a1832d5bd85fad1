import { beforeAll, describe, expect, it } from 'vitest';
import {
  groupChart,
  histogramChart,
  levelChart,
  orderChart,
  pairChart,
  quantileChart,
  shareChart,
} from '../../cells/assumptions/chart.ts';
import {
  groupRows,
  histogramRows,
  levelPoints,
  orderPoints,
  pairRows,
  quantilePoints,
  sharePoints,
} from '../../cells/assumptions/points.ts';
import { type Checks, checkAssumptions } from '../../src/analysis/checks.ts';
import { layoutOf, mixedLayout, plantLayout, sleepLayout, visitLayout } from '../support/check-layouts.ts';

const options = { test: 'shapiro-wilk', departures: [], alpha: 0.05, seed: 4, runs: 20 } as const;
let pair: Checks;
let groups: Checks;
let visits: Checks;
beforeAll(async () => {
  pair = await checkAssumptions(sleepLayout, options);
  groups = await checkAssumptions(plantLayout, options);
  visits = await checkAssumptions(visitLayout, options);
}, 60_000);

describe('rows of the figures', () => {
  it('by hand: the quantile plot has every residual, the band, and marks what is outside', () => {
    const { points, band, line } = quantilePoints(pair);
    expect(points.map(({ y }) => y)).toEqual(Array.from(pair.standard ?? []));
    expect(points[0]?.x).toBeCloseTo(-(points.at(-1)?.x ?? 0), 12);
    expect(band).toHaveLength(10);
    expect(line.every(({ x, y }) => x === y)).toBe(true);
    const out = quantilePoints(visits).points.filter((point) => point.out).length;
    expect(out).toBe(visits.outside.length);
  });

  it('theory: shares are the quantile plot through the normal curve, so the same points are outside', () => {
    const shares = sharePoints(visits);
    expect(shares.points.map(({ out }) => out)).toEqual(quantilePoints(visits).points.map(({ out }) => out));
    for (const { low, high } of shares.band) expect(high).toBeGreaterThan(low);
    for (const { y } of shares.points) expect(Math.abs(y - 0.5)).toBeLessThanOrEqual(0.5);
  });

  it('theory: the histogram counts everybody once, and the curve holds as much', () => {
    for (const checks of [pair, groups, visits]) {
      const { bins, curve } = histogramRows(checks);
      const all = bins.reduce((sum, bin) => sum + bin.count, 0);
      expect(all).toBe(checks.residuals.values.length);
      const [bin] = bins;
      const width = (bin?.to ?? 0) - (bin?.from ?? 0);
      const step = (curve[1]?.x ?? 0) - (curve[0]?.x ?? 0);
      const area = curve.reduce((sum, { count }) => sum + count * step, 0);
      // Both ends lie 3 SD out or further: .997 and more of the curve (common practice).
      expect(area / (all * width)).toBeGreaterThan(0.99);
      expect(area / (all * width)).toBeLessThan(1.005);
    }
  });

  it('by hand: spreads, levels, pairs and order', async () => {
    expect(groupRows(groups).points).toHaveLength(30);
    expect(groupRows(groups).bars.map(({ group }) => group)).toEqual(plantLayout.groups);
    expect(groupRows(groups).bars[0]?.high).toBeCloseTo(groups.spreads[0]?.checks.groups[0]?.sd ?? 0, 12);
    expect(levelPoints(pair).middle[0]?.y).toBeCloseTo(-1.58, 12);
    expect(pairRows(visits).map(({ pair: name }) => name)[0]).toBe('v1 \u2212 v2');
    expect(pairRows(visits).every(({ low, sd, high }) => low < sd && sd < high)).toBe(true);
    const sample = await checkAssumptions(layoutOf([[3], [1], [4], [1], [5], [9]], { columns: [''] }), options);
    expect(orderPoints(sample).map(({ y }) => y)).toEqual([3, 1, 4, 1, 5, 9]);
  });

  it('degenerate: residuals that do not vary give empty rows', async () => {
    const flat = layoutOf([
      [2, 1],
      [3, 2],
      [4, 3],
      [6, 5],
    ]);
    const checks = await checkAssumptions(flat, options);
    expect([quantilePoints(checks).points, sharePoints(checks).points, histogramRows(checks).bins]).toEqual([
      [],
      [],
      [],
    ]);
  });
});

describe('specifications', () => {
  it('by hand: a figure is as wide as it is given, its own frame counted in', async () => {
    const mixed = await checkAssumptions(mixedLayout, options);
    const size = { width: 330, height: 240 };
    const specs = [
      quantileChart(pair, size),
      shareChart(size),
      histogramChart(pair, size),
      levelChart(pair, size),
      groupChart(groups, size),
      pairChart(mixed, ['v1 \u2212 v2'], size),
      orderChart(groups, size),
    ] as unknown as { width: number; height: number; padding: Record<string, number> }[];
    for (const { width, height, padding } of specs) {
      expect(width + (padding.left ?? 0) + (padding.right ?? 0)).toBe(330);
      expect(height + (padding.top ?? 0) + (padding.bottom ?? 0)).toBe(240);
    }
  });

  it('theory: what is outside the band differs by shape and size, not by colour alone', () => {
    const text = JSON.stringify(quantileChart(pair, { width: 330, height: 240 }));
    expect(text).toContain('"shape":"diamond"');
    expect(text).toContain('"shape":"circle"');
    expect(text).toContain('simultaneous 95 % band');
    expect(text).not.toMatch(/#[0-9a-f]{3,6}/i);
  });
});
