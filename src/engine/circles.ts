/**
 * The cells that read their own result.
 *
 * @param reads cell id -> ids of the cells it reads; every id must be a key
 * @returns cell id -> the ids of one shortest circle through it, starting with itself; cells in no circle are absent
 */
export function circlesIn(reads: ReadonlyMap<string, readonly string[]>): ReadonlyMap<string, readonly string[]> {
  const circles = new Map<string, readonly string[]>();
  for (const id of notReachedFromTheTop(reads)) {
    const circle = wayBack(id, reads);
    if (circle !== null) circles.set(id, circle);
  }
  return circles;
}

/** Cells that are in a circle or below one: what is left when cells whose inputs are all settled are taken away in turn. */
function notReachedFromTheTop(reads: ReadonlyMap<string, readonly string[]>): ReadonlySet<string> {
  const left = new Set(reads.keys());
  const unsettled = new Map<string, number>();
  const readers = new Map<string, string[]>();
  for (const [id, above] of reads) {
    unsettled.set(id, above.length);
    for (const each of above) {
      const known = readers.get(each);
      if (known === undefined) readers.set(each, [id]);
      else known.push(id);
    }
  }
  const queue = [...left].filter((id) => unsettled.get(id) === 0);
  for (let id = queue.pop(); id !== undefined; id = queue.pop()) {
    left.delete(id);
    for (const reader of readers.get(id) ?? []) {
      const rest = (unsettled.get(reader) ?? 0) - 1;
      unsettled.set(reader, rest);
      if (rest === 0) queue.push(reader);
    }
  }
  return left;
}

/** A shortest way from a cell up to itself, or null. */
function wayBack(start: string, reads: ReadonlyMap<string, readonly string[]>): readonly string[] | null {
  const cameFrom = new Map<string, string>();
  const queue = [start];
  for (let at = 0; at < queue.length; at++) {
    const id = queue[at] as string;
    for (const above of reads.get(id) ?? []) {
      if (above === start) return pathTo(id, start, cameFrom);
      if (cameFrom.has(above)) continue;
      cameFrom.set(above, id);
      queue.push(above);
    }
  }
  return null;
}

function pathTo(end: string, start: string, cameFrom: ReadonlyMap<string, string>): readonly string[] {
  const path = [end];
  for (let id = end; id !== start; ) {
    id = cameFrom.get(id) ?? start;
    path.unshift(id);
  }
  return path;
}
