/** Where streams go until their hash is known. */
export const INCOMING = 'incoming/';

/** The lasting name of the bytes with this SHA-256 (hex). Throws on anything else. */
export function keyOf(sha256: string): string {
  if (!/^[0-9a-f]{64}$/.test(sha256)) throw new Error('A stored file is named by the hex of its SHA-256.');
  return `sha256/${sha256}`;
}
