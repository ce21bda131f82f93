/** Cuts a byte stream into blocks of `size` bytes (the last may be shorter), so that nothing later depends on how it arrived. */
export async function* blocks(bytes: AsyncIterable<Uint8Array>, size: number): AsyncGenerator<Uint8Array> {
  let block = new Uint8Array(size);
  let filled = 0;
  for await (const chunk of bytes) {
    for (let at = 0; at < chunk.length;) {
      const part = chunk.subarray(at, at + size - filled);
      block.set(part, filled);
      filled += part.length;
      at += part.length;
      if (filled === size) {
        yield block;
        block = new Uint8Array(size);
        filled = 0;
      }
    }
  }
  if (filled > 0) yield block.subarray(0, filled);
}
