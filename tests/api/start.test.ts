import { type ChildProcess, spawn } from 'node:child_process';
import { chmodSync, existsSync, mkdtempSync, readdirSync, readFileSync, rmSync, statSync } from 'node:fs';
import os from 'node:os';
import path from 'node:path';
import { setTimeout as delay } from 'node:timers/promises';
import pg from 'pg';
import { afterAll, afterEach, beforeAll, describe, expect, it } from 'vitest';
import { DEMO_PEOPLE } from '@/lib/server/commands/local/demo-people.mjs';
import { ROOT } from '@/lib/server/commands/local/places.mjs';
import { anyFreePort, isFree } from '@/lib/server/commands/local/ports.mjs';
import { createTestDatabase } from '../support/database';

const SERVICES =
  /^(DATABASE_URL|MIGRATION_DATABASE_URL|APP_URL|S3_|SMTP_URL|MAIL_FROM|POLHODE_|VITEST|NODE_ENV$)/;
const READY = /The data stay in|serves http/;

interface Start {
  readonly child: ChildProcess;
  readonly output: () => string;
  /** Resolves with what was printed when it serves, or when it has ended. */
  readonly settled: Promise<string>;
  readonly ended: Promise<number | null>;
}

const started: Start[] = [];

// A test that fails half-way must leave nothing either.
afterEach(async () => {
  for (const { child, ended } of started.splice(0)) {
    if (child.exitCode === null && child.signalCode === null) child.kill('SIGTERM');
    await ended;
  }
});

/** What `npm start` runs, with the build of this test run and nothing of its services. */
function start(env: Readonly<Record<string, string>>): Start {
  const bare = Object.entries(process.env).filter(([name]) => !SERVICES.test(name));
  const child = spawn(process.execPath, ['lib/server/commands/start.mjs'], {
    cwd: ROOT,
    env: { ...Object.fromEntries(bare), ...env, NEXT_DIST_DIR: '.test-data/next', NODE_ENV: 'production' },
  });
  let text = '';
  const ended = new Promise<number | null>((resolve) => child.on('close', resolve));
  const settled = new Promise<string>((resolve) => {
    for (const stream of [child.stdout, child.stderr]) {
      stream.on('data', (piece: Buffer) => {
        text += piece.toString();
        if (READY.test(text)) resolve(text);
      });
    }
    child.on('close', () => resolve(text));
  });
  const running = { child, output: () => text, settled, ended };
  started.push(running);
  return running;
}

interface Process {
  readonly pid: number;
  readonly parent: number;
  readonly line: string;
}

/** The processes of this machine that live; zombies do not. */
function processes(): Process[] {
  const found: Process[] = [];
  for (const pid of readdirSync('/proc').filter((name) => /^\d+$/.test(name))) {
    try {
      const [state, parent] =
        readFileSync(`/proc/${pid}/stat`, 'latin1').split(') ').at(-1)?.split(' ') ?? [];
      const line = readFileSync(`/proc/${pid}/cmdline`, 'latin1').replaceAll('\0', ' ');
      if (state !== 'Z') found.push({ pid: Number(pid), parent: Number(parent), line });
    } catch (error) {
      // It ended while it was being looked at.
      if (!['ENOENT', 'ESRCH'].includes((error as NodeJS.ErrnoException).code ?? '')) throw error;
    }
  }
  return found;
}

/** All that a start has made: itself, its children and theirs, and PostgreSQL, which is nobody's child. */
function madeBy(start: Start, folder: string): Set<number> {
  const all = processes();
  const made = new Set(all.filter(({ line }) => line.includes(folder)).map(({ pid }) => pid));
  made.add(start.child.pid ?? 0);
  for (let size = 0; size < made.size;) {
    size = made.size;
    for (const { pid, parent } of all) if (made.has(parent)) made.add(pid);
  }
  return made;
}

const left = (made: ReadonlySet<number>) => processes().filter(({ pid }) => made.has(pid));

async function until(what: string, holds: () => boolean | Promise<boolean>): Promise<void> {
  const end = Date.now() + 20_000;
  while (!(await holds())) {
    if (Date.now() > end) throw new Error(`Waited in vain until ${what}.`);
    await delay(100);
  }
}

const addressIn = (output: string) => /Polhode is at +(http:\S+)/.exec(output)?.[1] ?? '';

