import { type Transaction } from 'kysely';
import { type Db } from '@/db/client';
import { lockMember } from '@/db/queries/programs';
import { type Database } from '@/db/schema/database';
import { AppError } from '@/lib/errors';
import { type MemberRole } from '@/lib/permissions';
import { type Person } from '@/lib/server/actor';
import { recordEvent } from '@/lib/server/audit/record-event';

interface MemberChange {
  readonly person: Person;
  readonly programId: string;
  readonly userId: string;
}

/** Gives a member another role. Throws `conflict` for the last chief engineer. */
export async function changeMemberRole(
  db: Db,
  { person, programId, userId, role }: MemberChange & { readonly role: MemberRole },
): Promise<void> {
  await db.transaction().execute(async (trx) => {
    const member = await memberToChange(trx, programId, userId, role);
    if (member.role === role) return;
    await trx
      .updateTable('program_members')
      .set({ role })
      .where('program_id', '=', programId)
      .where('user_id', '=', userId)
      .execute();
    await recordEvent(trx, {
      scope: programId,
      actor: person,
      kind: 'member.role-changed',
      subject: userId,
      detail: { email: member.email, from: member.role, to: role },
    });
  });
}

/** Takes a member out of a program; what they made stays. Throws `conflict` for the last chief engineer. */
export async function removeMember(db: Db, { person, programId, userId }: MemberChange): Promise<void> {
  await db.transaction().execute(async (trx) => {
    const member = await memberToChange(trx, programId, userId, null);
    await trx
      .deleteFrom('program_members')
      .where('program_id', '=', programId)
      .where('user_id', '=', userId)
      .execute();
    await recordEvent(trx, {
      scope: programId,
      actor: person,
      kind: 'member.removed',
      subject: userId,
      detail: { email: member.email, role: member.role },
    });
  });
}

async function memberToChange(
  trx: Transaction<Database>,
  programId: string,
  userId: string,
  role: MemberRole | null,
): Promise<{ email: string; role: MemberRole }> {
  const member = await lockMember(trx, programId, userId);
  if (!member) throw new AppError('not-found', 'There is no such member any more.');
  if (member.role === 'chief' && role !== 'chief' && member.otherChiefs === 0) {
    throw new AppError('conflict', 'A program keeps at least one chief engineer. Name another one first.');
  }
  return member;
}
