import { spawnSync } from 'node:child_process';
import { closeSync, mkdtempSync, openSync, rmSync, statSync, writeSync } from 'node:fs';
import os from 'node:os';
import path from 'node:path';
import { declarationsFromBody, listDeclarationsSchema } from '@/lib/contracts/list-declarations';
import { RowChecks } from '@/lib/findings/look';
import { type RowBlock } from '@/lib/ingest/blocks/row-block';
import { readMassListBlocks } from '@/lib/ingest/read-blocks';
import { rollUpList } from '@/lib/ingest/roll-up-list';
import { StatelessRollUp } from '@/lib/mass/stateless';
import { fileBytes } from '@/lib/server/commands/file-bytes';
import { bareScan } from './bare-scan';
import { type BigListShape, bigListText } from './big-list';

/*
 * What a mass list of a million rows (or as many as the first argument says) costs from file to tensor, without a database: seconds of
 * processor time of reading it, of booking it too, of running all rules on rows too, against a bare scan of its bytes in the same round;
 * and the most memory that `npm run roll-up` takes for it. Medians of the rounds, and the least. Ends with an error when a target is
 * missed. A busy machine slows both sides, but not evenly: caches are shared.
 */
const ROWS = Number(process.argv[2] ?? 1_000_000);
const ROUNDS = Number(process.argv[3] ?? 5);
const TARGETS = { ratio: 2, mebibytes: 150 };
const ROOT = path.join(import.meta.dirname, '../..');

const declarations = declarationsFromBody(
  listDeclarationsSchema.parse({ mass_unit: 'kg', length_unit: 'm', inertia_unit: 'kg.m2' }),
);
const folder = mkdtempSync(path.join(os.tmpdir(), 'polhode-reading-'));

function listFile(name: string, shape: Omit<BigListShape, 'seed'>): string {
  const file = path.join(folder, `${name}.csv`);
  const to = openSync(file, 'w');
  for (const text of bigListText({ seed: 1967, ...shape })) writeSync(to, text);
  closeSync(to);
  return file;
}

/** Seconds of processor time, all threads of the process. */
async function seconds(work: () => unknown): Promise<number> {
  const before = process.cpuUsage();
  await work();
  const { user, system } = process.cpuUsage(before);
  return (user + system) / 1e6;
}

async function read(file: string, onBlock: (block: RowBlock) => void): Promise<void> {
  const { problems } = await readMassListBlocks(fileBytes(file), declarations, { onBlock });
  if (problems.length > 0) throw new Error(`the list of the bench is wrong: ${problems[0]?.message ?? ''}`);
}

const WAYS: readonly (readonly [string, (file: string) => unknown])[] = [
  ['bare scan', (file) => bareScan(file, NUMBERS)],
  ['read', (file) => read(file, () => undefined)],
  [
    'read, booked',
    async (file) => {
      const sum = new StatelessRollUp(declarations);
      await read(file, (block) => sum.addRows(block));
      sum.result();
    },
  ],
  [
    'read, rules on rows',
    async (file) => {
      const checks = new RowChecks(declarations);
      await read(file, (block) => checks.seeBlock(block));
      checks.findings();
    },
  ],
  ['file to tensor and findings', (file) => rollUpList(fileBytes(file), declarations)],
];

/** Which columns of the bench's plain list hold numbers. */
const NUMBERS = [...bigListText({ rows: 0, seed: 1 })]
  .join('')
  .trim()
  .split(',')
  .map((name) => /^(quantity|mass|[xyz]|i[xyz]{2}|growth_percent|\w+_sigma)$/.test(name));

const median = (values: readonly number[]): number => {
  const sorted = values.toSorted((a, b) => a - b);
  return sorted[Math.floor(sorted.length / 2)] ?? NaN;
};

let missed = 0;
const hold = (value: number, limit: number, digits = 2): string => {
  if (!(value <= limit)) missed += 1;
  return `${value.toFixed(digits)}${value <= limit ? '' : ` MISSED (at most ${limit})`}`;
};

