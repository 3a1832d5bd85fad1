/** Where a hash begins. */
export const SEED = 0x811c9dc5 | 0;

/**
 * One more byte of a hash.
 *
 * @param hash the hash so far
 * @param byte the next byte
 * @returns the hash with it
 * @source FNV-1a (Fowler, Noll and Vo), 32 bits: h = (h xor byte) * 16777619
 */
export function nextHash(hash: number, byte: number): number {
  return Math.imul(hash ^ byte, 16777619);
}

/**
 * The hash of some bytes.
 *
 * @param bytes any
 * @returns nextHash over all of them
 * @source as nextHash
 */
export function hashOf(bytes: Uint8Array): number {
  let hash = SEED;
  for (const byte of bytes) hash = nextHash(hash, byte);
  return hash;
}

/**
 * Distinct texts in order of first appearance, looked up by their bytes, so that a text is made once for each level
 * and not once for each cell.
 */
export class LevelTable {
  private slots = new Int32Array(256).fill(-1);
  private hashes = new Int32Array(128);
  /** Level k lies in the pool from bounds[k] to bounds[k + 1]. */
  private bounds = new Uint32Array(129);
  private pool = new Uint8Array(4096);
  private size = 0;

  /**
   * The code of a text, given a new one at its first appearance.
   *
   * @param bytes UTF-8 text
   * @param start first byte
   * @param end one past the last byte
   * @param rawHash nextHash of all these bytes, from SEED
   * @returns the code, counted from 0
   */
  codeOf(bytes: Uint8Array, start: number, end: number, rawHash: number): number {
    const hash = rawHash ^ (rawHash >>> 15);
    const mask = this.slots.length - 1;
    let slot = hash & mask;
    for (;;) {
      const code = this.slots[slot] as number;
      if (code < 0) break;
      if (this.hashes[code] === hash && this.holds(code, bytes, start, end)) return code;
      slot = (slot + 1) & mask;
    }
    return this.add(bytes, start, end, hash, slot);
  }

  /** The levels as texts, in order of their codes. */
  levels(): string[] {
    const decoder = new TextDecoder('utf-8', { ignoreBOM: true });
    return Array.from({ length: this.size }, (_, code) =>
      decoder.decode(this.pool.subarray(this.bounds[code] as number, this.bounds[code + 1] as number)),
    );
  }

  private holds(code: number, bytes: Uint8Array, start: number, end: number): boolean {
    let at = this.bounds[code] as number;
    if ((this.bounds[code + 1] as number) - at !== end - start) return false;
    for (let i = start; i < end; i++) if (this.pool[at++] !== bytes[i]) return false;
    return true;
  }

  private add(bytes: Uint8Array, start: number, end: number, hash: number, slot: number): number {
    const code = this.size++;
    const from = this.bounds[code] as number;
    const to = from + end - start;
    if (to > this.pool.length) this.pool = grown(this.pool, new Uint8Array(Math.max(to, this.pool.length * 2)));
    this.pool.set(bytes.subarray(start, end), from);
    if (code >= this.hashes.length) {
      this.hashes = grown(this.hashes, new Int32Array(code * 2));
      this.bounds = grown(this.bounds, new Uint32Array(code * 2 + 1));
    }
    this.bounds[code + 1] = to;
    this.hashes[code] = hash;
    this.slots[slot] = code;
    if (this.size * 2 > this.slots.length) this.spread();
    return code;
  }

  private spread(): void {
    const slots = new Int32Array(this.slots.length * 2).fill(-1);
    const mask = slots.length - 1;
    for (let code = 0; code < this.size; code++) {
      let slot = (this.hashes[code] as number) & mask;
      while ((slots[slot] as number) >= 0) slot = (slot + 1) & mask;
      slots[slot] = code;
    }
    this.slots = slots;
  }
}

function grown<A extends Uint8Array | Uint32Array | Int32Array>(old: A, larger: A): A {
  larger.set(old);
  return larger;
}
