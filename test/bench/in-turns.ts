import type { BenchRow } from './bench-row.ts';
import type { LineServer } from './line-server.ts';

/** Does its work once and gives the CPU time it took, in ms. */
export interface Contender {
  readonly name: string;
  run(): Promise<number>;
  /** What is done before the first round, if more than one run. */
  warmUp?(): Promise<number>;
}

export interface Peer extends Contender {
  readonly goal: number;
}

function median(values: readonly number[]): number {
  const sorted = [...values].sort((a, b) => a - b);
  const middle = sorted.length >> 1;
  const upper = sorted[middle] as number;
  return sorted.length % 2 === 1 ? upper : ((sorted[middle - 1] as number) + upper) / 2;
}

/** Least time of one measurement of ours, ms, because the CPU clock is coarse; and of the warm-up before all of them. */
const LEAST = 5;
const WARM = 250;

/** Our own work, repeated within one measurement until it is long enough to be measured. */
export function ours(work: () => unknown): Contender {
  let times = 1;
  const measure = async (): Promise<number> => {
    const before = process.cpuUsage();
    for (let i = 0; i < times; i++) await work();
    const { user, system } = process.cpuUsage(before);
    return (user + system) / 1000;
  };
  return {
    name: 'ours',
    run: async () => {
      for (;;) {
        const ms = await measure();
        if (ms >= LEAST || times >= 4096) return ms / times;
        times *= 2;
      }
    },
    warmUp: async () => {
      let last = await measure();
      for (let spent = last; spent < WARM; spent += last) last = Math.max(await measure(), 0.01);
      return last;
    },
  };
}

/** A function of a line server; its answer is the CPU time in ms. */
export function asked(server: LineServer, name: string, line: string, goal: number): Peer {
  return {
    name,
    goal,
    run: async () => {
      const answer = await server.ask(line);
      const ms = Number(answer);
      if (!Number.isFinite(ms)) throw new Error(`${server.name} answered "${answer}" to "${line}"`);
      return ms;
    },
  };
}

/** Long work is asked fewer times: as many rounds as this much time allows, from one to nine. */
const ROUND_TIME = 3000;

/**
 * Asks all in turn, A B C A B C, after one warm-up each.
 * @returns the median CPU time of each, ms
 */
export async function inTurns(contenders: readonly Contender[]): Promise<number[]> {
  const warm: number[] = [];
  for (const each of contenders) warm.push(await (each.warmUp?.() ?? each.run()));
  const once = warm.reduce((sum, ms) => sum + ms, 0);
  const rounds = Math.min(9, Math.max(1, Math.floor(ROUND_TIME / Math.max(once, 1))));
  const times = contenders.map((): number[] => []);
  for (let round = 0; round < rounds; round++) {
    for (const [i, each] of contenders.entries()) times[i]?.push(await each.run());
  }
  return times.map(median);
}

/** The rows of one case: ours beside each peer. Rows of peers that are not here say so. */
export async function compareInTurns(
  id: string,
  name: string,
  work: () => unknown,
  peers: readonly (Peer | { readonly name: string; readonly goal: number; readonly absent: string })[],
): Promise<BenchRow[]> {
  const here = peers.filter((each): each is Peer => 'run' in each);
  const [own = 0, ...others] = await inTurns([ours(work), ...here]);
  return peers.map((peer) => {
    const peerMs = 'run' in peer ? (others[here.indexOf(peer)] ?? null) : null;
    const row = { id, case: name, ours_ms: own, peer: peer.name, goal: `>= ${peer.goal}` };
    if (peerMs === null) return { ...row, peer_ms: null, ratio: null, note: 'absent' in peer ? peer.absent : '' };
    return { ...row, peer_ms: peerMs, ratio: peerMs / own };
  });
}
