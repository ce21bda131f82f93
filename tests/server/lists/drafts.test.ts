import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest';
import { findList, findRevision, type List } from '@/db/queries/lists';
import { type Choice, DRAFT_ROWS, type DraftEdit, type DraftPatch } from '@/lib/contracts/list-draft';
import { type ListDeclarationsInput } from '@/lib/contracts/list-declarations';
import { type Person } from '@/lib/server/actor';
import { loadDraft } from '@/lib/server/lists/draft/load-draft';
import { loadPresence } from '@/lib/server/lists/draft/load-presence';
import { moveDraft } from '@/lib/server/lists/draft/move-draft';
import { patchDraft } from '@/lib/server/lists/draft/patch-draft';
import { saveDraft } from '@/lib/server/lists/draft/save-draft';
import { throwAwayDraft } from '@/lib/server/lists/draft/throw-away-draft';
import { programUnderTest, type ProgramUnderTest, reviseList } from '@/tests/support/program';

const CSV = [
  'item,group,parent,quantity,mass,x,y,z,note,Zone',
  'A-100,Wing,,1,33.5,100,20,7,first,12',
  'A-110,Wing,A-100,3,7.25,101,21,7,,12',
  'A-120,Wing,A-100,1,11.75,98,19,6,,',
  'B-100,Tail,,1,5.875,300,0,55,,14',
  '',
].join('\r\n');

let test: ProgramUnderTest;
let list: List;
let made = 0;
/** Two people in two sessions. */
let ann: Person;
let bo: Person;

beforeAll(async () => {
  test = await programUnderTest();
  ann = test.crew.weights;
  bo = test.crew.weights2;
});
afterAll(() => test.close());
beforeEach(async () => {
  const code = `drafted-${(made += 1)}`;
  await reviseList(test, ann, code, CSV);
  list = await fresh(code);
});

async function fresh(code: string): Promise<List> {
  const found = await findList(test.db, test.program.id, code);
  if (found === undefined) throw new Error(`no list ${code}`);
  return found;
}

const change = (item: string, fields: Record<string, string>): DraftEdit => ({
  kind: 'change',
  item,
  fields,
});
const remove = (item: string): DraftEdit => ({ kind: 'remove', item });
const add = (id: string, place: number, fields: Record<string, string>): DraftEdit => ({
  kind: 'add',
  id,
  place,
  fields,
});
const NEW = { mass: '2', x: '1', y: '0', z: '0' };

function patch(person: Person, version: number, put: DraftEdit[], more: Partial<DraftPatch> = {}) {
  return patchDraft(test.db, { person, list, patch: { base: 1, version, put, drop: [], ...more } });
}
async function save(person: Person, reason = 'weighed again') {
  const draft = await loadDraft(test.db, await fresh(list.code), person);
  return saveDraft(test, { person, list: await fresh(list.code), version: draft?.version ?? 0, reason });
}
async function move(person: Person, onto: number, choices: Choice[] = []) {
  const draft = await loadDraft(test.db, list, person);
  return moveDraft(test.db, { person, list, version: draft?.version ?? 0, onto, choices });
}
async function rowsOf(number: number) {
  const revision = await findRevision(test.db, list.id, number);
  const rows = await test.db
    .selectFrom('mass_rows')
    .select(['item', 'mass', 'x', 'note', 'parent', 'extra'])
    .where('revision_id', '=', revision?.id ?? '')
    .orderBy('position')
    .execute();
  return new Map(rows.map((row) => [row.item, row]));
}

