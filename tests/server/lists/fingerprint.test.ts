import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { fingerprint, type FingerprintKey, fingerprintKey } from '@/lib/server/lists/fingerprint';

/**
 * HalfSipHash with 64 bits of output, plainly, with c rounds a word and d at the end (Aumasson and Bernstein 2012 and the reference
 * code's 32-bit variant).
 */
function plain(bytes: Uint8Array, k0: number, k1: number, c: number, d: number): number[] {
  const v = Int32Array.from([k0, k1 ^ 0xee, 0x6c796765 ^ k0, 0x74656462 ^ k1]);
  const rotate = (i: number, by: number): void => {
    v[i] = ((v[i] ?? 0) << by) | ((v[i] ?? 0) >>> (32 - by));
  };
  const half = (a: number, b: number, by: number, then: number): void => {
    v[a] = (v[a] ?? 0) + (v[b] ?? 0);
    rotate(b, by);
    v[b] = (v[b] ?? 0) ^ (v[a] ?? 0);
    if (then > 0) rotate(a, then);
  };
  const rounds = (count: number): void => {
    for (let k = 0; k < count; k += 1) {
      half(0, 1, 5, 16);
      half(2, 3, 8, 0);
      half(0, 3, 7, 0);
      half(2, 1, 13, 16);
    }
  };
  const padded = new Uint8Array(4 * Math.floor(bytes.length / 4) + 4);
  padded.set(bytes);
  padded[padded.length - 1] = bytes.length & 255;
  const view = new DataView(padded.buffer);
  for (let at = 0; at < padded.length; at += 4) {
    v[3] = (v[3] ?? 0) ^ view.getInt32(at, true);
    rounds(c);
    v[0] = (v[0] ?? 0) ^ view.getInt32(at, true);
  }
  v[2] = (v[2] ?? 0) ^ 0xee;
  rounds(d);
  const first = (v[1] ?? 0) ^ (v[3] ?? 0);
  v[1] = (v[1] ?? 0) ^ 0xdd;
  rounds(d);
  return [first, (v[1] ?? 0) ^ (v[3] ?? 0)];
}

const hex = (words: readonly number[]): string => Buffer.from(Int32Array.from(words).buffer).toString('hex');

describe('A fingerprint', () => {
  // HalfSipHash-2-4, key 00 01 .. 07, messages of the bytes 00 01 ..: vectors_hsip64 of the reference code (github.com/veorq/SipHash,
  // vectors.h), read in a stored copy.
  it.each([
    [0, '218d1f59b9b83cc8'],
    [1, 'be552412f8387315'],
    [2, '064f39ef7c50eb57'],
    [3, 'ce0f1a45f7060679'],
  ])('rests on a hash that gives the published values: %i bytes', (length, published) => {
    const message = Uint8Array.from({ length }, (_, k) => k);
    expect(hex(plain(message, 0x03020100, 0x07060504, 2, 4))).toBe(published);
  });

  it('is that hash with fewer rounds, under two keys', () => {
    const word = fc.integer({ min: -(2 ** 31), max: 2 ** 31 - 1 });
    fc.assert(
      fc.property(
        fc.uint8Array({ maxLength: 300 }),
        fc.nat(9),
        fc.tuple(word, word, word, word),
        (bytes, before, key) => {
          const held = new Uint8Array(before + bytes.length + 3).fill(7);
          held.set(bytes, before);
          const out = new Int32Array(4);
          fingerprint(new DataView(held.buffer), before, before + bytes.length, key, out);
          expect([...out]).toEqual([
            ...plain(bytes, key[0], key[1], 1, 3),
            ...plain(bytes, key[2], key[3], 1, 3),
          ]);
        },
      ),
    );
  });

  it('depends on the key, which is read from what a list keeps', () => {
    const bytes = new DataView(new TextEncoder().encode('a row').buffer);
    const of = (key: FingerprintKey): number[] => {
      const out = new Int32Array(4);
      fingerprint(bytes, 0, bytes.byteLength, key, out);
      return [...out];
    };
    const key = fingerprintKey('00112233-4455-6677-8899-aabbccddeeff');
    expect(key).toEqual([0x00112233, 0x44556677, 0x8899aabb | 0, 0xccddeeff | 0]);
    expect(of(key)).not.toEqual(of([0x00112233, 0x44556677, 0x8899aabb | 0, 0xccddeefe | 0]));
    expect(() => fingerprintKey('no key')).toThrow(RangeError);
  });
});
