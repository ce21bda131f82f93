import pg from 'pg';
import { pageOfView, type RowFilter, type RowOrder } from '@/db/queries/list-rows';
import { ROWS_PER_PAGE } from '@/lib/contracts/list-rows';
import { listViewOf } from '@/lib/contracts/list-view';
import { loadGroups } from '@/lib/server/lists/load-groups';
import { reachList, reachRevision } from '@/lib/server/lists/reach-list';
import { programUnderTest, reviseList } from '@/tests/support/program';
import setup from '@/tests/support/services.setup';
import { bigListText } from './big-list';

/*
 * Pages of a list of 100,000 rows (or as many as the first argument says) against the bare SQL of the same page: first page and last,
 * in several orders and with several filters, and the groupings. Medians of several runs; ends with an error when a page takes more than
 * three times its bare SQL, or 200 ms.
 */
const ROWS = Number(process.argv[2] ?? 100_000);
const RUNS = Number(process.argv[3] ?? 9);
const MOST_MS = 200;
const MOST_TIMES = 3;
const ALL: RowFilter = { text: '', groups: null, only: null, category: null, counting: null, items: null };
const LIST_ORDER: RowOrder = { column: 'position', descending: false };

const stop = await setup();
const test = await programUnderTest();
const bare = new pg.Client({ connectionString: test.appUrl });
await bare.connect();
try {
  await main();
} finally {
  await bare.end();
  await test.close();
  await stop();
}

/** The seeded list with two columns of its own. */
function text(): string {
  let row = -1;
  return [...bigListText({ rows: ROWS, seed: 1967 })]
    .join('')
    .split('\n')
    .map((line) => {
      if (line === '') return line;
      row += 1;
      return row === 0 ? `${line},Supplier,Zone` : `${line},Supplier ${row % 37},Z${row % 211}`;
    })
    .join('\n');
}

async function median(run: () => Promise<unknown>): Promise<number> {
  const times: number[] = [];
  for (let k = 0; k < RUNS; k += 1) {
    const start = performance.now();
    await run();
    times.push(performance.now() - start);
  }
  return times.sort((a, b) => a - b)[Math.floor(RUNS / 2)] ?? NaN;
}

async function main(): Promise<void> {
  const start = performance.now();
  await reviseList(test, test.crew.weights, 'long', text(), {});
  console.log(`${ROWS} rows stored in ${((performance.now() - start) / 1000).toFixed(1)} s`);
  const { id, list_no } = await test.db
    .selectFrom('list_revisions')
    .innerJoin('lists', 'lists.id', 'list_revisions.list_id')
    .select(['list_revisions.id', 'list_no'])
    .executeTakeFirstOrThrow();
  let missed = 0;
  const told = (name: string, ms: number, bareMs: number | null): void => {
    const bad = !(ms <= MOST_MS) || (bareMs !== null && !(ms <= MOST_TIMES * bareMs));
    if (bad) missed += 1;
    console.log(
      `${name.padEnd(44)} ${ms.toFixed(1).padStart(7)} ms${bareMs === null ? '' : `  bare ${bareMs.toFixed(1).padStart(7)} ms  x${(ms / bareMs).toFixed(2)}`}${bad ? '  MISSED' : ''}`,
    );
  };
  const page = async (
    name: string,
    filter: RowFilter,
    order: RowOrder,
    offset: number,
    where: string,
    by: string,
  ) => {
    const sql = `select * from row_versions where list_no = ${list_no} and row_no <= ${ROWS} ${where} order by ${by} limit ${ROWS_PER_PAGE} offset ${offset}`;
    const bareMs = await median(() => bare.query(sql));
    const ms = await median(() => pageOfView(test.db, id, filter, order, { offset, limit: ROWS_PER_PAGE }));
    told(name, ms, bareMs);
  };
  const last = ROWS - ROWS_PER_PAGE;
  await page('first page', ALL, LIST_ORDER, 0, '', 'sort_key');
  await page('last page', ALL, LIST_ORDER, last, '', 'sort_key');
  for (const column of ['mass', 'description', 'group'] as const) {
    const by = column === 'group' ? 'group_path' : column;
    await page(`by ${column}`, ALL, { column, descending: false }, 0, '', `${by} asc nulls last, sort_key`);
    await page(
      `by ${column}, downwards`,
      ALL,
      { column, descending: true },
      0,
      '',
      `${by} desc nulls last, sort_key`,
    );
    await page(
      `by ${column}, last page`,
      ALL,
      { column, descending: false },
      last,
      '',
      `${by} asc nulls last, sort_key`,
    );
  }
  const find =
    "and concat_ws(E'\\n', item, part_number, description, source, note, change_ref, extra::text) ilike";
  await page(
    'a text that many rows have',
    { ...ALL, text: 'bracket' },
    LIST_ORDER,
    0,
    `${find} '%bracket%'`,
    'sort_key',
  );
  await page(
    'a text that one row has',
    { ...ALL, text: 'W1099998' },
    LIST_ORDER,
    0,
    `${find} '%W1099998%'`,
    'sort_key',
  );
  await page(
    'a text that no row has',
    { ...ALL, text: 'zzz' },
    { column: 'mass', descending: true },
    0,
    `${find} '%zzz%'`,
    'mass desc nulls last, sort_key',
  );
  await page(
    'a group',
    { ...ALL, groups: ['Wing/Inner/Skins'] },
    LIST_ORDER,
    0,
    "and group_path = 'Wing/Inner/Skins'",
    'sort_key',
  );
  const revision = await reachRevision(test.db, await reachList(test.db, test.program.id, 'long'), '1');
  for (const by of ['group', 'category', 'maturity', 'own:Supplier', 'own:Zone', 'part_number'] as const)
    told(
      `groups by ${by}`,
      await median(() => loadGroups(test.db, revision, listViewOf(new URLSearchParams()), by)),
      null,
    );
  told(
    'groups of the rows with a text',
    await median(() =>
      loadGroups(test.db, revision, listViewOf(new URLSearchParams({ find: 'bracket' })), 'group'),
    ),
    null,
  );
  if (missed > 0) process.exitCode = 1;
}
