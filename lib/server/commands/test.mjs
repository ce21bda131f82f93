import { existsSync, mkdirSync, readFileSync, rmSync } from 'node:fs';
import path from 'node:path';
import { chromium } from './local/debian.mjs';
import { Failure } from './local/failure.mjs';
import { ensurePackages } from './local/packages.mjs';
import { TEST_DATA } from './local/places.mjs';
import { postgresPrograms } from './local/postgres-programs.mjs';

const totals = { passed: 0, failed: 0, skipped: 0 };
let children = null;
let stopCluster = () => undefined;

for (const signal of ['SIGINT', 'SIGTERM', 'SIGHUP']) {
  process.on(signal, async () => {
    await children?.stop();
    stopCluster();
    process.exit(1);
  });
}

/** Runs one check; its output is shown only if it fails. */
async function check(name, run) {
  const log = path.join(TEST_DATA, `${name.replaceAll(' ', '-')}.log`);
  rmSync(log, { force: true });
  const began = Date.now();
  try {
    await run(log);
    totals.passed += 1;
    console.log(`passed: ${name} (${seconds(began)})`);
    return true;
  } catch (error) {
    if (!(error instanceof Failure)) throw error;
    totals.failed += 1;
    console.log(existsSync(log) ? readFileSync(log, 'utf8') : error.message);
    console.log(`FAILED: ${name} (${seconds(began)})`);
    return false;
  }
}

const seconds = (since) => `${((Date.now() - since) / 1000).toFixed(0)} s`;

const tool = (log, name, args) => children.finish({ name, args, log, env: process.env });

async function types(log) {
  await tool(log, 'next typegen', ['node_modules/next/dist/bin/next', 'typegen']);
  await tool(log, 'tsc', ['node_modules/typescript/bin/tsc', '--noEmit']);
}

async function lint(log) {
  await tool(log, 'eslint', ['node_modules/eslint/bin/eslint.js', '.', '--max-warnings', '0']);
  await tool(log, 'prettier', [
    'node_modules/prettier/bin/prettier.cjs',
    '--check',
    '--log-level',
    'warn',
    '.',
  ]);
}

/** Adds one run's tests to the totals. A file that could not even be read counts as one failure. */
function count(report) {
  if (!existsSync(report)) {
    console.log('FAILED: vitest ended without a report');
    totals.failed += 1;
    return;
  }
  const { numPassedTests, numFailedTests, numPendingTests, testResults } = JSON.parse(
    readFileSync(report, 'utf8'),
  );
  const broken = testResults.filter(
    ({ status, assertionResults }) =>
      status === 'failed' && !assertionResults.some((test) => test.status === 'failed'),
  );
  totals.passed += numPassedTests;
  totals.failed += numFailedTests + broken.length;
  totals.skipped += numPendingTests;
}

async function vitest(name, projects) {
  const report = path.join(TEST_DATA, `${name}.json`);
  rmSync(report, { force: true });
  const before = totals.failed;
  const run = {
    name: 'vitest',
    args: [
      'node_modules/vitest/vitest.mjs',
      'run',
      ...projects.flatMap((project) => ['--project', project]),
      '--reporter=default',
      '--reporter=json',
      `--outputFile.json=${report}`,
    ],
    env: process.stdout.isTTY ? process.env : { ...process.env, NO_COLOR: '1' },
  };
  let failure = null;
  try {
    await children.finish(run);
  } catch (error) {
    if (!(error instanceof Failure)) throw error;
    failure = error;
  }
  count(report);
  // Something outside any test, such as an unhandled rejection: no test carries it, and it is a failure all the same.
  if (failure && totals.failed === before) {
    console.log(`FAILED: ${failure.message}`);
    totals.failed += 1;
  }
}

async function main() {
  ensurePackages();
  postgresPrograms();
  chromium();
  mkdirSync(TEST_DATA, { recursive: true });
  const { Children } = await import('./local/children.mjs');
  const { ensureBuild } = await import('./local/build.mjs');
  const { startTestCluster } = await import('./local/test-cluster.mjs');
  children = new Children();
  await Promise.all([check('types', types), check('lint and format', lint)]);
  const cluster = await startTestCluster();
  stopCluster = cluster.stop;
  process.env.POLHODE_TEST_CLUSTER = JSON.stringify(cluster.settings);
  await vitest('unit', ['unit', 'server']);
  const isBuilt = await check('build', (log) => ensureBuild(children, '.test-data/next', log));
  if (isBuilt) await vitest('browser', ['browser']);
  else console.log('The API and browser tests were not run, for there is no build.');
}

const began = Date.now();
try {
  await main();
} catch (error) {
  console.error(error instanceof Failure ? error.message : error);
  totals.failed += 1;
}
stopCluster();
console.log(`\n${seconds(began)}${totals.skipped > 0 ? `, ${totals.skipped} skipped` : ''}`);
console.log(`${totals.passed} passed, ${totals.failed} failed`);
process.exitCode = totals.failed === 0 ? 0 : 1;
