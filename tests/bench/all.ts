import { spawnSync } from 'node:child_process';
import path from 'node:path';

/*
 * All benches, or those named as arguments, one after another, each in a process of its own; then which of them missed a target. Each prints its
 * figures and what they were held against.
 */
const BENCHES = ['reading', 'imports', 'stored', 'list-pages', 'accuracy'];

const named = process.argv.slice(2);
const unknown = named.filter((name) => !BENCHES.includes(name));
if (unknown.length > 0)
  throw new Error(`There is no bench ${unknown.join(', ')}. There are ${BENCHES.join(', ')}.`);

const ended = (named.length > 0 ? named : BENCHES).map((name) => {
  console.log(`\n== ${name}`);
  const { status } = spawnSync(
    process.execPath,
    ['--import', 'tsx', path.join(import.meta.dirname, `${name}.ts`)],
    {
      stdio: 'inherit',
    },
  );
  return { name, status };
});
console.log('\n== Targets');
for (const { name, status } of ended)
  console.log(`${name.padEnd(12)} ${status === 0 ? 'held' : 'MISSED, or failed'}`);
if (ended.some(({ status }) => status !== 0)) process.exitCode = 1;
