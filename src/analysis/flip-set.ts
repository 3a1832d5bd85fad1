/** The search for the smallest set of participants whose removal changes the claim. */
import { choices, nextChoice } from '../numerics/removals.ts';

/** Judges a set of candidates (ascending places): at or below 0 its removal changes the claim; null = cannot be judged. */
export interface RemovalJudge {
  readonly candidates: number;
  pull(removed: Int32Array): number | null;
  /** Sets of one size that may all be tried. */
  readonly mostSets: number;
  /** Sets that may be tried one by one where not all can be. */
  readonly mostTries: number;
  /** Largest set worth trying. */
  readonly largest: number;
  /** Where theory says so: sets of a size among which the one that pulls most must be. */
  strongestSets?(size: number): readonly Int32Array[];
}

/** What a long computation needs from whoever runs it. */
export interface LongWork {
  /** Lets messages through; rejects when the work is to stop. */
  pause(): Promise<void>;
  /** Share done, 0 to 1. */
  progress(share: number): void;
}

export interface FlipSet {
  /** Places of the strongest set found; null where none was found. */
  readonly members: readonly number[] | null;
  /** Whether no smaller set can change the claim: every one was tried, or those that pull most were. */
  readonly exact: boolean;
  /** Sets of this size that change the claim, and sets of this size in all; null unless every one was tried. */
  readonly changing: number | null;
  readonly sets: number | null;
  /** Every set of up to so many was tried without one that changes the claim, before this size. */
  readonly noneUpTo: number;
  /** Largest set that was tried at all. */
  readonly triedUpTo: number;
}

/** Sets between two pauses: cheap ones by the thousand, whole chains by the few. */
const BETWEEN_PAUSES = { cheap: 2000, dear: 4 } as const;
const CHEAP = 100_000;

/**
 * Finds the fewest removals that change the claim: sizes 1, 2, ... with every set of a size tried where that is
 * feasible, beyond that the sets that pull most, built up one by one and improved by exchanging pairs.
 *
 * @param judge what a removal does
 * @param work pauses and progress
 * @returns the smallest set found; `exact` only where every smaller set was tried
 * @source Broderick, Giordano & Meager 2020 (influence order, exact refits); exhaustive search and exchanges: methods 2.5
 */
export async function fewestRemovals(judge: RemovalJudge, work: LongWork): Promise<FlipSet> {
  let size = 1;
  for (; size <= judge.largest; size++) {
    const sets = choices(judge.candidates, size);
    if (sets > judge.mostSets) break;
    const found = await everySet(judge, size, sets, work);
    if (found.members !== null) {
      return { ...found, exact: true, sets, noneUpTo: size - 1, triedUpTo: size };
    }
  }
  const none = { members: null, exact: size > judge.largest, changing: null, sets: null, noneUpTo: size - 1 };
  if (size > judge.largest) return { ...none, triedUpTo: size - 1 };
  return strongestOnes(judge, size) ?? buildUp(judge, size, work);
}

/** Tries only the sets that can pull most, so that a set of that size exists exactly where one of them does. */
function strongestOnes(judge: RemovalJudge, first: number): FlipSet | null {
  if (judge.strongestSets === undefined) return null;
  for (let size = first; size <= judge.largest; size++) {
    for (const set of judge.strongestSets(size)) {
      const pull = judge.pull(set);
      if (pull === null || pull > 0) continue;
      return { members: [...set], exact: true, changing: null, sets: null, noneUpTo: size - 1, triedUpTo: size };
    }
  }
  const { largest } = judge;
  return { members: null, exact: true, changing: null, sets: null, noneUpTo: largest, triedUpTo: largest };
}

async function everySet(judge: RemovalJudge, size: number, sets: number, work: LongWork) {
  const chosen = Int32Array.from({ length: size }, (_, i) => i);
  let changing = 0;
  let best: number[] | null = null;
  let least = Number.POSITIVE_INFINITY;
  let tried = 0;
  const every = judge.mostSets > CHEAP ? BETWEEN_PAUSES.cheap : BETWEEN_PAUSES.dear;
  do {
    const pull = judge.pull(chosen);
    if (pull !== null && pull <= 0) {
      changing++;
      if (pull < least) {
        least = pull;
        best = Array.from(chosen);
      }
    }
    if (++tried % every === 0) {
      await work.pause();
      work.progress(tried / sets);
    }
  } while (nextChoice(chosen, judge.candidates));
  return { members: best, changing };
}

interface Tries {
  left: number;
}

/** From the strongest set one smaller, adds the strongest candidate and exchanges pairs until nothing pulls more. */
async function buildUp(judge: RemovalJudge, first: number, work: LongWork): Promise<FlipSet> {
  const tries: Tries = { left: judge.mostTries };
  let members: number[] = [];
  let done = 0;
  for (let size = 1; size <= judge.largest && tries.left > 0; size++) {
    const added = await strongest(judge, members, -1, tries, work);
    if (added === null) break;
    members = await exchanged(judge, added.members, added.pull, tries, work);
    done = size;
    const pull = judge.pull(ascending(members));
    if (size >= first && pull !== null && pull <= 0) {
      return {
        members: [...ascending(members)],
        exact: false,
        changing: null,
        sets: null,
        noneUpTo: first - 1,
        triedUpTo: size,
      };
    }
    work.progress(size / judge.largest);
  }
  return { members: null, exact: false, changing: null, sets: null, noneUpTo: first - 1, triedUpTo: done };
}

/** The candidate that pulls most beside the members but the one at `without`. */
async function strongest(
  judge: RemovalJudge,
  members: readonly number[],
  without: number,
  tries: Tries,
  work: LongWork,
): Promise<{ members: number[]; pull: number } | null> {
  const rest = members.filter((_, index) => index !== without);
  let best: { members: number[]; pull: number } | null = null;
  for (let candidate = 0; candidate < judge.candidates && tries.left > 0; candidate++) {
    if (members.includes(candidate)) continue;
    tries.left--;
    const pull = judge.pull(ascending([...rest, candidate]));
    if (pull !== null && (best === null || pull < best.pull)) best = { members: [...rest, candidate], pull };
    if (candidate % 16 === 15) await work.pause();
  }
  await work.pause();
  return best;
}

async function exchanged(
  judge: RemovalJudge,
  start: readonly number[],
  startPull: number,
  tries: Tries,
  work: LongWork,
): Promise<number[]> {
  let members = [...start];
  let pull = startPull;
  for (let better = true; better && tries.left > 0; ) {
    better = false;
    for (let place = 0; place < members.length; place++) {
      const swapped = await strongest(judge, members, place, tries, work);
      if (swapped === null || !(swapped.pull < pull)) continue;
      ({ members, pull } = swapped);
      better = true;
    }
  }
  return members;
}

function ascending(members: readonly number[]): Int32Array {
  return Int32Array.from(members).sort();
}
