import { execFileSync, spawn } from 'node:child_process';
import { chmodSync, createReadStream, createWriteStream, mkdtempSync, rmSync, statSync } from 'node:fs';
import os from 'node:os';
import path from 'node:path';
import { Readable } from 'node:stream';
import { pipeline } from 'node:stream/promises';
import pg from 'pg';
import { superuserUrl } from '@/lib/server/commands/local/test-cluster.mjs';
import { anyFreePort } from '@/lib/server/commands/local/ports.mjs';
import { declarationsFromBody, listDeclarationsSchema } from '@/lib/contracts/list-declarations';
import { ensureBucket } from '@/lib/server/storage/bucket';
import { createStore } from '@/lib/server/storage/client';
import { requestImport } from '@/lib/server/lists/request-import';
import { addList } from '@/lib/server/lists/save-list';
import { storeStream } from '@/lib/server/storage/store-stream';
import { testCluster } from '@/tests/support/cluster';
import { programUnderTest } from '@/tests/support/program';
import setup from '@/tests/support/services.setup';
import { bigListText } from './big-list';

/*
 * The import job against the database alone: a file of a million rows (or as many as the first argument says) becomes a revision;
 * then the very same rows go from a file of the database's own machine into an empty table of the same shape by binary COPY, which
 * is the least that storing them takes. Then a file in which one row in a hundred has another mass becomes the next revision. Ratios
 * within a round, medians of the rounds; ends with an error when a target is missed.
 */
const ROWS = Number(process.argv[2] ?? 1_000_000);
/** Column of the mass in the generated file. */
const MASS = 6;
const ROUNDS = Number(process.argv[3] ?? 3);
const TARGETS = { first: 2, next: 3, growth: 0.03, memory: 200 };

interface Run {
  readonly seconds: number;
  readonly cpu: number;
  readonly grownMiB: number;
}

const stop = await setup();
const folder = mkdtempSync(path.join(os.tmpdir(), 'polhode-bench-'));
chmodSync(folder, 0o777);
const store = await startStore();
const test = await programUnderTest();
const superuser = new pg.Client({ connectionString: await databaseOfTest() });
await superuser.connect();
try {
  await main();
} finally {
  await superuser.end();
  await test.close();
  store.kill();
  await stop();
  rmSync(folder, { recursive: true });
}

/** The S3 stand-in in a process of its own, as `npm start` runs it. */
async function startStore(): Promise<{ kill: () => void }> {
  const port = await anyFreePort();
  const child = spawn(
    process.execPath,
    ['--import', 'tsx', 'lib/server/fakes/s3/main.ts', String(port), path.join(folder, 's3')],
    { stdio: ['ignore', 'inherit', 'inherit', 'ipc'] },
  );
  await new Promise((resolve, reject) => {
    child.once('message', resolve);
    child.once('exit', () => reject(new Error('the S3 stand-in did not start')));
  });
  process.env['S3_ENDPOINT'] = `http://127.0.0.1:${port}`;
  await ensureBucket(
    createStore({
      endpoint: process.env['S3_ENDPOINT'],
      region: process.env['S3_REGION'] ?? '',
      bucket: process.env['S3_BUCKET'] ?? '',
      accessKeyId: process.env['S3_ACCESS_KEY_ID'] ?? '',
      secretAccessKey: process.env['S3_SECRET_ACCESS_KEY'] ?? '',
    }),
  );
  return { kill: () => child.kill('SIGKILL') };
}

async function databaseOfTest(): Promise<string> {
  const url = new URL(superuserUrl(testCluster()));
  url.pathname = new URL(test.appUrl).pathname;
  return url.href;
}

/** With `changed`, one row in a hundred weighs a tenth more. */
async function writeFile(name: string, changed: boolean): Promise<string> {
  const file = path.join(folder, name);
  await pipeline(
    Readable.from(changed ? heavier() : bigListText({ rows: ROWS, seed: 1967 })),
    createWriteStream(file),
  );
  return file;
}

function* heavier(): Generator<string> {
  let row = -1;
  for (const text of bigListText({ rows: ROWS, seed: 1967 })) {
    const lines = text.split('\n').map((line) => {
      if (line === '') return line;
      row += 1;
      if (row % 100 !== 57) return line;
      const fields = line.split(',');
      fields[MASS] = String(Number((Number(fields[MASS]) * 1.1).toPrecision(6)));
      return fields.join(',');
    });
    yield lines.join('\n');
  }
}