describe('A draft', () => {
  it('keeps what is typed, small patch by small patch, for its owner alone', async () => {
    expect(await patch(ann, 0, [change('B-100', { mass: '6' })])).toMatchObject({
      version: 1,
      rows: 1,
      base: 1,
    });
    expect(
      await patch(ann, 1, [
        change('B-100', { mass: '6.5', note: 'scale 4' }),
        add('n1', 1, { item: 'C-1', ...NEW }),
      ]),
    ).toMatchObject({ version: 2, rows: 2 });
    expect(await patch(ann, 2, [remove('A-120')], { drop: ['new n1'] })).toMatchObject({
      version: 3,
      rows: 2,
    });
    const draft = await loadDraft(test.db, list, ann);
    expect(draft?.edits).toHaveLength(2);
    expect(draft?.edits).toEqual(
      expect.arrayContaining([change('B-100', { mass: '6.5', note: 'scale 4' }), remove('A-120')]),
    );
    expect(await loadDraft(test.db, list, bo)).toBeNull();
    expect((await fresh(list.code)).last_revision).toBe(1);
  });

  it('comes back with the rows that it edits, as the base has them, and where they stand in it', async () => {
    await patch(ann, 0, [change('B-100', { mass: '6' }), remove('A-110')]);
    const draft = await loadDraft(test.db, list, ann);
    const stated = draft?.stated.toSorted((a, b) => a.index - b.index);
    expect(stated).toMatchObject([
      { index: 1, row: { cells: { item: 'A-110', quantity: 3, mass: 7.25 }, own: { Zone: '12' } } },
      { index: 3, row: { cells: { item: 'B-100', group: 'Tail', mass: 5.875 }, own: { Zone: '14' } } },
    ]);
  });

  it('is changed only as it was seen: of two windows that type at once, one is told', async () => {
    await patch(ann, 0, [change('B-100', { mass: '6' })]);
    const both = await Promise.allSettled([
      patch(ann, 1, [change('B-100', { mass: '6.1' })]),
      patch(ann, 1, [change('B-100', { mass: '6.2' })]),
    ]);
    expect(both.map(({ status }) => status).sort()).toEqual(['fulfilled', 'rejected']);
    await expect(patch(ann, 0, [remove('A-100')])).rejects.toMatchObject({ code: 'conflict' });
    await expect(patch(ann, 1, [remove('A-100')])).rejects.toMatchObject({ code: 'conflict' });
    const [won] = both.filter((each) => each.status === 'fulfilled');
    expect(won?.value.version).toBe(2);
    expect((await loadDraft(test.db, list, ann))?.edits).toHaveLength(1);
  });

  it('begun in two windows at once is one draft', async () => {
    const both = await Promise.allSettled([
      patch(ann, 0, [change('B-100', { mass: '6' })]),
      patch(ann, 0, [change('A-100', { mass: '7' })]),
    ]);
    expect(both.map(({ status }) => status).sort()).toEqual(['fulfilled', 'rejected']);
  });

  it('says what is wrong with its rows as a set', async () => {
    const { problems } = await patch(ann, 0, [
      add('n1', 1, { item: 'B-100' }),
      change('A-110', { parent: 'nowhere' }),
      add('n2', 2, { item: '' }),
      add('n3', 3, { item: 'C-2', parent: 'C-3' }),
      add('n4', 4, { item: 'C-3' }),
    ]);
    expect(problems.map(({ item, column }) => [item, column])).toEqual([
      ['B-100', 'item'],
      ['A-110', 'parent'],
    ]);
    const after = await patch(ann, 1, [remove('A-100')]);
    expect(after.problems.find(({ item }) => item === 'A-100')?.message).toMatch(
      /A row names `A-100`.*A-120/,
    );
  });

  it('holds items of any length, and more rows than a draft takes not at all', async () => {
    const item = 'L'.repeat(8000);
    await patch(ann, 0, [add('n1', 1, { item, ...NEW })]);
    const many = Array.from({ length: DRAFT_ROWS }, (_, at) => add(`m${at}`, at, { item: `M${at}` }));
    await expect(patch(ann, 1, many)).rejects.toMatchObject({ code: 'too-large' });
    expect(await loadDraft(test.db, list, ann)).toMatchObject({ version: 1, rows: 1 });
  });

  it('is thrown away as it was seen, and no other', async () => {
    await patch(ann, 0, [change('B-100', { mass: '6' })]);
    await patch(ann, 1, [change('B-100', { mass: '7' })]);
    await expect(throwAwayDraft(test.db, { person: ann, list, version: 1 })).rejects.toMatchObject({
      code: 'conflict',
    });
    await throwAwayDraft(test.db, { person: ann, list, version: 2 });
    expect(await loadDraft(test.db, list, ann)).toBeNull();
  });

  it('is told to others with its owner, its beginning and its size, and not what it says', async () => {
    await patch(ann, 0, [change('B-100', { mass: '6' }), remove('A-120')]);
    const seen = await loadPresence(test.db, list, bo);
    expect(seen).toEqual({
      newest: { number: 1, author: 'weights', at: expect.any(String) },
      mine: null,
      others: [
        { name: 'weights', base: 1, rows: 2, since: expect.any(String), changedAt: expect.any(String) },
      ],
    });
    expect((await loadPresence(test.db, list, ann)).mine).toMatchObject({ rows: 2, version: 1 });
    await patch(ann, 1, [], { drop: ['row B-100', 'row A-120'] });
    expect((await loadPresence(test.db, list, bo)).others).toEqual([]);
  });
});

