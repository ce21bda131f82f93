import { spawnSync } from 'node:child_process';
import { accessSync, constants } from 'node:fs';
import path from 'node:path';
import { Failure } from './failure.mjs';

/**
 * The full path of the first of `names` that is an executable on PATH.
 * @param {string[]} names
 * @returns {string | null}
 */
export function onPath(names) {
  for (const folder of (process.env.PATH ?? '').split(path.delimiter)) {
    for (const name of names) {
      const file = path.join(folder, name);
      if (folder && isExecutable(file)) return file;
    }
  }
  return null;
}

/** @param {string} file */
export function isExecutable(file) {
  try {
    accessSync(file, constants.X_OK);
    return true;
  } catch (error) {
    if (error.code === 'ENOENT' || error.code === 'EACCES' || error.code === 'ENOTDIR') return false;
    throw error;
  }
}

/**
 * Installs a Debian package as root; otherwise says in one line what to install.
 * @param {string} packageName
 * @param {string} otherwise what else the user can do, e.g. "or set PG_BIN to its folder of programs"
 */
export function installFromDebian(packageName, otherwise) {
  const remedy = `Install it (on Debian: sudo apt-get install ${packageName}) ${otherwise}, then run this again.`;
  if (process.getuid?.() !== 0 || !onPath(['apt-get'])) {
    throw new Failure(`${packageName} is missing. ${remedy}`);
  }
  console.log(`Installing ${packageName} from Debian ...`);
  const env = { ...process.env, DEBIAN_FRONTEND: 'noninteractive' };
  for (const args of [
    ['update', '-qq'],
    ['install', '-y', '-qq', '--no-install-recommends', packageName],
  ]) {
    const { status } = spawnSync('apt-get', args, { stdio: ['ignore', 'ignore', 'inherit'], env });
    if (status !== 0) throw new Failure(`apt-get ${args.join(' ')} failed. ${remedy}`);
  }
}

/**
 * The browser that tests drive: CHROMIUM_BIN, or one on PATH, or Debian's, installed if it must be.
 * @returns {string}
 */
export function chromium() {
  const find = () => process.env.CHROMIUM_BIN ?? onPath(['chromium', 'chromium-browser', 'google-chrome']);
  if (!find()) installFromDebian('chromium', 'or set CHROMIUM_BIN to its program');
  const found = find();
  if (!found)
    throw new Failure('chromium was installed and is still not on PATH; set CHROMIUM_BIN to its program.');
  return found;
}
