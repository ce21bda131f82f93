import { createHash } from 'node:crypto';
import canonicalize from 'canonicalize';
import { type Transaction } from 'kysely';
import { type z } from 'zod';
import { type Db } from '@/db/client';
import { findKept, keepResult, reserveKey } from '@/db/queries/idempotency-keys';
import { type Database } from '@/db/schema/database';
import { AppError } from '@/lib/errors';

const REMEMBERED_MS = 24 * 3600 * 1000;

const since = (): Date => new Date(Date.now() - REMEMBERED_MS);

/** A caller's key, with what its request was made of. */
export interface KeyedRequest {
  readonly userId: string;
  readonly key: string;
  /** Whatever must be the same for the request to be the same. */
  readonly request: Readonly<Record<string, string>>;
}

/** The Idempotency-Key of a request (draft-ietf-httpapi-idempotency-key-header), with or without its quotes; null without one. */
export function idempotencyKey(headers: Headers): string | null {
  const given = headers.get('idempotency-key');
  if (given === null) return null;
  const key = /^"(.*)"$/.exec(given)?.[1] ?? given;
  if (!/^[\x21-\x7e]{1,255}$/.test(key)) {
    throw new AppError('invalid-request', 'An Idempotency-Key has 1 to 255 visible ASCII characters.');
  }
  return key;
}

/** Whether a result is kept under the key, so that the request is a repetition or a mistake, and no new work. */
export async function isKeyInUse(db: Db, userId: string, key: string): Promise<boolean> {
  return (await findKept(db, { userId, key }, since())) !== undefined;
}

/**
 * Does `work` once per key: whoever repeats the request, even at the same moment, is given the first result, checked by `schema`.
 * It is kept in the transaction of the work, so neither is without the other. Throws `invalid-input` when the key was used for
 * another request.
 */
export async function answerOnce<T>(
  db: Db,
  { request, ...owner }: KeyedRequest,
  work: (trx: Transaction<Database>) => Promise<T>,
  schema: z.ZodType<T>,
): Promise<T> {
  const requestHash = createHash('sha256')
    .update(canonicalize(request) ?? '')
    .digest('hex');
  return db.transaction().execute(async (trx) => {
    if (await reserveKey(trx, owner, requestHash, since())) {
      const result = await work(trx);
      await keepResult(trx, owner, result);
      return result;
    }
    const kept = await findKept(trx, owner, since());
    if (kept?.requestHash !== requestHash) {
      throw new AppError(
        'invalid-input',
        'This Idempotency-Key was used for another request. Give each new request a key of its own.',
      );
    }
    return schema.parse(kept.result);
  });
}
