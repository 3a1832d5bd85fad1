import { Refusal } from '../data/refusal.ts';
import { type ClaimSpec, type Verdict, verdictOf } from './claim.ts';
import type { Result } from './compare.ts';
import type { Finding, Limits } from './finding.ts';
import { type FlipSet, fewestRemovals, type LongWork } from './flip-set.ts';
import { judgeOf } from './flip-set-judge.ts';
import { type FlipTarget, orientedEstimate } from './flip-set-target.ts';
import { type Chain, chainOf, plannedRow, samplesWithout } from './influence-chain.ts';
import type { Samples } from './samples.ts';

export interface InfluenceSpec {
  readonly target: FlipTarget;
  /** Smallest effect of interest, in the outcome's unit, 0 or more; read by 'falls below' only. */
  readonly smallest: number;
}

/** The chain without one participant. */
export interface LeftOut {
  readonly participant: string;
  readonly estimate: number | null;
  readonly p: number | null;
  readonly interval: Limits | null;
  readonly verdict: Verdict | null;
  /** Estimate of everyone minus this one, in the planned row's unit. */
  readonly change: number | null;
  /** The change over the standard error of the reduced fit. */
  readonly dfbeta: number | null;
}

/** The smallest set found, and what the chain comes to without it. */
export interface Removal {
  readonly participants: readonly string[];
  /** How many of them stand on which side, or in which group. */
  readonly composition: readonly { readonly group: string; readonly count: number }[];
  readonly finding: Finding;
  readonly verdict: Verdict | null;
}

/** How far one claim depends on single participants and on small sets of them. */
export interface Influence {
  readonly spec: InfluenceSpec;
  readonly full: Finding;
  readonly verdict: Verdict | null;
  /** Everyone who could enter, left out in turn. */
  readonly single: readonly LeftOut[];
  /** Single removals after which the verdict is another. */
  readonly changed: number;
  readonly flip: FlipSet;
  readonly removal: Removal | null;
  /** Participants who enter the planned row, and those the rules set aside altogether. */
  readonly n: number;
  readonly setAside: number;
}

/**
 * Leaves every participant out in turn, through the whole chain, and finds the fewest whose removal changes the claim.
 *
 * @param args a comparison with its chain, what is claimed, and what counts as a change
 * @param work pauses and progress
 * @throws Refusal where the planned row cannot be judged, or the change asked for is there already
 * @source leave-one-out through the pipeline: methods 2.6; DFBETA: Belsley, Kuh & Welsch 1980; flip set: methods 2.5
 */
export async function findInfluence(
  args: { readonly result: Result; readonly claim: ClaimSpec; readonly spec: InfluenceSpec },
  work: LongWork,
): Promise<Influence> {
  const { result, claim, spec } = args;
  const chain = chainOf(result);
  if (chain === null) {
    throw new Refusal(
      'The comparison is about several levels at once, so there is no single difference to change. Compare two sides first.',
    );
  }
  const samples = samplesWithout(chain, new Set());
  const full = plannedRow(chain, samples);
  const verdict = verdictOf(full, claim, result.comparison.first);
  const own = refuseTarget(full, verdict, claim, result, spec);
  const single = await leaveOneOut(chain, full, claim, { ...work, progress: (share) => work.progress(share / 3) });
  const judge = judgeOf(chain, samples, { target: spec.target, claim, smallest: spec.smallest, full: own });
  const flip = await fewestRemovals(judge, { ...work, progress: (share) => work.progress((1 + 2 * share) / 3) });
  const members = flip.members?.map((place) => judge.names[place] as string) ?? null;
  return {
    spec,
    full,
    verdict,
    single,
    changed: single.filter((each) => each.verdict !== null && each.verdict !== verdict).length,
    flip,
    removal: members === null ? null : removalOf(chain, samples, members, claim),
    n: full.n,
    setAside: new Set(result.scores.design.steps.flatMap((step) => step.participants)).size,
  };
}

function refuseTarget(
  full: Finding,
  verdict: Verdict | null,
  claim: ClaimSpec,
  result: Result,
  { target, smallest }: InfluenceSpec,
): number {
  const own = orientedEstimate(full, claim, result.comparison.first);
  if (own === null) throw new Refusal(`The planned row has no estimate (${full.reason ?? 'nothing to compare'}).`);
  const support = target === 'loses support' || target === 'gains support';
  if (support && verdict === null) {
    throw new Refusal(
      `The planned row cannot be judged against the claim${full.reason ? ` (${full.reason})` : ''}. Ask when the estimate changes sign instead, or plan a row with an interval.`,
    );
  }
  if (target === 'loses support' && verdict !== 'supported') {
    throw new Refusal(
      'The planned row does not support the claim, so it has no support to lose. Ask when it gains support.',
    );
  }
  if (target === 'gains support' && verdict === 'supported') {
    throw new Refusal('The planned row supports the claim already. Ask when it loses support.');
  }
  if (target === 'falls below') {
    if (!full.sameUnit)
      throw new Refusal(
        'The planned row is not in the outcome\u2019s unit, so it cannot be held against a smallest effect.',
      );
    if ((claim.relation === 'different' ? Math.abs(own) : own) < smallest) {
      throw new Refusal('The estimate is below the smallest effect of interest already. Give a smaller one.');
    }
  }
  return own;
}

async function leaveOneOut(chain: Chain, full: Finding, claim: ClaimSpec, work: LongWork): Promise<LeftOut[]> {
  const all: LeftOut[] = [];
  for (const participant of chain.people) {
    const row = plannedRow(chain, samplesWithout(chain, new Set([participant])));
    const change = full.estimate === null || row.estimate === null ? null : full.estimate - row.estimate;
    all.push({
      participant,
      estimate: row.estimate,
      p: row.p,
      interval: row.interval,
      verdict: verdictOf(row, claim, chain.result.comparison.first),
      change,
      dfbeta: change === null || row.se === null || !(row.se > 0) ? null : change / row.se,
    });
    await work.pause();
    work.progress(all.length / chain.people.length);
  }
  return all;
}

function removalOf(chain: Chain, samples: Samples, participants: readonly string[], claim: ClaimSpec): Removal {
  const finding = plannedRow(chain, samplesWithout(chain, new Set(participants)));
  const groupOf = groupsOf(chain, samples);
  const groups = [...new Set(participants.map(groupOf))];
  return {
    participants,
    composition: groups.map((group) => ({
      group,
      count: participants.filter((each) => groupOf(each) === group).length,
    })),
    finding,
    verdict: verdictOf(finding, claim, chain.result.comparison.first),
  };
}

/** Where a participant belongs: a side of the comparison, else the first group of the design, else nowhere in particular. */
function groupsOf(chain: Chain, samples: Samples): (participant: string) => string {
  const { scores } = chain.result;
  if (samples.xParticipants !== samples.yParticipants) {
    const first = new Set(samples.xParticipants);
    const second = new Set(samples.yParticipants);
    return (name) => (first.has(name) ? samples.first : second.has(name) ? samples.second : 'set aside by a rule');
  }
  const [group] = scores.groups;
  return (name) => {
    const who = scores.participants.indexOf(name);
    return group === undefined || who < 0 ? '' : (group.levels[group.codes[who] as number] ?? '');
  };
}
