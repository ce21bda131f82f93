import { Readable } from 'node:stream';
import { findList } from '@/db/queries/lists';
import { type DemoProgram, type DemoRevision } from '@/fixtures/demo/program';
import { importFile } from '@/lib/server/lists/import-file';
import { requestImport } from '@/lib/server/lists/request-import';
import { addList } from '@/lib/server/lists/save-list';
import { openObject } from '@/lib/server/storage/open-object';
import { storeStream } from '@/lib/server/storage/store-stream';
import { type DemoServices } from './load-demo';
import { type DemoPeople, personOf } from './load-people';

/** Uploads every revision of every list as its author would, and one file that is refused. */
export async function loadLists(
  services: DemoServices,
  demo: DemoProgram,
  program: { readonly id: string },
  people: DemoPeople,
): Promise<void> {
  for (const list of demo.lists) {
    const first = list.revisions[0];
    if (first === undefined) throw new Error(`the demo's list ${list.code} has no revision`);
    await addList(services.db, {
      person: personOf(people, first.by),
      programId: program.id,
      code: list.code,
      title: list.title,
      declarations: list.declarations,
    });
    for (const revision of list.revisions)
      await upload(services, program.id, list.code, revision, people, 'done');
  }
  const { refusedUpload } = demo;
  await upload(services, program.id, refusedUpload.list, refusedUpload, people, 'failed');
}

async function upload(
  services: DemoServices,
  programId: string,
  code: string,
  { csv, fileName, reason, by }: DemoRevision,
  people: DemoPeople,
  expected: 'done' | 'failed',
): Promise<void> {
  const { db, pool } = services;
  const list = await findList(db, programId, code);
  if (list === undefined) throw new Error(`the demo has no list ${code}`);
  const bytes = Buffer.from(csv);
  const { sha256 } = await storeStream(Readable.from([bytes]), { contentLength: bytes.length });
  const id = await requestImport(db, {
    person: personOf(people, by),
    list: { id: list.id, programId, code },
    file: { sha256, bytes: bytes.length, name: fileName, lines: csv.split('\n').length - 1 },
    reason,
  });
  await importFile({ db, pool, openObject: (name) => openObject(name) }, id);
  const { state } = await db
    .selectFrom('imports')
    .select('state')
    .where('id', '=', id)
    .executeTakeFirstOrThrow();
  if (state !== expected) throw new Error(`the demo's file ${fileName} ended as ${state}, not ${expected}`);
}
