import type { ViewContext } from '../../cells/kind.ts';
import type { Sweep } from '../analysis/sweep.ts';
import { computedOf, titleOf, waitingWords } from './cell-model.ts';
import { findingText } from './finding-text.ts';
import { claimOf, plannedOf } from './hold-reference.ts';
import type { Page } from './page.ts';
import type { StripModel } from './strip-view.ts';
import { veilBound } from './veil-bound.ts';
import { cellOf, JOINT, STANDING } from './wiring.ts';

const NO_CLAIM = 'No claim yet: say what the comparison shows, and this strip tests whether it stands fast.';

/** The sweep of the standing strip, while it belongs to the claim as it is. */
export function sweepOf(page: Page): Sweep | null {
  const standing = page.worksheet.cells.find((cell) => cell.kind === STANDING);
  if (standing === undefined) return null;
  const state = page.parts.engine.state(standing.id);
  return state.status === 'fresh' ? (state.computed.value as Sweep) : null;
}

/** What the standing strip shows now. */
export function stripModel(page: Page, width: number): StripModel {
  const { worksheet, parts, view } = page;
  const standing = worksheet.cells.find((cell) => cell.kind === STANDING);
  const claimId = Object.values(standing?.from ?? {})[0];
  const claimCell = claimId === undefined ? undefined : cellOf(worksheet, claimId);
  const claim = claimOf(page);
  const state = standing === undefined || claimCell === undefined ? null : parts.engine.state(standing.id);
  const kind = parts.registry[STANDING];
  const settings = standing === undefined ? {} : parts.engine.settings(standing.id);
  const computed = state === null ? undefined : computedOf(state);
  const shown = state?.status === 'fresh' || state?.status === 'computing';
  const held = worksheet.reference;
  return {
    claim: claim?.words ?? claimWords(page, claimId) ?? NO_CLAIM,
    hasClaim: claimCell !== undefined,
    now: findingText(plannedOf(claim)),
    reference: held === null ? null : findingText(held.finding),
    blind: worksheet.opening.state === 'blind',
    bound: worksheet.opening.state === 'blind' && standing !== undefined ? veilBound(page, standing.id) : null,
    state,
    say: shown && computed !== undefined && kind !== undefined ? kind.say(computed, settings) : null,
    joint: jointOf(page),
    waitingFor:
      state === null
        ? ''
        : waitingWords(state, (id) => {
            const cell = cellOf(worksheet, id);
            return cell === undefined ? 'a cell' : `the ${titleOf(parts.registry, cell)}`;
          }),
    context:
      standing === undefined
        ? null
        : {
            cellId: standing.id,
            settings,
            shared: worksheet.shared,
            theme: view.theme,
            width,
            reference: referenceOf(page),
            sweep: (computed?.value as Sweep | undefined) ?? null,
          },
  };
}

/** What the joint inference over the strip says, or how far it is; null where it is hidden or has nothing to wait for. */
function jointOf(page: Page): StripModel['joint'] {
  const cell = page.worksheet.cells.find((each) => each.kind === JOINT);
  const kind = page.parts.registry[JOINT];
  if (cell === undefined || kind === undefined) return null;
  const state = page.parts.engine.state(cell.id);
  if (state.status === 'fresh')
    return { say: kind.say(state.computed, page.parts.engine.settings(cell.id)), progress: 1 };
  if (state.status === 'failed') return { say: `no joint p: ${state.sentence}`, progress: 1 };
  return state.status === 'computing' ? { say: null, progress: state.progress } : null;
}

/** The held reference as views get it; the record itself, so that its identity tells whether it changed. */
export function referenceOf(page: Page): ViewContext['reference'] {
  return page.worksheet.reference;
}

/** The claim as its cell says it while it is not worked out. */
function claimWords(page: Page, id: string | undefined): string | null {
  const cell = id === undefined ? undefined : cellOf(page.worksheet, id);
  const kind = cell === undefined ? undefined : page.parts.registry[cell.kind];
  if (cell === undefined || kind === undefined) return null;
  const { title } = cell.settings;
  if (typeof title === 'string' && title.trim() !== '') return title;
  const parts = kind.sentence(cell.settings, page.parts.engine.context(cell.id));
  return parts.map((part) => (typeof part === 'string' ? part : part.shown)).join('');
}
