import { randomBytes } from 'node:crypto';
import { existsSync, readFileSync, writeFileSync } from 'node:fs';
import path from 'node:path';
import { DATA } from './places.mjs';

const FILE = path.join(DATA, 'secrets.json');

/** @param {number} [bytes] */
export const randomText = (bytes = 24) => randomBytes(bytes).toString('base64url');

/**
 * The passwords of the local services, made once and kept in an ignored file that only its owner reads.
 * `demo` is the password of every demo sign-in.
 */
export function localSecrets() {
  if (existsSync(FILE))
    return /** @type {ReturnType<typeof generate>} */ (JSON.parse(readFileSync(FILE, 'utf8')));
  const secrets = generate();
  writeFileSync(FILE, `${JSON.stringify(secrets, null, 2)}\n`, { mode: 0o600, flag: 'wx' });
  return secrets;
}

function generate() {
  return {
    superuser: randomText(),
    owner: randomText(),
    app: randomText(),
    s3AccessKeyId: randomText(12),
    s3SecretAccessKey: randomText(30),
    demo: randomText(9),
  };
}
