import { describe, expect, it } from 'vitest';
import { type JointSettings, jointKind, type StripJoint } from '../../cells/joint/kind.ts';
import { plainSentence } from '../../cells/kind.ts';
import { sayJoint } from '../../cells/run-joint.ts';
import type { ClaimValue } from '../../src/analysis/claim.ts';
import { sweepClaim } from '../../src/analysis/sweep.ts';
import { claimLower, resultOf, trialColumns } from '../support/joint.ts';
import { contextOf, run } from '../support/kind-run.ts';

const settings = { ...(jointKind.defaults(contextOf()) as JointSettings), relabellings: 199 };

function claimOf(margin = 0, people = 12): ClaimValue {
  const claim = { ...claimLower, margin };
  return { claim, result: resultOf(trialColumns(people, 4)), words: 'voice is lower', verdict: null };
}

async function computed(claim: ClaimValue, own = settings) {
  const sweep = sweepClaim(claim.result, claim.claim);
  return { sweep, cell: await run<null, StripJoint>(jointKind, own, { claim, sweep }) };
}

describe('the joint inference of the strip', () => {
  it('by hand: 1,999 relabellings judged by the average Z unless said otherwise, never offered', () => {
    expect(jointKind.defaults(contextOf())).toEqual({ statistic: 'average Z', relabellings: 1999 });
    expect(jointKind.offer).toBe(null);
    expect(plainSentence(jointKind.sentence(jointKind.defaults(contextOf()), contextOf()))).toMatch(
      /1,999 times.*average Z/,
    );
  });

  it('theory: it is about the analyses of the strip, each once, and says its p in words', async () => {
    const { sweep, cell } = await computed(claimOf());
    expect(cell.detail.places).toEqual(sweep.specifications.map((_, place) => place));
    expect(cell.detail.joint?.rows).toHaveLength(sweep.specifications.length);
    // 12 participants: all 4,096 exchanges.
    expect(jointKind.say(cell, settings)).toMatch(/^joint p [=<] \.\d{3} \(average Z, all 4,096 relabellings\)$/);
    expect(JSON.stringify(jointKind.record(cell))).not.toMatch(/null,null|NaN/);
  });

  it('invariance: the same seed gives the same digits', async () => {
    const [a, b] = [await computed(claimOf(0, 18)), await computed(claimOf(0, 18))];
    expect(jointKind.record(a.cell)).toEqual(jointKind.record(b.cell));
  });

  it('refuses in words: a margin in either direction; settings that cannot be read', async () => {
    const own = claimOf(5);
    const { cell } = await computed({ ...own, claim: { ...own.claim, relation: 'different' } });
    expect(cell.detail.joint).toBe(null);
    expect(jointKind.say(cell, settings)).toMatch(/^no joint p: A difference beyond a margin/);
    expect(jointKind.check({ ...settings, relabellings: 1e9 }, contextOf())).toHaveLength(1);
    expect(jointKind.check({ ...settings, statistic: 'none such' }, contextOf())).toHaveLength(1);
    expect(jointKind.check(settings, contextOf())).toEqual([]);
    expect(sayJoint(null, null, 'average Z')).toBe('no joint p: not worked out');
  });
});
