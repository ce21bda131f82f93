import { sql, type Transaction } from 'kysely';
import { type MemberRole } from '@/lib/permissions';
import { type Db } from '../client';
import { type Database } from '../schema/database';

export interface ProgramRow {
  readonly id: string;
  readonly code: string;
  readonly title: string;
}

export type ProgramOfMember = ProgramRow & { readonly role: MemberRole };

/** A program by its code, with the role that the person has in it; null is none. */
export function findProgramFor(
  db: Db,
  code: string,
  userId: string,
): Promise<(ProgramRow & { role: MemberRole | null }) | undefined> {
  return standing(db, userId).where('programs.code', '=', code).executeTakeFirst();
}

export function findProgramByIdFor(
  db: Db,
  id: string,
  userId: string,
): Promise<(ProgramRow & { role: MemberRole | null }) | undefined> {
  return standing(db, userId).where('programs.id', '=', id).executeTakeFirst();
}

function standing(db: Db, userId: string) {
  return db
    .selectFrom('programs')
    .leftJoin('program_members', (join) =>
      join.onRef('program_members.program_id', '=', 'programs.id').on('program_members.user_id', '=', userId),
    )
    .select(['programs.id', 'programs.code', 'programs.title', 'program_members.role']);
}

/** The programs that a person belongs to, by title. */
export function listProgramsOf(db: Db, userId: string): Promise<ProgramOfMember[]> {
  return db
    .selectFrom('program_members')
    .innerJoin('programs', 'programs.id', 'program_members.program_id')
    .select(['programs.id', 'programs.code', 'programs.title', 'program_members.role'])
    .where('program_members.user_id', '=', userId)
    .orderBy('programs.title')
    .execute();
}

export interface ProgramInDirectory extends ProgramRow {
  readonly members: number;
  readonly chiefs: readonly string[];
  readonly createdAt: Date;
}

/** Every program with how many belong to it and who leads it, for administrators. */
export function listAllPrograms(db: Db): Promise<ProgramInDirectory[]> {
  return db
    .selectFrom('programs')
    .leftJoin('program_members', 'program_members.program_id', 'programs.id')
    .leftJoin('users', 'users.id', 'program_members.user_id')
    .select((eb) => [
      'programs.id',
      'programs.code',
      'programs.title',
      'programs.created_at as createdAt',
      eb.fn.count<number>('program_members.user_id').as('members'),
      sql<
        string[]
      >`coalesce(array_agg(users.name order by users.name) filter (where program_members.role = 'chief'), '{}')`.as(
        'chiefs',
      ),
    ])
    .groupBy('programs.id')
    .orderBy('programs.title')
    .execute();
}

export interface MemberRow {
  readonly userId: string;
  readonly name: string;
  readonly email: string;
  readonly role: MemberRole;
  readonly joined: boolean;
  readonly disabled: boolean;
  readonly addedAt: Date;
}

export function listMembers(db: Db, programId: string): Promise<MemberRow[]> {
  return db
    .selectFrom('program_members')
    .innerJoin('users', 'users.id', 'program_members.user_id')
    .select((eb) => [
      'users.id as userId',
      'users.name',
      'users.email',
      'program_members.role',
      eb('users.password_hash', 'is not', null).$castTo<boolean>().as('joined'),
      eb('users.disabled_at', 'is not', null).$castTo<boolean>().as('disabled'),
      'program_members.added_at as addedAt',
    ])
    .where('program_id', '=', programId)
    .orderBy('program_members.role')
    .orderBy('users.name')
    .execute();
}

/** The member as they stand, locked with all members of the program until the transaction ends. */
export async function lockMember(
  trx: Transaction<Database>,
  programId: string,
  userId: string,
): Promise<{ email: string; role: MemberRole; otherChiefs: number } | null> {
  const members = await trx
    .selectFrom('program_members')
    .innerJoin('users', 'users.id', 'program_members.user_id')
    .select(['program_members.user_id as userId', 'program_members.role', 'users.email', 'users.disabled_at'])
    .where('program_id', '=', programId)
    .orderBy('program_members.user_id')
    .forUpdate('program_members')
    .execute();
  const member = members.find((one) => one.userId === userId);
  if (!member) return null;
  const chiefs = members.filter(
    (one) => one.role === 'chief' && one.userId !== userId && one.disabled_at === null,
  );
  return { email: member.email, role: member.role, otherChiefs: chiefs.length };
}
