import { createHash, randomUUID } from 'node:crypto';
import canonicalize from 'canonicalize';
import { type Browser, type Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { createDb, createPool, type Db } from '@/db/client';
import { openBrowser } from '../support/browser';
import { linkIn, waitForMail } from '../support/mailbox';
import { makePerson } from '../support/people';
import { testWeb } from '../support/web';
import { byHand } from './story-by-hand';
import { engineSays, membersOf } from './story-engine';
import {
  BOX,
  FRAME,
  LIST_DECLARATIONS,
  POINTS,
  RIGHT_LIST,
  ROTOR_INERTIA_UNIT,
  ROTORS,
  SECOND_LIST,
  WRONG_LIST,
} from './story-inputs';

/* The main job from the first file to the last pull, by the three people it is for. Every step stands on the one before. */

const { url, appUrl } = testWeb();
const CODE = `story-${randomUUID().slice(0, 8)}`;
const TITLE = `Hopper ${CODE}`;
const HOME = `${url}/programs/${CODE}`;
const PASSWORD = 'three words and four';
const NAMES = {
  admin: 'Ada Admin',
  chief: 'Carl Chief',
  weights: 'Wanda Weights',
  simulation: 'Sam Simulation',
} as const;
type Role = keyof typeof NAMES;
const mailOf = (role: Role) => `${role}@${CODE}.example`;

let db: Db;
let browser: Browser;
const pages = new Map<Role, Page>();
const failures: string[] = [];

beforeAll(async () => {
  db = createDb(createPool(appUrl, 2, (error) => failures.push(error.message)));
  await makePerson(db, { email: mailOf('admin'), name: NAMES.admin, password: PASSWORD, admin: true });
  browser = await openBrowser();
});
afterAll(async () => {
  await browser.close();
  await db.destroy();
});

/** The browser of one person, opened once; nothing may go wrong in it unseen. */
async function at(role: Role): Promise<Page> {
  const open = pages.get(role);
  if (open) return open;
  const context = await browser.newContext({ viewport: { width: 1440, height: 1000 } });
  const page = await context.newPage();
  page.setDefaultTimeout(30_000);
  page.on('console', (message) => {
    if (/content security policy|hydrat/i.test(message.text())) failures.push(message.text());
  });
  page.on('pageerror', (error) => failures.push(error.message));
  pages.set(role, page);
  return page;
}

async function fill(page: Page, fields: Readonly<Record<string, string>>): Promise<void> {
  for (const [label, text] of Object.entries(fields))
    await page.getByLabel(new RegExp(`^${label}(?: \\(optional\\))?$`)).fill(text);
}

const press = (page: Page, name: string) => page.getByRole('button', { name, exact: true }).click();

/** Follows the invitation out of the mail that was delivered, and joins. */
async function join(role: Role): Promise<void> {
  const page = await at(role);
  await page.goto(linkIn(await waitForMail(mailOf(role), 'invited')));
  await fill(page, { 'Your name': NAMES[role], 'New password': PASSWORD, 'New password again': PASSWORD });
  await press(page, 'Join Polhode');
  await page.getByRole('link', { name: NAMES[role] }).waitFor();
}

async function addMember(chief: Page, role: Role, words: string): Promise<void> {
  await chief.goto(`${HOME}/settings/members`);
  await fill(chief, { 'Mail address': mailOf(role), Name: NAMES[role] });
  await chief.getByRole('combobox', { name: 'Role' }).last().selectOption({ label: words });
  await press(chief, 'Add member');
  await chief.getByRole('table').getByText(NAMES[role]).waitFor();
}

async function upload(page: Page, address: string, name: string, text: string, reason: string) {
  await page.goto(address);
  const buffer = Buffer.from(text);
  await page.getByLabel('File', { exact: true }).setInputFiles({ name, mimeType: 'text/csv', buffer });
  await page.getByLabel('Reason for this revision').fill(reason);
  await press(page, 'Upload file');
}

async function answerWarnings(page: Page, words: string): Promise<void> {
  for (const field of await page.getByLabel(/^Answer to warning/).all()) await field.fill(words);
}

/** The number in large, as it is shown: kg with six digits or as many as its σ supports. */
async function shownMass(page: Page): Promise<number> {
  const text = await page.locator('.text-total').first().innerText();
  return Number(text.replace(/[^\d.]/g, ''));
}

let token = '';
const ask = (path: string, headers: Record<string, string> = {}) =>
  fetch(`${url}/api/v1/programs/${CODE}${path}`, {
    headers: { authorization: `Bearer ${token}`, ...headers },
  });
type Answer = Readonly<Record<string, unknown>>;
const body = async (response: Response) => (await response.json()) as Answer;

/** The digest of an answer, taken anew over what was received. */
function recomputed({ digest: _digest, state: _state, ...document }: Answer): string {
  const text = canonicalize(document) ?? '';
  return `sha256:${createHash('sha256').update(text, 'utf8').digest('hex')}`;
}

/** The chief engineer opens the link out of the mail and signs what it leads to. */
async function reviewAndSign(title: string, number: number): Promise<Page> {
  const chief = await at('chief');
  const mail = await waitForMail(mailOf('chief'), `"${title}" waits for a decision`);
  expect(mail.html).toContain(linkIn(mail));
  await chief.goto(linkIn(mail));
  await chief.getByRole('heading', { name: title }).waitFor();
  await fill(chief, { 'Your password': PASSWORD });
  await press(chief, `Sign baseline ${number}`);
  await chief.waitForURL(`${HOME}/baselines/${number}`);
  return chief;
}

describe('from the first file to the last pull', () => {
  it('an administrator makes the program, and everyone joins by the link in their mail', async () => {
    const admin = await at('admin');
    await admin.goto(`${url}/admin`);
    await fill(admin, { 'Mail address': mailOf('admin'), Password: PASSWORD });
    await press(admin, 'Sign in');
    await admin.waitForURL(`${url}/admin`);
    await fill(admin, {
      Title: TITLE,
      Code: CODE,
      'First chief engineer, mail address': mailOf('chief'),
      'First chief engineer, name': NAMES.chief,
    });
    await press(admin, 'Make program');
    await admin.getByRole('link', { name: TITLE }).waitFor();
    await join('chief');
    const chief = await at('chief');
    await addMember(chief, 'weights', 'Weights engineer');
    await addMember(chief, 'simulation', 'Simulation engineer');
    await join('weights');
    await join('simulation');
  });

  it('the chief engineer issues the airframe frame', async () => {
    const chief = await at('chief');
    await chief.goto(`${HOME}/settings/frame-issue?length=m`);
    await fill(chief, {
      Title: 'Layout of the first day',
      'LEMAC x': String(FRAME.lemac[0]),
      'LEMAC y': String(FRAME.lemac[1]),
      'LEMAC z': String(FRAME.lemac[2]),
      MAC: String(FRAME.mac),
      Span: String(FRAME.span),
      Length: String(FRAME.length),
      'Incidence of body x': String(FRAME.incidence),
      'Valid from': '2026-01-05',
      Reason: 'The first layout.',
    });
    await press(chief, 'Issue frame 1');
    await chief.waitForURL(`${HOME}/settings**`);
    await chief.getByText('Layout of the first day').first().waitFor();
  });

  it('the weights engineer uploads a list, reads what is wrong with it, and uploads it put right', async () => {
    const weights = await at('weights');
    await weights.goto(`${HOME}/lists/new`);
    await fill(weights, { Title: 'Whole aircraft', Code: 'whole' });
    await weights.getByLabel('Mass', { exact: true }).selectOption(LIST_DECLARATIONS.mass_unit);
    await weights.getByLabel('Length', { exact: true }).selectOption(LIST_DECLARATIONS.length_unit);
    await weights.getByLabel('Inertia', { exact: true }).selectOption(LIST_DECLARATIONS.inertia_unit);
    await weights.getByLabel('Negative integral').check();
    await press(weights, 'Add list');
    const form = `${HOME}/lists/whole/upload`;
    await weights.waitForURL(form);
    await upload(weights, form, 'whole-a.csv', WRONG_LIST, 'First issue.');
    await weights.getByText('The file has 3 problems').waitFor();
    const problems = await weights.locator('main tbody tr').allInnerTexts();
    const places = problems.map((text) =>
      text
        .split('\t')
        .slice(0, 3)
        .map((cell) => cell.trim()),
    );
    expect(places).toEqual([
      ['2', 'mass', '2210,5'],
      ['4', 'item', 'W-1'],
      ['5', 'x', ''],
    ]);
    await upload(weights, form, 'whole-b.csv', RIGHT_LIST, 'First issue, put right.');
    await weights.waitForURL(/\/lists\/whole\?revision=1$/);
    await weights.getByText('6 rows', { exact: true }).waitFor();
  });

  it('and the rotating parts with their operating points', async () => {
    const weights = await at('weights');
    const form = `${HOME}/rotating-parts/upload`;
    await weights.goto(form);
    await weights.getByLabel('Unit of the inertias in the file').selectOption(ROTOR_INERTIA_UNIT);
    await weights
      .getByLabel('File', { exact: true })
      .setInputFiles({ name: 'rotors.csv', mimeType: 'text/csv', buffer: Buffer.from(ROTORS) });
    await weights.getByLabel('Reason for this revision').fill('From the engine maker.');
    await press(weights, 'Upload file');
    await weights.getByText('Revision 1 is in force: 3 rotors.').waitFor();
    await upload(weights, `${form}?content=points`, 'points.csv', POINTS, 'Two points for a start.');
    await weights.getByText('Revision 2 is in force: 2 operating points.').waitFor();
  });

  it('makes a configuration of them with a second condition, and rolls it up to what the engine says', async () => {
    const weights = await at('weights');
    await weights.goto(`${HOME}/configurations`);
    await fill(weights, { Title: 'First design', Code: 'first' });
    await press(weights, 'Make configuration');
    await weights.waitForURL(`${HOME}/configurations/first`);
    await weights.goto(`${HOME}/configurations/first/conditions?edit=&mass=kg&length=m`);
    await fill(weights, { Title: 'Ferry with spares', Code: 'ferry' });
    await press(weights, 'Add item');
    await fill(weights, {
      'Name of item 1': BOX.name,
      'mass of item 1, kg': BOX.mass,
      'x of item 1, m': BOX.x,
      'y of item 1, m': BOX.y,
      'z of item 1, m': BOX.z,
    });
    await press(weights, 'Add condition');
    await weights.getByRole('row', { name: /Ferry with spares/ }).waitFor();
    await weights.goto(`${HOME}/configurations/first`);
    await weights.getByRole('button', { name: 'Roll up' }).first().click();
    await weights.getByRole('link', { name: 'Submit for approval' }).waitFor();
    expect(await shownMass(weights)).toBeCloseTo(byHand(RIGHT_LIST).mass, 0);
  });

  it('submits it, once the warning about the pod is answered', async () => {
    const weights = await at('weights');
    await weights.getByRole('link', { name: 'Submit for approval' }).click();
    await weights.getByText('1 heavy row states no moments of its own').waitFor();
    await fill(weights, { Title: 'First account', Reason: 'For the first flight simulator.' });
    await answerWarnings(weights, 'A pod of 0.3 m at the tip: its own inertia is noise.');
    await press(weights, 'Submit for approval');
    await weights.waitForURL(/\/submissions\//);
    await weights.getByText('Only a chief engineer').waitFor();
    expect(await weights.getByLabel('Your password').count()).toBe(0);
  });

  it('the chief engineer follows the mail, reads, is refused with a wrong password, and signs with the right one', async () => {
    const chief = await at('chief');
    const mail = await waitForMail(mailOf('chief'), '"First account" waits for a decision');
    await chief.goto(linkIn(mail));
    await chief.getByText('The build has no current baseline: everything is new.').waitFor();
    await chief.getByText('its own inertia is noise').waitFor();
    expect(await shownMass(chief)).toBeCloseTo(byHand(RIGHT_LIST).mass, 0);
    await fill(chief, { 'Your password': 'not my password' });
    await press(chief, 'Sign baseline 1');
    await chief.getByText('This is not your password. Nothing was signed.').waitFor();
    await reviewAndSign('First account', 1);
    await chief.getByText('Current', { exact: true }).first().waitFor();
  });

  it('the simulation engineer hears of it, opens it from the mail and makes a token', async () => {
    const simulation = await at('simulation');
    const mail = await waitForMail(mailOf('simulation'), 'baseline 1 is signed');
    expect(linkIn(mail)).toBe(`${HOME}/baselines/1`);
    await simulation.goto(linkIn(mail));
    await simulation.getByRole('heading', { name: /First account/ }).waitFor();
    await simulation.goto(`${url}/account`);
    await fill(simulation, { Name: 'Simulator' });
    await press(simulation, 'Make token');
    token = (await simulation.locator('[data-token]').textContent()) ?? '';
    expect(token).toMatch(/^polhode_/);
  });

  let firstTag = '';
  let firstText = '';
  it("pulls the baseline: the engine's numbers to the last digit, a digest that recomputes, 304 for the same again", async () => {
    const response = await ask('/baselines/current');
    expect(response.status).toBe(200);
    firstTag = response.headers.get('etag') ?? '';
    firstText = await response.text();
    const pulled = JSON.parse(firstText) as Answer & { conditions: { inertia: Record<string, number> }[] };
    expect(pulled).toMatchObject({ baseline: 1, state: 'current', supersedes: null, build: 'design' });
    expect(pulled).toMatchObject(membersOf(await engineSays(RIGHT_LIST)) as Answer);
    const { ixy = 0, ixz = 0, iyz = 0 } = pulled.conditions[0]?.inertia ?? {};
    for (const product of [ixy, ixz, iyz]) expect(Math.abs(product)).toBeGreaterThan(1);
    expect(pulled['digest']).toBe(recomputed(pulled));
    expect((await ask('/baselines/current', { 'if-none-match': firstTag })).status).toBe(304);
  });

  it('and the same as plain arithmetic makes of the file', async () => {
    const hand = byHand(RIGHT_LIST);
    const { conditions } = (await body(await ask('/baselines/1'))) as {
      conditions: { mass: number; cg: { airframe: typeof hand.cg }; inertia: Record<string, number> }[];
    };
    const [empty] = conditions;
    const pairs: [number | undefined, number][] = [
      [empty?.mass, hand.mass],
      [empty?.cg.airframe.x, hand.cg.x],
      [empty?.cg.airframe.y, hand.cg.y],
      [empty?.cg.airframe.z, hand.cg.z],
      [empty?.inertia['ixx'], hand.ixx],
      [empty?.inertia['iyy'], hand.iyy],
      [empty?.inertia['izz'], hand.izz],
      [empty?.inertia['ixz'], hand.ixz],
    ];
    for (const [pulled = NaN, truth] of pairs) expect(Math.abs(pulled / truth - 1)).toBeLessThan(1e-12);
  });

  it('the pod moves: a second submission shows what changes against baseline 1, down to the row', async () => {
    const weights = await at('weights');
    await upload(weights, `${HOME}/lists/whole/upload`, 'whole-c.csv', SECOND_LIST, 'Pod weighed and moved.');
    await weights.waitForURL(/\/lists\/whole\?revision=2$/);
    await weights.goto(`${HOME}/configurations/first`);
    await press(weights, 'Take revision 2');
    await weights.getByText('Out of date').waitFor();
    await weights.getByRole('button', { name: 'Roll up' }).first().click();
    await weights.getByRole('link', { name: 'Submit for approval' }).click();
    await fill(weights, { Title: 'Pod inboard', Reason: 'The pod was weighed.' });
    await answerWarnings(weights, 'As before.');
    await press(weights, 'Submit for approval');
    await weights.waitForURL(/\/submissions\//);

    const chief = await at('chief');
    await chief.goto(linkIn(await waitForMail(mailOf('chief'), '"Pod inboard" waits for a decision')));
    await chief.getByText('Against baseline 1, First account.').waitFor();
    const change = byHand(SECOND_LIST).mass - byHand(RIGHT_LIST).mass;
    await chief
      .getByText(`+${change.toFixed(2)}`)
      .first()
      .waitFor();
    await chief.getByText('1 changed').waitFor();
    await chief.getByRole('link', { name: 'Whole aircraft' }).click();
    await chief.getByRole('heading', { name: 'Rows behind the change' }).waitFor();
    const rows = await chief.locator('main tbody tr').allInnerTexts();
    const cells = rows.map((text) => text.split(/\s+/));
    expect(new Set(cells.map(([item]) => item))).toEqual(new Set(['P-1']));
    expect(cells[0]).toEqual(['P-1', 'Changed', 'mass', '63.75', '66.375', '+2.625']);
  });

  it('signed, it supersedes the first: the ETag changes, the mail arrives, the first is kept as it was', async () => {
    await reviewAndSign('Pod inboard', 2);
    const mail = await waitForMail(mailOf('simulation'), 'baseline 2 is signed');
    expect(mail.text).toContain('It supersedes baseline 1.');
    const response = await ask('/baselines/current', { 'if-none-match': firstTag });
    expect(response.status).toBe(200);
    expect(response.headers.get('etag')).not.toBe(firstTag);
    const pulled = await body(response);
    expect(pulled).toMatchObject({ baseline: 2, state: 'current', supersedes: 1 });
    expect(pulled).toMatchObject(membersOf(await engineSays(SECOND_LIST)) as Answer);
    expect(pulled['digest']).toBe(recomputed(pulled));
    expect(mail.text).toContain(String(pulled['digest']));
    const first = await ask('/baselines/1', { 'if-none-match': firstTag });
    expect(first.status).toBe(200);
    expect(await first.text()).toBe(firstText.replace('"state":"current"', '"state":"superseded"'));
    const simulation = await at('simulation');
    await simulation.goto(`${HOME}/baselines/1`);
    await simulation.getByText('Baseline 1 is not the current one of its build').waitFor();
  });

  it('withdrawn, it is gone: 410 for current and never the older one, and every page and mail says so', async () => {
    const chief = await at('chief');
    await chief.goto(`${HOME}/baselines/2`);
    await press(chief, 'Withdraw baseline 2');
    const dialog = chief.getByRole('alertdialog');
    await dialog.getByLabel('Reason').fill('The pod is not the one that flies.');
    await dialog.getByRole('button', { name: 'Withdraw baseline 2' }).click();
    await chief.getByText('Do not use baseline 2 any longer').waitFor();

    for (const role of ['simulation', 'weights'] as const) {
      const mail = await waitForMail(mailOf(role), 'baseline 2 is withdrawn');
      expect(mail.text).toContain('The pod is not the one that flies.');
    }
    const gone = await ask('/baselines/current');
    expect([gone.status, gone.headers.get('content-type')]).toEqual([410, 'application/problem+json']);
    expect((await body(gone))['detail']).toContain('The pod is not the one that flies.');
    expect(await body(await ask('/baselines/2'))).toMatchObject({ baseline: 2, state: 'withdrawn' });
    const { baselines } = (await body(await ask('/baselines'))) as { baselines: Answer[] };
    expect(baselines.map(({ baseline, state }) => [baseline, state])).toEqual([
      [2, 'withdrawn'],
      [1, 'superseded'],
    ]);

    const simulation = await at('simulation');
    await simulation.goto(linkIn(await waitForMail(mailOf('simulation'), 'baseline 2 is withdrawn')));
    await simulation.getByText('Do not use baseline 2 any longer').waitFor();
    await simulation.getByText('The pod is not the one that flies.').waitFor();
    await simulation.goto(`${HOME}/baselines`);
    await simulation
      .getByRole('row', { name: /Pod inboard/ })
      .getByText('Withdrawn')
      .waitFor();
  });

  it('the trail holds every step with its author', async () => {
    const chief = await at('chief');
    await chief.goto(`${HOME}/trail?subject=baseline`);
    const events = await chief.locator('main tbody tr').allInnerTexts();
    const told = events.map((text) => text.split('\t').slice(1, 3).join(' ').replace(/\s+/g, ' '));
    expect(told).toHaveLength(4);
    for (const [index, words] of ['withdrawn', 'superseded', 'signed', 'signed'].entries()) {
      expect(told[index]?.toLowerCase()).toContain(words);
      expect(told[index]).toContain(NAMES.chief);
    }
  });

  it('and nothing went wrong in any of the browsers', () => {
    expect(failures).toEqual([]);
  });
});
