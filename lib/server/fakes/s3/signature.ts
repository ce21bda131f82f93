import { createHash, createHmac, timingSafeEqual } from 'node:crypto';
import { type IncomingMessage } from 'node:http';
import { S3Error } from './errors';

/** AWS Signature Version 4, in the header or in the query (AWS General Reference, "Signature Version 4"). */

export interface Credentials {
  readonly accessKeyId: string;
  readonly secretAccessKey: string;
}

interface Claim {
  readonly credential: string;
  readonly signedHeaders: string;
  readonly signature: string;
  readonly time: string;
  readonly payload: string;
}

const ALGORITHM = 'AWS4-HMAC-SHA256';
const SKEW_MS = 15 * 60_000;

const hmac = (key: string | Buffer, text: string) => createHmac('sha256', key).update(text).digest();
const denied = (code: string, message: string) => new S3Error(403, code, message);

/** Percent-encoding of RFC 3986, as the signature wants it. */
const encode = (text: string) =>
  encodeURIComponent(text).replace(/[!'()*]/g, (c) => `%${c.charCodeAt(0).toString(16).toUpperCase()}`);

function dateOf(time: string): number {
  const parts = /^(\d{4})(\d\d)(\d\d)T(\d\d)(\d\d)(\d\d)Z$/.exec(time);
  if (!parts) throw denied('AccessDenied', 'The time of the signature is missing or malformed.');
  const [year, month, day, hour, minute, second] = parts.slice(1).map(Number) as [
    number,
    number,
    number,
    number,
    number,
    number,
  ];
  return Date.UTC(year, month - 1, day, hour, minute, second);
}

function claimInHeader(request: IncomingMessage, header: string): Claim {
  const field = (name: string) => new RegExp(`${name}=([^, ]+)`).exec(header)?.[1] ?? '';
  const time = String(request.headers['x-amz-date'] ?? '');
  if (Math.abs(Date.now() - dateOf(time)) > SKEW_MS) {
    throw denied('RequestTimeTooSkewed', 'The time of the request is too far from the time here.');
  }
  return {
    credential: field('Credential'),
    signedHeaders: field('SignedHeaders'),
    signature: field('Signature'),
    time,
    payload: String(request.headers['x-amz-content-sha256'] ?? 'UNSIGNED-PAYLOAD'),
  };
}

function claimInQuery(query: URLSearchParams): Claim {
  const field = (name: string) => query.get(`X-Amz-${name}`) ?? '';
  const time = field('Date');
  if (Date.now() > dateOf(time) + Number(field('Expires')) * 1000) {
    throw denied('AccessDenied', 'Request has expired.');
  }
  return {
    credential: field('Credential'),
    signedHeaders: field('SignedHeaders'),
    signature: field('Signature'),
    time,
    payload: 'UNSIGNED-PAYLOAD',
  };
}

function canonicalRequest(request: IncomingMessage, url: URL, claim: Claim): string {
  const query = [...url.searchParams]
    .filter(([name]) => name !== 'X-Amz-Signature')
    .map(([name, value]) => `${encode(name)}=${encode(value)}`)
    .sort();
  const path = url.pathname.split('/').map((part) => encode(decodeURIComponent(part)));
  const names = claim.signedHeaders.split(';');
  const headers = names.map((name) => {
    const value = String(request.headers[name] ?? '');
    return `${name}:${value.trim().replace(/ +/g, ' ')}\n`;
  });
  return [
    request.method,
    path.join('/'),
    query.join('&'),
    headers.join(''),
    claim.signedHeaders,
    claim.payload,
  ].join('\n');
}

/** Throws the protocol's 403 unless the request is signed with these credentials. */
export function checkSignature(request: IncomingMessage, url: URL, credentials: Credentials): void {
  const header = request.headers.authorization ?? '';
  const isInQuery = url.searchParams.get('X-Amz-Algorithm') === ALGORITHM;
  if (!header.startsWith(ALGORITHM) && !isInQuery) throw denied('AccessDenied', 'Access denied.');
  const claim = isInQuery ? claimInQuery(url.searchParams) : claimInHeader(request, header);
  const [accessKeyId, day = '', region = '', service = ''] = claim.credential.split('/');
  if (accessKeyId !== credentials.accessKeyId) {
    throw denied('InvalidAccessKeyId', 'The access key is not known here.');
  }
  const hash = createHash('sha256')
    .update(canonicalRequest(request, url, claim))
    .digest('hex');
  const text = [ALGORITHM, claim.time, `${day}/${region}/${service}/aws4_request`, hash].join('\n');
  const keyOfDay = hmac(`AWS4${credentials.secretAccessKey}`, day);
  const key = hmac(hmac(hmac(keyOfDay, region), service), 'aws4_request');
  const expected = hmac(key, text);
  const given = Buffer.from(claim.signature, 'hex');
  const isSame = given.length === expected.length && timingSafeEqual(given, expected);
  if (!isSame || !claim.time.startsWith(day) || !claim.signedHeaders.split(';').includes('host')) {
    throw denied('SignatureDoesNotMatch', 'The signature is not that of this request.');
  }
}
