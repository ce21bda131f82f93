import { existsSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import path from 'node:path';
import { Failure } from './failure.mjs';
import { DATA, LOCAL_ENV } from './places.mjs';

const FILE = path.join(DATA, 'start.pid');

/** Whether `pid` is a start command that still runs; /proc guards against a number that was given out again. */
function isStart(pid) {
  const commandLine = `/proc/${pid}/cmdline`;
  if (existsSync('/proc/self/cmdline')) {
    return existsSync(commandLine) && readFileSync(commandLine, 'utf8').includes('start.mjs');
  }
  try {
    process.kill(pid, 0);
    return true;
  } catch (error) {
    if (error.code === 'ESRCH') return false;
    throw error;
  }
}

/** Claims the data folder for this process; a Failure if another start holds it. */
export function claimData() {
  const holder = existsSync(FILE) ? Number(readFileSync(FILE, 'utf8')) : 0;
  if (holder > 0 && isStart(holder)) {
    throw new Failure(
      `Polhode already runs from this folder (process ${holder}). Stop it first, with Ctrl-C.`,
    );
  }
  writeFileSync(FILE, String(process.pid));
}

/** Gives the data folder free. */
export function releaseData() {
  rmSync(LOCAL_ENV, { force: true });
  rmSync(FILE, { force: true });
}
