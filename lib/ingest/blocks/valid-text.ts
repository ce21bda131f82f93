const strict = new TextDecoder('utf-8', { fatal: true, ignoreBOM: true });

/** Whether bytes are UTF-8 text without a NUL. Cheap where they are ASCII. */
export function isText(buffer: Uint8Array<ArrayBuffer>, start: number, end: number): boolean {
  const bytes = buffer.subarray(start, end);
  if (bytes.includes(0)) return false;
  if (isAscii(bytes)) return true;
  try {
    strict.decode(bytes);
    return true;
  } catch (error) {
    if (error instanceof TypeError) return false;
    throw error;
  }
}

/** Four bytes at a time: none has its highest bit set. */
function isAscii(bytes: Uint8Array<ArrayBuffer>): boolean {
  const head = Math.min((4 - (bytes.byteOffset & 3)) & 3, bytes.length);
  const words = new Int32Array(bytes.buffer, bytes.byteOffset + head, (bytes.length - head) >> 2);
  let all = 0;
  for (let k = 0; k < words.length; k += 1) all |= words[k] ?? 0;
  if ((all & 0x80808080) !== 0) return false;
  for (let k = 0; k < head; k += 1) if ((bytes[k] ?? 0) > 127) return false;
  for (let k = head + 4 * words.length; k < bytes.length; k += 1) if ((bytes[k] ?? 0) > 127) return false;
  return true;
}
