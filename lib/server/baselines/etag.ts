import { createHash } from 'node:crypto';
import { type BaselineState } from '@/lib/baselines/states';

/** A strong ETag over what makes one representation of a baseline: its digest, its state, the part asked for and the units. */
export function etagOf(
  baseline: { readonly digest: string; readonly state: BaselineState },
  representation: string,
): string {
  const text = [baseline.digest, baseline.state, representation].join('\n');
  return `"${createHash('sha256').update(text).digest('base64url')}"`;
}

/** Opaque tags with their quotes (RFC 9110, 8.8.3); a weak one without its `W/`. */
const TAGS = /"[\x21\x23-\x7e\x80-\xff]*"/g;

/** Whether If-None-Match names this ETag (RFC 9110, 13.1.2: weak comparison, a list, or `*`). */
export function matches(ifNoneMatch: string | null, etag: string): boolean {
  if (ifNoneMatch === null) return false;
  const named: readonly string[] = ifNoneMatch.match(TAGS) ?? [];
  return ifNoneMatch.trim() === '*' || named.includes(etag);
}
