import { createHash } from 'node:crypto';
import { http, HttpResponse } from 'msw';
import { setupServer } from 'msw/node';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { GET } from '@/app/api/v1/imports/[id]/route';
import { POST } from '@/app/api/v1/programs/[program]/lists/[list]/revisions/route';
import { findImport } from '@/db/queries/lists';
import { importEndpoint } from '@/lib/contracts/api/imports';
import { addRevisionEndpoint } from '@/lib/contracts/api/revisions';
import { LIST_BYTES } from '@/lib/ingest/limits';
import { importFile } from '@/lib/server/lists/import-file';
import { OPEN_IMPORTS } from '@/lib/server/lists/request-import';
import { addList } from '@/lib/server/lists/save-list';
import { objectExists, openObject } from '@/lib/server/storage/open-object';
import { declare } from '@/tests/ingest/support';
import { programUnderTest, type ProgramUnderTest } from '@/tests/support/program';
import { callerOfEndpoint, documentedStatuses, restoreQuotas, sorted, tokenOf, useUpQuota } from './calls';

const revisions = callerOfEndpoint(addRevisionEndpoint, POST);
const imports = callerOfEndpoint(importEndpoint, GET);
const CSV = 'item,mass,x,y,z\nA,1,0,0,0\nB,2,1,0,0\n';

const failing = setupServer();
const storeFails = http.put(`${process.env['S3_ENDPOINT'] ?? ''}/*`, () =>
  HttpResponse.xml('<Error><Code>SlowDown</Code></Error>', { status: 503 }),
);

let test: ProgramUnderTest;
let token: string;
beforeAll(async () => {
  // Before the first call: the client keeps the functions it finds then.
  failing.listen({ onUnhandledRequest: 'bypass' });
  test = await programUnderTest();
  token = await tokenOf(test, test.crew.weights, ['lists:write']);
  for (const code of ['wing', 'tail']) {
    await addList(test.db, {
      person: test.crew.weights,
      programId: test.program.id,
      code,
      title: code,
      declarations: declare(),
    });
  }
});
afterAll(async () => {
  failing.close();
  await test.close();
});

interface Post {
  readonly body?: string | ReadableStream<Uint8Array>;
  readonly list?: string;
  readonly program?: string;
  readonly query?: Record<string, string>;
  readonly headers?: Record<string, string>;
  readonly by?: string;
}
const post = ({ body = CSV, list = 'wing', program = test.program.code, by = token, ...rest }: Post = {}) =>
  revisions.call({ token: by, params: { program, list }, body, ...rest });
const read = (id: unknown, by = token) => imports.call({ token: by, params: { id: String(id) } });

/** Reads all files that wait, as the jobs would. */
async function runImports(): Promise<void> {
  const waiting = await test.db.selectFrom('imports').select('id').where('state', '=', 'waiting').execute();
  for (const { id } of waiting) {
    const services = { pool: test.pool, db: test.db, openObject: (sha256: string) => openObject(sha256) };
    await importFile(services, id);
  }
}

const importsMade = async (): Promise<number> =>
  (await test.db.selectFrom('imports').select('id').execute()).length;

describe('POST revisions', () => {
  it('stores the file, and its import becomes the next revision', async () => {
    const headers = { 'X-File-Name': encodeURIComponent('Flügel 3.csv') };
    const { status, body, headers: sent } = await post({ query: { reason: 'First weighing' }, headers });
    expect(status).toBe(202);
    expect(sent.get('location')).toBe(body['url']);
    expect(body['url']).toMatch(/\/api\/v1\/imports\/[0-9a-f-]{36}$/);
    const { import: id } = body;
    const expected = {
      import: id,
      program: test.program.code,
      list: 'wing',
      mapping: null,
      errors: [],
      errorCounts: {},
    };
    expect((await read(id)).body).toEqual({
      ...expected,
      state: 'waiting',
      rows: 0,
      ofRows: 2,
      revision: null,
    });
    await runImports();
    expect((await read(id)).body).toEqual({ ...expected, state: 'done', rows: 2, ofRows: 2, revision: 1 });
    const kept = await findImport(test.db, String(id));
    expect(kept).toMatchObject({ reason: 'First weighing', file_name: 'Flügel 3.csv' });
  });

  it('keeps a wrong file from becoming a revision, and tells its errors by line and column', async () => {
    const { body } = await post({ body: 'item,mass,x,y,z\nA,12 kg,0,0,0\nB,1,0,0\n' });
    await runImports();
    const { body: found } = await read(body['import']);
    expect(found).toMatchObject({
      state: 'failed',
      revision: null,
      errors: [
        { kind: 'not-a-number', line: 2, column: 'mass', found: '12 kg' },
        { kind: 'too-few-fields', line: 3, column: null },
      ],
      errorCounts: { 'not-a-number': 1, 'too-few-fields': 1 },
    });
  });

  it('refuses a fifth file of a person while four are under way, before it reads it', async () => {
    for (let made = 0; made < OPEN_IMPORTS; made += 1) expect((await post()).status).toBe(202);
    const before = await importsMade();
    const { status, headers } = await post();
    expect([status, headers.get('retry-after'), (await importsMade()) - before]).toEqual([429, '10', 0]);
    await runImports();
  });

  it('refuses what it cannot take before it reads it', async () => {
    const before = await importsMade();
    expect((await post({ list: 'no-such-list' })).status).toBe(404);
    expect((await post({ program: 'no-such-program' })).status).toBe(404);
    expect((await post({ headers: { 'Content-Type': 'application/json' } })).status).toBe(415);
    expect((await post({ headers: { 'Content-Length': String(LIST_BYTES + 1) } })).status).toBe(413);
    expect((await post({ body: new Blob([CSV]).stream() as ReadableStream<Uint8Array> })).status).toBe(411);
    expect((await post({ query: { reason: '' } })).status).toBe(422);
    expect((await post({ query: { because: 'x' } })).body['errors']).toMatchObject([
      { parameter: 'because' },
    ]);
    expect((await post({ headers: { 'Idempotency-Key': 'x'.repeat(256) } })).status).toBe(400);
    expect(await importsMade()).toBe(before);
  });

  it('keeps nothing of a body that is not as long as declared', async () => {
    const before = await importsMade();
    for (const bytes of [CSV.length - 1, CSV.length + 1]) {
      const body = `${CSV}C${bytes},3,0,0,0\n`;
      const declared = String(body.length + bytes - CSV.length);
      const answer = await post({ body, headers: { 'Content-Length': declared } });
      expect(answer.status).toBe(400);
      expect(await objectExists(createHash('sha256').update(body).digest('hex'))).toBe(false);
    }
    expect(await importsMade()).toBe(before);
  });

  it('is for weights engineers of the program with a token of the scope', async () => {
    const { crew } = test;
    expect((await post({ by: await tokenOf(test, crew.weights, ['baselines:read']) })).status).toBe(403);
    expect((await post({ by: 'polhode_nobody-has-ever-made-this-one' })).status).toBe(401);
  });

  it('answers 503 when the file store fails, and keeps nothing', async () => {
    const body = `${CSV}STORE-FAILS,1,0,0,0\n`;
    const before = await importsMade();
    failing.use(storeFails);
    const {
      status,
      headers,
      body: problem,
    } = await post({ body, headers: { 'Idempotency-Key': 'failing' } });
    failing.resetHandlers();
    expect([status, headers.get('retry-after')]).toEqual([503, '30']);
    expect(problem['detail']).toMatch(/nothing of it was kept/);
    expect(await objectExists(createHash('sha256').update(body).digest('hex'))).toBe(false);
    expect(await importsMade()).toBe(before);
    expect((await post({ body, headers: { 'Idempotency-Key': 'failing' } })).status).toBe(202);
    await runImports();
  });
});

