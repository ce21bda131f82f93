import { newId } from '@/lib/server/ids';
import { addPerson, type ProgramUnderTest } from '@/tests/support/program';
import { tokenOf } from './calls';

export const READERS = [
  'simulation',
  'weights',
  'chief',
  'outsider',
  'admin',
  'limited',
  'unscoped',
] as const;
export type Role = (typeof READERS)[number];

/** Tokens of people who may read the program's baselines, and of some who may not. */
export async function tokensOf(test: ProgramUnderTest): Promise<Record<Role, string>> {
  const { db, crew } = test;
  const other = { id: newId(), code: 'other-program', title: 'Other' };
  await db
    .insertInto('programs')
    .values({ ...other, created_by: crew.admin.userId })
    .execute();
  await db
    .insertInto('program_members')
    .values({
      program_id: other.id,
      user_id: crew.simulation.userId,
      role: 'simulation',
      added_by: crew.admin.userId,
    })
    .execute();
  const read = ['baselines:read'] as const;
  return {
    simulation: await tokenOf(test, crew.simulation, read),
    weights: await tokenOf(test, crew.weights, read),
    chief: await tokenOf(test, crew.chief, read),
    outsider: await tokenOf(test, await addPerson(db, 'outsider', false), read),
    admin: await tokenOf(test, crew.admin, read),
    limited: await tokenOf(test, crew.simulation, read, [other.code]),
    unscoped: await tokenOf(test, crew.weights, ['lists:write']),
  };
}
