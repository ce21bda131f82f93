import { type DemoPerson, type PersonCode } from '@/fixtures/demo/program';
import { type Person } from '@/lib/server/actor';
import { hashPassword } from '@/lib/server/auth/password';
import { newId } from '@/lib/server/ids';
import { type DemoServices } from './load-demo';

export type DemoPeople = ReadonlyMap<PersonCode, Person>;

export function personOf(people: DemoPeople, code: PersonCode): Person {
  const person = people.get(code);
  if (person === undefined) throw new Error(`the demo has no person ${code}`);
  return person;
}

/** The demo's people, all with the one password that the start command prints. */
export async function loadPeople(
  { db, password }: DemoServices,
  people: readonly DemoPerson[],
): Promise<DemoPeople> {
  const made = new Map<PersonCode, Person>();
  for (const { code, email, name, role } of people) {
    const userId = newId();
    await db
      .insertInto('users')
      .values({
        id: userId,
        email,
        name,
        is_admin: role === 'admin',
        password_hash: await hashPassword(password),
      })
      .execute();
    made.set(code, { userId, address: 'demo' });
  }
  return made;
}
