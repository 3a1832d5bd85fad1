/**
 * Whether two plain values are equal in every part: numbers by Object.is except that 0 equals -0, typed arrays element
 * by element, maps and sets by their entries in order, objects by their own fields whatever their order. The same
 * object is equal to itself without being walked.
 *
 * @param a plain data: what compute gives, settings, records
 * @param b the same
 * @returns false for anything it does not know (functions, class instances that are not the same object)
 */
export function sameValue(a: unknown, b: unknown): boolean {
  if (a === b || Object.is(a, b)) return true;
  if (typeof a !== 'object' || typeof b !== 'object' || a === null || b === null) return false;
  const prototype: unknown = Object.getPrototypeOf(a);
  if (prototype !== Object.getPrototypeOf(b)) return false;
  if (Array.isArray(a)) return sameArray(a, b as readonly unknown[]);
  if (ArrayBuffer.isView(a)) return sameView(a, b as ArrayBufferView);
  if (a instanceof Map) return sameArray([...a], [...(b as Map<unknown, unknown>)]);
  if (a instanceof Set) return sameArray([...a], [...(b as Set<unknown>)]);
  if (a instanceof Date) return Object.is(a.getTime(), (b as Date).getTime());
  if (prototype !== Object.prototype && prototype !== null) return false;
  return sameFields(a, b);
}

function sameArray(a: readonly unknown[], b: readonly unknown[]): boolean {
  if (a.length !== b.length) return false;
  for (let i = 0; i < a.length; i++) if (!sameValue(a[i], b[i])) return false;
  return true;
}

function sameView(a: ArrayBufferView, b: ArrayBufferView): boolean {
  if (a.byteLength !== b.byteLength) return false;
  if (a instanceof DataView) return sameBytes(bytesOf(a), bytesOf(b));
  return sameBytes(a as unknown as ArrayLike<number>, b as unknown as ArrayLike<number>);
}

function bytesOf(view: ArrayBufferView): Uint8Array {
  return new Uint8Array(view.buffer, view.byteOffset, view.byteLength);
}

function sameBytes(a: ArrayLike<number>, b: ArrayLike<number>): boolean {
  for (let i = 0; i < a.length; i++) {
    const left = a[i] as number;
    const right = b[i] as number;
    // NaN stands for a missing value in a number column, so two of them are the same.
    if (left !== right && !(Number.isNaN(left) && Number.isNaN(right))) return false;
  }
  return true;
}

function sameFields(a: object, b: object): boolean {
  const keys = Object.keys(a);
  if (keys.length !== Object.keys(b).length) return false;
  for (const key of keys) {
    if (!Object.hasOwn(b, key)) return false;
    if (!sameValue((a as Record<string, unknown>)[key], (b as Record<string, unknown>)[key])) return false;
  }
  return true;
}
