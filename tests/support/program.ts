import { Readable } from 'node:stream';
import type pg from 'pg';
import { type Db, createDb, createPool } from '@/db/client';
import {
  type ListDeclarationsInput,
  declarationsFromBody,
  listDeclarationsSchema,
} from '@/lib/contracts/list-declarations';
import { readMassList } from '@/lib/ingest/mass-list';
import { type MemberRole } from '@/lib/permissions';
import { type Person } from '@/lib/server/actor';
import { newId } from '@/lib/server/ids';
import { publishRevision } from '@/lib/server/lists/publish-revision';
import { addList } from '@/lib/server/lists/save-list';
import { createTestDatabase } from './database';

export interface Crew {
  readonly weights: Person;
  readonly weights2: Person;
  readonly chief: Person;
  readonly chief2: Person;
  readonly simulation: Person;
  readonly admin: Person;
}

export interface ProgramUnderTest {
  readonly db: Db;
  readonly pool: pg.Pool;
  readonly appUrl: string;
  readonly ownerUrl: string;
  readonly program: { readonly id: string; readonly code: string; readonly title: string };
  readonly frameIssueId: string;
  readonly crew: Crew;
  readonly close: () => Promise<void>;
}

/** A database with one program, its frame (stations aft, right, up; m), a design build and six people. Invented. */
export async function programUnderTest(code = 'test-hopper'): Promise<ProgramUnderTest> {
  const { appUrl, ownerUrl, drop } = await createTestDatabase();
  const failures: Error[] = [];
  const pool = createPool(appUrl, 6, (error) => failures.push(error));
  const db = createDb(pool);
  const admin = await addPerson(db, 'admin', true);
  const program = { id: newId(), code, title: 'Test hopper' };
  await db
    .insertInto('programs')
    .values({ ...program, created_by: admin.userId })
    .execute();
  const member = async (name: string, role: MemberRole): Promise<Person> => {
    const person = await addPerson(db, name, false);
    await db
      .insertInto('program_members')
      .values({ program_id: program.id, user_id: person.userId, role, added_by: admin.userId })
      .execute();
    return person;
  };
  const crew: Crew = {
    weights: await member('weights', 'weights'),
    weights2: await member('weights2', 'weights'),
    chief: await member('chief', 'chief'),
    chief2: await member('chief2', 'chief'),
    simulation: await member('simulation', 'simulation'),
    admin,
  };
  const frameIssueId = newId();
  await db
    .insertInto('frame_issues')
    .values({
      id: frameIssueId,
      program_id: program.id,
      number: 1,
      title: 'First issue',
      axis_x: 'aft',
      axis_y: 'right',
      axis_z: 'up',
      lemac: [6, 0, 1],
      mac: 2,
      span: 18,
      length: 15,
      lateral_plane: 0,
      incidence: 0,
      reference: [6.5, 0, 1],
      valid_from: '2026-01-05',
      reason: 'first layout',
      created_by: crew.chief.userId,
    })
    .execute();
  await db
    .insertInto('builds')
    .values({
      id: newId(),
      program_id: program.id,
      code: 'design',
      title: 'Design',
      kind: 'design',
      is_default: true,
      created_by: crew.chief.userId,
    })
    .execute();
  const close = async (): Promise<void> => {
    await db.destroy();
    await drop();
  };
  return { db, pool, appUrl, ownerUrl, program, frameIssueId, crew, close };
}

/** A person who can receive mail; nobody can sign in with this hash. */
export async function addPerson(db: Db, name: string, isAdmin: boolean): Promise<Person> {
  const userId = newId();
  await db
    .insertInto('users')
    .values({
      id: userId,
      email: `${name}@skerry.example`,
      name,
      password_hash: 'unusable',
      is_admin: isAdmin,
    })
    .execute();
  return { userId, address: '127.0.0.1' };
}

/** Makes the list if it is new, and a revision of it from the text of a CSV file, as an import would. */
export async function reviseList(
  test: Pick<ProgramUnderTest, 'db' | 'pool' | 'program' | 'frameIssueId'>,
  author: Person,
  code: string,
  csv: string,
  input: Partial<ListDeclarationsInput> = {},
): Promise<{ id: string; number: number }> {
  const { db, pool, program } = test;
  const declarations = declarationsFromBody(
    listDeclarationsSchema.parse({ mass_unit: 'kg', length_unit: 'm', inertia_unit: 'kg.m2', ...input }),
  );
  const known = await db
    .selectFrom('lists')
    .select(['id', 'frame_issue_id'])
    .where('program_id', '=', program.id)
    .where('code', '=', code)
    .executeTakeFirst();
  const id =
    known?.id ??
    (await addList(db, { person: author, programId: program.id, code, title: code, declarations })).id;
  return publishRevision(
    pool,
    {
      list: { id, programId: program.id, code, frameIssueId: known?.frame_issue_id ?? test.frameIssueId },
      declarations,
      origin: 'edit',
      reason: 'for the test',
      file: null,
      author,
    },
    async (writer) => {
      const reading = await readMassList(Readable.from([Buffer.from(csv)]), declarations, {
        onComponent: (component) => writer.add(component),
      });
      if (reading.problems.length > 0) throw new Error(reading.problems.map((one) => one.message).join('\n'));
    },
    async () => undefined,
  );
}
