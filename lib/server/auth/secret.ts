import { createHash, randomBytes } from 'node:crypto';

/** A new secret of 256 random bits, in letters that need no escaping. */
export const newSecret = (): string => randomBytes(32).toString('base64url');

/** What is stored of a secret. It has 256 bits of its own, so a plain hash is enough. */
export const hashSecret = (secret: string): string => createHash('sha256').update(secret).digest('hex');
