import { type Transaction, sql } from 'kysely';
import { type Db } from '@/db/client';
import { currentFrameIssue } from '@/db/queries/frames';
import { type Database } from '@/db/schema/database';
import { AppError } from '@/lib/errors';
import { type OperatingPoint, type Rotor } from '@/lib/rotors/rotor';
import { type Person } from '@/lib/server/actor';
import { recordEvent } from '@/lib/server/audit/record-event';
import { newId } from '@/lib/server/ids';
import { rotorFindingsInProgram } from './rotor-findings';

export interface ReviseRotors {
  readonly person: Person;
  readonly programId: string;
  readonly reason: string;
  /** The revision that the change was made against; 0 before the first. */
  readonly base: number;
  /**
   * What is new; what is left out stays as it was. Rotors of a file are stated in the frame issue in force; others in the issue of the
   * revision that they were changed from.
   */
  readonly rotors?: readonly Rotor[];
  readonly points?: readonly OperatingPoint[];
  readonly file?: { readonly sha256: string; readonly bytes: number; readonly name: string };
}

/**
 * Makes the next revision of a program's rotating parts and operating points.
 * @throws AppError conflict when someone else has made a revision since `base`.
 */
export async function reviseRotors(db: Db, input: ReviseRotors): Promise<{ id: string; number: number }> {
  return db.transaction().execute(async (trx) => {
    const latest = await lockLatest(trx, input.programId);
    const number = latest?.number ?? 0;
    if (number !== input.base)
      throw new AppError(
        'conflict',
        `Revision ${number} of the rotating parts was made meanwhile${latest ? ` by ${latest.author}` : ''}. ` +
          'Nothing was saved: look at it, then make your change again.',
      );
    const rotors = input.rotors ?? latest?.rotors ?? [];
    const points = input.points ?? latest?.points ?? [];
    const id = newId();
    const inForce = await currentFrameIssue(trx, input.programId);
    const isRead = input.rotors !== undefined && input.file !== undefined;
    const issueId = (isRead ? inForce?.id : (latest?.frame_issue_id ?? inForce?.id)) ?? null;
    if (input.file) {
      await trx
        .insertInto('stored_files')
        .values({ sha256: input.file.sha256, bytes: input.file.bytes })
        .onConflict((conflict) => conflict.column('sha256').doNothing())
        .execute();
    }
    await trx
      .insertInto('rotor_revisions')
      .values({
        id,
        program_id: input.programId,
        frame_issue_id: issueId,
        number: number + 1,
        reason: input.reason,
        rotors: JSON.stringify(rotors),
        points: JSON.stringify(points),
        findings: JSON.stringify(
          await rotorFindingsInProgram(trx, input.programId, { rotors, points }, issueId),
        ),
        file_sha256: input.file?.sha256 ?? null,
        file_name: input.file?.name ?? null,
        created_by: input.person.userId,
      })
      .execute();
    await recordEvent(trx, {
      scope: input.programId,
      actor: input.person,
      kind: 'rotors.revised',
      subject: `rotating parts ${number + 1}`,
      detail: { number: number + 1, reason: input.reason },
    });
    return { id, number: number + 1 };
  });
}

async function lockLatest(trx: Transaction<Database>, programId: string) {
  await sql`select pg_advisory_xact_lock(hashtextextended(${`rotors:${programId}`}, 0))`.execute(trx);
  return trx
    .selectFrom('rotor_revisions')
    .innerJoin('users', 'users.id', 'rotor_revisions.created_by')
    .select([
      'rotor_revisions.number',
      'rotor_revisions.rotors',
      'rotor_revisions.points',
      'rotor_revisions.frame_issue_id',
      'users.name as author',
    ])
    .where('program_id', '=', programId)
    .orderBy('number', 'desc')
    .limit(1)
    .executeTakeFirst();
}
