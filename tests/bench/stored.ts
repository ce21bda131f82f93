import { Readable } from 'node:stream';
import { findConfiguration } from '@/db/queries/configurations';
import { pageOfView } from '@/db/queries/list-rows';
import { findRevision } from '@/db/queries/lists';
import { neededRowRange } from '@/db/queries/revision-rows';
import { ROWS_PER_PAGE } from '@/lib/contracts/list-rows';
import { listViewOf } from '@/lib/contracts/list-view';
import { readMassListBlocks } from '@/lib/ingest/read-blocks';
import { declarationsFromBody, listDeclarationsSchema } from '@/lib/contracts/list-declarations';
import { createConfiguration } from '@/lib/server/configurations/create-configuration';
import { evaluate } from '@/lib/server/configurations/roll-up-configuration';
import { publishRevision } from '@/lib/server/lists/publish-revision';
import { revisionGroups } from '@/lib/server/lists/revision-groups';
import { filterOf, orderOf, rowReader } from '@/lib/server/lists/row-view';
import { addList } from '@/lib/server/lists/save-list';
import { programUnderTest } from '@/tests/support/program';
import setup from '@/tests/support/services.setup';
import { bigListBytes } from './big-list';

/*
 * What is read of stored lists. The first page of a list of 100 000 rows, in any order and under any filter, against the bare SQL of
 * that page; and the roll-up of a configuration of ten lists from stored subtotals, whose time depends on their groups and not on
 * their rows: each list has the 200 groups of one of a million rows. Medians; ends with an error when a target is missed.
 */
const PAGE_ROWS = 100_000;
const LISTS = 10;
const TIMES = 9;
const TARGETS = { ratio: 3, pageMs: 200, rollUpMs: 50 };

const declarations = declarationsFromBody(
  listDeclarationsSchema.parse({ mass_unit: 'kg', length_unit: 'm', inertia_unit: 'kg.m2' }),
);
let missed = 0;

async function makeList(code: string, rows: number, seed: number): Promise<string> {
  const { db, pool, crew, program, frameIssueId } = test;
  const { id } = await addList(db, {
    person: crew.weights,
    programId: program.id,
    code,
    title: code,
    declarations,
  });
  await publishRevision(
    pool,
    {
      list: { id, programId: program.id, code, frameIssueId },
      declarations,
      origin: 'edit',
      reason: 'bench',
      file: null,
      author: crew.weights,
    },
    async (writer) => {
      const reading = await readMassListBlocks(Readable.from(bigListBytes({ rows, seed })), declarations, {
        onBlock: (block) => writer.addBlock(block),
      });
      if (reading.problems.length > 0) throw new Error('the generated list is not right');
    },
    async () => undefined,
  );
  return id;
}

async function median(work: () => Promise<unknown>): Promise<number> {
  const taken: number[] = [];
  for (let k = 0; k < TIMES; k += 1) {
    const start = performance.now();
    await work();
    taken.push(performance.now() - start);
  }
  return taken.sort((a, b) => a - b)[Math.floor(TIMES / 2)] ?? NaN;
}

function hold(value: number, limit: number): string {
  if (value <= limit) return '';
  missed += 1;
  return '  MISSED';
}

const VIEWS: readonly (readonly [address: string, bare: string])[] = [
  ['', 'order by sort_key'],
  ['sort=-mass', 'order by mass desc nulls last, sort_key'],
  ['sort=description', 'order by description asc nulls last, sort_key'],
  ['sort=-ixy', 'order by ixy desc nulls last, sort_key'],
  [
    'find=bracket',
    `and concat_ws(E'\\n', item, part_number, description, source, note, change_ref, extra::text) ilike '%bracket%' order by sort_key`,
  ],
  [
    'find=W1099999',
    `and concat_ws(E'\\n', item, part_number, description, source, note, change_ref, extra::text) ilike '%W1099999%' order by sort_key`,
  ],
  ['category=operating&sort=x', `and category = 'operating' order by x asc nulls last, sort_key`],
  [
    'group=Wing/Inner&sort=-z',
    `and (group_path = 'Wing/Inner' or starts_with(group_path, 'Wing/Inner/')) order by z desc nulls last, sort_key`,
  ],
];

async function pages(): Promise<void> {
  const id = await makeList('pages', PAGE_ROWS, 3);
  const revision = await findRevision(test.db, id, 1);
  if (revision === undefined) throw new Error('no revision');
  const { listNo, lastRow } = await neededRowRange(test.db, revision.id);
  console.log(`first page of ${PAGE_ROWS} rows\n${'view'.padEnd(32)} page, ms   SQL, ms   ratio`);
  for (const [address, bare] of VIEWS) {
    const view = listViewOf(new URLSearchParams(address));
    const page = await median(async () => {
      const groups = await revisionGroups(test.db, revision.id);
      const { rows, total } = await pageOfView(
        test.db,
        revision.id,
        filterOf(view, revision.findings, groups),
        orderOf(view, revision.declarations),
        { offset: 0, limit: ROWS_PER_PAGE },
      );
      return JSON.stringify({ total, rows: rows.map(rowReader(revision.declarations, groups)) });
    });
    const text = `select * from row_versions where list_no = ${listNo} and row_no <= ${lastRow} ${bare} limit ${ROWS_PER_PAGE}`;
    const sql = await median(() => test.pool.query(text));
    console.log(
      `${(address || 'as in the file').padEnd(32)} ${page.toFixed(1).padStart(8)}  ${sql.toFixed(1).padStart(8)}  ${(page / sql).toFixed(2).padStart(6)}` +
        `${hold(page / sql, TARGETS.ratio)}${hold(page, TARGETS.pageMs)}`,
    );
  }
}

async function rollUp(): Promise<void> {
  for (let k = 1; k <= LISTS; k += 1) await makeList(`part-${k}`, 20_000, 100 + k);
  await createConfiguration(test.db, {
    person: test.crew.weights,
    programId: test.program.id,
    buildCode: 'design',
    code: 'ten',
    title: 'Ten lists',
  });
  const configuration = await findConfiguration(test.db, test.program.id, 'ten');
  if (configuration === undefined) throw new Error('no configuration');
  const { count } = await test.db
    .selectFrom('revision_subtotals')
    .select((eb) => eb.fn.countAll<number>().as('count'))
    .executeTakeFirstOrThrow();
  const start = performance.now();
  await evaluate(test.db, configuration);
  const first = performance.now() - start;
  const taken = await median(() => evaluate(test.db, configuration));
  console.log(
    `\nroll-up of ${LISTS} lists, ${count} subtotals: ${taken.toFixed(1)} ms${hold(taken, TARGETS.rollUpMs)}; the first in a process ${first.toFixed(0)} ms`,
  );
}

const stop = await setup();
const test = await programUnderTest();
try {
  await pages();
  await rollUp();
} finally {
  await test.close();
  await stop();
}
if (missed > 0) process.exitCode = 1;
