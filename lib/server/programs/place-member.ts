import { type Transaction } from 'kysely';
import { type Database } from '@/db/schema/database';
import { fieldError } from '@/lib/errors';
import { type MemberRole, ROLE_NAMES } from '@/lib/permissions';
import { type Person } from '@/lib/server/actor';
import { recordEvent } from '@/lib/server/audit/record-event';
import { queueMail } from '@/lib/server/mail-queue';

/** Gives a person a role in a program, and tells those by mail who had an account before. Throws `invalid-input` for a member. */
export async function placeMember(
  trx: Transaction<Database>,
  place: {
    person: Person;
    program: { id: string; title: string };
    member: { id: string; email: string; name: string; added: boolean };
    role: MemberRole;
  },
): Promise<void> {
  const { person, program, member, role } = place;
  const made = await trx
    .insertInto('program_members')
    .values({ program_id: program.id, user_id: member.id, role, added_by: person.userId })
    .onConflict((conflict) => conflict.columns(['program_id', 'user_id']).doNothing())
    .executeTakeFirst();
  if (made.numInsertedOrUpdatedRows !== 1n) {
    throw fieldError('email', `${member.name} is already a member. Change the role in the table.`);
  }
  await recordEvent(trx, {
    scope: program.id,
    actor: person,
    kind: 'member.added',
    subject: member.id,
    detail: { email: member.email, role },
  });
  if (member.added || member.id === person.userId) return;
  await queueMail(trx, {
    to: member.email,
    subject: `You were added to ${program.title}`,
    blocks: [
      {
        kind: 'paragraph',
        text: `You are now ${ROLE_NAMES[role].toLowerCase()} of the program ${program.title}.`,
      },
      { kind: 'paragraph', text: 'It is among your programs the next time you sign in.' },
    ],
  });
}
