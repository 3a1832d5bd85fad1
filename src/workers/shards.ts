export interface Shard {
  /** Number of the shard: its stream of random numbers is the fork of that number. */
  readonly index: number;
  /** First item, and the one after the last. */
  readonly from: number;
  readonly to: number;
}

/**
 * Cuts `total` items into shards of `size`, the last one shorter. The cut depends on nothing else, so that a result is
 * the same with any number of workers.
 *
 * @param total how many items, 0 or more
 * @param size items of a shard, 1 or more
 */
export function shardsOf(total: number, size: number): readonly Shard[] {
  if (!Number.isInteger(total) || total < 0)
    throw new RangeError(`*total* must be a whole number of 0 or more; got ${total}`);
  if (!Number.isInteger(size) || size < 1)
    throw new RangeError(`*size* must be a whole number of 1 or more; got ${size}`);
  return Array.from({ length: Math.ceil(total / size) }, (_, index) => {
    return { index, from: index * size, to: Math.min(total, (index + 1) * size) };
  });
}
