import type pg from 'pg';
import { type Transaction } from 'kysely';
import { type Db } from '@/db/client';
import { findRevision, type List, type ListRevision } from '@/db/queries/lists';
import { programFrames } from '@/db/queries/program-frames';
import { type Database } from '@/db/schema/database';
import { AppError } from '@/lib/errors';
import { type IssueConversion } from '@/lib/mass/issue-conversion';
import { issueDifferences } from '@/lib/mass/issue-differences';
import { type Person } from '@/lib/server/actor';
import { recordEvent } from '@/lib/server/audit/record-event';
import { outOfReach } from '@/lib/server/configurations/pin-revisions';
import { publishRevision } from './publish-revision';
import { componentOf } from './row-codec';
import { storedRows } from './stored-rows';

export interface CarryList {
  readonly person: Person;
  readonly list: List;
  /** The revision that the person saw as the newest; 0 before the first. */
  readonly baseRevision: number;
  /** Number of the frame issue to carry it to. */
  readonly frameIssue: number;
  readonly reason: string;
}

/**
 * Carries a list to another frame issue: its frame stays where it is on the aircraft, so its origin and turn are stated anew and its
 * rows stay as they are, to the last bit. The newest revision becomes the next one in the new issue, and coming files are read in it.
 * What rolls up from it is unchanged. Returns the number of the new revision, null for a list that has none.
 *
 * Mirror images belong to the plane of symmetry of the issue that a list is stated in. Where the new issue has its plane elsewhere on
 * the aircraft, a list that stands for mirror images would gain others: it is refused, and stays where it is, converted at roll-up.
 *
 * `pool` must not be the one that `db` draws on, as for `editRows`.
 * @throws AppError invalid-input for an issue that is not there, conflict where the list has changed, is there already or cannot go.
 */
export async function carryList(
  services: { readonly pool: pg.Pool; readonly db: Db },
  input: CarryList,
): Promise<number | null> {
  const { pool, db } = services;
  const { list, person, reason } = input;
  const frames = await programFrames(db, list.program_id);
  const to = frames.issues.find(({ number }) => number === input.frameIssue);
  if (to === undefined)
    throw new AppError('invalid-input', `The program has no frame issue ${input.frameIssue}.`);
  const base = input.baseRevision === 0 ? null : await findRevision(db, list.id, input.baseRevision);
  if (base === undefined)
    throw new AppError('not-found', `The list ${list.code} has no revision ${input.baseRevision}.`);
  const from = frames.issue((base ?? list).frame_issue_id);
  if (from.id === to.id && list.frame_issue_id === to.id)
    throw new AppError('conflict', `The list ${list.code} is stated in frame issue ${to.number} already.`);
  const conversionFrom = (issueId: string): IssueConversion => {
    const found = frames.between(issueId, to.id);
    if (found !== null) return found;
    throw new AppError('conflict', `The list ${list.code} ${outOfReach(frames.gap(issueId, to.id) ?? 0)}`);
  };
  const isRevised = base !== null && from.id !== to.id;
  const ahead = conversionFrom(list.frame_issue_id);
  refuseMovedImages(ahead, list.declarations.extent !== 'whole', to.number);
  const settle = (trx: Transaction<Database>, revision: number | null) =>
    settleList(
      trx,
      input,
      { issueId: to.id, declarations: ahead.declarations(list.declarations) },
      {
        list: list.code,
        from: isRevised ? from.number : frames.issue(list.frame_issue_id).number,
        to: to.number,
        revision,
        reason,
      },
    );
  if (base === null || !isRevised) {
    await db.transaction().execute(async (trx) => {
      await holdAsSeen(trx, input);
      await settle(trx, null);
    });
    return null;
  }
  const conversion = conversionFrom(base.frame_issue_id);
  refuseMovedImages(conversion, await standsForImages(db, base), to.number);
  const made = await publishRevision(
    pool,
    {
      list: { id: list.id, programId: list.program_id, code: list.code, frameIssueId: to.id },
      declarations: { ...conversion.declarations(base.declarations), marking: list.marking },
      origin: 'edit',
      reason,
      file: null,
      author: person,
      patience: 'a-moment',
      prepare: (trx) => holdAsSeen(trx, input),
    },
    async (writer) => {
      for await (const row of storedRows(db, base.id)) await writer.add(componentOf(row));
    },
    (trx, { number }) => settle(trx, number),
  );
  return made.number;
}

/** The reason that a person is offered. */
export function carryReason(from: number, to: number): string {
  return `Carried from frame issue ${from} to ${to}: the frame of the list is stated anew, the rows are as they were.`;
}

function refuseMovedImages({ change, from, to }: IssueConversion, hasImages: boolean, issue: number): void {
  if (!hasImages || issueDifferences(change, from, to).isPlaneKept) return;
  throw new AppError(
    'conflict',
    `This list stands for mirror images, and the plane of symmetry of frame issue ${issue} is another plane of the aircraft: carried ` +
      'there, its images would be elsewhere. It stays in its own issue and is converted at roll-up, images and all.',
  );
}

async function standsForImages(db: Db, revision: ListRevision): Promise<boolean> {
  if (revision.declarations.extent !== 'whole') return true;
  const pair = await db
    .selectFrom('mass_rows')
    .select('item')
    .where('revision_id', '=', revision.id)
    .where('pair', '=', true)
    .limit(1)
    .executeTakeFirst();
  return pair !== undefined;
}

/** Holds the list; refuses if it is not as the person saw it. */
async function holdAsSeen(trx: Transaction<Database>, { list, baseRevision }: CarryList): Promise<void> {
  const now = await trx
    .selectFrom('lists')
    .select(['last_revision', 'frame_issue_id'])
    .where('id', '=', list.id)
    .forUpdate()
    .executeTakeFirstOrThrow();
  if (now.last_revision === baseRevision && now.frame_issue_id === list.frame_issue_id) return;
  throw new AppError(
    'conflict',
    `The list has changed since you looked at it: revision ${now.last_revision} is its newest. Nothing was saved; look again.`,
  );
}

async function settleList(
  trx: Transaction<Database>,
  { person, list }: CarryList,
  now: { readonly issueId: string; readonly declarations: List['declarations'] },
  detail: {
    readonly list: string;
    readonly from: number;
    readonly to: number;
    readonly revision: number | null;
    readonly reason: string;
  },
): Promise<void> {
  await trx
    .updateTable('lists')
    .set({ frame_issue_id: now.issueId, declarations: JSON.stringify(now.declarations) })
    .where('id', '=', list.id)
    .execute();
  await recordEvent(trx, {
    scope: list.program_id,
    actor: person,
    kind: 'list.carried',
    subject: list.code,
    detail,
  });
}
