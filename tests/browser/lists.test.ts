import { readFile } from 'node:fs/promises';
import { type Browser, type BrowserContext, type Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { sessionCookie } from '@/lib/server/auth/session';
import { newId } from '@/lib/server/ids';
import { openBrowser } from '../support/browser';
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
    await page.getByLabel('+y points').selectOption('up');
    await page
      .getByText('The axes aft, up, up do not span space: none of them points right or left.')
      .waitFor();
    await page.getByRole('button', { name: 'Add list' }).click();
    await page.getByText('Use lower-case letters, digits and hyphens').waitFor();
    expect(await page.getByLabel('+y points').inputValue()).toBe('up');
    expect(await page.getByLabel('Mass', { exact: true }).inputValue()).toBe('lb');
    await page.getByLabel('Code').fill('wing');
    await page.getByLabel('+y points').selectOption('left');
    await page.getByText('These axes are left-handed.').waitFor();
    await page.getByLabel('+y points').selectOption('right');
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
    await page.getByText('Line 2 of wing-b.csv').waitFor();
    expect(new URL(page.url()).searchParams.get('row')).toBe('W-1');
    await page.goBack();
    await expect.poll(() => page.getByText('Line 2 of wing-b.csv').count()).toBe(0);
  });

  it('gathers edits that outlast the page, is told what is wrong in them, and saves them as a revision', async () => {
    await page.goto(`${home}/wing?row=W-1`);
    await page.getByRole('button', { name: 'Edit row' }).click();
    await page.getByLabel('Mass of one piece').fill('41,5');
    await page.getByRole('button', { name: 'Close row' }).click();
    await page.getByText('nothing that is typed is lost unasked').waitFor();
    await page.getByRole('button', { name: 'Keep the edit' }).click();
    await page.getByRole('button', { name: 'Add row' }).click();
    const beside = page.getByRole('complementary', { name: 'Row' });
    await beside.getByLabel('Item', { exact: true }).fill('W-4');
    for (const [label, text] of [
      ['Mass of one piece', '2'],
      ['x, aft', '220'],
      ['y, right', '0'],
      ['z, up', '50'],
    ] as const)
      await beside.getByLabel(label).fill(text);
    await page.getByRole('button', { name: 'Add to the edits' }).click();
    await page.getByRole('heading', { name: '2 edits not saved yet' }).waitFor();
    await page.reload();
    await page.getByRole('heading', { name: '2 edits not saved yet' }).waitFor();
    await page.getByLabel('Reason for the revision').fill('weighed');
    await page.getByRole('button', { name: 'Save revision 2' }).click();
    await page.getByText('The edits have 1 problem').waitFor();
    await page.getByRole('button', { name: 'W-1', exact: true }).click();
    await page.getByRole('button', { name: 'Edit row' }).click();
    await page.getByLabel('Mass of one piece').fill('41.5');
    await page.getByRole('button', { name: 'Keep the edit' }).click();
    await page.getByRole('button', { name: 'Save revision 2' }).click();
    await page.waitForURL(/revision=2$/);
    await page.getByText('Revision 2, 4 rows').waitFor();
    expect(await page.getByText('not saved yet').count()).toBe(0);
  });

  it('is refused when a colleague was faster, told who, and overwrites nothing by going on', async () => {
    await page.goto(`${home}/wing?row=W-1`);
    await page.getByRole('button', { name: 'Edit row' }).click();
    await page.getByLabel('Mass of one piece').fill('42');
    await page.getByRole('button', { name: 'Keep the edit' }).click();
    const faster = await fetch(`${route}/edits`, {
      method: 'POST',
      headers: { cookie: people.cookies.weights, origin: url, 'content-type': 'application/json' },
      body: JSON.stringify({
        baseRevision: 2,
        reason: 'faster',
        edits: [{ kind: 'change', item: 'W-1', fields: { mass: '43' } }],
      }),
    });
    expect(await faster.json()).toEqual({ status: 'saved', revision: 3 });
    await page.getByLabel('Reason for the revision').fill('weighed again');
    await page.getByRole('button', { name: 'Save revision 3' }).click();
    await page.getByText('The weights made revision 3 after you began from revision 2.').waitFor();
    await page.reload();
    await page.getByRole('button', { name: 'Go on from revision 3' }).click();
    await page.getByLabel('Reason for the revision').fill('weighed again');
    await page.getByRole('button', { name: 'Save revision 4' }).click();
    await page.getByText('in revision 3 it is').waitFor();
    await page.getByRole('button', { name: 'Undo the edit', exact: true }).click();
    await expect.poll(() => page.getByText('not saved yet').count()).toBe(0);
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
    for (const words of ['Edit row', 'Remove row', 'Add row', 'Upload a file', 'Change declarations'])
      expect(await page.getByText(words, { exact: true }).count()).toBe(0);
    expect(failures).toEqual([]);
    await context.close();
  });
});
