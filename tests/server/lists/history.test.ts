import { createHash } from 'node:crypto';
import pg from 'pg';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { findList, findRevision, type List, type ListRevision } from '@/db/queries/lists';
import { compareGroups } from '@/lib/server/lists/compare-groups';
import { compareRevisions } from '@/lib/server/lists/compare-revisions';
import { hashRevision } from '@/lib/server/lists/hash-revision';
import { restoreRevision } from '@/lib/server/lists/restore-revision';
import { storedRows } from '@/lib/server/lists/stored-rows';
import { programUnderTest, type ProgramUnderTest, reviseList } from '@/tests/support/program';
import { randomNumbers } from '@/tests/support/random';

const HEAD = 'item,group,mass,x,y,z,note';
type Row = readonly [item: string, group: string, mass: number, x: number, note: string];
const csv = (rows: readonly Row[]): string =>
  [HEAD, ...rows.map(([item, group, mass, x, note]) => `${item},${group},${mass},${x},0,1,${note}`), ''].join(
    '\n',
  );

const random = randomNumbers(7);
const GROUPS = ['Wing/Spars', 'Wing/Ribs', 'Tail'] as const;
const newRow = (item: string): Row => [
  item,
  GROUPS[Math.floor(3 * random())] ?? 'Tail',
  1 + Math.floor(900 * random()) / 100,
  Math.floor(1000 * random()) / 100,
  '',
];

/** The next revision of a random life: rows changed, removed, added, moved, sorted, or nothing at all. */
function next(rows: readonly Row[], step: number): Row[] {
  const kept = rows.filter(() => random() < 0.93);
  let now = kept.map((row): Row =>
    random() < 0.1 ? ([...row.slice(0, 2), row[2] + 0.5, ...row.slice(3)] as unknown as Row) : row,
  );
  for (let k = 0; k < 3; k += 1) now.splice(Math.floor(random() * now.length), 0, newRow(`N-${step}-${k}`));
  if (step % 4 === 1) {
    const [moved] = now.splice(5, 1);
    if (moved) now.unshift(moved);
  }
  if (step % 4 === 3) now = [...now].sort((a, b) => b[2] - a[2]);
  return step === 6 ? [...rows] : now;
}

const HISTORY: Row[][] = [Array.from({ length: 80 }, (_, k) => newRow(`P-${k}`))];
for (let step = 1; step < 9; step += 1) HISTORY.push(next(HISTORY[step - 1] ?? [], step));

let test: ProgramUnderTest;
let list: List;
const revisions: ListRevision[] = [];

beforeAll(async () => {
  test = await programUnderTest();
  for (const rows of HISTORY) await reviseList(test, test.crew.weights, 'life', csv(rows));
  list = await freshList();
  for (let number = 1; number <= HISTORY.length; number += 1) revisions.push(await revision(number));
});
afterAll(() => test.close());

async function freshList(): Promise<List> {
  const found = await findList(test.db, test.program.id, 'life');
  if (found === undefined) throw new Error('no list');
  return found;
}

async function revision(number: number): Promise<ListRevision> {
  const found = await findRevision(test.db, list.id, number);
  if (found === undefined) throw new Error(`no revision ${number}`);
  return found;
}

async function rowsOf(of: ListRevision): Promise<Row[]> {
  const rows: Row[] = [];
  for await (const { item, group_path, mass, x, note } of storedRows(test.db, of.id))
    rows.push([item, group_path, mass, x, note ?? '']);
  return rows;
}

describe('The revisions of a list', () => {
  it('are each whole and in the order of their file, and hash from what is stored to what was read', async () => {
    for (const [k, of] of revisions.entries()) {
      expect(await rowsOf(of)).toEqual(HISTORY[k]);
      expect(of).toMatchObject({ rows: HISTORY[k]?.length, content_format: 2 });
      expect(await hashRevision(test.db, of.id, createHash('sha256'))).toBe(of.content_sha256);
    }
  });

  it('store nothing for rows that stay, nor for a revision that is the same', () => {
    const [before, same] = [revisions[5], revisions[6]];
    expect(same).toMatchObject({ last_row: before?.last_row, last_end: before?.last_end });
    expect(same?.content_sha256).toBe(before?.content_sha256);
    const begun = (revisions[1]?.last_row ?? 0) - (revisions[0]?.last_row ?? 0);
    const old = new Map((HISTORY[0] ?? []).map((row) => [row[0], row.join()]));
    const differ = (HISTORY[1] ?? []).filter((row) => old.get(row[0]) !== row.join()).length;
    // One row went to the front.
    expect(begun).toBe(differ + 1);
  });

  it('compare any two, in either direction, as their rows compare one by one', async () => {
    for (const [i, before] of HISTORY.entries())
      for (const [j, after] of HISTORY.entries()) {
        const old = new Map(before.map((row) => [row[0], row.join()]));
        const now = new Map(after.map((row) => [row[0], row.join()]));
        const expected = [
          ...after.flatMap(([item]) => {
            if (!old.has(item)) return [`added ${item}`];
            return old.get(item) === now.get(item) ? [] : [`changed ${item}`];
          }),
          ...before.flatMap(([item]) => (now.has(item) ? [] : [`removed ${item}`])),
        ];
        const [a, b] = [revisions[i], revisions[j]];
        if (a === undefined || b === undefined) throw new Error('no such revision');
        const { rows, counts } = await compareRevisions(test.db, a, b, { offset: 0, limit: 1000 });
        expect(rows.map(({ item, kind }) => `${kind} ${item}`)).toEqual(expected);
        expect(counts.added + counts.removed + counts.changed).toBe(expected.length);
      }
  });

  it('tell what the way between them did to the mass of each group', async () => {
    const [a, b] = [revisions[0], revisions[3]];
    if (a === undefined || b === undefined) throw new Error('no such revision');
    const { whole, groups } = await compareGroups(test.db, a, b);
    const massOf = (rows: readonly Row[] = [], group = ''): number =>
      rows.filter((row) => row[1].startsWith(group)).reduce((sum, row) => sum + row[2], 0);
    for (const line of [whole, ...groups]) {
      expect(line.before?.basic.mass ?? 0).toBeCloseTo(massOf(HISTORY[0], line.group), 9);
      expect(line.after?.basic.mass ?? 0).toBeCloseTo(massOf(HISTORY[3], line.group), 9);
    }
    expect(groups.map(({ group }) => group)).toEqual(['Tail', 'Wing', 'Wing/Ribs', 'Wing/Spars']);
    const [c, d] = [revisions[5], revisions[6]];
    if (c === undefined || d === undefined) throw new Error('no such revision');
    expect((await compareGroups(test.db, c, d)).groups).toEqual([]);
  });
});

