import { spawnSync } from 'node:child_process';
import { createHash } from 'node:crypto';
import { existsSync, readFileSync, writeFileSync } from 'node:fs';
import path from 'node:path';
import { Failure } from './failure.mjs';
import { ROOT } from './places.mjs';

const STAMP = path.join(ROOT, 'node_modules', '.polhode-lock');
const OLDEST_NODE = [20, 20, 0];

function checkNode() {
  const have = process.versions.node.split('.').map(Number);
  for (let i = 0; i < OLDEST_NODE.length; i += 1) {
    if (have[i] > OLDEST_NODE[i]) return;
    if (have[i] < OLDEST_NODE[i]) {
      throw new Failure(
        `Node ${OLDEST_NODE.join('.')} or newer is needed; this is ${process.versions.node}.`,
      );
    }
  }
}

/** Installs the locked npm packages when they are missing or the lock has changed since they were installed. */
export function ensurePackages() {
  checkNode();
  const lock = createHash('sha256')
    .update(readFileSync(path.join(ROOT, 'package-lock.json')))
    .digest('hex');
  if (existsSync(STAMP) && readFileSync(STAMP, 'utf8') === lock) return;
  console.log('Installing npm packages (about a minute) ...');
  // Development packages are needed to build and for the local services, whatever NODE_ENV says.
  const { status } = spawnSync('npm', ['ci', '--include=dev', '--no-audit', '--no-fund'], {
    cwd: ROOT,
    stdio: 'inherit',
  });
  if (status !== 0) throw new Failure('npm ci failed; its message stands above.');
  writeFileSync(STAMP, lock);
}
