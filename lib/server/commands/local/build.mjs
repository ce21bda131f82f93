import { createHash } from 'node:crypto';
import { existsSync, mkdirSync, readdirSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import path from 'node:path';
import { ROOT, TEST_DATA } from './places.mjs';

/** Everything that `next build` reads. */
const SOURCES = [
  'app',
  'components',
  'lib',
  'db',
  'public',
  'instrumentation.ts',
  'proxy.ts',
  'next.config.mjs',
  'postcss.config.mjs',
  'tailwind.config.ts',
  'tsconfig.json',
  'package-lock.json',
];

function* files(place) {
  if (!existsSync(place)) return;
  const entries = readdirSync(path.dirname(place), { withFileTypes: true });
  const self = entries.find((entry) => entry.name === path.basename(place));
  if (self?.isFile()) yield place;
  if (!self?.isDirectory()) return;
  for (const entry of readdirSync(place, { recursive: true, withFileTypes: true })) {
    if (entry.isFile()) yield path.join(entry.parentPath, entry.name);
  }
}

function hashOfSources() {
  const hash = createHash('sha256');
  for (const source of SOURCES) {
    for (const file of [...files(path.join(ROOT, source))].sort()) {
      hash.update(path.relative(ROOT, file)).update('\0').update(readFileSync(file)).update('\0');
    }
  }
  return hash.digest('hex');
}

/**
 * Builds the application into `distDir` unless that holds a build of these very sources.
 * @param {import('./children.mjs').Children} children
 * @param {string} distDir e.g. `.next`
 * @param {string} log
 */
export async function ensureBuild(children, distDir, log) {
  const stamp = path.join(ROOT, distDir, 'polhode-sources');
  const sources = hashOfSources();
  if (existsSync(stamp) && readFileSync(stamp, 'utf8') === sources) return;
  console.log('Building (about a minute) ...');
  if (distDir !== '.next') {
    mkdirSync(TEST_DATA, { recursive: true });
    writeFileSync(path.join(TEST_DATA, 'tsconfig.json'), '{ "extends": "../tsconfig.json" }\n');
  }
  rmSync(stamp, { force: true });
  rmSync(log, { force: true });
  await children.finish({
    name: 'next build',
    args: ['node_modules/next/dist/bin/next', 'build'],
    env: webEnvironment({ NEXT_DIST_DIR: distDir, NODE_ENV: 'production' }),
    log,
  });
  writeFileSync(stamp, sources);
}

/**
 * The environment of Next's own processes: this one's and `settings`, without the owner's connection.
 * @param {Record<string, string>} settings
 * @returns {NodeJS.Dict<string>}
 */
export function webEnvironment(settings) {
  const env = { ...process.env, ...settings };
  delete env.MIGRATION_DATABASE_URL;
  return env;
}