describe('Saving a draft', () => {
  it('makes a revision with a reason, added rows in their order, and the draft is gone with it', async () => {
    await patch(ann, 0, [
      add('n2', 2, { item: 'C-2', ...NEW }),
      add('n1', 1, { item: 'C-1', ...NEW }),
      change('B-100', { mass: '6.5', Zone: '15' }),
      remove('A-120'),
    ]);
    expect(await save(ann)).toEqual({ status: 'saved', revision: 2, merged: null });
    const rows = await rowsOf(2);
    expect([...rows.keys()]).toEqual(['A-100', 'A-110', 'B-100', 'C-1', 'C-2']);
    expect(rows.get('B-100')).toMatchObject({ mass: 6.5, extra: { Zone: '15' } });
    expect(await loadDraft(test.db, list, ann)).toBeNull();
    const event = await test.db
      .selectFrom('audit_events')
      .select(['kind', 'detail'])
      .where('subject', '=', list.code)
      .orderBy('number', 'desc')
      .limit(1)
      .executeTakeFirstOrThrow();
    expect(event).toMatchObject({ kind: 'list.revised', detail: { number: 2, reason: 'weighed again' } });
  });

  it('with problems saves nothing, tells them by row and column, and leaves the draft', async () => {
    await patch(ann, 0, [change('B-100', { mass: '12,4.5' }), change('A-110', { parent: 'A-110' })]);
    expect(await save(ann)).toMatchObject({
      status: 'problems',
      problems: [
        { item: 'A-110', column: 'parent', message: expect.stringContaining('its own parent') },
        { item: 'B-100', column: 'mass', found: '12,4.5' },
      ],
    });
    expect(await loadDraft(test.db, list, ann)).toMatchObject({ version: 1, rows: 2 });
    expect((await fresh(list.code)).last_revision).toBe(1);
  });

  it('is refused for a version that is not the newest, and for a draft that says nothing', async () => {
    await patch(ann, 0, [change('B-100', { mass: '6' })]);
    await patch(ann, 1, [], { drop: ['row B-100'] });
    await expect(saveDraft(test, { person: ann, list, version: 1, reason: 'x' })).rejects.toMatchObject({
      code: 'conflict',
    });
    await expect(save(ann)).rejects.toMatchObject({
      code: 'conflict',
      message: expect.stringMatching(/no edit/),
    });
  });
});

