import { sql } from 'kysely';
import { type Db } from '@/db/client';
import { programFrames } from '@/db/queries/program-frames';
import { AppError } from '@/lib/errors';
import { type Person } from '@/lib/server/actor';
import { recordEvent } from '@/lib/server/audit/record-event';
import { newId } from '@/lib/server/ids';

export interface CreateConfiguration {
  readonly person: Person;
  readonly programId: string;
  readonly buildCode: string;
  readonly code: string;
  readonly title: string;
  /** Number of the frame issue that it stands in; the one in force where none is named. */
  readonly frameIssue?: number;
}

/**
 * A new configuration of a build in a frame issue: it pins the newest revision of every components list of the program and the newest
 * rotating parts, and has one condition, the empty aircraft. What is stated in another issue is converted at each roll-up; what
 * nobody knows how to convert is left out.
 * @throws AppError conflict without a frame issue or when the code is taken, not-found for an unknown build or issue.
 */
export async function createConfiguration(db: Db, input: CreateConfiguration): Promise<string> {
  return db.transaction().execute(async (trx) => {
    const frames = await programFrames(trx, input.programId);
    const [newest] = frames.issues;
    if (newest === undefined)
      throw new AppError(
        'conflict',
        'The program has no airframe frame yet. A chief engineer issues it in the settings.',
      );
    const issue =
      input.frameIssue === undefined
        ? newest
        : frames.issues.find(({ number }) => number === input.frameIssue);
    if (issue === undefined)
      throw new AppError('not-found', `The program has no frame issue ${input.frameIssue}.`);
    const within = frames.issues.filter(({ id }) => frames.gap(id, issue.id) === null).map(({ id }) => id);
    const build = await trx
      .selectFrom('builds')
      .select(['id', 'code'])
      .where('program_id', '=', input.programId)
      .where('code', '=', input.buildCode)
      .executeTakeFirst();
    if (build === undefined)
      throw new AppError('not-found', `The program has no build "${input.buildCode}".`);
    const rotors = await trx
      .selectFrom('rotor_revisions')
      .select('id')
      .where('program_id', '=', input.programId)
      .where((eb) => eb.or([eb('frame_issue_id', 'is', null), eb('frame_issue_id', 'in', within)]))
      .orderBy('number', 'desc')
      .limit(1)
      .executeTakeFirst();
    const id = newId();
    const made = await trx
      .insertInto('configurations')
      .values({
        id,
        program_id: input.programId,
        build_id: build.id,
        frame_issue_id: issue.id,
        code: input.code,
        title: input.title,
        rotor_revision_id: rotors?.id ?? null,
        created_by: input.person.userId,
      })
      .onConflict((conflict) => conflict.columns(['program_id', 'code']).doNothing())
      .executeTakeFirstOrThrow();
    if (made.numInsertedOrUpdatedRows !== 1n)
      throw new AppError(
        'conflict',
        `This program already has a configuration "${input.code}". Choose another code.`,
        {
          errors: [{ pointer: '/code', message: 'This code is taken.' }],
        },
      );
    await trx
      .insertInto('configuration_lists')
      .columns(['configuration_id', 'list_id', 'revision_id'])
      .expression((eb) =>
        eb
          .selectFrom('lists')
          .innerJoin('list_revisions', (join) =>
            join
              .onRef('list_revisions.list_id', '=', 'lists.id')
              .onRef('list_revisions.number', '=', 'lists.last_revision'),
          )
          .select((select) => [
            select.val(id).as('configuration_id'),
            'lists.id as list_id',
            'list_revisions.id as revision_id',
          ])
          .where('lists.program_id', '=', input.programId)
          .where('list_revisions.frame_issue_id', 'in', within)
          // Adjustments are changes against something; a person chooses which configuration they belong to.
          .where(sql<string>`list_revisions.declarations ->> 'kind'`, '=', 'components'),
      )
      .execute();
    await trx
      .insertInto('conditions')
      .values({ id: newId(), configuration_id: id, code: 'empty', title: 'Empty aircraft', position: 1 })
      .execute();
    await recordEvent(trx, {
      scope: input.programId,
      actor: input.person,
      kind: 'configuration.created',
      subject: input.code,
      detail: { code: input.code, title: input.title, build: build.code },
    });
    return id;
  });
}
