import { type JobHelpers } from 'graphile-worker';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { findList, openImportsOf } from '@/db/queries/lists';
import { importListTask } from '@/lib/server/jobs/tasks/import-list';
import { requestImport } from '@/lib/server/lists/request-import';
import { type ProgramUnderTest, programUnderTest, reviseList } from '@/tests/support/program';

let test: ProgramUnderTest;

beforeAll(async () => {
  test = await programUnderTest();
  await reviseList(test, test.crew.weights, 'wing', 'item,mass,x,y,z\na,10,6.5,0,1\n');
});
afterAll(() => test.close());

const attempt = (attempts: number): JobHelpers =>
  ({ job: { attempts, max_attempts: 8 } }) as unknown as JobHelpers;

describe('an import whose stored file cannot be read', () => {
  it('is tried again until the last attempt, then ends with a sentence and no longer counts against its owner', async () => {
    const { db, program, crew } = test;
    const list = await findList(db, program.id, 'wing');
    if (list === undefined) throw new Error('no list');
    const importId = await requestImport(db, {
      person: crew.weights,
      list: { id: list.id, programId: program.id, code: 'wing' },
      file: { sha256: 'd'.repeat(64), bytes: 10, name: 'lost.csv', lines: 2 },
      reason: 'a file that the store has lost',
    });
    const state = () =>
      db
        .selectFrom('imports')
        .select(['state', 'failure'])
        .where('id', '=', importId)
        .executeTakeFirstOrThrow();

    await expect(importListTask({ importId }, attempt(7))).rejects.toThrow();
    expect(await state()).toMatchObject({ state: 'running', failure: null });
    expect(await openImportsOf(db, crew.weights.userId)).toBe(1);

    await expect(importListTask({ importId }, attempt(8))).rejects.toThrow();
    const ended = await state();
    expect(ended.state).toBe('failed');
    expect(ended.failure).toContain('Nothing of it was stored');
    expect(await openImportsOf(db, crew.weights.userId)).toBe(0);
    expect((await findList(db, program.id, 'wing'))?.last_revision).toBe(1);
  });
});
