import { AppError } from '@/lib/errors';

const SAFE = new Set(['GET', 'HEAD', 'OPTIONS']);

/**
 * Throws `wrong-origin` unless the request was made by our own pages: what may change something must carry our Origin; what only
 * reads must not have been started by another site.
 */
export function requireOwnOrigin(method: string, headers: Headers, appUrl: string): void {
  const site = headers.get('sec-fetch-site');
  const own = SAFE.has(method)
    ? site === null || site === 'same-origin' || site === 'none'
    : headers.get('origin') === appUrl;
  if (!own) {
    throw new AppError(
      'wrong-origin',
      `This request did not come from ${appUrl}. Open Polhode there and try again.`,
    );
  }
}

/** Checks the declared length before a byte of the body is read. `maxBytes` 0 takes no body. */
export function requireDeclaredSize(method: string, headers: Headers, maxBytes: number): void {
  if (SAFE.has(method)) return;
  const declared = headers.get('content-length');
  if (declared === null) {
    if (headers.get('transfer-encoding') === null) return;
    throw new AppError('length-required', 'Send the body with a Content-Length.');
  }
  if (!/^\d{1,15}$/.test(declared)) throw new AppError('invalid-request', 'Content-Length is not a number.');
  if (Number(declared) > maxBytes) {
    throw new AppError(
      'too-large',
      maxBytes === 0
        ? 'This request takes no body.'
        : `The body has ${declared} bytes; at most ${maxBytes} are accepted here.`,
    );
  }
}
