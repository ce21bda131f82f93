import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import pg from 'pg';
import { baselinesOfProgram, findBaseline, newestBaseline } from '@/db/queries/baselines';
import { findConfiguration } from '@/db/queries/configurations';
import { digestOf } from '@/lib/server/baselines/digest';
import { returnSubmission } from '@/lib/server/baselines/return-submission';
import { signSubmission } from '@/lib/server/baselines/sign-submission';
import { submitConfiguration } from '@/lib/server/baselines/submit-configuration';
import { verifyEverything } from '@/lib/server/baselines/verify';
import { withdrawBaseline } from '@/lib/server/baselines/withdraw-baseline';
import { createConfiguration } from '@/lib/server/configurations/create-configuration';
import { pinRevisions } from '@/lib/server/configurations/pin-revisions';
import { type ProgramUnderTest, programUnderTest, reviseList } from '@/tests/support/program';

const WING = `item,group,mass,x,y,z,ixx,iyy,izz,symmetry,maturity
spar,Wing,120,6.4,2.5,1.2,90,8,95,pair,C
tank bay,Wing,60,6.8,3.0,1.2,20,5,24,pair,E
`;
const BODY = `item,group,mass,x,y,z,ixx,iyy,izz,ixz,maturity
shell,Body,900,6.6,0,1.4,500,4200,4300,-120,C
`;

let test: ProgramUnderTest;

beforeAll(async () => {
  test = await programUnderTest();
  await reviseList(test, test.crew.weights, 'wing', WING);
  await reviseList(test, test.crew.weights2, 'body', BODY);
  const { db, program, crew } = test;
  for (const code of ['first', 'second', 'raced', 'returned'])
    await createConfiguration(db, {
      person: crew.weights,
      programId: program.id,
      buildCode: 'design',
      code,
      title: `The ${code} one`,
    });
});

afterAll(() => test.close());

async function submit(code: string, person = test.crew.weights): Promise<string> {
  const configuration = await findConfiguration(test.db, test.program.id, code);
  if (configuration === undefined) throw new Error(`no configuration ${code}`);
  return submitConfiguration(test.db, {
    person,
    program: test.program,
    configuration,
    version: configuration.version,
    title: `Title of ${code}`,
    reason: 'because the test says so',
    answers: {},
  });
}

const sign = (submissionId: string, person = test.crew.chief) =>
  signSubmission(test.db, { person, program: test.program, submissionId });

const mailsQueued = async (): Promise<string[]> => {
  const pool = new pg.Pool({ connectionString: test.ownerUrl });
  const { rows } = await pool.query<{ to: string }>(
    `select payload->>'to' as "to" from graphile_worker._private_jobs order by id`,
  );
  await pool.end();
  return rows.map((row) => row.to);
};

describe('a submission', () => {
  it('is mailed to the chief engineers, signed as baseline 1 with a digest over its canonical document, and mailed on', async () => {
    const before = (await mailsQueued()).length;
    const id = await submit('first');
    expect((await mailsQueued()).slice(before).sort()).toEqual([
      'chief2@skerry.example',
      'chief@skerry.example',
    ]);
    const { number, digest } = await sign(id);
    expect(number).toBe(1);
    const baseline = await findBaseline(test.db, test.program.id, 1);
    expect(baseline?.state).toBe('current');
    expect(digestOf(baseline?.document ?? '')).toBe(digest);
    expect((await mailsQueued()).slice(before + 2).sort()).toEqual([
      'simulation@skerry.example',
      'weights@skerry.example',
    ]);
  });

  it('is not signed by the chief engineer who submitted it, by the word of PostgreSQL', async () => {
    const { db, program, crew } = test;
    const id = await submit('second', crew.chief2);
    await expect(sign(id, crew.chief2)).rejects.toMatchObject({ code: 'forbidden' });
    const untouched = await baselinesOfProgram(db, program.id);
    expect(untouched.map((row) => row.number)).toEqual([1]);
    await expect(
      db
        .insertInto('decisions')
        .values({ submission_id: id, decision: 'approved', decided_by: crew.chief2.userId })
        .execute(),
    ).rejects.toMatchObject({ constraint: 'decisions_not_own' });
  });

  it('is not signed by someone who made a list revision that it holds', async () => {
    const { db, program, crew } = test;
    await db
      .updateTable('program_members')
      .set({ role: 'chief' })
      .where('user_id', '=', crew.weights2.userId)
      .execute();
    const waiting = await db
      .selectFrom('submissions')
      .select('id')
      .where('title', '=', 'Title of second')
      .executeTakeFirstOrThrow();
    await expect(sign(waiting.id, crew.weights2)).rejects.toMatchObject({
      code: 'forbidden',
      message: expect.stringContaining('You made a list revision') as string,
    });
    await db
      .updateTable('program_members')
      .set({ role: 'weights' })
      .where('user_id', '=', crew.weights2.userId)
      .execute();
    expect(await sign(waiting.id)).toMatchObject({ number: 2 });
    const rows = await baselinesOfProgram(db, program.id);
    expect(rows.map(({ number, state, supersedes }) => [number, state, supersedes])).toEqual([
      [2, 'current', 1],
      [1, 'superseded', null],
    ]);
  });

  it('signed and returned by two chiefs at once is decided once, and the other is told', async () => {
    const { db, program, crew } = test;
    const id = await submit('raced');
    const outcomes = await Promise.allSettled([
      sign(id, crew.chief),
      returnSubmission(db, { person: crew.chief2, program, submissionId: id, reason: 'not yet' }),
      sign(id, crew.chief2),
    ]);
    const lost = outcomes.filter((outcome) => outcome.status === 'rejected');
    expect(lost).toHaveLength(2);
    for (const outcome of lost) expect(outcome.reason).toMatchObject({ code: 'conflict' });
    const { count } = await db
      .selectFrom('decisions')
      .select((eb) => eb.fn.countAll<number>().as('count'))
      .where('submission_id', '=', id)
      .executeTakeFirstOrThrow();
    expect(count).toBe(1);
  });

  it('is refused while its configuration waits already, and again once it has changed since it was seen', async () => {
    const { db, program, crew } = test;
    const configuration = await findConfiguration(db, program.id, 'returned');
    if (configuration === undefined) throw new Error('no configuration');
    const id = await submit('returned');
    await expect(submit('returned')).rejects.toMatchObject({ code: 'conflict' });
    await returnSubmission(db, {
      person: crew.chief,
      program,
      submissionId: id,
      reason: 'weigh the tank bay',
    });
    await pinRevisions(db, {
      person: crew.weights,
      configuration,
      version: configuration.version,
      revisions: { wing: 1 },
      rotors: null,
    });
    await expect(
      submitConfiguration(db, {
        person: crew.weights,
        program,
        configuration,
        version: configuration.version,
        title: 'stale',
        reason: 'stale',
        answers: {},
      }),
    ).rejects.toMatchObject({ code: 'conflict' });
  });
});

