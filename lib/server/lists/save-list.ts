import { type Transaction } from 'kysely';
import { type Db } from '@/db/client';
import { currentFrameIssue, findFrameIssue, type FrameIssue } from '@/db/queries/frames';
import { findList } from '@/db/queries/lists';
import { type Database } from '@/db/schema/database';
import { AppError, fieldError } from '@/lib/errors';
import { type ListDeclarations } from '@/lib/mass/declarations';
import { type Person } from '@/lib/server/actor';
import { recordEvent } from '@/lib/server/audit/record-event';
import { newId } from '@/lib/server/ids';

export interface SaveList {
  readonly person: Person;
  readonly programId: string;
  readonly code: string;
  readonly title: string;
  readonly declarations: ListDeclarations;
  /** Number of the frame issue that coming files are stated in: left out, the one in force for a new list, else the one it has. */
  readonly frameIssue?: number;
}

/**
 * Creates a list, or changes its title, declarations and frame issue for the revisions to come; those that exist keep what they were
 * read with. Returns whether it was created.
 * @throws AppError conflict when the program has no frame issue yet, invalid-input for an issue that it does not have.
 */
export async function saveList(db: Db, input: SaveList): Promise<{ id: string; created: boolean }> {
  return db.transaction().execute(async (trx) => {
    const list = await findList(trx, input.programId, input.code);
    return list === undefined ? createList(trx, input) : changeList(trx, input, list);
  });
}

/** `saveList` for a new list only. @throws AppError conflict when the code is taken. */
export async function addList(db: Db, input: SaveList): Promise<{ id: string }> {
  return db.transaction().execute(async (trx) => {
    if ((await findList(trx, input.programId, input.code)) !== undefined)
      throw new AppError(
        'conflict',
        `This program already has a list "${input.code}". Choose another code.`,
        {
          errors: [{ pointer: '/code', message: 'This code is taken.' }],
        },
      );
    return createList(trx, input);
  });
}

async function createList(
  trx: Transaction<Database>,
  input: SaveList,
): Promise<{ id: string; created: boolean }> {
  const newest = await currentFrameIssue(trx, input.programId);
  if (newest === undefined)
    throw new AppError(
      'conflict',
      'The program has no airframe frame yet. A chief engineer issues it in the settings.',
    );
  const issue = (await namedIssue(trx, input)) ?? newest;
  const id = newId();
  const { numInsertedOrUpdatedRows } = await trx
    .insertInto('lists')
    .values({
      id,
      program_id: input.programId,
      code: input.code,
      title: input.title,
      frame_issue_id: issue.id,
      declarations: JSON.stringify(input.declarations),
      marking: input.declarations.marking,
      created_by: input.person.userId,
    })
    .onConflict((conflict) => conflict.columns(['program_id', 'code']).doNothing())
    .executeTakeFirstOrThrow();
  if (numInsertedOrUpdatedRows === 0n)
    throw new AppError('conflict', `Someone else has just made the list "${input.code}".`);
  await recordEvent(trx, {
    scope: input.programId,
    actor: input.person,
    kind: 'list.created',
    subject: input.code,
    detail: { code: input.code, title: input.title },
  });
  return { id, created: true };
}

async function namedIssue(
  trx: Transaction<Database>,
  { programId, frameIssue }: SaveList,
): Promise<FrameIssue | undefined> {
  if (frameIssue === undefined) return undefined;
  const issue = await trx
    .selectFrom('frame_issues')
    .selectAll()
    .where('program_id', '=', programId)
    .where('number', '=', frameIssue)
    .executeTakeFirst();
  if (issue === undefined) throw fieldError('frame_issue', `The program has no frame issue ${frameIssue}.`);
  return issue;
}

async function changeList(
  trx: Transaction<Database>,
  input: SaveList,
  list: { id: string; declarations: ListDeclarations; title: string; frame_issue_id: string },
): Promise<{ id: string; created: boolean }> {
  const was = await findFrameIssue(trx, list.frame_issue_id);
  const issue = (await namedIssue(trx, input)) ?? was;
  const told = (number: number) => (issue.id === was.id ? {} : { frameIssue: number });
  await trx
    .updateTable('lists')
    .set({
      frame_issue_id: issue.id,
      title: input.title,
      declarations: JSON.stringify(input.declarations),
      marking: input.declarations.marking,
    })
    .where('id', '=', list.id)
    .execute();
  await recordEvent(trx, {
    scope: input.programId,
    actor: input.person,
    kind: 'list.declared',
    subject: input.code,
    detail: {
      code: input.code,
      before: { title: list.title, declarations: list.declarations, ...told(was.number) },
      after: { title: input.title, declarations: input.declarations, ...told(issue.number) },
    },
  });
  return { id: list.id, created: false };
}
