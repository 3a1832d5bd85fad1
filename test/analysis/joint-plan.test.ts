import { describe, expect, it } from 'vitest';
import { applyRules } from '../../src/analysis/exclusion.ts';
import { planJoint } from '../../src/analysis/joint-plan.ts';
import { Relabeller, relabelDesign } from '../../src/analysis/relabel.ts';
import { claimLower, extreme, MEAN, planned, points, resultOf, trialColumns } from '../support/joint.ts';

const blind = [[], [extreme('MAD', 2, 'participant')], [extreme('SD', 2, 'pooled')]];
const reading = [[extreme('MAD', 2, 'condition')], [extreme('SD', 2, 'condition')]];
const rows: [string, number][] = [
  ['paired-t', 0],
  ['trimmed-differences', 20],
];

describe('planJoint', () => {
  it('theory: the rows a blind rule keeps are the same under every relabelling, those of a reading rule are not', () => {
    const result = resultOf(trialColumns(8, 8));
    const plan = planned(result, points([...blind, ...reading], rows));
    const { design } = result.scores;
    const relabeller = new Relabeller(plan.relabel);
    let moved = 0;
    for (let index = 0; index < 40; index++) {
      const relabelled = relabelDesign(design, plan.relabel, relabeller.labels(index * 6));
      for (const rules of blind) expect(applyRules(relabelled, rules).kept).toEqual(applyRules(design, rules).kept);
      for (const rules of reading) {
        if (applyRules(relabelled, rules).kept.some((mark, row) => mark !== applyRules(design, rules).kept[row]))
          moved++;
      }
    }
    expect(moved).toBeGreaterThan(20);
  });

  it('by hand: blind rules become sets of scores, reading rules chains; rows of one rule share it', () => {
    const plan = planned(resultOf(trialColumns(8, 4)), points([...blind, ...reading], rows));
    expect(plan.sets.map((set) => [...set.places])).toEqual([
      [0, 1],
      [2, 3],
      [4, 5],
    ]);
    expect(plan.chains.map((chain) => [chain.places, chain.reads])).toEqual([
      [[6, 7], true],
      [[8, 9], true],
    ]);
    expect([...plan.tested]).toEqual(new Array(10).fill(1));
    expect(planned(resultOf(trialColumns(8, 4)), points(blind, rows)).design).toBe(null);
  });

  it('by hand: a margin is taken off the claimed condition before anything else', () => {
    const result = resultOf(trialColumns(6, 3));
    const at = (margin: number, relation: 'lower' | 'higher', first = 'voice') => {
      const second = first === 'voice' ? 'tone' : 'voice';
      const claim = { ...claimLower, first, second, relation, margin };
      const [set] = planned(result, points([[]], rows), { claim }).sets;
      return [...set!.a, ...set!.b];
    };
    const plain = at(0, 'lower');
    const shifted = at(25, 'lower');
    const moved = shifted.map((value, i) => Math.round((value - (plain[i] as number)) * 1e6) / 1e6);
    // "voice is lower by more than 25": voice is raised by 25, whichever block it stands in.
    expect(moved.filter((each) => each === 25)).toHaveLength(6);
    expect(moved.filter((each) => each === 0)).toHaveLength(6);
    expect(at(25, 'higher', 'tone')).toEqual(shifted);
    expect(at(25, 'higher').map((value, i) => Math.round(value - (plain[i] as number)))).toEqual(
      moved.map((each) => 0 - each),
    );
  });

  it('refuses: a margin in either direction, an empty grid, a single value', () => {
    const result = resultOf(trialColumns(6, 3));
    const request = { result, claim: claimLower, points: points([[]], rows), relabellings: 9, seed: 1 };
    const either = { ...claimLower, relation: 'different', margin: 5 } as const;
    expect(planJoint({ ...request, claim: either })).toMatch(/claim one direction/);
    expect(planJoint({ ...request, points: [] })).toMatch(/no analysis in the grid/);
    const value = { ...result.comparison, effect: { type: 'value', value: 3 } } as const;
    expect(planJoint({ ...request, result: { ...result, comparison: value } })).toMatch(/not assigned/);
  });

  it('degenerate: a specification that gives no test is marked', () => {
    const result = resultOf(trialColumns(5, 3));
    const plan = planned(
      result,
      points(
        [[]],
        [
          ['paired-t', 0],
          ['trimmed-differences', 25],
        ],
      ),
    );
    // 5 pairs, 25 %: floor(1.25) = 1 at each end leaves 3, too few for a test.
    expect([...plan.tested]).toEqual([1, 0]);
    expect(plan.sets[0]?.rows[0]).toEqual({ estimator: 'paired-t', trim: 0 });
    expect(MEAN.trim).toBe(0);
  });
});
