import { createHash } from 'node:crypto';
import { sql } from 'kysely';
import { type Db } from '@/db/client';
import { digestOf, canonicalText } from './digest';
import { verifyAgainstTrail } from './verify-against-trail';
import { verifyTrail } from '@/lib/server/audit/verify-trail';
import { hashRevision } from '@/lib/server/lists/hash-revision';

/** One thing that does not hold, in words that say which. */
export interface Breach {
  readonly what: string;
  readonly detail: string;
}

export interface Verification {
  readonly baselines: number;
  readonly revisions: number;
  readonly auditEvents: number;
  readonly breaches: readonly Breach[];
}

/**
 * Recomputes every digest from what is stored: each baseline's document, the content of every list revision that a
 * submission holds against its content hash and against the sources its baseline names, and the chain of the trail. What the trail says was
 * decided must be what is stored. Call it on one snapshot: steps taken meanwhile would look like breaches.
 */
export async function verifyEverything(db: Db): Promise<Verification> {
  const breaches: Breach[] = [];
  const baselines = await verifyBaselines(db, breaches);
  const revisions = await verifyRevisions(db, breaches);
  const trail = await verifyTrail(db);
  breaches.push(...trail.breaches, ...(await verifyAgainstTrail(db)));
  return { baselines, revisions, auditEvents: trail.events, breaches };
}

interface SourceMember {
  readonly list: string;
  readonly revision: number;
  readonly sha256: string;
  /** Number and title of the frame issue that it was converted from. */
  readonly converted?: { readonly frameIssue?: unknown };
}

async function verifyBaselines(db: Db, breaches: Breach[]): Promise<number> {
  const rows = await db
    .selectFrom('baselines')
    .innerJoin('programs', 'programs.id', 'baselines.program_id')
    .select([
      'programs.code',
      'number',
      'baselines.title',
      'supersedes',
      'submission_id',
      'document',
      'digest',
    ])
    .orderBy('programs.code')
    .orderBy('number')
    .execute();
  const expected = new Map<string, number>();
  for (const row of rows) {
    const what = `baseline ${row.number} of ${row.code}`;
    const next = (expected.get(row.code) ?? 0) + 1;
    expected.set(row.code, row.number);
    if (row.number !== next) breaches.push({ what, detail: `the number should be ${next}` });
    if (digestOf(row.document) !== row.digest)
      breaches.push({
        what,
        detail: `the document hashes to ${digestOf(row.document)}, recorded is ${row.digest}`,
      });
    const parsed = parse(row.document);
    if (parsed === null || canonicalText(parsed) !== row.document)
      breaches.push({ what, detail: 'the document is not the canonical JSON of its content' });
    if (parsed === null) continue;
    breaches.push(...compareHead(what, row, parsed));
    breaches.push(...(await compareSources(db, what, row.submission_id, parsed)));
  }
  return rows.length;
}

/** Null for a text that is no JSON object: an altered document may be anything. */
function parse(text: string): object | null {
  try {
    const value: unknown = JSON.parse(text);
    return typeof value === 'object' ? value : null;
  } catch (error) {
    if (error instanceof SyntaxError) return null;
    throw error;
  }
}

/** What lists of baselines show without opening the document. */
function compareHead(
  what: string,
  { number, title, supersedes }: { number: number; title: string; supersedes: number | null },
  document: object,
): Breach[] {
  const read = document as {
    readonly baseline?: unknown;
    readonly title?: unknown;
    readonly supersedes?: unknown;
  };
  const same = read.baseline === number && read.title === title && read.supersedes === supersedes;
  return same
    ? []
    : [{ what, detail: 'its number, title or what it supersedes is not as its document says' }];
}

async function compareSources(
  db: Db,
  what: string,
  submissionId: string,
  document: unknown,
): Promise<Breach[]> {
  const held = await db
    .selectFrom('submission_revisions')
    .innerJoin('list_revisions', 'list_revisions.id', 'submission_revisions.revision_id')
    .innerJoin('lists', 'lists.id', 'submission_revisions.list_id')
    .innerJoin('submissions', 'submissions.id', 'submission_revisions.submission_id')
    .innerJoin('frame_issues as stated', 'stated.id', 'list_revisions.frame_issue_id')
    .select([
      'lists.code as list',
      'list_revisions.number as revision',
      'list_revisions.content_sha256 as sha256',
      sql<
        string | null
      >`case when stated.id = submissions.frame_issue_id then null else stated.number || ': ' || stated.title end`.as(
        'converted',
      ),
    ])
    .where('submission_id', '=', submissionId)
    .orderBy('lists.code')
    .execute();
  const { sources = [] } = document as { readonly sources?: readonly SourceMember[] };
  const named = sources.map(({ list, revision, sha256, converted }) => ({
    list,
    revision,
    sha256,
    converted: converted?.frameIssue ?? null,
  }));
  if (canonicalText(named) === canonicalText(held)) return [];
  return [
    {
      what,
      detail:
        'its sources are not the list revisions that were submitted, or not stated in the frame issue that it names',
    },
  ];
}

async function verifyRevisions(db: Db, breaches: Breach[]): Promise<number> {
  const revisions = await db
    .selectFrom('list_revisions')
    .innerJoin('lists', 'lists.id', 'list_revisions.list_id')
    .innerJoin('programs', 'programs.id', 'lists.program_id')
    .select([
      'programs.code as program',
      'lists.code as list',
      'list_revisions.id',
      'list_revisions.number',
      'content_sha256',
    ])
    .where('list_revisions.id', 'in', (eb) => eb.selectFrom('submission_revisions').select('revision_id'))
    .orderBy('programs.code')
    .orderBy('lists.code')
    .orderBy('list_revisions.number')
    .execute();
  for (const revision of revisions) {
    const found = await hashRevision(db, revision.id, createHash('sha256'));
    if (found !== revision.content_sha256)
      breaches.push({
        what: `revision ${revision.number} of list ${revision.list} in ${revision.program}`,
        detail: `its rows hash to ${found}, recorded is ${revision.content_sha256}`,
      });
  }
  return revisions.length;
}
