import { randomBytes } from 'node:crypto';
import { hash, verify } from '@node-rs/argon2';
import { AppError } from '@/lib/errors';

/** OWASP Password Storage Cheat Sheet, argon2id: 19 MiB, two passes, one lane. The library's default variant is argon2id. */
const COST = { memoryCost: 19_456, timeCost: 2, parallelism: 1 } as const;

const AT_ONCE = 2;
const WAITING_AT_MOST = 64;

let running = 0;
const waiting: (() => void)[] = [];

/** A hash takes 19 MiB and 50 ms of a core: only a few run at once, a short queue waits, the rest is told to come back. */
async function bounded<T>(work: () => Promise<T>): Promise<T> {
  if (running >= AT_ONCE) {
    if (waiting.length >= WAITING_AT_MOST) {
      throw new AppError(
        'unavailable',
        'Too many people sign in at this moment. Try again in a few seconds.',
        {
          retryAfter: 5,
        },
      );
    }
    await new Promise<void>((resolve) => waiting.push(resolve));
  } else {
    running += 1;
  }
  try {
    return await work();
  } finally {
    // The place is handed to the next in line, so that `running` never passes AT_ONCE.
    const next = waiting.shift();
    if (next) next();
    else running -= 1;
  }
}

export function hashPassword(password: string): Promise<string> {
  return bounded(() => hash(password, COST));
}

let nobody: Promise<string> | undefined;

/** Whether the password is the one hashed. Without a hash (no such person) it takes as long and answers false. */
export async function verifyPassword(passwordHash: string | null, password: string): Promise<boolean> {
  nobody ??= hash(randomBytes(32), COST);
  const against = passwordHash ?? (await nobody);
  const matches = await bounded(() => verify(against, password));
  return passwordHash !== null && matches;
}
