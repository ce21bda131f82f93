import { type Transaction } from 'kysely';
import { type Database } from '@/db/schema/database';
import { type MemberRole } from '@/lib/permissions';
import { type MailBlock } from '@/lib/server/email/blocks';
import { queueMail } from '@/lib/server/mail-queue';

interface ProgramMail {
  readonly programId: string;
  /** Members of these roles, and besides them these persons. */
  readonly roles: readonly MemberRole[];
  readonly userIds?: readonly string[];
  /** Whoever caused the mail does not get it. */
  readonly except: string;
  /** A decision reaches those who want only decisions, too. */
  readonly isDecision: boolean;
  readonly subject: string;
  readonly blocks: readonly MailBlock[];
}

/** Queues one mail to each person of a program who should hear of it and wants to, in the caller's transaction. */
export async function mailPeople(trx: Transaction<Database>, mail: ProgramMail): Promise<void> {
  const people = await trx
    .selectFrom('users')
    .innerJoin('program_members', 'program_members.user_id', 'users.id')
    .select(['users.email'])
    .distinct()
    .where('program_members.program_id', '=', mail.programId)
    .where('users.disabled_at', 'is', null)
    .where('users.password_hash', 'is not', null)
    .where('users.id', '!=', mail.except)
    .where('users.mail_wish', 'in', mail.isDecision ? ['all', 'decisions'] : ['all'])
    .where((eb) =>
      eb.or([
        ...(mail.roles.length > 0 ? [eb('program_members.role', 'in', mail.roles)] : []),
        ...(mail.userIds && mail.userIds.length > 0 ? [eb('users.id', 'in', mail.userIds)] : []),
      ]),
    )
    .execute();
  for (const { email } of people)
    await queueMail(trx, { to: email, subject: mail.subject, blocks: mail.blocks });
}
