/** Every way to fail that a caller can learn of, with its HTTP status and its title. Closed: a new one is added here only. */
export const ERROR_CODES = {
  'invalid-request': { status: 400, title: 'The request is not well formed' },
  'not-signed-in': { status: 401, title: 'Not signed in' },
  'invalid-token': { status: 401, title: 'The token is not valid' },
  forbidden: { status: 403, title: 'Not allowed' },
  'wrong-origin': { status: 403, title: 'The request comes from another site' },
  'insufficient-scope': { status: 403, title: 'The token does not reach this far' },
  'not-found': { status: 404, title: 'Not found' },
  'method-not-allowed': { status: 405, title: 'There is no such method here' },
  conflict: { status: 409, title: 'The state does not allow this' },
  gone: { status: 410, title: 'No longer available' },
  'length-required': { status: 411, title: 'The request must declare its length' },
  'too-large': { status: 413, title: 'Too large' },
  'unsupported-media-type': { status: 415, title: 'Unsupported media type' },
  'invalid-input': { status: 422, title: 'The input has errors' },
  'too-many-requests': { status: 429, title: 'Too many requests' },
  internal: { status: 500, title: 'Something failed on the server' },
  unavailable: { status: 503, title: 'A service is not available' },
} as const satisfies Record<string, { status: number; title: string }>;

export type ErrorCode = keyof typeof ERROR_CODES;

/** One thing wrong in an input: by line and column in a file, by JSON pointer (RFC 6901) in a body, by name in a query or path. */
export interface InputError {
  readonly message: string;
  readonly pointer?: string;
  readonly parameter?: string;
  readonly line?: number | null;
  readonly column?: string | null;
  readonly found?: string | null;
  readonly kind?: string;
}

interface AppErrorOptions {
  readonly errors?: readonly InputError[];
  /** Seconds after which another try makes sense. */
  readonly retryAfter?: number;
  readonly cause?: unknown;
}

/** The one error that is told to a caller; `message` is a sentence for them. Anything else thrown is a fault of ours. */
export class AppError extends Error {
  override readonly name = 'AppError';
  readonly code: ErrorCode;
  readonly errors: readonly InputError[];
  readonly retryAfter: number | null;

  constructor(code: ErrorCode, message: string, options: AppErrorOptions = {}) {
    super(message, options.cause === undefined ? {} : { cause: options.cause });
    this.code = code;
    this.errors = options.errors ?? [];
    this.retryAfter = options.retryAfter ?? null;
  }

  get status(): number {
    return ERROR_CODES[this.code].status;
  }
}

/** The stable `type` of a problem (RFC 9457). */
export const problemType = (code: ErrorCode): string => `urn:polhode:problem:${code}`;

/** An input error of one form field or JSON member. */
export function fieldError(field: string, message: string): AppError {
  return new AppError('invalid-input', message, { errors: [{ pointer: `/${field}`, message }] });
}
