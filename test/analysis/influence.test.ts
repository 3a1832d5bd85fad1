import { readFileSync } from 'node:fs';
import { describe, expect, test } from 'vitest';
import type { ClaimSpec } from '../../src/analysis/claim.ts';
import type { Result } from '../../src/analysis/compare.ts';
import { findInfluence, type InfluenceSpec } from '../../src/analysis/influence.ts';
import { aHigher, atOnce, groupsOf, pairsOf } from '../support/chains.ts';
import { csv } from '../support/samples.ts';

const reference = JSON.parse(readFileSync(new URL('../reference/error_rates.json', import.meta.url), 'utf8'));
const find = (result: Result, spec: Partial<InfluenceSpec> = {}, claim: ClaimSpec = aHigher) =>
  findInfluence({ result, claim, spec: { target: 'loses support', smallest: 0, ...spec } }, atOnce);

const darwin: number[] = reference.darwin.values;
const sleep: { group1: number[]; group2: number[] } = reference.sleep;
const plants = csv('plant_growth');
const plant = (name: string) => (plants.weight as number[]).filter((_, i) => plants.group?.[i] === name);

describe('agrees with the check values of methods 2.5, from error_rates.json', () => {
  test('agrees with Darwin: 13 of the 15 single removals lose it, the largest p .0991 without the 75', async () => {
    const found = await find(
      pairsOf(
        darwin,
        darwin.map(() => 0),
      ),
    );
    expect(found.flip).toMatchObject({
      exact: true,
      changing: reference.darwin.single_removals_that_lose_p05,
      sets: 15,
    });
    expect(found.changed).toBe(13);
    expect(found.removal?.participants).toEqual([`p${darwin.indexOf(75) + 1}`]);
    expect(found.removal?.finding.p).toBeCloseTo(0.0991, 4);
    const extreme = found.single.find((each) => each.participant === `p${darwin.indexOf(-67) + 1}`);
    expect(extreme?.p).toBeCloseTo(reference.darwin['p_without_-67'], 12);
    expect(extreme?.verdict).toBe('supported');
  });

  test('agrees with sleep: exactly 4, 26 of 210 sets, best p .0718, the extreme 4.6 never needed', async () => {
    const found = await find(pairsOf(sleep.group2, sleep.group1));
    expect(found.flip).toMatchObject({ exact: true, changing: 26, sets: 210, noneUpTo: 3 });
    expect(found.removal?.participants).toHaveLength(reference.sleep.flip_min_k);
    expect(found.removal?.finding.p).toBeCloseTo(0.0718, 4);
    const at = sleep.group2.findIndex((score, i) => Math.abs(score - (sleep.group1[i] ?? 0) - 4.6) < 1e-9);
    expect(found.removal?.participants).not.toContain(`p${at + 1}`);
    expect(found.single[at]?.p).toBeCloseTo(0.00048, 5);
  });

  test('agrees with the plants: trt2 against ctrl loses it by one of 12, trt1 gains it by two, 2 of 190', async () => {
    const lose = await find(groupsOf(plant('trt2'), plant('ctrl')));
    expect(lose.full.p).toBeCloseTo(0.0479, 4);
    expect(lose.flip).toMatchObject({ exact: true, changing: 12, sets: 20 });
    const claim: ClaimSpec = { ...aHigher, relation: 'lower' };
    const gain = await find(groupsOf(plant('trt1'), plant('ctrl')), { target: 'gains support' }, claim);
    expect(gain.full.p).toBeCloseTo(0.2504, 4);
    expect(gain.flip).toMatchObject({ exact: true, changing: 2, sets: 190, noneUpTo: 1 });
    expect(gain.removal?.finding.p).toBeCloseTo(0.0126, 4);
    const trt1 = plant('trt1');
    expect(gain.removal?.participants.map((name) => trt1[Number(name.slice(1)) - 1]).sort()).toEqual([5.87, 6.03]);
    expect(gain.removal?.composition).toEqual([{ group: 'a', count: 2 }]);
  });

  test('agrees with chickwts: exactly 6, 3 of 230,230 sets, best p .0543; the sign by exactly 11', async () => {
    const { sunflower, soybean, flip_min_k_p05, flip_subsets_of_6 } = reference.chickwts_sunflower_soybean;
    const result = groupsOf(sunflower, soybean);
    const found = await find(result);
    expect(found.flip).toMatchObject({ exact: true, changing: flip_subsets_of_6, sets: 230_230, noneUpTo: 5 });
    expect(found.removal?.participants).toHaveLength(flip_min_k_p05);
    expect(found.removal?.finding.p).toBeCloseTo(0.0543, 4);
    const scores = found.removal?.participants.map((name) => sunflower[Number(name.slice(1)) - 1]);
    expect(scores?.sort()).toEqual([322, 334, 339, 340, 341, 392]);
    const sign = await find(result, { target: 'changes sign' });
    expect(sign.flip).toMatchObject({ exact: true, changing: null, noneUpTo: 10 });
    expect(sign.removal?.participants).toHaveLength(reference.chickwts_sunflower_soybean.sign_flip_min_k);
  });
});

