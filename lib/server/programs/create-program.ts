import { type Db } from '@/db/client';
import { fieldError } from '@/lib/errors';
import { type Person } from '@/lib/server/actor';
import { recordEvent } from '@/lib/server/audit/record-event';
import { newId } from '@/lib/server/ids';
import { findOrInvite } from '@/lib/server/people/invite-person';
import { placeMember } from './place-member';

/** Makes a program with its design build and its first chief engineer, who is invited if new. Returns its id. */
export async function createProgram(
  db: Db,
  request: {
    person: Person;
    code: string;
    title: string;
    chief: { email: string; name: string | undefined };
  },
): Promise<string> {
  const { person, code, title, chief } = request;
  return db.transaction().execute(async (trx) => {
    const id = newId();
    const made = await trx
      .insertInto('programs')
      .values({ id, code, title, created_by: person.userId })
      .onConflict((conflict) => conflict.column('code').doNothing())
      .executeTakeFirst();
    if (made.numInsertedOrUpdatedRows !== 1n)
      throw fieldError('code', `Another program has the code ${code}.`);
    await recordEvent(trx, {
      scope: id,
      actor: person,
      kind: 'program.created',
      subject: id,
      detail: { code, title },
    });
    const build = { id: newId(), code: 'design', title: 'Design', kind: 'design' } as const;
    await trx
      .insertInto('builds')
      .values({ ...build, program_id: id, is_default: true, created_by: person.userId })
      .execute();
    await recordEvent(trx, {
      scope: id,
      actor: person,
      kind: 'build.added',
      subject: build.id,
      detail: { code: build.code, kind: build.kind },
    });
    const first = await findOrInvite(trx, {
      actor: person,
      email: chief.email,
      name: chief.name,
      admin: false,
    });
    await placeMember(trx, { person, program: { id, title }, member: first, role: 'chief' });
    return id;
  });
}
