import { randomUUID } from 'node:crypto';
import { AppError, ERROR_CODES, problemType } from '@/lib/errors';
import { log } from '@/lib/server/log';

export interface Failure {
  readonly error: AppError;
  /** Names the log entry of a fault of ours; null for what the caller can mend. */
  readonly id: string | null;
}

/** What PostgreSQL answers to a text with a NUL character, which it keeps nowhere: `invalid byte sequence`, and the same within JSON. */
const NUL_CODES: readonly unknown[] = ['22021', '22P05'];

const isNulText = (thrown: unknown): boolean =>
  thrown instanceof Error && 'code' in thrown && NUL_CODES.includes(thrown.code);

/** What is told of anything thrown. A fault of ours is logged under an id, and only the id is told. */
export function failureOf(thrown: unknown, where: string): Failure {
  if (thrown instanceof AppError && thrown.code !== 'internal') {
    if (thrown.cause !== undefined) log.warn({ err: thrown.cause, where }, thrown.message);
    return { error: thrown, id: null };
  }
  if (isNulText(thrown)) {
    return {
      error: new AppError('invalid-request', 'A text holds a NUL character. Leave it out.'),
      id: null,
    };
  }
  const id = randomUUID();
  log.error({ err: thrown, where, errorId: id }, 'unexpected error');
  const message = `Something failed on our side. It is in the log as ${id}.`;
  return { error: new AppError('internal', message), id };
}

/** RFC 9457 problem details. */
export function problemResponse(failure: Failure, headers: Record<string, string> = {}): Response {
  const { error, id } = failure;
  return Response.json(
    {
      type: problemType(error.code),
      title: ERROR_CODES[error.code].title,
      status: error.status,
      detail: error.message,
      ...(id === null ? {} : { instance: `urn:uuid:${id}` }),
      ...(error.errors.length === 0 ? {} : { errors: error.errors }),
    },
    {
      status: error.status,
      headers: {
        'Content-Type': 'application/problem+json',
        'Cache-Control': 'no-store',
        ...(error.retryAfter === null ? {} : { 'Retry-After': String(error.retryAfter) }),
        ...headers,
      },
    },
  );
}
