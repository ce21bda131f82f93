import { type Browser, type BrowserContext, type Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { findConfiguration } from '@/db/queries/configurations';
import { type Person } from '@/lib/server/actor';
import { createConfiguration } from '@/lib/server/configurations/create-configuration';
import { rollUpConfiguration } from '@/lib/server/configurations/roll-up-configuration';
import { sessionCookie } from '@/lib/server/auth/session';
import { newId } from '@/lib/server/ids';
import { reviseList } from '@/tests/support/program';
import { openBrowser } from '../support/browser';
import { testWeb } from '../support/web';
import { type Role, type WebPeople, webPeople } from '../support/web-people';

const { url } = testWeb();
const home = `${url}/programs/drivers-flow`;
let people: WebPeople;
let browser: Browser;

/* Two points: 30 kg at x 12, z 1 and 10 kg at x 20, z 3; invented, their ten numbers follow from the definitions. */
const LIST = 'item,group,mass,x,y,z\nhull,Fuselage,30,12,0,1\ntail,Tail,10,20,0,3\n';

beforeAll(async () => {
  people = await webPeople('drivers-flow');
  browser = await openBrowser();
  const { db, pool, program, ids } = people;
  const frameIssueId = newId();
  await db
    .insertInto('frame_issues')
    .values({
      id: frameIssueId,
      program_id: program.id,
      number: 1,
      title: 'First issue',
      axis_x: 'aft',
      axis_y: 'right',
      axis_z: 'up',
      lemac: [11, 0, 1],
      mac: 2,
      span: 18,
      length: 15,
      lateral_plane: 0,
      incidence: 0,
      reference: [12, 0, 1],
      valid_from: '2026-01-05',
      reason: 'first layout',
      created_by: ids.chief,
    })
    .execute();
  await db
    .insertInto('builds')
    .values({
      id: newId(),
      program_id: program.id,
      code: 'design',
      title: 'Design',
      kind: 'design',
      is_default: true,
      created_by: ids.chief,
    })
    .execute();
  const person: Person = { userId: ids.weights, address: '127.0.0.1' };
  await reviseList({ db, pool, program, frameIssueId }, person, 'whole', LIST);
  await createConfiguration(db, {
    person,
    programId: program.id,
    buildCode: 'design',
    code: 'first',
    title: 'First',
  });
  const configuration = await findConfiguration(db, program.id, 'first');
  if (configuration === undefined) throw new Error('no configuration');
  await rollUpConfiguration(db, { person, configuration });
});
afterAll(async () => {
  await browser.close();
  await people.close();
});

async function pageOf(role: Role, width = 1440): Promise<{ page: Page; context: BrowserContext }> {
  const context = await browser.newContext({ viewport: { width, height: 1000 } });
  const { name } = sessionCookie(url);
  await context.addCookies([{ name, value: people.cookies[role].slice(name.length + 1), url }]);
  const page = await context.newPage();
  page.setDefaultTimeout(30_000);
  return { page, context };
}

/** The figure of a line and column of the table of effects, as it is shown at full precision. */
async function figure(page: Page, line: number, column: number): Promise<number> {
  const cell = page
    .locator('#drivers [aria-label^="Effect of"] tbody tr')
    .nth(line)
    .locator('td')
    .nth(column);
  return Number(await cell.locator('data').first().getAttribute('value'));
}
const [X, IXZ] = [1, 8];
const [NOW, REMOVED, MOVED] = [0, 1, 2];

describe('what drives a condition', () => {
  it('ranks rows by one of the ten numbers and shows the whole without one and with it moved, on the spot', async () => {
    const { page, context } = await pageOf('chief');
    await page.goto(`${home}/configurations/first`);
    await page.locator('#drivers').getByRole('link', { name: 'Ixz', exact: true }).click();
    await page.waitForURL(/number=ixz/);
    const names = page.locator('#drivers [role=region] tbody th');
    await expect.poll(() => names.allInnerTexts()).toEqual(['tail', 'hull']);
    const asked: string[] = [];
    // Links may be fetched ahead of a click; the page's own data may not.
    page.on('request', (request) => {
      if (/\/api\/|\/configurations\/first/.test(request.url())) asked.push(request.url());
    });
    await page.getByRole('radio', { name: 'tail' }).check();
    await page.getByLabel('x aft').fill('-4');
    await expect.poll(() => figure(page, X, MOVED)).toBeCloseTo(13, 9);
    expect(await figure(page, X, NOW)).toBeCloseTo(14, 9);
    expect(await figure(page, X, REMOVED)).toBeCloseTo(12, 9);
    expect(await figure(page, IXZ, NOW)).toBeCloseTo(120, 9);
    expect(await figure(page, IXZ, REMOVED)).toBeCloseTo(0, 9);
    expect(await figure(page, IXZ, MOVED)).toBeCloseTo(60, 9);
    expect(asked).toEqual([]);
    const address = page.url();
    await page.goto('about:blank');
    await page.goto(address);
    await expect.poll(() => figure(page, IXZ, MOVED)).toBeCloseTo(60, 9);
    await context.close();
  });

  it('is there for one list too, fits a phone, and is not printed', async () => {
    const { page, context } = await pageOf('weights', 390);
    await page.goto(`${home}/lists/whole?number=iyy&by=branches`);
    await page.getByRole('radio', { name: 'Tail' }).check();
    await expect.poll(() => figure(page, X, REMOVED)).toBeCloseTo(12, 9);
    const wider = await page.evaluate(
      () => document.documentElement.scrollWidth - document.documentElement.clientWidth,
    );
    expect(wider).toBe(0);
    await page.emulateMedia({ media: 'print' });
    expect(await page.locator('#drivers').isVisible()).toBe(false);
    await context.close();
  });

  it('says of an open row what it contributes to the list and to the configuration that pins it', async () => {
    const { page, context } = await pageOf('weights');
    await page.goto(`${home}/lists/whole?row=tail#rows`);
    const beside = page.getByRole('complementary', { name: 'Row' });
    await beside.getByRole('img', { name: 'side, from the left' }).waitFor();
    const ixz = beside.getByRole('row', { name: /^Ixz/ }).locator('data').first();
    expect(Number(await ixz.getAttribute('value'))).toBeCloseTo(90, 9);
    await beside
      .getByRole('combobox', { name: 'Contribution to' })
      .selectOption({ label: 'First, Empty aircraft' });
    expect(Number(await ixz.getAttribute('value'))).toBeCloseTo(90, 9);
    await context.close();
  });
});

describe('the form of a rotor', () => {
  it('draws the arrow as it is typed, names what is wrong at its field, and saves a revision', async () => {
    const { page, context } = await pageOf('weights');
    await page.goto(`${home}/rotating-parts`);
    await page.getByRole('link', { name: 'Add a rotor' }).click();
    await page.getByLabel('Rotor', { exact: true }).fill('Propeller');
    await page.getByLabel('Polar inertia about the spin axis').fill('4,5');
    await page.getByLabel('Yaw').fill('0');
    await page.getByLabel('Pitch').fill('-2');
    await page.getByText('has a decimal comma', { exact: false }).waitFor();
    await page.getByLabel('Sense of a positive speed').selectOption('cw');
    await page.getByText('Clockwise seen from behind.', { exact: false }).waitFor();
    await page.getByLabel('Polar inertia about the spin axis').fill('4.5');
    await page
      .getByText('No operating point yet', { exact: false })
      .or(page.getByText('no operating point yet', { exact: false }))
      .waitFor();
    await page.getByLabel('Reason for this revision').fill('first propeller');
    await page.getByRole('button', { name: 'Save revision 1' }).click();
    await page.getByRole('rowheader', { name: 'Propeller' }).waitFor();
    await page.getByRole('link', { name: 'Change Propeller' }).waitFor();
    await context.close();
  });

  it('does not overwrite what someone else saved meanwhile, and keeps what was typed', async () => {
    const one = await pageOf('weights');
    const other = await pageOf('weights');
    for (const { page } of [one, other]) {
      await page.goto(`${home}/rotating-parts/rotor?rotor=Propeller`);
      await page.getByLabel('Reason for this revision').fill('weighed');
    }
    await one.page.getByLabel('Polar inertia about the spin axis').fill('4.6');
    await one.page.getByRole('button', { name: 'Save revision 2' }).click();
    await one.page.getByRole('rowheader', { name: 'Propeller' }).waitFor();
    await other.page.getByLabel('Blades').fill('4');
    await other.page.getByRole('button', { name: 'Save revision 2' }).click();
    await other.page.getByText('was made meanwhile', { exact: false }).waitFor();
    expect(await other.page.getByLabel('Blades').inputValue()).toBe('4');
    const revisions = await people.db
      .selectFrom('rotor_revisions')
      .select(['number', 'rotors'])
      .where('program_id', '=', people.program.id)
      .orderBy('number')
      .execute();
    expect(revisions.map(({ number }) => number)).toEqual([1, 2]);
    expect(revisions[1]?.rotors[0]).toMatchObject({ polarInertia: 4.6, blades: null });
    await one.context.close();
    await other.context.close();
  });
});
