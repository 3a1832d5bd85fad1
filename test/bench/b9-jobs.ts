import { isMainThread, workerData } from 'node:worker_threads';
import { rng } from '../../src/numerics/rng.ts';
import { trimmedMeanSorted } from '../../src/numerics/trimmed-mean.ts';
import { serveInThread } from '../../src/workers/node-pool.ts';

export interface RelabelShard {
  readonly scores: Float64Array;
  readonly seed: number;
  /** The shard's own stream. */
  readonly stream: number;
  /** Relabellings of this shard. */
  readonly count: number;
}

export const B9_MARK = 'workload of two workers';

/** Relabels two halves and counts how often their 20 % trimmed means lie at least as far apart as they do. */
function relabel({ scores, seed, stream, count }: RelabelShard): number {
  const random = rng(seed, stream);
  const labels = scores.slice();
  const half = scores.length >> 1;
  const trim = Math.floor((20 * half) / 100);
  const apart = () => {
    const [a, b] = [labels.slice(0, half).sort(), labels.slice(half).sort()];
    return Math.abs(trimmedMeanSorted(a, trim) - trimmedMeanSorted(b, trim));
  };
  const observed = apart();
  let beyond = 0;
  for (let r = 0; r < count; r++) {
    for (let i = labels.length - 1; i > 0; i--) {
      const j = random.below(i + 1);
      const held = labels[i] as number;
      labels[i] = labels[j] as number;
      labels[j] = held;
    }
    if (apart() >= observed) beyond++;
  }
  return beyond;
}

export const b9Jobs = { relabel };

if (!isMainThread && workerData === B9_MARK) serveInThread(b9Jobs);
