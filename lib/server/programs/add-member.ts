import { type Db } from '@/db/client';
import { type MemberRole } from '@/lib/permissions';
import { type Person } from '@/lib/server/actor';
import { findOrInvite } from '@/lib/server/people/invite-person';
import { placeMember } from './place-member';

/** Adds someone to a program by mail address; whoever has no account yet is invited. Returns whether that was so. */
export async function addMember(
  db: Db,
  request: {
    person: Person;
    program: { id: string; title: string };
    email: string;
    name: string | undefined;
    role: MemberRole;
  },
): Promise<{ name: string; invited: boolean }> {
  const { person, program, email, name, role } = request;
  return db.transaction().execute(async (trx) => {
    const member = await findOrInvite(trx, { actor: person, email, name, admin: false });
    await placeMember(trx, { person, program, member, role });
    return { name: member.name, invited: member.added };
  });
}
