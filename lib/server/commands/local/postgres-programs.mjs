import { spawnSync } from 'node:child_process';
import { existsSync, readdirSync, readFileSync } from 'node:fs';
import path from 'node:path';
import { installFromDebian, isExecutable, onPath } from './debian.mjs';
import { Failure } from './failure.mjs';

const DEBIAN = '/usr/lib/postgresql';
const OLDEST = 14;

function majorOf(bin) {
  const { stdout } = spawnSync(path.join(bin, 'postgres'), ['--version'], { encoding: 'utf8', cwd: '/' });
  return Number(/ (\d+)/.exec(stdout ?? '')?.[1] ?? 0);
}

/** Folders that hold PostgreSQL's programs, best first: PG_BIN, Debian's newest, pg_config's. */
function candidates() {
  const found = [];
  if (process.env.PG_BIN) found.push(process.env.PG_BIN);
  if (existsSync(DEBIAN)) {
    const versions = readdirSync(DEBIAN).sort((a, b) => Number(b) - Number(a));
    found.push(...versions.map((version) => path.join(DEBIAN, version, 'bin')));
  }
  const pgConfig = onPath(['pg_config']);
  if (pgConfig) found.push(spawnSync(pgConfig, ['--bindir'], { encoding: 'utf8' }).stdout.trim());
  return found.filter(
    (bin) => isExecutable(path.join(bin, 'initdb')) && isExecutable(path.join(bin, 'postgres')),
  );
}

/**
 * The folder of PostgreSQL's programs, installed from Debian if there is none. A data folder that exists decides
 * the major version, for another one cannot open it.
 * @param {string} [dataFolder]
 * @returns {string}
 */
export function postgresPrograms(dataFolder) {
  if (candidates().length === 0) {
    installFromDebian('postgresql', 'or set PG_BIN to the folder of its programs');
  }
  const found = candidates();
  const versionFile = dataFolder ? path.join(dataFolder, 'PG_VERSION') : null;
  if (versionFile && existsSync(versionFile)) {
    const wanted = Number(readFileSync(versionFile, 'utf8').trim());
    const fitting = found.find((bin) => majorOf(bin) === wanted);
    if (fitting) return fitting;
    throw new Failure(
      `The data in ${dataFolder} belong to PostgreSQL ${wanted}, which is not installed any more.`,
    );
  }
  const newEnough = found.find((bin) => majorOf(bin) >= OLDEST);
  if (!newEnough) throw new Failure(`PostgreSQL ${OLDEST} or newer is needed.`);
  return newEnough;
}

/**
 * PostgreSQL refuses to run as root; then it runs as the `postgres` user. Else as whoever asks.
 * @returns {{ uid?: number, gid?: number }}
 */
export function postgresUser() {
  if (process.getuid?.() !== 0) return {};
  const line = readFileSync('/etc/passwd', 'utf8')
    .split('\n')
    .find((entry) => entry.startsWith('postgres:'));
  if (!line)
    throw new Failure('PostgreSQL will not run as root, and there is no user `postgres` to run it as.');
  const [, , uid, gid] = line.split(':');
  return { uid: Number(uid), gid: Number(gid) };
}