describe('Bringing an old revision back', () => {
  const restore = (number: number, newest: number) =>
    restoreRevision(test, {
      person: test.crew.weights2,
      list,
      number,
      newest,
      reason: 'the later ones were a mistake',
    });

  it('makes a new one of its rows, with who and why and what it brings back', async () => {
    const made = await revision(await restore(2, HISTORY.length));
    expect(await rowsOf(made)).toEqual(HISTORY[1]);
    expect(made).toMatchObject({
      number: HISTORY.length + 1,
      origin: 'restored',
      restored_from: 2,
      reason: 'the later ones were a mistake',
      created_by: test.crew.weights2.userId,
      file_sha256: null,
      content_sha256: (await revision(2)).content_sha256,
    });
    const { rows } = await compareRevisions(test.db, await revision(2), made, { offset: 0, limit: 10 });
    expect(rows).toEqual([]);
  });

  it('is refused for the newest one, for none, and when the list has moved on', async () => {
    const newest = HISTORY.length + 1;
    await expect(restore(newest, newest)).rejects.toMatchObject({ code: 'conflict' });
    await expect(restore(99, newest)).rejects.toMatchObject({ code: 'not-found' });
    await expect(restore(1, newest - 1)).rejects.toMatchObject({
      code: 'conflict',
      message: expect.stringContaining(`has a revision ${newest} now`) as string,
    });
    expect((await freshList()).last_revision).toBe(newest);
  });
});

describe('What is published', () => {
  const inRevision = `select list_no, last_row, last_end from lists join list_revisions on list_id = lists.id and number = last_revision`;
  const copyOf = (rowNo: string) =>
    `insert into row_versions select (jsonb_populate_record(null::row_versions, to_jsonb(r) || jsonb_build_object('row_no', ${rowNo}))).*
     from row_versions r join lists using (list_no) where r.row_no = 1 limit 1`;

  it.each([
    ['a row under a number that is taken', copyOf('(select min(last_row) from list_revisions)'), /23505/],
    [
      'an end under a number that is taken',
      `insert into row_ends select list_no, last_end, 1 from (${inRevision}) r where last_end > 0`,
      /23505/,
    ],
    [
      'a subtotal',
      `insert into revision_subtotals select (jsonb_populate_record(null::revision_subtotals, to_jsonb(s) || '{"group_path": "Other"}')).*
       from revision_subtotals s limit 1`,
      /23514/,
    ],
    [
      'a revision whose rows are not there',
      `insert into list_revisions select (jsonb_populate_record(null::list_revisions, to_jsonb(v) ||
        jsonb_build_object('id', 'x', 'number', (select max(number) + 1 from list_revisions), 'last_row', v.last_row + 1, 'rows', v.rows + 1))).*
       from list_revisions v order by number desc limit 1`,
      /23514/,
    ],
    [
      'a revision that leaves out a number',
      `insert into list_revisions select (jsonb_populate_record(null::list_revisions, to_jsonb(v) ||
        jsonb_build_object('id', 'y', 'number', v.number + 2))).* from list_revisions v order by number desc limit 1`,
      /23514/,
    ],
  ])("takes in nothing more by the application's own credentials: %s", async (_, statement, code) => {
    const client = new pg.Client({ connectionString: test.appUrl });
    await client.connect();
    try {
      await expect(client.query(statement)).rejects.toMatchObject({
        code: expect.stringMatching(code) as string,
      });
    } finally {
      await client.end();
    }
  });

  it.each([
    ['a row beyond its last', copyOf('(select max(last_row) + 1 from list_revisions)')],
    [
      'an end beyond its last',
      `insert into row_ends select list_no, last_end + 1, last_row from (${inRevision}) r`,
    ],
    [
      'a row of no list',
      `insert into row_versions select 999999, r.row_no, r.sort_key + 1, r.mass, r.x, r.y, r.z, r.ixx, r.iyy, r.izz, r.ixy,
      r.ixz, r.iyz, r.yaw, r.pitch, r.roll, r.growth, r.fingerprint, r.quantity, r.pair, r.item, r.part_number, r.part_revision,
      r.description, r.group_path, r.category, r.parent, r.counting, r.maturity, r.source, r.source_date, r.note, r.change_ref, r.status,
      r.sigma, r.extra from row_versions r limit 1`,
    ],
  ])('is not followed by %s either, which no commit keeps', async (_, statement) => {
    const client = new pg.Client({ connectionString: test.appUrl });
    await client.connect();
    try {
      await expect(client.query(statement)).rejects.toMatchObject({ constraint: 'row_versions_not_stray' });
    } finally {
      await client.end();
    }
    const before = (await freshList()).last_revision;
    await reviseList(test, test.crew.weights, 'life', csv(HISTORY[3] ?? []));
    expect((await freshList()).last_revision).toBe(before + 1);
  });
});
