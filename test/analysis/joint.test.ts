import { describe, expect, it } from 'vitest';
import { countJoint, finishJoint, jointShards } from '../../src/analysis/joint.ts';
import { fillLognormal, fillNormal } from '../../src/numerics/draws.ts';
import { rng } from '../../src/numerics/rng.ts';
import { jobs } from '../../src/workers/jobs.ts';
import {
  extreme,
  GROUPS,
  groupColumns,
  noPause,
  planned,
  pOf,
  points,
  resultOf,
  runPlan,
  trialColumns,
} from '../support/joint.ts';
import { countFor, noteLongRun } from '../support/long-run.ts';

const rows: [string, number][] = [
  ['paired-t', 0],
  ['trimmed-differences', 20],
  ['signed-rank', 0],
];
const rules = [[], [extreme('MAD', 2, 'participant')], [extreme('SD', 2, 'condition')]];

/** One score under each alert: voice minus tone is d. */
function pairColumns(d: readonly number[]) {
  return {
    p: d.flatMap((_, i) => [`p${i}`, `p${i}`]),
    alert: d.flatMap(() => ['tone', 'voice']),
    ms: d.flatMap((each, i) => [100 + 10 * i, 100 + 10 * i + each]),
  };
}

describe('joint inference', () => {
  it('by hand: four pairs, all 16 exchanges', async () => {
    // Differences 3, 1, -2, 5 sum to 7. A sum of 11 - 2s arises where the negative ones sum to s: s <= 2 for {}, {1}, {2}
    // and s >= 9 for their complements give |sum| >= 7 in 6 of 16. The share significant is 0, which all reach: only
    // four positive differences, t(3) = 3.22, have p < .05.
    const result = resultOf(pairColumns([3, 1, -2, 5]), { rows: 'one score' });
    const joint = await runPlan(planned(result, points([[]], [['paired-t', 0]])));
    expect([joint.relabellings, joint.enumerated, joint.ways]).toEqual([16, true, 16]);
    expect(joint.statistics.map((each) => each.p)).toEqual([6 / 16, 6 / 16, 1]);
    expect(joint.statistics[1]?.observed).toBe(1.75);
    expect(joint.rows.map((row) => [row.p, row.adjusted])).toEqual([[6 / 16, 6 / 16]]);
    const up = resultOf(pairColumns([3, 1, 2, 5]), { rows: 'one score' });
    const all = await runPlan(planned(up, points([[]], [['paired-t', 0]])));
    // All of one sign is reached by itself and its mirror: 2 of 16; so is the share of 1.
    expect(all.statistics.map((each) => each.p)).toEqual([2 / 16, 2 / 16, 2 / 16]);
  });

  it('by hand: two separated groups of 4, all 70 splits; one-sided towards the claim half of it', async () => {
    const columns = groupColumns([1, 2, 3, 4], [5, 6, 7, 8]);
    const own = points(
      [[]],
      [
        ['welch', 0],
        ['rank-sum', 0],
      ],
    );
    const p = async (alternative: 'two-sided' | 'less' | 'greater') => {
      const spec = { estimator: 'welch', alternative };
      const joint = await runPlan(planned(resultOf(columns, GROUPS, spec), own));
      return [...joint.statistics.map((each) => each.p), ...joint.rows.flatMap((row) => [row.p, row.adjusted])];
    };
    // {1, 2, 3, 5} against the rest has Welch's t(6) = 3.11, z = 2.31, beyond the 2.19 of the rank sum's least p: it and
    // its mirror count for the adjusted p of the rank row.
    expect(await p('two-sided')).toEqual([...new Array(6).fill(2 / 70), 4 / 70]);
    // One-sided, {1, 2, 3, 5} against the rest is significant in both rows too: U = 1, p = 2/70.
    expect(await p('less')).toEqual([1, 1, 2, 1, 1, 1, 2].map((count) => count / 70));
    expect((await p('greater')).slice(0, 3)).toEqual([1, 1, 1]);
  });

  it('invariance: exchanging the names of the conditions turns the estimates and leaves every p', async () => {
    const columns = trialColumns(18, 4);
    const turnedSpec = { first: 'tone', second: 'voice' };
    const [plain, turned] = await Promise.all(
      [{}, turnedSpec].map((spec) => runPlan(planned(resultOf(columns, {}, spec), points(rules, rows)))),
    );
    expect(turned?.rows.map((row) => row.p)).toEqual(plain?.rows.map((row) => row.p));
    expect(turned?.rows.map((row) => row.adjusted)).toEqual(plain?.rows.map((row) => row.adjusted));
    expect(turned?.statistics.map((each) => each.p)).toEqual(plain?.statistics.map((each) => each.p));
    const median = (joint: typeof plain) => joint?.statistics[1]?.observed ?? 0;
    expect(Math.abs(median(turned) + median(plain))).toBeLessThan(1e-9);
  });

  it('invariance: another unit and another zero leave every p', async () => {
    const columns = trialColumns(18, 4);
    const plain = await runPlan(planned(resultOf(columns), points(rules, rows)));
    const moved = await runPlan(
      planned(resultOf({ ...columns, ms: columns.ms.map((ms) => ms / 8 + 64) }), points(rules, rows)),
    );
    expect(moved.rows.map((row) => [row.p, row.adjusted])).toEqual(plain.rows.map((row) => [row.p, row.adjusted]));
    expect(moved.statistics.map((each) => each.p)).toEqual(plain.statistics.map((each) => each.p));
  });

  it('invariance: any way of cutting the relabellings into shards gives the same digits', async () => {
    const plan = planned(resultOf(trialColumns(18, 3)), points(rules.slice(0, 2), rows), { relabellings: 300 });
    const whole = await runPlan(plan);
    for (const cuts of [
      [0, 300],
      [0, 64, 300],
      [0, 7, 11, 200, 300],
    ]) {
      const parts = [];
      for (let i = 0; i + 1 < cuts.length; i++)
        parts.push(await countJoint({ plan, from: cuts[i] as number, to: cuts[i + 1] as number }, noPause));
      expect(finishJoint(plan, parts.reverse())).toEqual(whole);
    }
    expect(jointShards(plan)).toEqual([
      { from: 0, to: 256 },
      { from: 256, to: 300 },
    ]);
    expect(jointShards({ relabel: { ...plan.relabel, total: 65_536 } })).toHaveLength(16);
  });

  it('theory: p adjusted for the grid is never below the p of the specification alone', async () => {
    const joint = await runPlan(planned(resultOf(trialColumns(18, 4)), points(rules, rows), { relabellings: 199 }));
    for (const row of joint.rows) expect(row.adjusted).toBeGreaterThanOrEqual(row.p as number);
    const largest = joint.rows.reduce((a, b) => (Math.abs(b.z) > Math.abs(a.z) ? b : a));
    expect(joint.rows.every((row) => (row.adjusted as number) >= (largest.adjusted as number))).toBe(true);
  });

  it('theory: drawn p lies within 3.5 SE of the enumerated one', async () => {
    const result = resultOf(trialColumns(12, 4));
    const exact = planned(result, points([[]], rows));
    const drawn = { ...exact, relabel: { ...exact.relabel, enumerated: false, total: 2000 } };
    const [all, some] = [await runPlan(exact), await runPlan(drawn)];
    for (const name of ['average Z', 'median estimate']) {
      const p = pOf(all, name);
      expect(Math.abs(pOf(some, name) - p)).toBeLessThan(3.5 * Math.sqrt((p * (1 - p)) / 2000) + 1 / 2001);
    }
  });

  it('by hand: a margin that is the estimate itself leaves nothing to find', async () => {
    const result = resultOf(pairColumns([-28, -20, -31, -25, -22, -27, -29, -18]), { rows: 'one score' });
    const claim = { first: 'voice', relation: 'lower', second: 'tone', margin: 25, title: '' } as const;
    const own = points([[]], [['paired-t', 0]]);
    const joint = await runPlan(planned(result, own, { claim }));
    expect(joint.statistics[1]?.observed).toBe(0);
    expect(joint.statistics[1]?.p).toBe(1);
    expect(pOf(await runPlan(planned(result, own)), 'median estimate')).toBe(2 / 256);
  });

  it('degenerate: a specification without a test has no p and does not stop the others', async () => {
    const own = points(
      [[]],
      [
        ['trimmed-differences', 25],
        ['paired-t', 0],
      ],
    );
    const joint = await runPlan(planned(resultOf(pairColumns([3, 1, 2, 5, 4]), { rows: 'one score' }), own));
    expect(joint.rows[0]).toEqual({ z: 0, p: null, adjusted: null });
    expect(joint.rows[1]?.p).toBe(2 / 32);
  });

  it('refuses to finish with a shard missing', () => {
    const plan = planned(resultOf(trialColumns(18, 2)), points([[]], rows));
    expect(() => finishJoint(plan, [])).toThrow(/must hold 99 relabellings; got 0/);
  });

  it('theory: the job stops when its signal is aborted', async () => {
    const plan = planned(resultOf(trialColumns(18, 3)), points(rules, rows), { relabellings: 5000 });
    const controller = new AbortController();
    const running = jobs.joint(
      { plan, from: 0, to: 5000 },
      { signal: controller.signal, progress: () => controller.abort(new Error('no longer wanted')) },
    );
    await expect(running).rejects.toThrow('no longer wanted');
  });
});

