import { Readable } from 'node:stream';
import { type Db } from '@/db/client';
import { type RotorFile, ROTOR_FILE_BYTES, type RotorFileAnswer } from '@/lib/contracts/rotors';
import { readOperatingPoints } from '@/lib/ingest/operating-points';
import { type Problem } from '@/lib/ingest/problem';
import { readRotors } from '@/lib/ingest/rotors';
import { type OperatingPoint, type Rotor } from '@/lib/rotors/rotor';
import { type Person } from '@/lib/server/actor';
import { csvBytes } from '@/lib/server/api/csv-bytes';
import { sentFileName } from '@/lib/server/lists/file-name';
import { type ObjectStore, objectStore } from '@/lib/server/storage/client';
import { storeStream } from '@/lib/server/storage/store-stream';
import { reviseRotors } from './revise-rotors';

export interface ReceiveRotorFile {
  readonly person: Person;
  readonly programId: string;
  readonly request: Request;
  readonly file: RotorFile;
  readonly store?: ObjectStore;
}

interface Reading {
  readonly content: { readonly rotors: readonly Rotor[] } | { readonly points: readonly OperatingPoint[] };
  readonly count: number;
  readonly problems: readonly Problem[];
  readonly problemCounts: Readonly<Record<string, number>>;
  readonly unknownColumns: readonly string[];
}

/**
 * A CSV of rotating parts or operating points becomes the next revision, whole or not at all; a file with problems is answered by
 * them and nothing is kept. Throws what `csvBytes`, `storeStream` and `reviseRotors` throw.
 */
export async function receiveRotorFile(db: Db, input: ReceiveRotorFile): Promise<RotorFileAnswer> {
  const { person, programId, request, file, store = objectStore() } = input;
  const pieces: Uint8Array[] = [];
  for await (const piece of csvBytes(request, ROTOR_FILE_BYTES)) pieces.push(piece);
  const bytes = Buffer.concat(pieces);
  const reading = await read(bytes, file);
  if (reading.problems.length > 0) {
    const total = Object.values(reading.problemCounts).reduce((sum, count) => sum + count, 0);
    return { status: 'problems', problems: [...reading.problems], total };
  }
  const stored = await storeStream(Readable.from([bytes]), { contentLength: bytes.byteLength, store });
  const { number } = await reviseRotors(db, {
    person,
    programId,
    base: file.base,
    reason: file.reason,
    ...reading.content,
    file: { ...stored, name: sentFileName(request.headers) },
  });
  return { status: 'revised', revision: number, count: reading.count, unread: [...reading.unknownColumns] };
}

async function read(bytes: Buffer, file: RotorFile): Promise<Reading> {
  const source = Readable.from([bytes]);
  if (file.content === 'points') {
    const { points, ...rest } = await readOperatingPoints(source);
    return { ...rest, content: { points }, count: points.length };
  }
  const { rotors, ...rest } = await readRotors(source, { inertiaUnit: file.inertia_unit });
  return { ...rest, content: { rotors }, count: rotors.length };
}
