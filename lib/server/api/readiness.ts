import { HeadBucketCommand } from '@aws-sdk/client-s3';
import { sql } from 'kysely';
import { AppError } from '@/lib/errors';
import { serverDb } from '@/lib/server/database';
import { objectStore } from '@/lib/server/storage/client';

const PATIENCE_MS = 3000;
/** Whoever asks within this time is given the answer there is: asking needs no token and must cost nothing. */
const HOLDS_MS = 1000;

let asked = -Infinity;
let answer: Promise<void> | null = null;

/** Throws `unavailable`, without saying what of, unless database and file store answer. */
export async function requireReady(): Promise<void> {
  const now = performance.now();
  if (answer === null || now - asked > HOLDS_MS) {
    asked = now;
    answer = check();
  }
  return answer;
}

async function check(): Promise<void> {
  const { client, bucket } = objectStore();
  try {
    await Promise.all([
      inTime(sql`select 1`.execute(serverDb())),
      client.send(new HeadBucketCommand({ Bucket: bucket }), {
        abortSignal: AbortSignal.timeout(PATIENCE_MS),
      }),
    ]);
  } catch (cause) {
    throw new AppError('unavailable', 'The service is up and not ready to work.', { cause, retryAfter: 5 });
  }
}

async function inTime<T>(work: Promise<T>): Promise<T> {
  let timer: NodeJS.Timeout | undefined;
  const late = new Promise<never>((_resolve, reject) => {
    timer = setTimeout(() => reject(new Error(`no answer within ${PATIENCE_MS} ms`)), PATIENCE_MS);
  });
  return Promise.race([work, late]).finally(() => clearTimeout(timer));
}
