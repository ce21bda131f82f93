import { type Db } from '@/db/client';
import { type BuildKind } from '@/db/schema/programs';
import { fieldError } from '@/lib/errors';
import { type Person } from '@/lib/server/actor';
import { recordEvent } from '@/lib/server/audit/record-event';
import { newId } from '@/lib/server/ids';

export interface AddBuild {
  readonly person: Person;
  readonly programId: string;
  readonly code: string;
  readonly title: string;
  readonly kind: BuildKind;
  readonly serialFrom: number | null;
  readonly serialTo: number | null;
  /** Takes the place of the default build there was. */
  readonly isDefault: boolean;
}

/** Adds a build to a program. @throws AppError invalid-input for a code that is taken. */
export async function addBuild(db: Db, input: AddBuild): Promise<void> {
  const { person, programId, code, title, kind, serialFrom, serialTo, isDefault } = input;
  await db.transaction().execute(async (trx) => {
    if (isDefault)
      await trx
        .updateTable('builds')
        .set({ is_default: false })
        .where('program_id', '=', programId)
        .where('is_default', '=', true)
        .execute();
    const made = await trx
      .insertInto('builds')
      .values({
        id: newId(),
        program_id: programId,
        code,
        title,
        kind,
        serial_from: serialFrom,
        serial_to: serialTo,
        is_default: isDefault,
        created_by: person.userId,
      })
      .onConflict((conflict) => conflict.columns(['program_id', 'code']).doNothing())
      .executeTakeFirstOrThrow();
    if (made.numInsertedOrUpdatedRows !== 1n)
      throw fieldError('code', `This program has a build ${code} already.`);
    await recordEvent(trx, {
      scope: programId,
      actor: person,
      kind: 'build.added',
      subject: code,
      detail: { code, kind },
    });
  });
}
