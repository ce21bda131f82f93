import { type ChildProcess, spawn } from 'node:child_process';
import { once } from 'node:events';
import path from 'node:path';
import { Readable } from 'node:stream';
import { setTimeout as delay } from 'node:timers/promises';
import { findImport, type Import } from '@/db/queries/lists';
import { type Person } from '@/lib/server/actor';
import { requestImport } from '@/lib/server/lists/request-import';
import { storeStream } from '@/lib/server/storage/store-stream';
import { type ProgramUnderTest } from '@/tests/support/program';

/** Stores a text as an uploaded file and asks for its import, as the upload route does. Returns the import's id. */
export async function upload(
  test: ProgramUnderTest,
  person: Person,
  list: { readonly id: string; readonly code: string },
  csv: string,
  reason = 'for the test',
): Promise<string> {
  const bytes = Buffer.from(csv);
  const stored = await storeStream(Readable.from([bytes]), { contentLength: bytes.length });
  return requestImport(test.db, {
    person,
    list: { id: list.id, programId: test.program.id, code: list.code },
    file: { ...stored, name: 'upload.csv', lines: csv.split('\n').length - 1 },
    reason,
  });
}

/** The import as soon as `ready` says so; fails after a minute. */
export async function waitForImport(
  test: ProgramUnderTest,
  id: string,
  ready: (found: Pick<Import, 'state' | 'rows_done'>) => boolean,
) {
  for (const until = Date.now() + 60_000; Date.now() < until; await delay(15)) {
    const found = await findImport(test.db, id);
    if (found !== undefined && ready(found)) return found;
  }
  throw new Error(`the import ${id} did not come that far within a minute`);
}

export const settled = ({ state }: Pick<Import, 'state'>): boolean =>
  state !== 'waiting' && state !== 'running';

/** A process of its own that runs the queue of this test's database; with `stall` its store stops in the middle of a file. */
export function startJobProcess(
  test: ProgramUnderTest,
  ...how: 'stall'[]
): { readonly kill: () => Promise<void> } {
  const child: ChildProcess = spawn(
    process.execPath,
    ['--import', 'tsx', path.join(import.meta.dirname, 'run-jobs.ts'), ...how],
    { env: { ...process.env, DATABASE_URL: test.appUrl }, stdio: ['ignore', 'inherit', 'inherit'] },
  );
  return {
    kill: async () => {
      if (child.exitCode !== null || child.signalCode !== null) return;
      child.kill('SIGKILL');
      await once(child, 'exit');
    },
  };
}

/** A list of `rows` point masses of 2 kg, in kg and m. */
export function longList(rows: number, mass = 2): string {
  const lines = Array.from({ length: rows }, (_, k) => `P-${k + 1},Group ${k % 7},${mass},${k / 100},0,1`);
  return `item,group,mass,x,y,z\r\n${lines.join('\r\n')}\r\n`;
}
