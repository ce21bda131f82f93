import { spawnSync } from 'node:child_process';
import {
  chmodSync,
  chownSync,
  existsSync,
  mkdirSync,
  readFileSync,
  renameSync,
  rmSync,
  writeFileSync,
} from 'node:fs';
import path from 'node:path';
import { Failure } from './failure.mjs';
import { postgresPrograms, postgresUser } from './postgres-programs.mjs';

/**
 * A PostgreSQL cluster of our own: `home/data` is its data folder, `home/log` its log.
 * @typedef {object} Cluster
 * @property {string} home
 * @property {string} data
 * @property {string} bin
 * @property {{ uid?: number, gid?: number }} user
 */

/**
 * @param {string} home
 * @returns {Cluster}
 */
export function clusterAt(home) {
  const data = path.join(home, 'data');
  return { home, data, bin: postgresPrograms(data), user: postgresUser() };
}

/** Runs one of PostgreSQL's programs. Output is dropped by default: a daemon would keep our pipe open. */
function program(cluster, name, args, stdio = 'ignore') {
  const { uid, gid } = cluster.user;
  return spawnSync(path.join(cluster.bin, name), args, {
    cwd: '/',
    stdio,
    encoding: 'utf8',
    ...(uid === undefined ? {} : { uid, gid }),
  });
}

/**
 * Whether the user that PostgreSQL runs as can get to `folder`.
 * @param {string} folder
 */
export function isReachable(folder) {
  const { uid, gid } = postgresUser();
  const as = uid === undefined ? {} : { uid, gid };
  return spawnSync('/bin/sh', ['-c', 'test -x "$1"', 'sh', folder], { cwd: '/', ...as }).status === 0;
}

/**
 * Makes the cluster if it is not there: scram passwords, UTF-8, byte order. It appears under its name only when whole.
 * @param {Cluster} cluster
 * @param {{ password: string, durable: boolean }} options
 */
export function createCluster(cluster, { password, durable }) {
  if (existsSync(path.join(cluster.data, 'PG_VERSION'))) return;
  const { uid, gid } = cluster.user;
  const fresh = `${cluster.data}.new`;
  rmSync(fresh, { recursive: true, force: true });
  mkdirSync(fresh, { recursive: true, mode: 0o700 });
  const passwordFile = path.join(cluster.home, 'initial-password');
  writeFileSync(passwordFile, password, { mode: 0o600 });
  if (uid !== undefined) {
    for (const place of [cluster.home, fresh, passwordFile]) chownSync(place, uid, gid);
  }
  chmodSync(cluster.home, 0o700);
  const made = program(
    cluster,
    'initdb',
    // prettier-ignore
    ['-D', fresh, '-U', 'postgres', '-A', 'scram-sha-256', `--pwfile=${passwordFile}`, '--no-locale', '-E', 'UTF8', ...(durable ? [] : ['--no-sync'])],
    ['ignore', 'ignore', 'pipe'],
  );
  rmSync(passwordFile);
  if (made.status !== 0) {
    rmSync(fresh, { recursive: true, force: true });
    throw new Failure(`initdb failed in ${cluster.home}:\n${made.stderr || made.error?.message}`);
  }
  renameSync(fresh, cluster.data);
}

/**
 * The port of the cluster if its server runs, be it one that an earlier run left behind; else null.
 * @param {Cluster} cluster
 * @returns {number | null}
 */
export function runningPort(cluster) {
  if (program(cluster, 'pg_ctl', ['status', '-D', cluster.data]).status !== 0) return null;
  const [, , , port] = readFileSync(path.join(cluster.data, 'postmaster.pid'), 'utf8').split('\n');
  return Number(port);
}

/**
 * Starts the server on 127.0.0.1:port and waits until it answers.
 * @param {Cluster} cluster
 * @param {number} port
 * @param {{ durable: boolean }} options
 */
export function startCluster(cluster, port, { durable }) {
  const settings = {
    port,
    listen_addresses: '127.0.0.1',
    unix_socket_directories: '',
    max_connections: 200,
    timezone: 'UTC',
    ...(durable ? {} : { fsync: 'off', full_page_writes: 'off', synchronous_commit: 'off' }),
  };
  const options = Object.entries(settings)
    .map(([name, value]) => `-c ${name}='${value}'`)
    .join(' ');
  const log = path.join(cluster.home, 'log');
  const started = program(cluster, 'pg_ctl', [
    'start',
    '-w',
    '-t',
    '60',
    '-D',
    cluster.data,
    '-l',
    log,
    '-o',
    options,
  ]);
  if (started.status !== 0) {
    const said = existsSync(log) ? readFileSync(log, 'utf8').split('\n').slice(-8).join('\n') : '';
    throw new Failure(`PostgreSQL did not start; the end of ${log}:\n${said}`);
  }
}

/**
 * Stops the server and waits until it is gone.
 * @param {Cluster} cluster
 * @param {'fast' | 'immediate'} [mode]
 */
export function stopCluster(cluster, mode = 'fast') {
  program(cluster, 'pg_ctl', ['stop', '-w', '-t', '30', '-m', mode, '-D', cluster.data]);
}
