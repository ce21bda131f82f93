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
 * and Bernstein, SipHash: a fast short-input PRF, 2012; the 32-bit variant of its reference code), under each of the two keys.
 */
export function fingerprint(
  view: DataView,
  from: number,
  to: number,
  key: FingerprintKey,
  out: Fingerprint,
): void {
  halfSip(view, from, to, key[0], key[1], out, 0);
  halfSip(view, from, to, key[2], key[3], out, 2);
}

/** HalfSipHash-1-3 with 64 bits of output, the two words from `at` on. One loop for all its rounds keeps the state in registers. */
function halfSip(
  view: DataView,
  from: number,
  to: number,
  k0: number,
  k1: number,
  out: Fingerprint,
  at: number,
): void {
  let v0 = k0;
  let v1 = k1 ^ 0xee;
  let v2 = 0x6c796765 ^ k0;
  let v3 = 0x74656462 ^ k1;
  const words = (to - from) >>> 2;
  let last = (to - from) << 24;
  for (let i = from + 4 * words; i < to; i += 1) last |= view.getUint8(i) << (8 * ((i - from) & 3));
  for (let step = 0; step <= words + 6; step += 1) {
    const word = step < words ? view.getInt32(from + 4 * step, true) : step === words ? last : 0;
    if (step === words + 1) v2 ^= 0xee;
    if (step === words + 4) {
      out[at] = v1 ^ v3;
      v1 ^= 0xdd;
    }
    v3 ^= word;
    v0 = (v0 + v1) | 0;
    v1 = ((v1 << 5) | (v1 >>> 27)) ^ v0;
    v0 = (v0 << 16) | (v0 >>> 16);
    v2 = (v2 + v3) | 0;
    v3 = ((v3 << 8) | (v3 >>> 24)) ^ v2;
    v0 = (v0 + v3) | 0;
    v3 = ((v3 << 7) | (v3 >>> 25)) ^ v0;
    v2 = (v2 + v1) | 0;
    v1 = ((v1 << 13) | (v1 >>> 19)) ^ v2;
    v2 = (v2 << 16) | (v2 >>> 16);
    v0 ^= word;
  }
  out[at + 1] = v1 ^ v3;
}
