const strict = new TextDecoder('utf-8', { fatal: true, ignoreBOM: true });

/** Whether bytes are UTF-8 text without a NUL. Cheap where they are ASCII. */
export function isText(buffer: Uint8Array<ArrayBuffer>, start: number, end: number): boolean {
  const bytes = buffer.subarray(start, end);
  if (isPlain(bytes)) return true;
  if (bytes.includes(0)) return false;
  try {
    strict.decode(bytes);
    return true;
  } catch (error) {
    if (error instanceof TypeError) return false;
    throw error;
  }
}

/** Four bytes at a time: none has its highest bit set, none is zero. */
function isPlain(bytes: Uint8Array<ArrayBuffer>): boolean {
  const head = Math.min((4 - (bytes.byteOffset & 3)) & 3, bytes.length);
  const words = new Int32Array(bytes.buffer, bytes.byteOffset + head, (bytes.length - head) >> 2);
  let all = 0;
  let k = 0;
  for (; k + 4 <= words.length; k += 4) {
    const [a, b, c, d] = [words[k] ?? 0, words[k + 1] ?? 0, words[k + 2] ?? 0, words[k + 3] ?? 0];
    // Taking 1 from each byte borrows into the highest bit of one that is zero (Mycroft 1987).
    all |= a | ((a - 0x01010101) & ~a) | b | ((b - 0x01010101) & ~b);
    all |= c | ((c - 0x01010101) & ~c) | d | ((d - 0x01010101) & ~d);
  }
  for (; k < words.length; k += 1) {
    const word = words[k] ?? 0;
    all |= word | ((word - 0x01010101) & ~word);
  }
  if ((all & 0x80808080) !== 0) return false;
  const isPlainAt = (k: number): boolean => bytes[k] !== 0 && (bytes[k] ?? 0) < 128;
  for (let k = 0; k < head; k += 1) if (!isPlainAt(k)) return false;
  for (let k = head + 4 * words.length; k < bytes.length; k += 1) if (!isPlainAt(k)) return false;
  return true;
}
