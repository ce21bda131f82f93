import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { MOST_VIEWS, saveViewSchema } from '@/lib/contracts/saved-view';
import { deleteView } from '@/lib/server/lists/views/delete-view';
import { loadViews } from '@/lib/server/lists/views/load-views';
import { renameView } from '@/lib/server/lists/views/rename-view';
import { saveView } from '@/lib/server/lists/views/save-view';
import { programUnderTest, type ProgramUnderTest, reviseList } from '@/tests/support/program';

let test: ProgramUnderTest;
const ids = new Map<string, string>();

beforeAll(async () => {
  test = await programUnderTest();
  for (const code of ['wing', 'tail']) {
    await reviseList(test, test.crew.weights, code, 'item,mass,x,y,z\nA,1,0,0,0\n');
    const { id } = await test.db
      .selectFrom('lists')
      .select('id')
      .where('code', '=', code)
      .executeTakeFirstOrThrow();
    ids.set(code, id);
  }
});
afterAll(() => test.close());

const list = (code: string) => ({ id: ids.get(code) ?? '' });
const mine = (code: string, who: 'weights' | 'chief' = 'weights') =>
  loadViews(test.db, list(code), test.crew[who]);
const save = (code: string, name: string, query: string, who: 'weights' | 'chief' = 'weights') =>
  saveView(test.db, {
    person: test.crew[who],
    list: list(code),
    view: saveViewSchema.parse({ name, query }),
  });

describe('A saved view', () => {
  it('keeps rows, order, columns and grouping, and neither the revision nor the open row', async () => {
    await save(
      'wing',
      ' Heavy ',
      'revision=3&row=A&sort=-mass&show=mass&show=own%3AZone&by=own%3AZone&where=maturity&unfold=*&drivers=mass',
    );
    const [view] = await mine('wing');
    expect(view?.name).toBe('Heavy');
    const kept = new URLSearchParams(view?.query);
    expect([...kept].map(([key, value]) => `${key}=${value}`).sort()).toEqual([
      'by=own:Zone',
      'show=mass',
      'show=own:Zone',
      'sort=-mass',
      'unfold=*',
      'where=maturity',
    ]);
  });

  it('belongs to one person and one list, and is replaced under its name', async () => {
    await save('wing', 'Heavy', 'sort=mass');
    await save('wing', 'Heavy', 'find=rib', 'chief');
    expect((await mine('wing')).map(({ name, query }) => [name, query])).toEqual([['Heavy', 'sort=mass']]);
    expect((await mine('wing', 'chief')).map(({ query }) => query)).toEqual(['find=rib']);
    expect(await mine('tail')).toEqual([]);
  });

  it('is renamed, but not to a name that is taken, and not by others', async () => {
    await save('wing', 'Light', 'sort=-mass');
    const light = (await mine('wing')).find(({ name }) => name === 'Light')?.id ?? '';
    const rename = (name: string, who: 'weights' | 'chief' = 'weights', of = 'wing') =>
      renameView(test.db, { person: test.crew[who], list: list(of), view: light, name });
    await expect(rename('Heavy')).rejects.toMatchObject({ code: 'conflict' });
    await expect(rename('Feathers', 'chief')).rejects.toMatchObject({ code: 'not-found' });
    await expect(rename('Feathers', 'weights', 'tail')).rejects.toMatchObject({ code: 'not-found' });
    await rename('Feathers');
    expect((await mine('wing')).map(({ name }) => name)).toEqual(['Feathers', 'Heavy']);
  });

  it('is deleted by its owner alone', async () => {
    const view = (await mine('wing'))[0]?.id ?? '';
    const remove = (who: 'weights' | 'chief') =>
      deleteView(test.db, { person: test.crew[who], list: list('wing'), view });
    await expect(remove('chief')).rejects.toMatchObject({ code: 'not-found' });
    await remove('weights');
    await expect(remove('weights')).rejects.toMatchObject({ code: 'not-found' });
    expect((await mine('wing')).map(({ name }) => name)).toEqual(['Heavy']);
  });

  it.each([
    ['no name', { name: '  ', query: '' }],
    ['a name of two lines', { name: 'a\nb', query: '' }],
    ['a very long one', { name: 'a', query: `find=${'x'.repeat(4001)}` }],
  ])('is refused with %s', (_, view) => {
    expect(saveViewSchema.safeParse(view).success).toBe(false);
  });

  it('is refused when there are very many', async () => {
    for (let k = 0; k < MOST_VIEWS; k += 1) await save('tail', `View ${k}`, '');
    await expect(save('tail', 'One more', '')).rejects.toMatchObject({ code: 'invalid-request' });
    await save('tail', 'View 7', 'sort=x');
    expect(await mine('tail')).toHaveLength(MOST_VIEWS);
  });
});
