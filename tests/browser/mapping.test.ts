import { readFileSync } from 'node:fs';
import path from 'node:path';
import { type Browser, type BrowserContext, type Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { declarationsFromBody, listDeclarationsSchema } from '@/lib/contracts/list-declarations';
import { sessionCookie } from '@/lib/server/auth/session';
import { newId } from '@/lib/server/ids';
import { addList } from '@/lib/server/lists/save-list';
import { openBrowser } from '../support/browser';
import { testWeb } from '../support/web';
import { type WebPeople, webPeople } from '../support/web-people';
import { xlsx } from '../support/xlsx';

const { url } = testWeb();
let people: WebPeople;
let browser: Browser;
let context: BrowserContext;
let page: Page;
const failures: string[] = [];
const list = `${url}/programs/mapping-flow/lists/nacelle`;

beforeAll(async () => {
  people = await webPeople('mapping-flow');
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
  await addList(people.db, {
    person: { userId: people.ids.weights, address: '127.0.0.1' },
    programId: people.program.id,
    code: 'nacelle',
    title: 'Nacelle',
    declarations: declarationsFromBody(
      listDeclarationsSchema.parse({ mass_unit: 'kg', length_unit: 'm', inertia_unit: 'kg.m2' }),
    ),
  });
  browser = await openBrowser();
  context = await browser.newContext({ viewport: { width: 1440, height: 1000 } });
  const name = sessionCookie(url).name;
  await context.addCookies([{ name, value: people.cookies.weights.slice(name.length + 1), url }]);
  page = await context.newPage();
  page.setDefaultTimeout(20_000);
  page.on('console', (message) => {
    if (/content security policy|hydrat/i.test(message.text())) failures.push(message.text());
  });
  page.on('pageerror', (error) => failures.push(error.message));
});
afterAll(async () => {
  await browser.close();
  await people.close();
});

const fixture = (name: string): Buffer =>
  readFileSync(path.join(import.meta.dirname, '../../fixtures/lists/mapped', `${name}.csv`));

async function upload(name: string, buffer: Buffer): Promise<void> {
  await page.goto(`${list}/upload`);
  await page.getByLabel('File', { exact: true }).setInputFiles({ name, mimeType: 'text/csv', buffer });
  await page.getByLabel('Reason for this revision').fill('from the supplier');
  await page.getByRole('button', { name: 'Upload file' }).click();
}

const group = (label: string) => page.getByRole('group', { name: label });
const check = () => page.getByRole('button', { name: 'Check the whole file' });

describe('a weights engineer with a supplier’s file', () => {
  it('is told before the upload that its columns will be asked for, and finds the stored file again on the list', async () => {
    await page.goto(`${list}/upload`);
    await page.getByLabel('File', { exact: true }).setInputFiles({
      name: 'plain.csv',
      mimeType: 'text/csv',
      buffer: Buffer.from('item,mass,x,y,z\nA,1,0,0,0\n'),
    });
    await page.getByText('it is read as it stands').waitFor();
    await upload('nacelle.csv', fixture('titles-and-totals'));
    await page.waitForURL(/\/uploads\//);
    await page.goto(list);
    await page.getByText('nacelle.csv, uploaded by').waitFor();
    await page.getByRole('link', { name: 'Map its columns' }).click();
    await page.waitForURL(/\/uploads\//);
  });

  it('sees what each column became and why, and cannot go on while a question is open', async () => {
    expect(await page.getByLabel('Meaning of column D, Wt [lb]').inputValue()).toBe('mass');
    expect(await page.getByLabel('Unit of column D, Wt [lb]').inputValue()).toBe('lb');
    await page.getByText('The heading says wt, in lb.').waitFor();
    const preview = page.getByRole('region', { name: 'Rows as they would be read, in SI' });
    // 12.5 lb and 201.4 in, by the factors of NIST SP 811.
    expect(await preview.getByRole('row', { name: /Inlet lip/ }).innerText()).toMatch(
      /5\.669905\s+5\.11556\s/,
    );
    await page.getByText('2 questions are open').waitFor();
    expect(await check().isDisabled()).toBe(true);
    await group('Rows that look like totals').getByLabel('Leave out').check();
    await preview.getByText('Left out as a total: TOTAL').waitFor();
    await group('Rows of one text and nothing else').getByLabel('Leave out').check();
    expect(await check().isEnabled()).toBe(true);
  });

  it('chooses by keyboard alone, and the preview follows at once', async () => {
    const preview = page.getByRole('region', { name: 'Rows as they would be read, in SI' });
    const unit = page.getByLabel('Unit of column D, Wt [lb]');
    await unit.focus();
    await page.keyboard.press('k');
    expect(await unit.inputValue()).toMatch(/^(kg)?$/);
    expect(await preview.getByRole('row', { name: /Inlet lip/ }).innerText()).toContain('12.5');
    await unit.selectOption('lb');
    await page.getByLabel('Meaning of column D, Wt [lb]').selectOption('');
    await page.getByText('Which column is mass? Every list needs one.').waitFor();
    await page.getByLabel('Meaning of column D, Wt [lb]').selectOption('mass');
    expect(await unit.inputValue()).toBe('lb');
  });

  it('is shown a total that does not agree, and imports once it is accepted', async () => {
    await check().click();
    await page.getByText('3 rows can be read').waitFor();
    const totals = page.getByRole('region', { name: 'Totals rows against the rows before them' });
    expect(await totals.getByRole('row', { name: /WL \(in\)/ }).innerText()).toMatch(
      /59\.3\s+60\.466\d*\s+in\s+No/,
    );
    expect(await totals.getByRole('row', { name: /Wt \[lb\]/ }).innerText()).toMatch(
      /71\.5\s+71\.5\s+lb\s+Yes/,
    );
    const start = page.getByRole('button', { name: 'Import as revision 1' });
    expect(await start.isDisabled()).toBe(true);
    await page.getByLabel('I have seen that a total does not agree').check();
    await start.click();
    await page.waitForURL(/\?revision=1$/, { timeout: 60_000 });
    await page.getByText('3 rows', { exact: true }).waitFor();
  });

  it('reads on the page of the import how the file was read and what was left out', async () => {
    await page.goto(`${list}/revisions`);
    await page.getByRole('link', { name: 'How it was read' }).click();
    await page.getByRole('heading', { name: 'How its columns are read' }).waitFor();
    await page.getByText('9 (totals)').waitFor();
    await page.getByText('mass of a piece, lb').waitFor();
  });

  it('is offered the mapping again for the same headings, and names problems before the import', async () => {
    await upload(
      'nacelle-2.csv',
      Buffer.from(fixture('titles-and-totals').toString().replace('30.25', '3O.25')),
    );
    await page.waitForURL(/\/uploads\//);
    await page.getByText(/Filled in as .* mapped it on/).waitFor();
    await check().click();
    await page.getByText('The file has 1 problem as it is mapped').waitFor();
    await page.getByText(/3O\.25 is not a number/).waitFor();
    expect(await page.getByRole('button', { name: 'Import as revision 2' }).isDisabled()).toBe(true);
    await page.getByRole('button', { name: 'Drop this file' }).click();
    await page.waitForURL(list);
    expect(await page.getByText('To be mapped').count()).toBe(0);
  });

  it('chooses a sheet of a workbook, on a narrow page too', async () => {
    const rows = [
      ['Item', 'Name', 'Mass [kg]', 'X [mm]', 'Y [mm]', 'Z [mm]'],
      ['T-1', 'Fin', 48.25, 14200, 0, 3100],
    ];
    await page.setViewportSize({ width: 390, height: 844 });
    await upload(
      'tail.xlsx',
      xlsx([
        { name: 'Read me', rows: [['Nothing here']] },
        { name: 'Tail', rows },
      ]),
    );
    await page.waitForURL(/\/uploads\//);
    await page.getByLabel('Sheet').selectOption('Tail');
    await page.getByLabel('Meaning of column C, Mass [kg]').waitFor();
    const wide = await page.evaluate(() => document.documentElement.scrollWidth - window.innerWidth);
    expect(wide).toBeLessThanOrEqual(0);
    await check().click();
    await page.getByText('1 row can be read').waitFor();
    await page.getByRole('button', { name: 'Import as revision 2' }).click();
    await page.waitForURL(/\?revision=2$/, { timeout: 60_000 });
  });

  it('has met no failure of a page on the way', () => {
    expect(failures).toEqual([]);
  });
});
