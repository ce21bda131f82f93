import canonicalize from 'canonicalize';
import { type Component } from '@/lib/mass/component';
import { type ListDeclarations } from '@/lib/mass/declarations';

/** The content format of new revisions: SHA-256 over `contentHead`, then every row in its order as `RowBytes` writes it. */
export const CONTENT_FORMAT = 2;

/** The declarations as canonical JSON (RFC 8785) on a line, which begins what is hashed in either format. */
export function contentHead(declarations: ListDeclarations): string {
  return `${canonicalize(declarations) ?? ''}\n`;
}

/** A row in format 1: as canonical JSON on a line. */
export function contentLine(component: Component): string {
  return `${canonicalize(component) ?? ''}\n`;
}
