import { describe, expect, it } from 'vitest';
import type { PairProcedure } from '../../src/analysis/asked.ts';
import { takeLayout } from '../../src/analysis/layout.ts';
import { comparePairs } from '../../src/analysis/pairs.ts';
import { adjustP } from '../../src/numerics/multiplicity.ts';
import { pairedT } from '../../src/numerics/one-sample-t.ts';
import { expectedOf } from '../support/cases.ts';
import { scoresOf } from '../support/designs.ts';
import { everyLevel } from '../support/omnibus.ts';

const plants = takeLayout(scoresOf('plant_growth', { between: ['group'], outcome: 'weight' }), everyLevel('group'));
const visits = takeLayout(
  scoresOf('epilepsy_visits', { participant: 'id', within: ['visit'], outcome: 'seizures' }),
  everyLevel('visit'),
);
const context = { alpha: 0.05, trim: 0 };

function pairsOf(procedure: PairProcedure, layout = plants, trim = 0) {
  const found = comparePairs(layout, procedure, { ...context, trim });
  if (found === null) throw new Error('no pairs');
  return found;
}

describe('comparePairs', () => {
  it('agrees with the reference cases tukey_hsd and games_howell of plant_growth: p 7 digits, limits 5', () => {
    for (const [procedure, method] of [
      ['tukey', 'tukey_hsd'],
      ['games-howell', 'games_howell'],
    ] as const) {
      const own = expectedOf('plant_growth', method) as unknown as Record<string, number[]>;
      pairsOf(procedure).rows.forEach((row, i) => {
        expect(row.estimate).toBeCloseTo(own.difference?.[i] as number, 10);
        expect(row.p).toBeCloseTo(own.p?.[i] as number, 7);
        expect(row.interval?.[0]).toBeCloseTo(own.lower?.[i] as number, 5);
        expect(row.interval?.[1]).toBeCloseTo(own.upper?.[i] as number, 5);
      });
    }
  });

  it('agrees with the reference cases dunn_test (Holm) and pairwise_welch of plant_growth, 10 digits', () => {
    const dunn = expectedOf('plant_growth', 'dunn_test', { adjust: 'holm' }) as unknown as Record<string, number[]>;
    const ranks = pairsOf('dunn');
    expect(ranks.sameUnit).toBe(false);
    ranks.rows.forEach((row, i) => {
      expect(row.statistic?.value).toBeCloseTo(dunn.z?.[i] as number, 10);
      expect(row.p).toBeCloseTo(dunn.p_adjusted?.[i] as number, 10);
      expect((row.estimate as number) / (row.se as number)).toBeCloseTo(dunn.z?.[i] as number, 10);
    });
    const welch = expectedOf('plant_growth', 'pairwise_welch', { adjust: 'hochberg' }) as unknown as Record<
      string,
      number[]
    >;
    pairsOf('hochberg').rows.forEach((row, i) => {
      expect(row.p).toBeCloseTo(welch.p_adjusted?.[i] as number, 10);
    });
  });

  it('by hand: within participants paired t of every pair, adjusted by Holm', () => {
    const { rows } = pairsOf('holm', visits);
    const columns = visits.groups[0]?.scores ?? [];
    const own = [
      [0, 1],
      [0, 2],
      [0, 3],
      [1, 2],
      [1, 3],
      [2, 3],
    ].map(([a, b]) =>
      pairedT(columns[a as number] as Float64Array, columns[b as number] as Float64Array, { level: 1 - 0.05 / 6 }),
    );
    const adjusted = adjustP(
      own.map((test) => test.p as number),
      'holm',
    );
    expect(rows.map((row) => [row.first, row.second])[5]).toEqual(['v3', 'v4']);
    rows.forEach((row, i) => {
      expect(row.p).toBeCloseTo(adjusted[i] as number, 12);
      expect(row.interval).toEqual(own[i]?.interval);
    });
  });

  it('invariance: turning the order of the levels turns estimates and limits, and keeps p', () => {
    const turned = {
      ...plants,
      between: plants.between.map((each) => ({ ...each, levels: [...each.levels].reverse() })),
      groups: [...plants.groups].reverse().map((group, i) => ({ ...group, levels: [i] })),
    };
    const [first] = pairsOf('games-howell').rows;
    const last = pairsOf('games-howell', turned).rows.find((row) => row.first === 'trt1' && row.second === 'ctrl');
    expect(last?.estimate).toBeCloseTo(-(first?.estimate as number), 10);
    expect(last?.interval?.[0]).toBeCloseTo(-(first?.interval?.[1] as number), 8);
    expect(last?.p).toBeCloseTo(first?.p as number, 8);
  });

  it('theory: trimmed pairs trim, and say so', () => {
    const found = pairsOf('holm', plants, 20);
    expect(found.label).toBe('Holm, 20 % trimmed means');
    expect(found.method).toMatch(/Yuen 1974/);
  });

  it('degenerate: pairs that do not vary have no p and leave the adjustment to the others; without pairs none', () => {
    const columns = visits.groups[0]?.scores ?? [];
    const same = {
      ...visits,
      groups: [{ levels: [], scores: [columns[0], columns[0], columns[2], columns[3]] as Float64Array[] }],
    };
    const [first, second] = pairsOf('holm', same).rows;
    expect([first?.p, first?.interval]).toEqual([null, null]);
    expect(second?.p).toBeGreaterThan(0);
    expect(comparePairs(plants, 'none', context)).toBeNull();
  });

  it('refuses p where fewer than four scores are left', () => {
    const few = {
      ...plants,
      groups: plants.groups.map((group) => ({ ...group, scores: group.scores.map((scores) => scores.slice(0, 3)) })),
    };
    const found = pairsOf('tukey', few);
    expect(found.reason).toMatch(/fewer than 4/);
    expect(found.rows.every((row) => row.p === null && row.interval === null)).toBe(true);
  });
});