describe('an Idempotency-Key', () => {
  const keyed = (key: string, said: Post = {}) => post({ ...said, headers: { 'Idempotency-Key': key } });

  it('gives a repetition the first answer, and no second import', async () => {
    const first = await keyed('one');
    const before = await importsMade();
    await runImports();
    const again = await keyed('one');
    const quoted = await keyed('"one"');
    expect([again.status, again.body, quoted.body]).toEqual([202, first.body, first.body]);
    expect(await importsMade()).toBe(before);
  });

  it('gives requests at the same moment one answer', async () => {
    const before = await importsMade();
    const answers = await Promise.all([keyed('two'), keyed('two'), keyed('two')]);
    expect(answers.map(({ status }) => status)).toEqual([202, 202, 202]);
    expect(new Set(answers.map(({ body }) => body['import'])).size).toBe(1);
    expect(await importsMade()).toBe(before + 1);
    await runImports();
  });

  it.each([
    ['another file', { body: `${CSV}C,1,0,0,0\n` }],
    ['another list', { list: 'tail' }],
    ['another reason', { query: { reason: 'other' } }],
  ])('is refused for %s', async (_what, said) => {
    const before = await importsMade();
    const { status, body } = await keyed('one', said);
    expect([status, body['type'], await importsMade()]).toEqual([
      422,
      'urn:polhode:problem:invalid-input',
      before,
    ]);
  });

  it('gives a repetition its answer also while as many imports as are allowed are under way', async () => {
    for (let made = 0; made < OPEN_IMPORTS; made += 1) await post();
    expect((await keyed('one')).status).toBe(202);
    expect((await keyed('three')).status).toBe(429);
    await runImports();
    expect((await keyed('three')).status).toBe(202);
    await runImports();
  });

  it('is forgotten after a day', async () => {
    const first = await keyed('one');
    const dayAgo = new Date(Date.now() - 25 * 3600 * 1000);
    await test.db
      .updateTable('idempotency_keys')
      .set({ created_at: dayAgo })
      .where('key', '=', 'one')
      .execute();
    const { status, body } = await keyed('one', { list: 'tail' });
    expect(status).toBe(202);
    expect(body['import']).not.toBe(first.body['import']);
    await runImports();
  });
});

describe('GET imports', () => {
  it('answers alike for an import that there is not and one out of reach', async () => {
    const { body } = await post({ by: token });
    await runImports();
    expect(
      (await read(body['import'], await tokenOf(test, test.crew.chief, ['baselines:read']))).status,
    ).toBe(403);
    const missing = await read('5f0c7a52-9a55-4d52-8d0e-6f5a3a1f2c11');
    await test.db.deleteFrom('program_members').where('user_id', '=', test.crew.weights.userId).execute();
    const out = await read(body['import']);
    expect([missing.status, out.status]).toEqual([404, 404]);
    expect(out.body).toEqual(missing.body);
  });

  it('needs a token, and counts calls', async () => {
    expect((await imports.call({ params: { id: 'x' } })).status).toBe(401);
    await useUpQuota(test);
    expect((await read('x')).status).toBe(429);
    await restoreQuotas(test);
  });

  it('has given every answer that it documents, as the upload has', () => {
    expect(sorted(imports.seen)).toEqual(documentedStatuses(importEndpoint));
    expect(sorted(revisions.seen)).toEqual(documentedStatuses(addRevisionEndpoint));
  });
});
