import { z } from 'zod';
import { type Db } from '@/db/client';
import { type ProgramRow } from '@/db/queries/programs';
import { addRevisionEndpoint } from '@/lib/contracts/api/revisions';
import { type Person } from '@/lib/server/actor';
import { reachList } from '@/lib/server/lists/reach-list';
import { receiveFile } from '@/lib/server/lists/receive-file';
import { orRefused } from '@/lib/server/lists/mapping/reach-upload';
import { type Remembered } from '@/lib/server/lists/mapping/remembered';
import { wayOf } from '@/lib/server/lists/mapping/way-of';
import { assertMayImport, queueImport, requestImport } from '@/lib/server/lists/request-import';
import { openObject } from '@/lib/server/storage/open-object';
import { answerOnce, isKeyInUse } from './idempotency';

interface AddRevision {
  readonly request: Request;
  readonly person: Person;
  readonly program: ProgramRow;
  /** Code of the list. */
  readonly list: string;
  readonly reason: string;
  /** Idempotency-Key, or null without one. */
  readonly key: string | null;
}

/**
 * Stores the request's file and queues it as the next revision of a list; returns the import's id. With a key, a repetition is
 * given the import of the first request. Throws `not-found`, `too-many-requests` before the body is read, and what `receiveFile`
 * and `answerOnce` throw.
 */
export async function addRevision(db: Db, input: AddRevision): Promise<string> {
  const { request, person, program, key, reason } = input;
  const list = await reachList(db, program.id, input.list);
  // A repetition is answered whatever is under way; it starts nothing.
  if (key === null || !(await isKeyInUse(db, person.userId, key))) await assertMayImport(db, person.userId);
  const file = await receiveFile(request, { maxBytes: addRevisionEndpoint.body.maxBytes });
  const way = await orRefused(wayOf(db, list.id, { open: () => openObject(file.sha256), bytes: file.bytes }));
  const asked = {
    person,
    list: { id: list.id, programId: program.id, code: list.code },
    file,
    reason,
    // A file of other headings and no remembered mapping is read as the contract says: its import names what it misses.
    ...(way.way === 'remembered' ? { read: readingOf(way.remembered) } : {}),
  };
  if (key === null) return requestImport(db, asked);
  const same = { path: addRevisionEndpoint.path, list: list.id, sha256: file.sha256, reason };
  return answerOnce(
    db,
    { userId: person.userId, key, request: same },
    (trx) => queueImport(trx, asked),
    z.string(),
  );
}

/** A totals row that does not agree is a problem of the import: nobody is there to look at it. */
function readingOf({ id, mapping }: Remembered) {
  return { mappingId: id, mapping, acceptTotals: false };
}
