import { S3ServiceException } from '@aws-sdk/client-s3';
import { AppError } from '@/lib/errors';

const statusOf = (error: unknown): number =>
  error instanceof S3ServiceException ? (error.$metadata.httpStatusCode ?? 0) : 0;

/** The store does not know the key. */
export const isMissing = (error: unknown): boolean => statusOf(error) === 404;

/** The store has the key already (412), or is being given it by another request at this moment (409). */
export const isTaken = (error: unknown): boolean => statusOf(error) === 412 || statusOf(error) === 409;

/** What a caller learns of a store that fails; the store's own words are the cause, for the log. */
export function storeFailed(what: string, error: unknown): AppError {
  if (error instanceof AppError) return error;
  const isDamaged = error instanceof S3ServiceException && error.name === 'BadDigest';
  const why = isDamaged
    ? 'the bytes did not arrive there unharmed'
    : 'the file store does not answer as it should';
  return new AppError('unavailable', `${what}: ${why}. Try again later.`, {
    cause: error,
    retryAfter: 30,
  });
}
