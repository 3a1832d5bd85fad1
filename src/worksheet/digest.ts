/** First 32 bits of the fractional parts of the cube roots of the first 64 primes. */
const ROUND = constants(64, 1 / 3);
/** First 32 bits of the fractional parts of the square roots of the first 8 primes. */
const START = constants(8, 1 / 2);

/**
 * SHA-256 as 64 lower-case hexadecimal digits.
 *
 * @param data bytes, or text that is taken as UTF-8
 * @returns the digest
 * @source FIPS 180-4 (NIST 2015), sections 4.1.2, 4.2.2, 5.1.1, 5.3.3 and 6.2.2
 * @checked the examples of FIPS 180-2 appendix B and the NIST short messages, exactly; Node's own for 0 to 300 bytes
 */
export function sha256(data: string | Uint8Array): string {
  const bytes = typeof data === 'string' ? new TextEncoder().encode(data) : data;
  const state = START.slice();
  const schedule = new Int32Array(64);
  const whole = bytes.length - (bytes.length % 64);
  for (let at = 0; at < whole; at += 64) compress(state, schedule, bytes, at);
  const end = padded(bytes.subarray(whole), bytes.length);
  for (let at = 0; at < end.length; at += 64) compress(state, schedule, end, at);
  return Array.from(state, (word) => (word >>> 0).toString(16).padStart(8, '0')).join('');
}

/** What is left of the message, a one bit, zeros, and the length in bits as 64 bits. */
function padded(rest: Uint8Array, length: number): Uint8Array {
  const end = new Uint8Array(rest.length < 56 ? 64 : 128);
  end.set(rest);
  end[rest.length] = 0x80;
  const view = new DataView(end.buffer);
  view.setUint32(end.length - 8, Math.floor(length / 0x20000000));
  view.setUint32(end.length - 4, (length << 3) >>> 0);
  return end;
}

function compress(state: Int32Array, w: Int32Array, bytes: Uint8Array, at: number): void {
  expand(w, bytes, at);
  let [a, b, c, d, e, f, g, h] = state as unknown as [number, number, number, number, number, number, number, number];
  for (let t = 0; t < 64; t++) {
    const big1 = turn(e, 6) ^ turn(e, 11) ^ turn(e, 25);
    const choice = (e & f) ^ (~e & g);
    const t1 = (h + big1 + choice + (ROUND[t] as number) + (w[t] as number)) | 0;
    const big0 = turn(a, 2) ^ turn(a, 13) ^ turn(a, 22);
    const majority = (a & b) ^ (a & c) ^ (b & c);
    h = g;
    g = f;
    f = e;
    e = (d + t1) | 0;
    d = c;
    c = b;
    b = a;
    a = (t1 + big0 + majority) | 0;
  }
  const round = [a, b, c, d, e, f, g, h];
  for (let i = 0; i < 8; i++) state[i] = ((state[i] as number) + (round[i] as number)) | 0;
}

function expand(w: Int32Array, bytes: Uint8Array, at: number): void {
  for (let t = 0; t < 16; t++) {
    const i = at + 4 * t;
    w[t] =
      ((bytes[i] as number) << 24) |
      ((bytes[i + 1] as number) << 16) |
      ((bytes[i + 2] as number) << 8) |
      (bytes[i + 3] as number);
  }
  for (let t = 16; t < 64; t++) {
    const x = w[t - 15] as number;
    const y = w[t - 2] as number;
    const small0 = turn(x, 7) ^ turn(x, 18) ^ (x >>> 3);
    const small1 = turn(y, 17) ^ turn(y, 19) ^ (y >>> 10);
    w[t] = ((w[t - 16] as number) + small0 + (w[t - 7] as number) + small1) | 0;
  }
}

function turn(x: number, by: number): number {
  return (x >>> by) | (x << (32 - by));
}

/** The fractional part is taken exactly in whole numbers: Math.cbrt may differ in the last digit between engines. */
function constants(count: number, power: number): Int32Array {
  const words = new Int32Array(count);
  let prime = 1;
  for (let i = 0; i < count; i++) {
    do prime++;
    while (!isPrime(prime));
    words[i] = Number(BigInt.asIntN(32, root(BigInt(prime), Math.round(1 / power))));
  }
  return words;
}

function isPrime(n: number): boolean {
  for (let d = 2; d * d <= n; d++) if (n % d === 0) return false;
  return true;
}

/** The whole part of the root of `prime` times 2^32: its low 32 bits are those of the fraction. */
function root(prime: bigint, degree: number): bigint {
  const target = prime << BigInt(32 * degree);
  let low = 0n;
  let high = 1n << 40n;
  while (high - low > 1n) {
    const middle = (low + high) >> 1n;
    if (middle ** BigInt(degree) <= target) low = middle;
    else high = middle;
  }
  return low;
}