describe('a withdrawn baseline', () => {
  it('leaves its build without a current one: an older number does not take its place', async () => {
    const { db, program, crew } = test;
    const rows = await baselinesOfProgram(db, program.id);
    const newest = rows[0];
    if (newest === undefined) throw new Error('no baseline');
    await withdrawBaseline(db, {
      person: crew.chief2,
      program,
      number: newest.number,
      reason: 'wrong tank bay',
    });
    const current = await newestBaseline(db, newest.build_id);
    expect(current).toMatchObject({ number: newest.number, state: 'withdrawn' });
    await expect(
      withdrawBaseline(db, { person: crew.chief, program, number: newest.number, reason: 'again' }),
    ).rejects.toMatchObject({ code: 'conflict' });
  });
});

describe('what is signed', () => {
  const ATTEMPTS = [
    `update baselines set title = 'other'`,
    `update baselines set document = replace(document, '1', '2')`,
    `delete from baselines`,
    `truncate baselines cascade`,
    `alter table baselines disable trigger all`,
    `alter table baselines drop column digest`,
    `drop trigger check_decision on decisions`,
    `update decisions set decided_by = submission_id`,
    `delete from decisions`,
    `update submissions set reason = ''`,
    `update list_revisions set content_sha256 = repeat('0', 64)`,
    `update row_versions set mass = mass + 1`,
    `delete from row_versions`,
    `truncate row_versions`,
    `update row_ends set row_no = row_no + 1`,
    `delete from row_ends`,
    `truncate row_ends`,
    `drop view mass_rows`,
    `update list_revisions set last_row = last_row + 1`,
    `update revision_subtotals set basic[1] = 0`,
    `delete from supersessions`,
    `delete from withdrawals`,
    `update audit_events set detail = '{}'`,
    `delete from audit_events`,
    `truncate audit_events`,
    `set session_replication_role = replica`,
    `create or replace function check_decision() returns trigger language plpgsql as 'begin return new; end'`,
    `insert into baselines select program_id, 99, build_id, submission_id, title, null, document, digest, signed_by, signed_at from baselines limit 1`,
  ];

  it.each(ATTEMPTS)("cannot be altered with the application's own credentials: %s", async (statement) => {
    const client = new pg.Client({ connectionString: test.appUrl });
    await client.connect();
    try {
      await expect(client.query(statement)).rejects.toMatchObject({
        code: expect.stringMatching(/^(42501|23514|23505)$/) as string,
      });
    } finally {
      await client.end();
    }
  });

  it('holds against the recorded digests, and an altered document or a missing event is found', async () => {
    const clean = await verifyEverything(test.db);
    expect(clean.breaches).toEqual([]);
    expect(clean.baselines).toBeGreaterThanOrEqual(2);
    expect(clean.revisions).toBe(2);
    expect(clean.auditEvents).toBeGreaterThan(8);
    const owner = new pg.Client({ connectionString: test.ownerUrl });
    await owner.connect();
    await owner.query('alter table baselines disable trigger user');
    await owner.query('alter table row_versions disable trigger user');
    await owner.query('alter table audit_events disable trigger user');
    await owner.query(
      `update baselines set document = replace(document, '"ixz":', '"ixz":-') where number = 1`,
    );
    await owner.query(`update row_versions set mass = mass * 2.2046 where item = 'spar'`);
    await owner.query(`delete from audit_events where number = 3 and scope = $1`, [test.program.id]);
    await owner.query(
      `delete from audit_events a where number = (select max(number) from audit_events where scope = $1) and scope = $1`,
      [test.program.id],
    );
    await owner.end();
    const { breaches } = await verifyEverything(test.db);
    const what = breaches.map((breach) => breach.what);
    expect(what).toContain('baseline 1 of test-hopper');
    expect(what).toContain('revision 1 of list wing in test-hopper');
    expect(what).toContain(`audit event 4 of ${test.program.id}`);
    expect(what).toContain(`audit trail of ${test.program.id}`);
  });
});
