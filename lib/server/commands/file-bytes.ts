import { closeSync, openSync, readSync } from 'node:fs';

/** The bytes of a file in pieces of one buffer: a piece holds until the next is asked for. For commands, which have nothing else to do. */
export async function* fileBytes(path: string, size = 262_144): AsyncGenerator<Uint8Array> {
  const file = openSync(path, 'r');
  try {
    const buffer = new Uint8Array(size);
    for (let read = readSync(file, buffer); read > 0; read = readSync(file, buffer))
      yield buffer.subarray(0, read);
  } finally {
    closeSync(file);
  }
}
