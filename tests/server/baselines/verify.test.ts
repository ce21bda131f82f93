import { sql } from 'kysely';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { createDb, createPool, type Db } from '@/db/client';
import { digestOf, canonicalText } from '@/lib/server/baselines/digest';
import { returnSubmission } from '@/lib/server/baselines/return-submission';
import { verifyEverything } from '@/lib/server/baselines/verify';
import { withdrawBaseline } from '@/lib/server/baselines/withdraw-baseline';
import { type ProgramUnderTest, programUnderTest } from '@/tests/support/program';
import { fillProgram, signed, submitted } from '@/tests/support/signed';

/* Someone with the owner's rights, who can switch every trigger off, and what they leave behind. */

let test: ProgramUnderTest;
let owner: Db;

beforeAll(async () => {
  test = await programUnderTest();
  const { db, program, crew } = test;
  await fillProgram(test);
  await signed(test, { code: 'first', title: 'First account' });
  await signed(test, { code: 'second', title: 'Radar moved' });
  await signed(test, { code: 'third', title: 'Weighed', build: 'as-built' });
  const { submissionId } = await submitted(test, { code: 'fourth', title: 'Not this one' });
  await returnSubmission(db, { person: crew.chief2, program, submissionId, reason: 'guessed' });
  await withdrawBaseline(db, { person: crew.chief, program, number: 3, reason: 'another scale' });
  const pool = createPool(test.ownerUrl, 1, (error) => {
    throw error;
  });
  owner = createDb(pool);
});
afterAll(async () => {
  await owner.destroy();
  await test.close();
});

const UNDO = new Error('undone');
const TABLES = ['submissions', 'decisions', 'baselines', 'supersessions', 'withdrawals', 'audit_events'];

/** What `verify` finds after the work of an owner, who then thinks better of it. */
async function after(work: (trx: Db) => Promise<unknown>): Promise<string[]> {
  const found: string[] = [];
  const undone = owner.transaction().execute(async (trx) => {
    for (const table of TABLES) await sql`alter table ${sql.table(table)} disable trigger user`.execute(trx);
    await work(trx);
    const { breaches } = await verifyEverything(trx);
    found.push(...breaches.map(({ what, detail }) => `${what}: ${detail}`));
    throw UNDO;
  });
  await expect(undone).rejects.toBe(UNDO);
  return found;
}

describe('verify', () => {
  it('finds nothing where nothing was touched: signed, superseded, returned and withdrawn', async () => {
    expect(await after(async () => undefined)).toEqual([]);
  });

  it('finds a document that was altered together with its digest', async () => {
    const found = await after(async (trx) => {
      const { document } = await trx
        .selectFrom('baselines')
        .select('document')
        .where('number', '=', 2)
        .executeTakeFirstOrThrow();
      const forged = canonicalText({ ...(JSON.parse(document) as object), marking: null });
      await trx
        .updateTable('baselines')
        .set({ document: forged, digest: digestOf(forged) })
        .where('number', '=', 2)
        .execute();
    });
    expect(found).toHaveLength(2);
    expect(found[0]).toMatch(/stored is "Signed baseline 2, .*", and the trail has no such event/);
    expect(found[1]).toMatch(/the trail says "Signed baseline 2, .*", and that is not what is stored/);
  });

  it.each([
    [
      'a withdrawal taken away',
      'delete from withdrawals',
      'the trail says "Withdrew baseline 3: another scale", and that is not what is stored',
    ],
    [
      'a withdrawal that nobody made',
      `insert into withdrawals (program_id, number, reason, withdrawn_by)
       select program_id, 2, 'mine', signed_by from baselines where number = 2`,
      'stored is "Withdrew baseline 2: mine", and the trail has no such event',
    ],
    [
      'a supersession taken away',
      'delete from supersessions',
      'the trail says "Baseline 1 is superseded by baseline 2", and that is not what is stored',
    ],
    [
      'the newest baseline taken away',
      'delete from withdrawals; delete from baselines where number = 3',
      'the trail says "Signed baseline 3, ',
    ],
    [
      'a signature in another name',
      `update baselines set signed_by = (select id from users where name = 'chief2') where number = 1`,
      'the trail says "Signed baseline 1, ',
    ],
    [
      'a decision in another name',
      `update decisions set decided_by = (select id from users where name = 'chief2') where decision = 'approved'`,
      'the trail says "Signed baseline 1, ',
    ],
    [
      'other reasons of a return',
      `update decisions set reason = 'praise' where decision = 'returned'`,
      'the trail says "Returned "Not this one": guessed", and that is not what is stored',
    ],
    [
      'another submitter',
      `update submissions set submitted_by = (select id from users where name = 'weights2') where title = 'Weighed'`,
      'the trail says "Submitted "Weighed" for approval',
    ],
    [
      'a title that the document does not have',
      `update baselines set title = 'Final' where number = 2`,
      'baseline 2 of test-hopper: its number, title or what it supersedes is not as its document says',
    ],
    [
      'another baseline before it than the document has',
      'update baselines set supersedes = 1 where number = 3',
      'baseline 3 of test-hopper: its number, title or what it supersedes is not as its document says',
    ],
    [
      'an event taken out of the trail',
      `delete from audit_events where kind = 'baseline.superseded'`,
      'stored is "Baseline 1 is superseded by baseline 2", and the trail has no such event',
    ],
  ])('finds %s', async (_name, statements, expected) => {
    const found = await after(async (trx) => {
      for (const statement of statements.split(';')) await sql.raw(statement).execute(trx);
    });
    expect(found.join('\n')).toContain(expected);
  });
});
