import { createHash } from 'node:crypto';
import { describe, expect, test } from 'vitest';
import { sha256 } from '../../src/worksheet/digest.ts';

describe('sha256', () => {
  // FIPS 180-2 appendix B.1 to B.3, and the empty message of the NIST short messages; quoted from memory.
  test.each([
    ['', 'e3b0c44298fc1c149afbf4c8996fb92427ae41e4649b934ca495991b7852b855'],
    ['abc', 'ba7816bf8f01cfea414140de5dae2223b00361a396177a9cb410ff61f20015ad'],
    [
      'abcdbcdecdefdefgefghfghighijhijkijkljklmklmnlmnomnopnopq',
      '248d6a61d20638b8e5c026930c3e6039a33ce45964ff2167f6ecedd419db06c1',
    ],
    ['a'.repeat(1_000_000), 'cdc76e5c9914fb9281a1c7e284d73e67f1809a48a497200e046d39ccc7112cd0'],
  ])('agrees with FIPS 180-2 (case %#), exactly', (message, digest) => {
    expect(sha256(message)).toBe(digest);
  });

  test('agrees with node:crypto for every length from 0 to 300 bytes, exactly', () => {
    const bytes = Uint8Array.from({ length: 300 }, (_, i) => (i * 167 + 13) % 256);
    for (let length = 0; length <= 300; length++) {
      const part = bytes.subarray(0, length);
      expect(sha256(part)).toBe(createHash('sha256').update(part).digest('hex'));
    }
  });

  test('by hand: text is taken as UTF-8', () => {
    expect(sha256('\u20ac')).toBe(sha256(Uint8Array.of(0xe2, 0x82, 0xac)));
  });

  test('invariance: arguments are not modified, and a call leaves nothing behind for the next', () => {
    const bytes = Uint8Array.of(1, 2, 3);
    const first = sha256(bytes);
    expect(sha256(bytes)).toBe(first);
    expect([...bytes]).toEqual([1, 2, 3]);
  });
});
