import { describe, expect, it } from 'vitest';
import { drawnOrder, pictureOf } from '../../cells/sensitivity/chart.ts';
import { ribbonRows, sayRibbon } from '../../cells/sensitivity/ribbon-chart.ts';
import { sayAnalysis, sayCounts } from '../../cells/sensitivity/words.ts';
import { runGrid } from '../../src/analysis/grid.ts';
import { defaultChoice, gridAxes } from '../../src/analysis/grid-options.ts';
import { gridRibbons } from '../../src/analysis/grid-ribbons.ts';
import { claimLower, resultOf, trialColumns } from '../support/joint.ts';

const result = resultOf(trialColumns(12, 6));
const { sweep } = runGrid(result, claimLower, defaultChoice(result));
const axes = gridAxes(result);

describe('the picture of the grid', () => {
  it('theory: estimates rise from left to right, each analysis once; the matrix stands under its own column', () => {
    const order = drawnOrder(sweep);
    const estimates = order.map((place) => sweep.specifications[place]?.finding.estimate ?? 0);
    expect(estimates).toEqual([...estimates].sort((a, b) => a - b));
    expect(order).toHaveLength(sweep.specifications.length);
    const { data } = pictureOf(sweep, axes, 900);
    const cells = data.cells as { x: number; y: number }[];
    for (const [x, place] of order.entries()) {
      // Choices with one option are not drawn: here scope and score.
      const { cutoff, measure, trim, row } = sweep.specifications[place]!.options;
      expect(cells.filter((cell) => cell.x === x)).toHaveLength(
        cutoff.length + measure.length + trim.length + row.length,
      );
    }
  });

  it('by hand: the worksheet\u2019s own analysis and those without a cutoff have shapes of their own', () => {
    const { data, order } = pictureOf(sweep, axes, 900);
    const marks = (data.lines as { mark: string }[]).map((line) => line.mark);
    expect(marks.filter((mark) => mark === 'own')).toHaveLength(1);
    expect(marks[order.indexOf(sweep.planned)]).toBe('own');
    const everyone = sweep.specifications.filter((each) => each.everyoneIn && !each.planned).length;
    expect(marks.filter((mark) => mark === 'everyone')).toHaveLength(everyone);
  });

  it('by hand: zero is on the scale, larger estimates stand higher, words fit a narrow page', () => {
    const { data, left } = pictureOf(sweep, axes, 390);
    const ticks = data.ticks as { y: number; label: string; zero: boolean }[];
    expect(ticks.filter((tick) => tick.zero).map((tick) => tick.label)).toEqual(['0']);
    const lines = data.lines as { x: number; y: number; low: number; high: number }[];
    expect(lines.every((line) => line.high <= line.y && line.y <= line.low)).toBe(true);
    expect(lines.at(-1)!.y).toBeLessThan(lines[0]!.y);
    expect(left).toBeLessThan(390 / 3);
    expect((data.words as { label: string; head: boolean }[]).every((word) => word.label.length <= 15)).toBe(true);
  });

  it('by hand: an analysis reads as a sentence', () => {
    const planned = sweep.specifications[sweep.planned]!;
    expect(sayAnalysis(planned, result)).toMatch(
      /^With nobody set aside for being extreme, 20 % trimmed mean of differences: voice minus tone is \u2212?\d+.* ms \[.*\], p .*: it (supports|leaves|contradicts) .*\. These are the worksheet\u2019s own settings\./,
    );
    const other = sweep.specifications.find((each) => !each.everyoneIn)!;
    expect(sayAnalysis(other, result)).toMatch(/^With scores set aside beyond \d.* within participant, /);
    expect(sayCounts(sweep)).toMatch(
      new RegExp(`^supported in ${sweep.supported} of ${sweep.specifications.length} analyses`),
    );
  });
});

describe('the ribbons', () => {
  it('by hand: the worksheet\u2019s own place is marked, no cutoff stands apart', () => {
    const [trim, cutoff] = gridRibbons(result, claimLower);
    const along = ribbonRows(trim!);
    expect(along.points.map((point) => [point.x, point.now])).toEqual([[20, true]]);
    const rows = ribbonRows(cutoff!);
    expect(rows.band.every((point) => point.at !== null)).toBe(true);
    expect(rows.points.map((point) => [point.x, point.none, point.now])).toEqual([[4.5, true, true]]);
    expect(sayRibbon(trim!, 'ms')).toMatch(
      /^Along the trim from 0 to 25 % at each end \(trimmed mean of differences\): estimates from .* to .* ms, p .* at the least/,
    );
  });
});
