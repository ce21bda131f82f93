import { readFile } from 'node:fs/promises';
import { type Browser, type BrowserContext, type Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { sessionCookie, startSession } from '@/lib/server/auth/session';
import { newId } from '@/lib/server/ids';
import { openBrowser } from '../support/browser';
import { makePerson } from '../support/people';
import { testWeb } from '../support/web';
import { type Role, type WebPeople, webPeople } from '../support/web-people';

const { url } = testWeb();
let people: WebPeople;
let browser: Browser;
let home: string;
let route: string;

beforeAll(async () => {
  people = await webPeople('lists-flow');
  browser = await openBrowser();
  home = `${url}/programs/lists-flow/lists`;
  route = `${url}/api/internal/programs/lists-flow/lists/wing`;
  await people.db
    .insertInto('frame_issues')
    .values({
      id: newId(),
      program_id: people.program.id,
      number: 1,
      title: 'First issue',
      axis_x: 'aft',
      axis_y: 'right',
      axis_z: 'up',
      lemac: [6, 0, 1],
      mac: 2,
      span: 18,
      length: 15,
      lateral_plane: 0,
      incidence: 0,
      reference: [6.5, 0, 1],
      valid_from: '2026-01-05',
      reason: 'first layout',
      created_by: people.ids.chief,
    })
    .execute();
});
afterAll(async () => {
  await browser.close();
  await people.close();
});

/** A page of someone signed in; nothing may go wrong in it unseen. */
async function pageOf(role: Role): Promise<{ page: Page; context: BrowserContext; failures: string[] }> {
  const context = await browser.newContext({ viewport: { width: 1440, height: 1000 } });
  const name = sessionCookie(url).name;
  const value = people.cookies[role].slice(name.length + 1);
  await context.addCookies([{ name, value, url }]);
  const page = await context.newPage();
  page.setDefaultTimeout(15_000);
  const failures: string[] = [];
  page.on('console', (message) => {
    if (/content security policy|hydrat/i.test(message.text())) failures.push(message.text());
  });
  page.on('pageerror', (error) => failures.push(error.message));
  return { page, context, failures };
}

async function keys(page: Page, key: string, times: number): Promise<void> {
  for (let time = 0; time < times; time += 1) await page.keyboard.press(key);
}

/** By the clipboard, as from a spreadsheet. */
async function paste(page: Page, text: string): Promise<void> {
  await page.context().grantPermissions(['clipboard-read', 'clipboard-write'], { origin: url });
  await page.evaluate((block) => navigator.clipboard.writeText(block), text);
  await page.keyboard.press('Control+v');
}

/** A line of what the edits do: before, as edited, difference. */
async function effectOf(page: Page, name: string): Promise<string[]> {
  const line = page.getByRole('row', { name: new RegExp(`^${name} `) }).first();
  return (await line.innerText())
    .split('\t')
    .slice(1)
    .map((cell) => cell.replace(/\s/g, ''));
}

const csv = (rows: readonly string[]): string => `item,group,mass,x,y,z,Zone\n${rows.join('\n')}\n`;
const RIGHT = csv([
  'W-1,Wing/Spars,40.5,200,10,50,7',
  'W-2,Wing/Ribs,12.25,210,0,51,7',
  '=W-3,Tail,8,400,0,90,9',
]);
const WRONG = csv(['W-1,Wing/Spars,"40,5",200,10,50,7', 'W-1,Wing/Ribs,12.25,,0,51,7']);

async function upload(page: Page, name: string, text: string, reason: string): Promise<void> {
  await page.goto(`${home}/wing/upload`);
  await page
    .getByLabel('File', { exact: true })
    .setInputFiles({ name, mimeType: 'text/csv', buffer: Buffer.from(text) });
  await page.getByLabel('Reason for this revision').fill(reason);
  await page.getByRole('button', { name: 'Upload file' }).click();
}

async function downloaded(page: Page, link: string): Promise<{ name: string; text: string }> {
  const [download] = await Promise.all([
    page.waitForEvent('download'),
    page.getByRole('link', { name: link, exact: true }).click(),
  ]);
  return { name: download.suggestedFilename(), text: await readFile(await download.path(), 'utf8') };
}

describe('a weights engineer', () => {
  let page: Page;
  let failures: string[];
  beforeAll(async () => {
    ({ page, failures } = await pageOf('weights'));
  });
  afterAll(() => page.context().close());

  it('finds an empty place with the first step and an example file', async () => {
    await page.goto(home);
    await page.getByText('There is no mass list yet').waitFor();
    const example = await downloaded(page, 'Download the example file');
    expect(example.name).toBe('dunlin-40-example.csv');
    expect(example.text.split('\r\n')[0]).toMatch(/^item,description,group,/);
  });

  it('declares a list; what is missing or cannot be is said beside its field, and what was chosen stays', async () => {
    await page.getByRole('link', { name: 'Add list' }).click();
    await page.getByLabel('Title').fill('Wing');
    await page.getByLabel('Code').fill('Wing!');
    await page.getByLabel('Mass', { exact: true }).selectOption('lb');
    await page.getByLabel('Length', { exact: true }).selectOption('in');
    await page.getByLabel('Inertia', { exact: true }).selectOption('lb.in2');
    await page.getByLabel('Negative integral').check();
    await page.getByLabel('+y points', { exact: true }).selectOption('up');
    await page
      .getByText('The axes aft, up, up do not span space: none of them points right or left.')
      .waitFor();
    await page.getByRole('button', { name: 'Add list' }).click();
    await page.getByText('Use lower-case letters, digits and hyphens').waitFor();
    expect(await page.getByLabel('+y points', { exact: true }).inputValue()).toBe('up');
    expect(await page.getByLabel('Mass', { exact: true }).inputValue()).toBe('lb');
    await page.getByLabel('Code').fill('wing');
    await page.getByLabel('+y points', { exact: true }).selectOption('left');
    await page.getByText('These axes are left-handed.').waitFor();
    await page.getByLabel('+y points', { exact: true }).selectOption('right');
    await page.getByRole('button', { name: 'Add list' }).click();
    await page.waitForURL(`${home}/wing/upload`);
    await page.getByText('negative integral').waitFor();
  });

  it('uploads a wrong file and reads what is wrong, where, and what would be right', async () => {
    await upload(page, 'wing-a.csv', WRONG, 'first issue');
    await page.waitForURL(/\/imports\//);
    await page.getByText('The file has 3 problems').waitFor();
    await page.getByText('the list has no revision yet').waitFor();
    const cells = await page.locator('main tbody tr').allInnerTexts();
    expect(
      cells.map((text) =>
        text
          .split('\t')
          .slice(0, 3)
          .map((cell) => cell.trim()),
      ),
    ).toEqual([
      ['2', 'mass', '40,5'],
      ['3', 'x', ''],
      ['3', 'item', 'W-1'],
    ]);
    const problems = await downloaded(page, 'Download as CSV');
    expect(problems.name).toBe('wing-a-problems.csv');
    expect(problems.text).toContain('2,mass,"40,5",');
  });

  it('uploads the right one and is led to the revision it became', async () => {
    await upload(page, 'wing-b.csv', RIGHT, 'first issue, put right');
    await page.waitForURL(/\/lists\/wing\?revision=1$/);
    await page.getByRole('gridcell', { name: 'W-2' }).or(page.getByText('W-2')).first().waitFor();
    await page.getByText('3 rows', { exact: true }).waitFor();
    const foot = await page.locator('[role=grid] tfoot td').allInnerTexts();
    expect(foot.map((text) => text.replace(/\s/g, ''))).toContain('60.75');
    expect(await page.locator('[role=grid] thead th').allInnerTexts()).toEqual(
      expect.arrayContaining([expect.stringMatching(/^Mass\s*lb$/), expect.stringMatching(/^x aft\s*in$/)]),
    );
  });

  it('sorts, filters and opens rows, all of it in the address', async () => {
    const items = async () => {
      const texts = await page.locator('[role=grid] tbody tr td:first-child').allInnerTexts();
      return texts.map((text) => text.trim()).filter(Boolean);
    };
    await page.getByRole('button', { name: /^Mass/ }).click();
    await expect.poll(items).toEqual(['=W-3', 'W-2', 'W-1']);
    await page.getByRole('combobox', { name: 'Group', exact: true }).selectOption('Wing');
    await expect.poll(items).toEqual(['W-2', 'W-1']);
    expect(new URL(page.url()).search).toBe('?revision=1&sort=mass&group=Wing');
    await page.reload();
    await expect.poll(items).toEqual(['W-2', 'W-1']);
    const part = await downloaded(page, 'Export rows shown');
    expect(part.name).toMatch(
      /^lists-flow-wing-revision-1-part_lb_in_[a-z.0-9]+_products-(positive|negative)_aft-right-up\.csv$/,
    );
    expect(
      part.text
        .split('\r\n')
        .slice(1, 3)
        .map((line) => line.split(',')[0]),
    ).toEqual(['W-2', 'W-1']);
    const all = await downloaded(page, 'Export all rows');
    expect(all.text).toContain("\r\n'=W-3,");
    await page.locator('[role=grid] tbody tr', { hasText: 'W-1' }).locator('td').nth(1).click();
    await page.getByText('As in wing-b.csv').waitFor();
    expect(new URL(page.url()).searchParams.get('row')).toBe('W-1');
    await page.goBack();
    await expect.poll(() => page.getByText('As in wing-b.csv').count()).toBe(0);
  });

  it('pastes into the grid, sees what is wrong at its cell and what the edits do, mends it, comes back later, and saves', async () => {
    await page.goto(`${home}/wing?row=W-1`);
    await page.getByRole('link', { name: 'Edit row', exact: true }).click();
    await page.waitForURL(/\/wing\/edit\?edit=W-1$/);
    await page.getByRole('button', { name: 'Leave without' }).click();
    const grid = page.getByRole('grid');
    await keys(page, 'ArrowRight', 4);
    await paste(page, '41.5\t200\n12,250\t210');
    await page.getByText('1 problem', { exact: true }).waitFor();
    const wrong = grid.locator('[aria-invalid=true]');
    expect(await wrong.innerText()).toBe('12,250');
    await expect.poll(() => effectOf(page, 'Mass')).toEqual(['60.7500', '61.7500', '+1.0000']);
    await page.getByLabel('Reason for the revision').fill('weighed');
    await page.getByRole('button', { name: 'Save revision 2' }).click();
    await page.getByText('1 problem to mend before this can be a revision.').waitFor();
    await page.keyboard.press('F2');
    await page.getByText('has a thousands separator').waitFor();
    await page.keyboard.press('Control+a');
    await page.keyboard.type('=2*6');
    await page.getByText('is a formula').waitFor();
    await page.keyboard.press('Control+a');
    await page.keyboard.type('12,5');
    await page.keyboard.press('Enter');
    await expect.poll(() => wrong.count()).toBe(0);
    await expect.poll(() => effectOf(page, 'Mass')).toEqual(['60.7500', '62.0000', '+1.2500']);
    await page.keyboard.press('Control+z');
    await expect.poll(() => wrong.count()).toBe(1);
    await page.keyboard.press('ArrowUp');
    await page.keyboard.type('12.25');
    await page.keyboard.press('Enter');
    await page.getByText('1 row edited').waitFor();

    await page.getByRole('button', { name: 'Add row' }).click();
    await page.keyboard.type('W-4');
    await page.keyboard.press('Tab');
    await keys(page, 'ArrowRight', 3);
    for (const text of ['2', '220', '0', '50']) {
      await page.keyboard.type(text);
      await page.keyboard.press('Tab');
    }
    await expect.poll(() => effectOf(page, 'Mass')).toEqual(['60.7500', '63.7500', '+3.0000']);
    // (40.5*200 + 12.25*210 + 8*400 + 1*200 + 2*220) / 63.75, by hand.
    await expect.poll(async () => (await effectOf(page, 'CG x aft'))[1]).toBe('227.647');
    await page.getByText(/^Draft kept at/).waitFor();

    await page.goto('about:blank');
    await page.goto(`${home}/wing`);
    await page.getByText(/^Your draft of .*, 2 rows changed$/).waitFor();
    await page.getByRole('link', { name: 'Go on with the draft' }).click();
    await expect.poll(() => effectOf(page, 'Mass')).toEqual(['60.7500', '63.7500', '+3.0000']);
    await page.getByLabel('Reason for the revision').fill('weighed');
    await page.getByRole('button', { name: 'Save revision 2' }).click();
    await page.waitForURL(/revision=2$/);
    await page.getByText('Revision 2, 4 rows').waitFor();
    expect(await page.getByText('Your draft of').count()).toBe(0);
  });

  it('is told of a colleague at work on the list, and where both changed a field chooses between both versions', async () => {
    const email = 'colleague@lists-flow.example';
    const id = await makePerson(people.db, { email, name: 'The colleague', admin: false });
    await people.db
      .insertInto('program_members')
      .values({ program_id: people.program.id, user_id: id, role: 'weights', added_by: people.ids.admin })
      .execute();
    const cookie = `${sessionCookie(url).name}=${await startSession(people.pool, id, '127.0.0.1')}`;
    const colleague = async (method: string, path: string, body: unknown): Promise<unknown> => {
      const headers = { cookie, origin: url, 'content-type': 'application/json' };
      return (await fetch(`${route}${path}`, { method, headers, body: JSON.stringify(body) })).json();
    };
    await page.goto(`${home}/wing/edit`);
    await page.getByRole('grid').focus();
    await keys(page, 'ArrowRight', 4);
    await page.keyboard.type('42');
    await page.keyboard.press('Enter');
    await page.getByText(/^Draft kept at/).waitFor();
    const put = [{ kind: 'change', item: 'W-1', fields: { mass: '43' } }];
    expect(await colleague('PATCH', '/draft', { base: 2, version: 0, put, drop: [] })).toMatchObject({
      version: 1,
    });
    await page.getByText('The colleague has a draft from revision 2').waitFor({ timeout: 40_000 });
    expect(await colleague('POST', '/draft/save', { version: 1, reason: 'faster' })).toEqual({
      status: 'saved',
      revision: 3,
      merged: null,
    });
    await page.getByLabel('Reason for the revision').fill('weighed again');
    await page.getByRole('button', { name: /^Save revision/ }).click();
    await page.getByRole('heading', { name: '1 row changed by both' }).waitFor();
    const line = page
      .locator('tr', { hasText: 'theirs for W-1' })
      .or(page.locator('tr:has(input[type=radio])'));
    const cells = (await line.innerText()).split('\t').map((text) => text.trim());
    expect(cells).toEqual(['W-1', 'mass', '41.5', '42', '43']);
    const goOn = page.getByRole('button', { name: 'Go on from revision 3 with these' });
    expect(await goOn.isDisabled()).toBe(true);
    await page.getByLabel('theirs for W-1, mass: 43').check();
    await goOn.click();
    await page.getByText('From revision 3.').waitFor();
    await page.getByText('Nothing edited yet').waitFor();
    await page.goto(`${home}/wing`);
    await page.getByText('Revision 3, 4 rows').waitFor();
  });

  it('sees who made each revision, why, from what file, and what changed', async () => {
    await page.goto(`${home}/wing/revisions`);
    await page.getByRole('link', { name: '1 added, 1 changed' }).waitFor();
    const file = await downloaded(page, 'wing-b.csv');
    expect(file).toEqual({ name: 'wing-b.csv', text: RIGHT });
    await page.getByRole('link', { name: '1 added, 1 changed' }).click();
    await page.getByRole('heading', { name: 'What changed from revision 1 to 2' }).waitFor();
    const line = page.locator('tr', { hasText: 'Changed' });
    expect((await line.innerText()).split('\t').map((text) => text.trim())).toEqual([
      'W-1',
      'Changed',
      'mass',
      '40.5',
      '41.5',
      '+1.000',
    ]);
    expect(failures).toEqual([]);
  });

  it('marks a list, and the marking stands on its pages and in its exports', async () => {
    await page.goto(`${home}/wing/declarations`);
    await page.getByText('Revisions 1 to 3 keep what they were read with').waitFor();
    await page.getByLabel('Marking').fill('Skerry Aircraft, in confidence');
    await page.getByRole('button', { name: 'Save declarations' }).click();
    await page.waitForURL(`${home}/wing`);
    await page.getByRole('note', { name: 'Marking' }).getByText('Skerry Aircraft, in confidence').waitFor();
    const all = await downloaded(page, 'Export all rows');
    for (const line of all.text.trimEnd().split('\r\n').slice(1))
      expect(line).toMatch(/,"Skerry Aircraft, in confidence"$/);
    expect(failures).toEqual([]);
  });
});

describe('a chief engineer', () => {
  it('reads lists and is offered nothing to change', async () => {
    const { page, context, failures } = await pageOf('chief');
    await page.goto(`${home}/wing?row=W-1`);
    await page.getByText('Mass of one piece').waitFor();
    for (const words of ['Edit row', 'Edit rows', 'Upload a file', 'Change declarations'])
      expect(await page.getByText(words, { exact: true }).count()).toBe(0);
    expect(failures).toEqual([]);
    await context.close();
  });
});