describe('level of the joint tests', () => {
  // Methods 2.2: 30 specifications (7 rules x 2 scopes and none, x Welch and Yuen), n = 20 a group, 3,000 runs of 199
  // relabellings. Any level of B with .05 (B + 1) whole is exact, so that few relabellings suffice here.
  const measures = [
    ['SD', 2],
    ['SD', 2.5],
    ['SD', 3],
    ['MAD', 2],
    ['MAD', 2.5],
    ['MAD', 3],
    ['fences', 1.5],
  ] as const;
  const all = [
    [],
    ...(['pooled', 'condition'] as const).flatMap((scope) =>
      measures.map(([measure, k]) => [extreme(measure, k, scope)]),
    ),
  ];
  const grid = points(all, [
    ['welch', 0],
    ['yuen-welch', 20],
  ]);
  const reference = {
    normal: { 'average Z': 0.051, 'median estimate': 0.051, 'share significant': 0.047, largest: 0.05, any: 0.14 },
    lognormal: { 'average Z': 0.046, 'median estimate': 0.048, 'share significant': 0.048, largest: 0.051, any: 0.305 },
  };
  const fill = { normal: fillNormal, lognormal: fillLognormal };

  it.each(['normal', 'lognormal'] as const)(
    'agrees with methods 2.2: %s scores, within 3.5 sqrt(SE^2 + SE^2)',
    async (shape) => {
      const runs = countFor(40, 1500);
      const B = countFor(19, 199);
      const random = rng(2026, shape === 'normal' ? 1 : 2);
      const hits = { 'average Z': 0, 'median estimate': 0, 'share significant': 0, largest: 0, any: 0 };
      const scores = new Float64Array(40);
      for (let run = 0; run < runs; run++) {
        fill[shape](scores, random);
        const columns = groupColumns(scores.subarray(0, 20), scores.subarray(20));
        const result = resultOf(columns, GROUPS, { estimator: 'welch' });
        const joint = await runPlan(planned(result, grid, { relabellings: B, seed: run }));
        for (const { name, p } of joint.statistics) if ((p as number) <= 0.05) hits[name]++;
        if (joint.rows.some((row) => (row.adjusted as number) <= 0.05)) hits.largest++;
        if (joint.rows.some((row) => Math.abs(row.z) >= 1.959964)) hits.any++;
      }
      for (const [name, rate] of Object.entries(reference[shape])) {
        const se = Math.hypot(Math.sqrt((rate * (1 - rate)) / runs), 0.004);
        expect(Math.abs(hits[name as keyof typeof hits] / runs - rate)).toBeLessThan(3.5 * se);
      }
      expect(hits.any).toBeGreaterThan(hits.largest);
    },
    3_600_000,
  );

  it('agrees with methods 2.2: power against a shift of .8 SD, within 3.5 sqrt(SE^2 + SE^2)', async ({ task }) => {
    const runs = countFor(20, 600);
    const random = rng(2027);
    let hits = 0;
    const scores = new Float64Array(40);
    for (let run = 0; run < runs; run++) {
      fillNormal(scores, random);
      for (let i = 0; i < 20; i++) scores[i]! -= 0.8;
      const columns = groupColumns(scores.subarray(0, 20), scores.subarray(20));
      const plan = planned(resultOf(columns, GROUPS, { estimator: 'welch' }), grid, {
        relabellings: countFor(39, 199),
        seed: run,
      });
      if (pOf(await runPlan(plan), 'average Z') <= 0.05) hits++;
    }
    expect(Math.abs(hits / runs - 0.634)).toBeLessThan(3.5 * Math.hypot(Math.sqrt((0.634 * 0.366) / runs), 0.017));
    noteLongRun(task, { count: `${runs} grids of 30`, outcome: `power ${(hits / runs).toFixed(3)} against .634` });
  }, 3_600_000);
});