async function newList(code: string): Promise<{ id: string; code: string }> {
  const declarations = declarationsFromBody(
    listDeclarationsSchema.parse({ mass_unit: 'kg', length_unit: 'm', inertia_unit: 'kg.m2' }),
  );
  const { id } = await addList(test.db, {
    person: test.crew.weights,
    programId: test.program.id,
    code,
    title: code,
    declarations,
  });
  return { id, code };
}

/** Stores a file, asks for its import, and runs that in a process of its own. */
async function runImport(list: { id: string; code: string }, file: string): Promise<Run> {
  const stored = await storeStream(createReadStream(file), { contentLength: statSync(file).size });
  const id = await requestImport(test.db, {
    person: test.crew.weights,
    list: { ...list, programId: test.program.id },
    file: { ...stored, name: path.basename(file), lines: ROWS + 1 },
    reason: 'bench',
  });
  await superuser.query('checkpoint');
  const told = execFileSync(
    process.execPath,
    ['--expose-gc', '--import', 'tsx', 'tests/bench/import-once.ts', id],
    { encoding: 'utf8', stdio: ['ignore', 'pipe', 'inherit'] },
  );
  return JSON.parse(told) as Run;
}

/** Seconds that the database takes to read the rows of a list's newest revision from a binary file into an empty table like theirs. */
async function copyAlone(listId: string): Promise<number> {
  const file = path.join(folder, 'rows.bin');
  await superuser.query(
    `copy (select r.* from row_versions r join lists l using (list_no) where l.id = '${listId}' order by sort_key)
     to '${file}' (format binary)`,
  );
  await superuser.query('create table copied (like row_versions including all)');
  await superuser.query('checkpoint');
  const start = performance.now();
  await superuser.query(`copy copied from '${file}' (format binary)`);
  const seconds = (performance.now() - start) / 1000;
  await superuser.query('drop table copied');
  return seconds;
}

/** Bytes of all that a revision stores, indexes with it. */
async function storage(): Promise<number> {
  const tables = ['row_versions', 'row_ends', 'revision_subtotals', 'list_revisions'];
  const { rows } = await superuser.query<{ bytes: string }>(
    'select sum(pg_total_relation_size(name::regclass)) as bytes from unnest($1::text[]) name',
    [tables],
  );
  return Number(rows[0]?.bytes);
}

function told({ seconds, cpu, grownMiB }: Run): string {
  return `${seconds.toFixed(2)} s (${cpu.toFixed(2)} s of processor, +${grownMiB.toFixed(0)} MiB)`;
}

async function main(): Promise<void> {
  const first = await writeFile('first.csv', false);
  const next = await writeFile('next.csv', true);
  const empty = await storage();
  console.log(`${ROWS} rows, ${(statSync(first).size / 1e6).toFixed(0)} MB of CSV, ${ROUNDS} rounds\n`);
  const rounds: {
    readonly first: number;
    readonly next: number;
    readonly growth: number;
    readonly memory: number;
  }[] = [];
  for (let round = 1; round <= ROUNDS; round += 1) {
    const list = await newList(`bench-${round}`);
    const made = await runImport(list, first);
    const before = await storage();
    const copy = await copyAlone(list.id);
    const more = await runImport(list, next);
    const grown = (await storage()) - before;
    const size = (before - empty) / round;
    rounds.push({
      first: made.seconds / copy,
      next: more.seconds / copy,
      growth: grown / size,
      memory: Math.max(made.grownMiB, more.grownMiB),
    });
    console.log(
      `round ${round}: COPY alone ${copy.toFixed(2)} s; first revision ${told(made)}; next ${told(more)}; storage +${((100 * grown) / size).toFixed(2)} %`,
    );
  }
  const median = (of: (one: (typeof rounds)[number]) => number): number =>
    rounds.map(of).sort((a, b) => a - b)[Math.floor(rounds.length / 2)] ?? NaN;
  let missed = 0;
  const hold = (name: string, value: number, limit: number): void => {
    if (!(value <= limit)) missed += 1;
    console.log(
      `${name.padEnd(52)} ${value.toFixed(3).padStart(9)}  at most ${limit}${value <= limit ? '' : '  MISSED'}`,
    );
  };
  console.log('');
  hold(
    'first revision, times the COPY alone',
    median((one) => one.first),
    TARGETS.first,
  );
  hold(
    'next revision with 1 % changed, times the COPY',
    median((one) => one.next),
    TARGETS.next,
  );
  hold(
    'storage for the next revision, of the first',
    median((one) => one.growth),
    TARGETS.growth,
  );
  hold(
    'growth of the process, MiB',
    median((one) => one.memory),
    TARGETS.memory,
  );
  if (missed > 0) process.exitCode = 1;
}
