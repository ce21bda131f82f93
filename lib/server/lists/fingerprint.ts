/** What a fingerprint depends on besides the bytes: two secret keys of 64 bits. */
export type FingerprintKey = readonly [number, number, number, number];

export type Fingerprint = Int32Array<ArrayBuffer>;

/** The key from a list's `fingerprint_key`. */
export function fingerprintKey(uuid: string): FingerprintKey {
  const hex = uuid.replaceAll('-', '');
  if (!/^[0-9a-f]{32}$/i.test(hex)) throw new RangeError(`not a key: ${uuid.length} characters`);
  const part = (k: number): number => Number.parseInt(hex.slice(8 * k, 8 * k + 8), 16) | 0;
  return [part(0), part(1), part(2), part(3)];
}

/**
 * The fingerprint of `view` from `from` to `to`, 128 bits as four words into `out`: HalfSipHash-1-3 with 64 bits of output (Aumasson
 * and Bernstein, SipHash: a fast short-input PRF, 2012; the 32-bit variant of its reference code), under each of the two keys. Both go
 * through one loop for all rounds: their steps do not wait for each other, and the states stay in registers.
 */
export function fingerprint(
  view: DataView,
  from: number,
  to: number,
  [k0, k1, k2, k3]: FingerprintKey,
  out: Fingerprint,
): void {
  let [v0, v1, v2, v3] = [k0, k1 ^ 0xee, 0x6c796765 ^ k0, 0x74656462 ^ k1];
  let [w0, w1, w2, w3] = [k2, k3 ^ 0xee, 0x6c796765 ^ k2, 0x74656462 ^ k3];
  const words = (to - from) >>> 2;
  let last = (to - from) << 24;
  for (let i = from + 4 * words; i < to; i += 1) last |= view.getUint8(i) << (8 * ((i - from) & 3));
  for (let step = 0; step <= words + 6; step += 1) {
    const word = step < words ? view.getInt32(from + 4 * step, true) : step === words ? last : 0;
    if (step > words) {
      if (step === words + 1) {
        v2 ^= 0xee;
        w2 ^= 0xee;
      } else if (step === words + 4) {
        out[0] = v1 ^ v3;
        out[2] = w1 ^ w3;
        v1 ^= 0xdd;
        w1 ^= 0xdd;
      }
    }
    v3 ^= word;
    w3 ^= word;
    v0 = (v0 + v1) | 0;
    w0 = (w0 + w1) | 0;
    v1 = ((v1 << 5) | (v1 >>> 27)) ^ v0;
    w1 = ((w1 << 5) | (w1 >>> 27)) ^ w0;
    v0 = (v0 << 16) | (v0 >>> 16);
    w0 = (w0 << 16) | (w0 >>> 16);
    v2 = (v2 + v3) | 0;
    w2 = (w2 + w3) | 0;
    v3 = ((v3 << 8) | (v3 >>> 24)) ^ v2;
    w3 = ((w3 << 8) | (w3 >>> 24)) ^ w2;
    v0 = (v0 + v3) | 0;
    w0 = (w0 + w3) | 0;
    v3 = ((v3 << 7) | (v3 >>> 25)) ^ v0;
    w3 = ((w3 << 7) | (w3 >>> 25)) ^ w0;
    v2 = (v2 + v1) | 0;
    w2 = (w2 + w1) | 0;
    v1 = ((v1 << 13) | (v1 >>> 19)) ^ v2;
    w1 = ((w1 << 13) | (w1 >>> 19)) ^ w2;
    v2 = (v2 << 16) | (v2 >>> 16);
    w2 = (w2 << 16) | (w2 >>> 16);
    v0 ^= word;
    w0 ^= word;
  }
  out[1] = v1 ^ v3;
  out[3] = w1 ^ w3;
}
