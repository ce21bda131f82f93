import { type HandoffDocument } from './handoff-document';

/** A signed document read back. Its text is checked against its digest by the verify command, not at each reading. */
export function readStoredDocument(text: string): HandoffDocument {
  return JSON.parse(text) as HandoffDocument;
}
