import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { listAllPrograms, listMembers, listProgramsOf } from '@/db/queries/programs';
import { markingsOf, whatWaits } from '@/db/queries/stations';
import { addMember } from '@/lib/server/programs/add-member';
import { changeMemberRole, removeMember } from '@/lib/server/programs/change-member';
import { createProgram } from '@/lib/server/programs/create-program';
import { ADDRESS, makePerson, type PeopleUnderTest, peopleUnderTest, queuedJobs } from '../../support/people';

let test: PeopleUnderTest;
let person: { userId: string; address: string };

beforeAll(async () => {
  test = await peopleUnderTest();
  person = {
    userId: await makePerson(test.db, { email: 'admin@skerry.example', admin: true }),
    address: ADDRESS,
  };
});
afterAll(() => test.close());

async function newProgram(code: string, chief = `chief-${code}@skerry.example`): Promise<string> {
  return createProgram(test.db, { person, code, title: code, chief: { email: chief, name: undefined } });
}

describe('a new program', () => {
  it('has its design build and its first chief engineer, who is invited', async () => {
    const id = await newProgram('one');
    expect(
      await test.db
        .selectFrom('builds')
        .select(['code', 'is_default'])
        .where('program_id', '=', id)
        .execute(),
    ).toEqual([{ code: 'design', is_default: true }]);
    expect(await listMembers(test.db, id)).toMatchObject([
      { email: 'chief-one@skerry.example', name: 'chief-one', role: 'chief', joined: false, disabled: false },
    ]);
    expect(await queuedJobs(test.pool, 'send-link-mail')).toContainEqual({
      email: 'chief-one@skerry.example',
      purpose: 'invitation',
    });
    expect(await listProgramsOf(test.db, person.userId)).toEqual([]);
  });

  it('is not made twice under one code, and nothing of the second try remains', async () => {
    await newProgram('two');
    await expect(newProgram('two', 'late@skerry.example')).rejects.toMatchObject({
      errors: [{ pointer: '/code' }],
    });
    expect((await listAllPrograms(test.db)).filter(({ code }) => code === 'two')).toMatchObject([
      { members: 1, chiefs: ['chief-two'] },
    ]);
    expect(
      await test.db.selectFrom('users').select('id').where('email', '=', 'late@skerry.example').execute(),
    ).toEqual([]);
  });

  it('has nothing that waits and no marking', async () => {
    const id = await newProgram('empty');
    expect(await whatWaits(test.db, id)).toEqual({
      listsWithProblems: 0,
      configurationsToRollUp: 0,
      submissionsToDecide: 0,
    });
    expect(await markingsOf(test.db, id)).toEqual([]);
  });
});

describe('a member', () => {
  it('who had an account before is told by mail; one who is new is invited', async () => {
    const id = await newProgram('three');
    await makePerson(test.db, {
      email: 'known@skerry.example',
      name: 'Known',
      password: 'correct horse battery',
    });
    const add = (email: string) =>
      addMember(test.db, {
        person,
        program: { id, title: 'Three' },
        email,
        name: undefined,
        role: 'weights',
      });
    expect(await add('known@skerry.example')).toEqual({ name: 'Known', invited: false });
    expect(await add('unknown@skerry.example')).toEqual({ name: 'unknown', invited: true });
    expect(await queuedJobs(test.pool, 'send-mail')).toMatchObject([
      { to: 'known@skerry.example', subject: 'You were added to Three' },
    ]);
    await expect(add('known@skerry.example')).rejects.toMatchObject({ errors: [{ pointer: '/email' }] });
  });

  it('who is the last chief engineer neither goes nor changes role', async () => {
    const programId = await newProgram('four');
    const [chief] = await listMembers(test.db, programId);
    const userId = chief?.userId ?? '';
    const refused = {
      code: 'conflict',
      message: expect.stringContaining('at least one chief engineer') as string,
    };
    await expect(removeMember(test.db, { person, programId, userId })).rejects.toMatchObject(refused);
    await expect(
      changeMemberRole(test.db, { person, programId, userId, role: 'weights' }),
    ).rejects.toMatchObject(refused);
    await changeMemberRole(test.db, { person, programId, userId, role: 'chief' });
  });

  it('of two chief engineers who leave at once, one stays', async () => {
    const programId = await newProgram('five');
    const second = { email: 'second@skerry.example', name: undefined, role: 'chief' as const };
    await addMember(test.db, { person, program: { id: programId, title: 'Five' }, ...second });
    const chiefs = await listMembers(test.db, programId);
    const left = await Promise.allSettled(
      chiefs.map(({ userId }) => removeMember(test.db, { person, programId, userId })),
    );
    expect(left.map(({ status }) => status).sort()).toEqual(['fulfilled', 'rejected']);
    expect(await listMembers(test.db, programId)).toHaveLength(1);
  });

  it('leaves a trail in the program', async () => {
    const programId = await newProgram('six');
    const member = { email: 'six@skerry.example', name: undefined, role: 'weights' as const };
    await addMember(test.db, { person, program: { id: programId, title: 'Six' }, ...member });
    const userId =
      (await listMembers(test.db, programId)).find(({ role }) => role === 'weights')?.userId ?? '';
    await changeMemberRole(test.db, { person, programId, userId, role: 'simulation' });
    await removeMember(test.db, { person, programId, userId });
    const trail = await test.db
      .selectFrom('audit_events')
      .select(['kind', 'detail'])
      .where('scope', '=', programId)
      .orderBy('number')
      .execute();
    expect(trail.map(({ kind }) => kind)).toEqual([
      'program.created',
      'build.added',
      'member.added',
      'member.added',
      'member.role-changed',
      'member.removed',
    ]);
    expect(trail[4]?.detail).toEqual({ email: 'six@skerry.example', from: 'weights', to: 'simulation' });
  });
});