describe('leave-one-out', () => {
  test('by hand: change, DFBETA and range of 1, 2, 3, 10', async () => {
    const found = await find(pairsOf([1, 2, 3, 10], [0, 0, 0, 0]), { target: 'changes sign' });
    // Mean 4; without the 10 it is 2 with SE 1/sqrt 3, so the change is 2 and DFBETA 2 sqrt 3.
    expect(found.single[3]?.change).toBeCloseTo(2, 12);
    expect(found.single[3]?.dfbeta).toBeCloseTo(2 * Math.sqrt(3), 12);
    expect(found.single.map((each) => each.estimate)).toEqual([5, 14 / 3, 13 / 3, 2]);
  });

  test('theory: the cutoff moves: one participant gone brings another back', async () => {
    // Without the 60, 30 is beyond 2 SD of the rest; with it, the SD is so large that only the 60 is.
    const x = [10, 11, 12, 9, 10, 11, 30, 60];
    const rule = {
      rule: 'extreme',
      on: 'participant',
      column: 'score',
      measure: 'SD',
      cutoff: 2,
      scope: 'pooled',
      sides: 'both',
    } as const;
    const found = await find(groupsOf(x, [8, 9, 10, 9, 8, 10, 9, 8]), { target: 'falls below', smallest: 3.5 });
    const ruled = await find(groupsOf(x, [8, 9, 10, 9, 8, 10, 9, 8], {}, [rule]), {
      target: 'falls below',
      smallest: 3.5,
    });
    expect(found.setAside).toBe(0);
    expect(ruled.setAside).toBe(1);
    expect(ruled.single).toHaveLength(16);
    const without60 = ruled.single.find((each) => each.participant === 'a8');
    expect(without60?.estimate).toBeLessThan(ruled.full.estimate ?? 0);
  });

  test('invariance: the order of the rows does not matter', async () => {
    const a = await find(groupsOf(plant('trt2'), plant('ctrl')));
    const b = await find(groupsOf([...plant('trt2')].reverse(), plant('ctrl')));
    expect(b.flip.changing).toBe(a.flip.changing);
    expect(b.removal?.finding.p).toBeCloseTo(a.removal?.finding.p ?? 0, 12);
  });

  test('degenerate: documented faults are not left out again, and a trimmed row is searched alike', async () => {
    const named = { rule: 'named', participants: ['a1'], reason: 'misread' } as const;
    const found = await find(
      groupsOf([900, 12, 13, 14, 15, 16, 17, 18], [1, 2, 3, 4, 5, 6, 7, 8], { estimator: 'yuen-welch', trim: 20 }, [
        named,
      ]),
    );
    expect(found.single.map((each) => each.participant)).not.toContain('a1');
    expect(found.n).toBe(15);
  });
});

describe('refuses', () => {
  test('refuses: support that is not there, support that is there, an effect already below', async () => {
    const none = groupsOf([1, 2, 3, 4], [1, 2, 3, 4.5]);
    const clear = groupsOf([11, 12, 13, 14], [1, 2, 3, 4.5]);
    await expect(find(none)).rejects.toThrow(/no support to lose/);
    await expect(find(clear, { target: 'gains support' })).rejects.toThrow(/supports the claim already/);
    await expect(find(clear, { target: 'falls below', smallest: 50 })).rejects.toThrow(/below the smallest effect/);
  });
});
