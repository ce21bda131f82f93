import { renameSync } from 'node:fs';
import { createRequire } from 'node:module';
import path from 'node:path';

/*
 * Makes one plain script of a command of this folder, so that it runs without a loader of TypeScript beside it, which takes as much memory
 * as half a million rows of a mass list: node bundle.mjs roll-up. The bundler is the one that tsx brings.
 */

const name = process.argv[2];
if (name === undefined) throw new Error('Name a command of this folder.');
const { buildSync } = createRequire(import.meta.resolve('tsx'))('esbuild');

const root = path.join(import.meta.dirname, '../../..');
// Within node_modules, so that packages are found from there.
const script = path.join(root, 'node_modules/.cache/polhode', `${name}.mjs`);
const made = `${script}.${process.pid}`;
buildSync({
  entryPoints: [path.join(import.meta.dirname, `${name}.ts`)],
  outfile: made,
  absWorkingDir: root,
  bundle: true,
  packages: 'external',
  platform: 'node',
  format: 'esm',
  target: 'node20',
  logLevel: 'error',
});
// At once, for another run may be reading it.
renameSync(made, script);
