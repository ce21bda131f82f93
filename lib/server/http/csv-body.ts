import { AppError } from '@/lib/errors';
import { requireDeclaredSize } from './guards';

const CSV_TYPES = ['text/csv', 'application/octet-stream'];

/**
 * What a request with a CSV file as its body declares, checked before a byte of it is read. Returns its length in bytes. Throws
 * AppError `unsupported-media-type`, `length-required`, `invalid-request` or `too-large`.
 */
export function requireCsv(headers: Headers, maxBytes: number): number {
  const [type = '', ...parameters] = (headers.get('content-type') ?? '').toLowerCase().split(';');
  if (!CSV_TYPES.includes(type.trim())) {
    throw new AppError('unsupported-media-type', 'Send the file itself as the body, as text/csv.');
  }
  const charset = parameters.map((one) => /^\s*charset="?([^"\s]+)"?\s*$/.exec(one)?.[1]).find(Boolean);
  if (charset !== undefined && !['utf-8', 'utf8', 'us-ascii'].includes(charset)) {
    throw new AppError('unsupported-media-type', `Send the file in UTF-8, not in ${charset}.`);
  }
  const encoding = headers.get('content-encoding');
  if (encoding !== null && encoding.toLowerCase() !== 'identity') {
    throw new AppError('unsupported-media-type', 'Send the file as it is, without a Content-Encoding.');
  }
  const declared = headers.get('content-length');
  if (declared === null) throw new AppError('length-required', 'Send the file with a Content-Length.');
  requireDeclaredSize('POST', headers, maxBytes);
  return Number(declared);
}