async function speed(): Promise<void> {
  const file = listFile('plain', { rows: ROWS });
  const took = WAYS.map((): number[] => []);
  for (let round = 0; round < ROUNDS; round += 1)
    for (const [k, [, work]] of WAYS.entries()) took[k]?.push(await seconds(() => work(file)));
  const mebibytes = statSync(file).size / 2 ** 20;
  console.log(`\n${ROWS.toLocaleString('en')} rows, ${mebibytes.toFixed(0)} MiB; seconds of processor time`);
  console.log(`${''.padEnd(30)} median   least   times the bare scan of its round`);
  const bare = took[0] ?? [];
  for (const [k, [name]] of WAYS.entries()) {
    const own = took[k] ?? [];
    const ratio = median(own.map((value, round) => value / (bare[round] ?? NaN)));
    const shown = k === WAYS.length - 1 ? hold(ratio, TARGETS.ratio) : ratio.toFixed(2);
    console.log(
      `${name.padEnd(30)} ${median(own).toFixed(2).padStart(6)}  ${Math.min(...own)
        .toFixed(2)
        .padStart(6)}   ${shown}`,
    );
  }
  rmSync(file);
}

async function variants(): Promise<void> {
  const rows = Math.ceil(ROWS / 5);
  console.log(
    `\nOther shapes of ${rows.toLocaleString('en')} rows: microseconds of processor time a row, file to tensor and findings`,
  );
  const shapes = {
    plain: {},
    'every text in quotes': { quoted: true },
    'a third turned': { turned: true },
    'ten σ on every row': { uncertain: true },
  };
  for (const [name, shape] of Object.entries(shapes)) {
    const file = listFile('shape', { rows, ...shape });
    const took: number[] = [];
    for (let round = 0; round < 3; round += 1)
      took.push(await seconds(() => rollUpList(fileBytes(file), declarations)));
    console.log(`${name.padEnd(30)} ${((1e6 * median(took)) / rows).toFixed(2).padStart(6)}`);
    rmSync(file);
  }
}

/** The most memory of the command itself, MiB, and how it ended. */
function command(file: string): {
  readonly mebibytes: number;
  readonly status: number | null;
  readonly error: string;
} {
  const report = "process.on('exit',()=>console.error('peak',process.resourceUsage().maxRSS))";
  const ran = spawnSync(
    'npm',
    [
      'run',
      '-s',
      'roll-up',
      '--',
      file,
      '--mass-unit',
      'kg',
      '--length-unit',
      'm',
      '--inertia-unit',
      'kg.m2',
    ],
    {
      cwd: ROOT,
      encoding: 'utf8',
      env: { ...process.env, NODE_OPTIONS: `--import data:text/javascript,${encodeURIComponent(report)}` },
      maxBuffer: 2 ** 26,
    },
  );
  // npm and the bundler report too; the command is the last to end but for npm.
  const peaks = [...ran.stderr.matchAll(/^peak (\d+)$/gm)].map(([, kibibytes]) => Number(kibibytes) / 1024);
  return {
    mebibytes: peaks.at(-2) ?? NaN,
    status: ran.status,
    error: ran.stderr.replace(/^peak \d+\n/gm, ''),
  };
}

function memory(): void {
  console.log('\nThe most memory of npm run roll-up, MiB');
  for (const rows of [10, Math.ceil(ROWS / 4), ROWS, 2 * ROWS].filter((count) => count <= 2_000_000)) {
    const file = listFile('memory', { rows });
    const { mebibytes, status, error } = command(file);
    if (status !== 0) throw new Error(`roll-up ended with ${String(status)}: ${error}`);
    console.log(
      `${rows.toLocaleString('en').padEnd(30)} ${hold(mebibytes, TARGETS.mebibytes, 0).padStart(6)}`,
    );
    rmSync(file);
  }
  const file = listFile('spoiled', { rows: ROWS, spoiled: true });
  const { mebibytes, status, error } = command(file);
  const isNamed = status === 1 && error.startsWith(`Line ${ROWS + 1}, column mass`);
  if (!isNamed) missed += 1;
  console.log(
    `${'one wrong number at the end'.padEnd(30)} ${hold(mebibytes, TARGETS.mebibytes, 0).padStart(6)}   ${isNamed ? 'named' : 'NOT NAMED'}`,
  );
  rmSync(file);
}

try {
  memory();
  await speed();
  await variants();
} finally {
  rmSync(folder, { recursive: true, force: true });
}
if (missed > 0) {
  console.error(`\n${missed} targets missed.`);
  process.exitCode = 1;
}
