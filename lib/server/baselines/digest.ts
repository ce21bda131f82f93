import { createHash } from 'node:crypto';
import canonicalize from 'canonicalize';

/** The one text of a document: canonical JSON (RFC 8785). */
export function canonicalText(document: object): string {
  const text = canonicalize(document);
  if (text === undefined) throw new TypeError('a document must be JSON');
  return text;
}

/** `sha256:` and the SHA-256 of a canonical text in UTF-8. */
export function digestOf(text: string): string {
  return `sha256:${createHash('sha256').update(text, 'utf8').digest('hex')}`;
}