describe('Two people on one list', () => {
  it('who change different rows are merged, whoever is later', async () => {
    await patch(ann, 0, [change('B-100', { mass: '6' })]);
    await patch(bo, 0, [change('A-120', { mass: '12' }), remove('A-110')]);
    expect(await save(ann)).toMatchObject({ status: 'saved', revision: 2 });
    expect(await save(bo)).toEqual({
      status: 'saved',
      revision: 3,
      merged: { together: [], settled: [] },
    });
    const rows = await rowsOf(3);
    expect([rows.get('B-100')?.mass, rows.get('A-120')?.mass, rows.has('A-110')]).toEqual([6, 12, false]);
  });

  it('who change different fields of one row are merged, and told which', async () => {
    await patch(ann, 0, [change('B-100', { mass: '6' })]);
    await patch(bo, 0, [change('B-100', { x: '301' })]);
    await save(ann);
    expect(await save(bo)).toMatchObject({ status: 'saved', merged: { together: ['B-100'] } });
    expect((await rowsOf(3)).get('B-100')).toMatchObject({ mass: 6, x: 301 });
  });

  it('who change one field: the later is refused with both versions and the one before, and nothing is lost', async () => {
    await patch(ann, 0, [change('B-100', { mass: '6' })]);
    await patch(bo, 0, [change('B-100', { mass: '7', note: 'scale 2' }), change('A-100', { note: 'seen' })]);
    await save(ann);
    expect(await save(bo)).toEqual({
      status: 'clashes',
      onto: 2,
      author: 'weights',
      at: expect.any(String),
      clashes: [
        {
          key: 'row B-100',
          item: 'B-100',
          kind: 'fields',
          fields: [{ column: 'mass', before: '5.875', mine: '7', theirs: '6' }],
        },
      ],
    });
    expect((await fresh(list.code)).last_revision).toBe(2);
    expect(await loadDraft(test.db, list, bo)).toMatchObject({ base: 1, version: 1, rows: 2 });
  });

  it('go on once each row is chosen, on the newer revision', async () => {
    await patch(ann, 0, [change('B-100', { mass: '6' }), change('A-120', { mass: '12', x: '97' })]);
    await patch(bo, 0, [
      change('B-100', { mass: '7', note: 'scale 2' }),
      change('A-120', { mass: '13', x: '96' }),
    ]);
    await save(ann);
    const half = await move(bo, 2, [{ key: 'row B-100', column: null, take: 'theirs' }]);
    expect(half).toMatchObject({ status: 'clashes', clashes: [{ item: 'A-120' }] });
    const moved = await move(bo, 2, [
      { key: 'row B-100', column: null, take: 'theirs' },
      { key: 'row A-120', column: 'mass', take: 'mine' },
      { key: 'row A-120', column: 'x', take: 'theirs' },
    ]);
    expect(moved).toMatchObject({
      status: 'moved',
      draft: {
        base: 2,
        version: 2,
        edits: expect.arrayContaining([
          change('B-100', { note: 'scale 2' }),
          change('A-120', { mass: '13' }),
        ]),
      },
    });
    expect(await save(bo)).toMatchObject({ status: 'saved', revision: 3, merged: null });
    const rows = await rowsOf(3);
    expect(rows.get('B-100')).toMatchObject({ mass: 6, note: 'scale 2' });
    expect(rows.get('A-120')).toMatchObject({ mass: 13, x: 97 });
  });

  it('of whom one removed what the other changed: refused, and put back when so chosen', async () => {
    await patch(ann, 0, [remove('B-100'), change('A-120', { mass: '12' })]);
    await patch(bo, 0, [change('B-100', { mass: '7' }), remove('A-120')]);
    await save(ann);
    expect(await save(bo)).toMatchObject({
      status: 'clashes',
      clashes: expect.arrayContaining([
        expect.objectContaining({ item: 'B-100', kind: 'they-removed' }),
        expect.objectContaining({ item: 'A-120', kind: 'i-removed' }),
      ]),
    });
    await move(bo, 2, [
      { key: 'row B-100', column: null, take: 'mine' },
      { key: 'row A-120', column: null, take: 'mine' },
    ]);
    expect(await save(bo)).toMatchObject({ status: 'saved', revision: 3 });
    const rows = await rowsOf(3);
    expect([...rows.keys()]).toEqual(['A-100', 'A-110', 'B-100']);
    expect(rows.get('B-100')).toMatchObject({ mass: 7, x: 300, extra: { Zone: '14' } });
  });

  it('who save in the same moment: both revisions are made, the later merged with the first, no edit is lost', async () => {
    await patch(ann, 0, [change('B-100', { mass: '6' })]);
    await patch(bo, 0, [change('A-120', { mass: '12' })]);
    const ends = await Promise.all([save(ann), save(bo)]);
    expect(ends.map((end) => end.status === 'saved' && end.revision).sort()).toEqual([2, 3]);
    const rows = await rowsOf(3);
    expect([rows.get('B-100')?.mass, rows.get('A-120')?.mass]).toEqual([6, 12]);
  });

  it('who save one field in the same moment: one is saved, the other refused with both versions', async () => {
    await patch(ann, 0, [change('B-100', { mass: '6' })]);
    await patch(bo, 0, [change('B-100', { mass: '7' })]);
    const ends = await Promise.all([save(ann), save(bo)]);
    expect(ends.map(({ status }) => status).sort()).toEqual(['clashes', 'saved']);
    const left = [await loadDraft(test.db, list, ann), await loadDraft(test.db, list, bo)];
    expect(left.filter((draft) => draft !== null)).toHaveLength(1);
  });

  it('of whom one typed in two windows while saving: the draft that was seen is saved or none', async () => {
    await patch(ann, 0, [change('B-100', { mass: '6' })]);
    const [saved, typed] = await Promise.allSettled([
      saveDraft(test, { person: ann, list, version: 1, reason: 'x' }),
      patch(ann, 1, [change('B-100', { mass: '9' })]),
    ]);
    const draft = await loadDraft(test.db, list, ann);
    const { last_revision: last } = await fresh(list.code);
    if (saved.status === 'fulfilled') {
      expect([last, draft]).toEqual([2, null]);
      expect((await rowsOf(2)).get('B-100')?.mass).toBe(6);
    } else {
      expect(typed.status).toBe('fulfilled');
      expect(last).toBe(1);
      expect(draft?.edits).toEqual([change('B-100', { mass: '9' })]);
    }
  });
});

describe('A newer revision in other units', () => {
  const again = (input: Partial<ListDeclarationsInput>) => reviseList(test, ann, list.code, CSV, input);

  it('takes the edits over in its own units', async () => {
    await patch(bo, 0, [change('B-100', { mass: '10', note: '10' })]);
    await again({ mass_unit: 'g' });
    // The newer file says 5.875 g where the older said 5.875 kg: they changed the mass of every row.
    expect(await save(bo)).toMatchObject({
      status: 'clashes',
      clashes: [{ fields: [{ column: 'mass', before: '5875', mine: '10000', theirs: '5.875' }] }],
    });
    await move(bo, 2, [{ key: 'row B-100', column: 'mass', take: 'mine' }]);
    expect(await save(bo)).toMatchObject({ status: 'saved', revision: 3 });
    expect((await rowsOf(3)).get('B-100')).toMatchObject({ mass: 10, note: '10' });
  });

  it('in other axes refuses to guess, and the draft stays', async () => {
    await patch(bo, 0, [change('B-100', { x: '10' })]);
    await again({ axes: ['forward', 'right', 'up'] });
    await expect(save(bo)).rejects.toMatchObject({
      code: 'conflict',
      message: expect.stringMatching(/declares other axes/),
    });
    expect(await loadDraft(test.db, list, bo)).toMatchObject({ base: 1, rows: 1 });
  });
});
