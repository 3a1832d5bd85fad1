import type { ClaimSpec } from './claim.ts';
import type { Finding, Limits } from './finding.ts';

/** What counts as changing the claim. */
export type FlipTarget = 'loses support' | 'gains support' | 'changes sign' | 'falls below';

/** The smallest pull that still is not a flip: a limit exactly on the margin supports nothing. */
const ON_THE_EDGE = Number.MIN_VALUE;

/** Estimate as the claim counts it: larger = first of the claim is further in the claimed direction. */
export function orientedEstimate(finding: Finding, claim: ClaimSpec, first: string): number | null {
  if (finding.estimate === null) return null;
  return sideOf(finding, claim, first) * (finding.estimate - finding.nullValue);
}

/** 1 where a larger estimate speaks for the claimed direction, else -1. A claim of any difference counts as higher. */
export function sideOf(finding: Finding, claim: ClaimSpec, first: string): 1 | -1 {
  const turned = (claim.first === first) === finding.reversed;
  return turned === (claim.relation === 'lower') ? 1 : -1;
}

/**
 * How far a row is from having changed the claim: at or below 0 it has.
 *
 * @param finding a row of the chain without some participants
 * @param target what counts as a change
 * @param claim the claim
 * @param first the condition the estimate counts as first
 * @param full oriented estimate of everyone, for a change of sign
 * @param smallest smallest effect of interest in the outcome's unit
 * @returns distance from the change, of support in standard errors where the row has one, of the estimate in its unit;
 *   null where the row cannot be judged
 * @source targets (i) to (v) of methods 2.5
 */
export function pullOf(
  finding: Finding,
  target: FlipTarget,
  claim: ClaimSpec,
  first: string,
  full: number,
  smallest: number,
): number | null {
  const scale = finding.se !== null && finding.se > 0 ? finding.se : 1;
  if (target === 'loses support' || target === 'gains support') {
    const beyond = supportOf(finding, claim, first);
    if (beyond === null) return null;
    return target === 'loses support' ? beyond / scale : beyond > 0 ? -beyond / scale : edge(-beyond / scale);
  }
  const own = orientedEstimate(finding, claim, first);
  if (own === null) return null;
  if (target === 'changes sign') return edge(Math.sign(full) * own);
  return edge((claim.relation === 'different' ? Math.abs(own) : own) - smallest);
}

/** How far the interval lies beyond the margin in the claimed direction; 0 or less = the row does not support the claim. */
function supportOf(finding: Finding, claim: ClaimSpec, first: string): number | null {
  if (finding.interval === null || (!finding.sameUnit && claim.margin !== 0)) return null;
  const [low, high] = oriented(finding.interval, finding, sideOf(finding, claim, first));
  const above = low === null ? Number.NEGATIVE_INFINITY : low - claim.margin;
  if (claim.relation !== 'different') return finite(above);
  return finite(Math.max(above, high === null ? Number.NEGATIVE_INFINITY : -claim.margin - high));
}

/** A one-sided interval without the limit that matters never supports the claim. */
function finite(value: number): number | null {
  return Number.isFinite(value) ? value : null;
}

function oriented([low, high]: Limits, finding: Finding, side: 1 | -1): Limits {
  const from = low === null ? null : side * (low - finding.nullValue);
  const to = high === null ? null : side * (high - finding.nullValue);
  return side === 1 ? [from, to] : [to, from];
}

function edge(pull: number): number {
  return pull === 0 || Object.is(pull, -0) ? ON_THE_EDGE : pull;
}
