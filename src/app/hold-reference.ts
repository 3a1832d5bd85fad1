import type { ClaimValue } from '../analysis/claim.ts';
import type { Finding } from '../analysis/finding.ts';
import type { Held, JsonObject } from '../worksheet/format.ts';
import { findingText } from './finding-text.ts';
import type { Page } from './page.ts';
import { STANDING } from './wiring.ts';

/** The claim that the standing strip shows, where it has been worked out. */
export function claimOf(page: Page): ClaimValue | null {
  const standing = page.worksheet.cells.find((cell) => cell.kind === STANDING);
  const id = Object.values(standing?.from ?? {})[0];
  if (id === undefined || !page.worksheet.cells.some((cell) => cell.id === id)) return null;
  const state = page.parts.engine.state(id);
  if (state.status === 'fresh') return state.computed.value as ClaimValue;
  return state.status === 'computing' && state.last !== undefined ? (state.last.value as ClaimValue) : null;
}

/** The planned row of a claim's comparison. */
export function plannedOf(claim: ClaimValue | null): Finding | null {
  return claim?.result.findings[claim.result.planned] ?? null;
}

/** Remembers the analysis as it stands now. */
export function holdReference(page: Page): void {
  const finding = plannedOf(claimOf(page));
  if (finding === null) return;
  const shared = Object.fromEntries(page.worksheet.shared.map((each) => [each.id, each.value]));
  const held: Held = {
    when: new Date().toISOString(),
    label: `${finding.label}: ${findingText(finding) ?? 'no estimate'}`,
    shared,
    // plain data already; this leaves out what is undefined
    finding: JSON.parse(JSON.stringify(finding)) as JsonObject,
  };
  page.parts.document.hold(held);
}
