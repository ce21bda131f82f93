import { inUnits } from '@/lib/baselines/document-units';
import { type HandoffDocument } from '@/lib/baselines/handoff-document';
import { readStoredDocument } from '@/lib/baselines/stored-document';
import { baselineCsv } from '@/lib/export/baseline-csv';
import { OUTPUT_UNITS, type UnitSystem } from '@/lib/units/names';
import { etagOf, matches } from './etag';
import { type SignedBaseline } from './reach-baseline';

/** What every answer made from a baseline begins with. */
export function headOf(baseline: SignedBaseline, document: HandoffDocument) {
  return {
    program: document.program,
    baseline: document.baseline,
    build: document.build,
    state: baseline.state,
    title: document.title,
    digest: baseline.digest,
    marking: document.marking,
    caution: document.caution,
    conventions: document.conventions,
  };
}

/** The whole hand-off document: in SI the very text that was signed, with digest and state put before it. */
export function documentText(baseline: SignedBaseline, system: UnitSystem): string {
  const head = { digest: baseline.digest, state: baseline.state };
  if (system === 'si') return `${JSON.stringify(head).slice(0, -1)},${baseline.document.slice(1)}`;
  return JSON.stringify({ ...head, ...inUnits(readStoredDocument(baseline.document), system) });
}

/** One row per condition, as `lib/export/baseline-csv.ts` writes it, with what later events say of the baseline. */
export function conditionsCsv(baseline: SignedBaseline, system: UnitSystem): string {
  return baselineCsv({
    document: inUnits(readStoredDocument(baseline.document), system),
    units: OUTPUT_UNITS[system],
    digest: baseline.digest,
    state: baseline.state,
  });
}

const JSON_TYPE = 'application/json';

/**
 * An answer that clients may keep and ask again for: strong ETag, 304 where it is still the same. `make` is asked for the body only
 * when it is sent.
 */
export function keepable(
  request: Request,
  baseline: SignedBaseline,
  representation: string,
  make: () => string,
  type = JSON_TYPE,
): Response {
  const etag = etagOf(baseline, representation);
  const headers = { ETag: etag, 'Cache-Control': 'private, no-cache' };
  if (matches(request.headers.get('if-none-match'), etag))
    return new Response(null, { status: 304, headers });
  return new Response(make(), { headers: { ...headers, 'Content-Type': type } });
}