describe('npm start', () => {
  let data: string;
  let port: number;
  beforeAll(async () => {
    data = mkdtempSync(path.join(os.tmpdir(), 'polhode-start-'));
    // PostgreSQL's user has to get through to its own folder inside.
    chmodSync(data, 0o711);
    port = await anyFreePort();
  });
  afterAll(() => rmSync(data, { recursive: true }));

  const settings = (): Record<string, string> =>
    Object.fromEntries(
      readFileSync(path.join(data, 'local.env'), 'utf8')
        .trim()
        .split('\n')
        .map((line) => [line.slice(0, line.indexOf('=')), line.slice(line.indexOf('=') + 1)]),
    );
  const people = async () => {
    const client = new pg.Client({ connectionString: settings()['DATABASE_URL'] });
    await client.connect();
    const { rows } = await client.query<{ id: string; email: string }>(
      'select id, email from users order by email',
    );
    await client.end();
    return rows;
  };

  it('serves the demo on a machine that has nothing of it, and leaves nothing running when told to stop', async () => {
    const first = start({ POLHODE_DATA: data, PORT: String(port) });
    const said = await first.settled;
    expect(said).toContain(`http://127.0.0.1:${port}`);
    for (const { email } of DEMO_PEOPLE) expect(said).toContain(email);
    expect((await fetch(`${addressIn(said)}/sign-in`)).status).toBe(200);
    const mailbox = /Mail it sends is at (\S+)/.exec(said)?.[1] ?? '';
    expect(await (await fetch(mailbox)).text()).toContain('Mailbox');
    expect((await people()).map(({ email }) => email)).toEqual(
      expect.arrayContaining(DEMO_PEOPLE.map(({ email }) => email)),
    );
    for (const file of ['secrets.json', 'local.env']) {
      expect(statSync(path.join(data, file)).mode & 0o777).toBe(0o600);
    }

    const second = start({ POLHODE_DATA: data });
    expect(await second.ended).toBe(1);
    expect(second.output()).toContain('already runs from this folder');

    const addresses = [
      settings()['DATABASE_URL'],
      settings()['S3_ENDPOINT'],
      settings()['SMTP_URL'],
      mailbox,
    ];
    const ports = [port, ...addresses.map((address) => Number(new URL(address ?? '').port))];
    const made = madeBy(first, data);
    // At least the start, the server, both local services and PostgreSQL.
    expect(made.size).toBeGreaterThanOrEqual(5);
    first.child.kill('SIGTERM');
    expect(await first.ended).toBe(0);
    expect(left(made)).toEqual([]);
    for (const one of ports) expect(await isFree(one)).toBe(true);
    expect(existsSync(path.join(data, 'local.env'))).toBe(false);
  }, 240_000);

  it('keeps the data, takes the next port if its own is taken, and recovers from a kill', async () => {
    const first = start({ POLHODE_DATA: data, PORT: String(port) });
    await first.settled;
    const before = await people();
    const made = madeBy(first, data);
    first.child.kill('SIGKILL');
    await first.ended;
    // The database server alone outlives it, for the next start to take over.
    await until('the server and the local services have gone with it', async () => isFree(port));
    await until('only PostgreSQL is left', () =>
      left(made).every(({ line }) => line.startsWith('postgres') || line.includes('/postgres -D')),
    );
    expect(left(made)).not.toEqual([]);

    const { createServer } = await import('node:net');
    const squatter = createServer().listen(port, '127.0.0.1');
    const began = Date.now();
    const second = start({ POLHODE_DATA: data, PORT: String(port) });
    const said = await second.settled;
    expect(Date.now() - began).toBeLessThan(30_000);
    expect(addressIn(said)).toMatch(/^http:\/\/127\.0\.0\.1:\d+$/);
    expect(addressIn(said)).not.toContain(`:${port}`);
    expect(await people()).toEqual(before);
    const all = new Set([...made, ...madeBy(second, data)]);
    second.child.kill('SIGINT');
    expect(await second.ended).toBe(0);
    squatter.close();
    expect(left(all)).toEqual([]);
  }, 240_000);
});

describe('npm start with services of the user’s own', () => {
  it('stops with one line that names what is missing', async () => {
    const refused = start({ DATABASE_URL: 'postgres://a:b@127.0.0.1/x', APP_URL: 'https://p.example' });
    expect(await refused.ended).toBe(1);
    expect(refused.output()).toMatch(
      /Not set: MIGRATION_DATABASE_URL, S3_ENDPOINT, S3_REGION, S3_BUCKET, S3_ACCESS_KEY_ID, S3_SECRET_ACCESS_KEY, SMTP_URL\./,
    );
    expect(refused.output()).not.toContain('    at ');
  });

  it('uses them, starts nothing local and loads no demo', async () => {
    const data = path.join(os.tmpdir(), `polhode-none-${process.pid}`);
    const database = await createTestDatabase();
    const port = await anyFreePort();
    const given = [
      'S3_ENDPOINT',
      'S3_REGION',
      'S3_BUCKET',
      'S3_ACCESS_KEY_ID',
      'S3_SECRET_ACCESS_KEY',
      'SMTP_URL',
    ];
    const running = start({
      ...Object.fromEntries(given.map((name) => [name, process.env[name] ?? ''])),
      DATABASE_URL: database.appUrl,
      MIGRATION_DATABASE_URL: database.ownerUrl,
      APP_URL: `http://127.0.0.1:${port}`,
      PORT: String(port),
      POLHODE_DATA: data,
    });
    expect(await running.settled).toContain(`serves http://127.0.0.1:${port}`);
    expect((await fetch(`http://127.0.0.1:${port}/sign-in`)).status).toBe(200);
    expect(running.output()).toContain('npm run admin');
    const client = new pg.Client({ connectionString: database.ownerUrl });
    await client.connect();
    expect((await client.query('select 1 from users')).rowCount).toBe(0);
    await client.end();
    running.child.kill('SIGTERM');
    expect(await running.ended).toBe(0);
    expect(await isFree(port)).toBe(true);
    expect(existsSync(data)).toBe(false);
    await database.drop();
  }, 120_000);
});
