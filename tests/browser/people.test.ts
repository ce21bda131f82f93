import { type Browser, type BrowserContext, type Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { openBrowser } from '../support/browser';
import { linkIn, waitForMail } from '../support/mailbox';
import { testWeb } from '../support/web';
import { type WebPeople, webPeople } from '../support/web-people';

const { url } = testWeb();
const PASSWORD = 'correct horse battery';
let people: WebPeople;
let browser: Browser;

beforeAll(async () => {
  people = await webPeople('people-flow', PASSWORD);
  browser = await openBrowser();
});
afterAll(async () => {
  await browser.close();
  await people.close();
});

/** A page of its own whose console must stay silent about scripts that the policy refused. */
async function fresh(): Promise<{ page: Page; context: BrowserContext; refused: string[] }> {
  const context = await browser.newContext();
  const page = await context.newPage();
  const refused: string[] = [];
  page.on('console', (message) => {
    if (/content security policy/i.test(message.text())) refused.push(message.text());
  });
  page.on('pageerror', (error) => refused.push(error.message));
  return { page, context, refused };
}

async function signIn(page: Page, email: string, password = PASSWORD): Promise<void> {
  await page.getByLabel('Mail address').fill(email);
  await page.getByLabel('Password').fill(password);
  await page.getByRole('button', { name: 'Sign in' }).click();
}

describe('a newcomer', () => {
  it('is invited by an administrator, follows the link from the mail, joins, signs out and in again', async () => {
    const admin = await fresh();
    await admin.page.goto(`${url}/admin`);
    expect(new URL(admin.page.url()).pathname).toBe('/sign-in');
    await signIn(admin.page, people.emails.admin);
    await admin.page.waitForURL(`${url}/admin`);
    const invite = admin.page.locator('form', {
      has: admin.page.getByRole('button', { name: 'Invite person' }),
    });
    await invite.getByLabel('Mail address').fill('newcomer@people-flow.example');
    await invite.getByLabel('Name').fill('Una Newcomer');
    await invite.getByRole('button', { name: 'Invite person' }).click();
    await admin.page.getByText('An invitation is on its way to newcomer@people-flow.example.').waitFor();
    expect(admin.refused).toEqual([]);

    const link = linkIn(await waitForMail('newcomer@people-flow.example', 'invited'));
    expect(link.startsWith(`${url}/invitation/`)).toBe(true);
    const { page, refused } = await fresh();
    await page.goto(link);
    await page.getByLabel('New password', { exact: true }).fill(PASSWORD);
    await page.getByLabel('New password again').fill('something else!');
    await page.getByRole('button', { name: 'Join Polhode' }).click();
    await page.getByText('The two passwords differ.').waitFor();
    await page.getByLabel('New password', { exact: true }).fill(PASSWORD);
    await page.getByLabel('New password again').fill(PASSWORD);
    await page.getByRole('button', { name: 'Join Polhode' }).click();
    await page.getByText('You belong to no program yet').waitFor();
    await page.getByRole('button', { name: 'Sign out' }).click();
    await page.waitForURL(`${url}/sign-in`);
    await signIn(page, 'newcomer@people-flow.example');
    await page.getByRole('link', { name: 'Una Newcomer' }).waitFor();

    await page.context().clearCookies();
    await page.goto(link);
    await page.getByText('This invitation no longer works').waitFor();
    expect(refused).toEqual([]);
  });
});

describe('sign-in', () => {
  it('keeps the address typed and says the same for a wrong password and an unknown address', async () => {
    const { page } = await fresh();
    await page.goto(`${url}/sign-in`);
    for (const email of [people.emails.chief, 'unknown@people-flow.example']) {
      await signIn(page, email, 'wrong');
      await page.getByText('No account has this address with this password.').waitFor();
      expect(await page.getByLabel('Mail address').inputValue()).toBe(email);
    }
  });

  it('leads on to a path of ours only', async () => {
    const { page } = await fresh();
    await page.goto(`${url}/sign-in?next=${encodeURIComponent('https://evil.example/')}`);
    await signIn(page, people.emails.outsider);
    await page.waitForURL(`${url}/`);
  });

  it('records the connection’s address, not one that the client claims', async () => {
    const context = await browser.newContext({
      extraHTTPHeaders: { 'x-forwarded-for': '203.0.113.9', 'x-polhode-peer': '203.0.113.9' },
    });
    const page = await context.newPage();
    await page.goto(`${url}/sign-in`);
    await signIn(page, people.emails.weights);
    await page.waitForURL(`${url}/`);
    const sessions = await people.db
      .selectFrom('sessions')
      .select('address')
      .where('user_id', '=', people.ids.weights)
      .execute();
    expect(sessions.map(({ address }) => address)).toEqual(['127.0.0.1', '127.0.0.1']);
  });
});

describe('an account', () => {
  it('makes a token, shown once, that opens the API until it is revoked', async () => {
    const { page, refused } = await fresh();
    await page.goto(`${url}/account`);
    await signIn(page, people.emails.simulation);
    await page.getByLabel('Name').fill('simulator');
    await page.getByRole('button', { name: 'Make token' }).click();
    const token = (await page.locator('[data-token]').textContent()) ?? '';
    expect(token).toMatch(/^polhode_[A-Za-z0-9_-]{43}$/);
    const ask = () => fetch(`${url}/api/v1/programs`, { headers: { authorization: `Bearer ${token}` } });
    const answer = (await (await ask()).json()) as { programs: { program: string }[] };
    expect(answer.programs.map(({ program }) => program)).toEqual([people.program.code]);
    await page.reload();
    expect(await page.locator('[data-token]').count()).toBe(0);
    expect(await page.content()).not.toContain(token);
    await page.getByRole('button', { name: 'Revoke token' }).click();
    await page.getByText(/^Revoked/).waitFor();
    expect((await ask()).status).toBe(401);
    expect(refused).toEqual([]);
  });

  it('changes its password, stays signed in here and is signed out elsewhere', async () => {
    const [here, there] = [await fresh(), await fresh()];
    for (const { page } of [here, there]) {
      await page.goto(`${url}/account`);
      await signIn(page, people.emails.chief);
      await page.getByRole('button', { name: 'Change password' }).waitFor();
    }
    const before = (await here.context.cookies()).find(({ name }) => name === 'polhode')?.value;
    await here.page.getByLabel('Present password').fill(PASSWORD);
    await here.page.getByLabel('New password', { exact: true }).fill('another long password');
    await here.page.getByLabel('New password again').fill('another long password');
    await here.page.getByRole('button', { name: 'Change password' }).click();
    await here.page.getByText('The password is changed. Every other session has ended.').waitFor();
    expect((await here.context.cookies()).find(({ name }) => name === 'polhode')?.value).not.toBe(before);
    await here.page.reload();
    expect(new URL(here.page.url()).pathname).toBe('/account');
    await there.page.reload();
    expect(new URL(there.page.url()).pathname).toBe('/sign-in');
  });
});

describe('the answers', () => {
  it('of pages carry a policy with a nonce that is new each time, and no unsafe inline scripts', async () => {
    const policies = await Promise.all(
      [1, 2].map(async () => (await fetch(`${url}/sign-in`)).headers.get('content-security-policy') ?? ''),
    );
    const nonces = policies.map((policy) => /'nonce-([^']+)'/.exec(policy)?.[1]);
    expect(nonces[0]).toBeTruthy();
    expect(nonces[0]).not.toBe(nonces[1]);
    for (const policy of policies) {
      const scripts = policy.split('; ').find((one) => one.startsWith('script-src')) ?? '';
      expect(scripts).not.toMatch(/unsafe-(inline|eval)/);
      expect(policy).toContain("frame-ancestors 'none'");
      expect(policy).toContain("object-src 'none'");
    }
  });

  it.each(['/sign-in', '/api/v1/health', '/api/v1/programs'])(
    'of %s carry the fixed headers',
    async (path) => {
      const { headers } = await fetch(url + path);
      expect(headers.get('x-content-type-options')).toBe('nosniff');
      expect(headers.get('referrer-policy')).toBe('same-origin');
      expect(headers.get('permissions-policy')).toContain('camera=()');
      expect(headers.get('content-security-policy')).toContain("frame-ancestors 'none'");
      expect(headers.get('x-powered-by')).toBeNull();
      expect(headers.get('strict-transport-security')).toBeNull();
    },
  );
});
