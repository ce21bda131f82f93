import { execFile } from 'node:child_process';
import { mkdtempSync, readdirSync, readFileSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { promisify } from 'node:util';
import { type Browser } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { withdrawBaseline } from '@/lib/server/baselines/withdraw-baseline';
import { sessionCookie, startSession } from '@/lib/server/auth/session';
import { type Person } from '@/lib/server/actor';
import { type Role, tokensOf } from '@/tests/server/api/baseline-tokens';
import { openBrowser } from '@/tests/support/browser';
import { addPerson, programUnderTest, type ProgramUnderTest } from '@/tests/support/program';
import { fillProgram, signed } from '@/tests/support/signed';
import { type RunningWeb, startWeb } from '@/tests/support/web-server';

const run = promisify(execFile);

let test: ProgramUnderTest;
let web: RunningWeb;
let browser: Browser;
let tokens: Record<Role, string>;
let folder: string;
const digests: string[] = [];

beforeAll(async () => {
  test = await programUnderTest('hopper');
  await fillProgram(test);
  digests.push((await signed(test, { code: 'first', title: 'First account' })).digest);
  digests.push((await signed(test, { code: 'second', title: 'Radar moved' })).digest);
  tokens = await tokensOf(test);
  web = await startWeb('hand-off', test.appUrl);
  browser = await openBrowser();
  folder = mkdtempSync(path.join(tmpdir(), 'hand-off-'));
}, 400_000);
afterAll(async () => {
  await browser.close();
  await web.stop();
  await test.close();
  rmSync(folder, { recursive: true });
});

async function cookieOf(person: Person): Promise<{ name: string; value: string }> {
  return {
    name: sessionCookie(web.url).name,
    value: await startSession(test.pool, person.userId, '127.0.0.1'),
  };
}

async function openAs(person: Person, at: string) {
  const context = await browser.newContext();
  await context.addCookies([{ ...(await cookieOf(person)), url: web.url }]);
  const page = await context.newPage();
  await page.goto(`${web.url}/programs/hopper${at}`);
  return page;
}

const linesOn = async (at: string, person = test.crew.simulation): Promise<string[]> => {
  const page = await openAs(person, at);
  const lines = await page.locator('[data-line]').allTextContents();
  await page.context().close();
  return lines;
};

/** Runs lines in one shell, as someone who pastes them. */
const paste = (...lines: string[]) => run('sh', ['-e', '-c', lines.join('\n')], { cwd: folder });

const withToken = (token: string): string => `export TOKEN='${token}'`;

const api = (rest: string, init: RequestInit = {}, token = tokens.simulation): Promise<Response> =>
  fetch(`${web.url}/api/v1/programs/hopper/baselines/${rest}`, {
    ...init,
    headers: { Authorization: `Bearer ${token}` },
  });

async function download(rest: string, person: Person | null): Promise<Response> {
  const cookie = person === null ? null : await cookieOf(person);
  return fetch(`${web.url}/api/internal/programs/hopper/baselines/${rest}`, {
    headers: cookie === null ? {} : { Cookie: `${cookie.name}=${cookie.value}` },
  });
}

describe('the lines of the hand-off page', () => {
  it('work when they are pasted into a shell, and write what the API answers', async () => {
    const [first, ...lines] = await linesOn('/hand-off');
    expect(first).toBe("export TOKEN='paste the token here'");
    expect(lines.length).toBe(6);
    const { stdout } = await paste(withToken(tokens.simulation), ...lines);
    const document = await (await api('2')).text();
    const file = (name: string) => readFileSync(path.join(folder, name), 'utf8');
    expect(readdirSync(folder).toSorted()).toEqual([
      'hopper-baseline-2.csv',
      'hopper-baseline-2.json',
      'hopper-design.etag',
      'hopper-design.json',
    ]);
    expect(file('hopper-design.json')).toBe(document);
    expect(file('hopper-baseline-2.json')).toBe(document);
    expect(file('hopper-baseline-2.csv')).toBe(await (await api('2.csv')).text());
    expect(stdout).toContain('"inertia":"slug.ft2"');
    expect(stdout).toContain('"operatingPoint":"cruise"');
  });

  it('asked again write nothing new while nothing has changed', async () => {
    const lines = await linesOn('/hand-off');
    const conditional = lines.find((line) => line.includes('--etag-compare')) ?? '';
    const before = readFileSync(path.join(folder, 'hopper-design.json'), 'utf8');
    const { stdout } = await paste(withToken(tokens.simulation), `${conditional} -w '%{http_code}'`);
    expect(stdout).toBe('304');
    expect(readFileSync(path.join(folder, 'hopper-design.json'), 'utf8')).toBe(before);
  });

  it('fail with a token that does not reach the program, and write no file', async () => {
    const before = readdirSync(folder).length;
    const [, line = ''] = await linesOn('/hand-off');
    const failed = paste(withToken(tokens.limited), line.replace('hopper-design.json', 'refused.json'));
    await expect(failed).rejects.toMatchObject({ stderr: expect.stringContaining('404') as string });
    expect(readdirSync(folder)).toHaveLength(before);
  });

  it('are what a simulation engineer finds on the program first, beside the digest and the sign of the products', async () => {
    const page = await openAs(test.crew.simulation, '');
    const text = await page.locator('main').innerText();
    expect(text).toContain(digests[1]);
    expect(text).toContain('Products: positive integral');
    const lines = await page.locator('[data-line]').allTextContents();
    const { stdout } = await paste(withToken(tokens.simulation), `${lines[0]} -w '%{http_code}'`);
    expect([lines.length, stdout]).toEqual([1, '200']);
    await page.context().close();
  });

  it('of a superseded baseline ask for it by number only, and the page says what it is', async () => {
    const page = await openAs(test.crew.chief, '/hand-off?baseline=1');
    const lines = await page.locator('[data-line]').allTextContents();
    expect(lines.filter((line) => line.includes('current'))).toEqual([]);
    expect(await page.locator('main').innerText()).toContain(
      'Baseline 1 is not the current one of its build',
    );
    await page.context().close();
  });
});

describe('the hand-off page', () => {
  it('makes a token for this program only, shown once, with which the lines work', async () => {
    const page = await openAs(test.crew.simulation, '/hand-off');
    await page.getByLabel('Name').fill('iron bird');
    await page.getByRole('button', { name: 'Make token' }).click();
    const token = (await page.locator('[data-token]').textContent()) ?? '';
    const lines = await page.locator('[data-line]').allTextContents();
    expect(lines).toContain(withToken(token));
    expect((await api('current', {}, token)).status).toBe(200);
    const programs = await fetch(`${web.url}/api/v1/programs`, {
      headers: { Authorization: `Bearer ${token}` },
    });
    expect(((await programs.json()) as { programs: object[] }).programs).toMatchObject([
      { program: 'hopper' },
    ]);
    await page.reload();
    expect(await page.locator('[data-token]').count()).toBe(0);
    expect(
      await page.getByRole('region', { name: 'Your tokens that read this program' }).innerText(),
    ).toContain('iron bird');
    await page.context().close();
  });

  it('states the product of the document as positive integral and its element as minus it', async () => {
    const page = await openAs(test.crew.weights, '/hand-off');
    const shown = await page
      .locator('figure data')
      .evaluateAll((all) => all.map((one) => one.getAttribute('value')));
    const { conditions } = (await (await api('2')).json()) as {
      conditions: { inertia: { ixz: number; tensor: number[][] } }[];
    };
    const { ixz, tensor } = conditions[0]?.inertia ?? { ixz: NaN, tensor: [] };
    expect(shown.map(Number)).toEqual([ixz, tensor[0]?.[2]]);
    await page.context().close();
  });
});

describe('downloads', () => {
  it.each([
    ['2/document', '2', 'hopper-baseline-2.json', 'application/json'],
    ['2/document?units=us', '2?units=us', 'hopper-baseline-2-us.json', 'application/json'],
    ['1/document', '1', 'hopper-baseline-1-superseded.json', 'application/json'],
    ['2/conditions', '2.csv', 'hopper-baseline-2.csv', 'text/csv; charset=utf-8'],
    [
      '1/conditions?units=us',
      '1.csv?units=us',
      'hopper-baseline-1-superseded-us.csv',
      'text/csv; charset=utf-8',
    ],
  ])('%s is what the API answers, as an attachment', async (rest, asApi, name, type) => {
    const { status, headers, ...answer } = await fetched(await download(rest, test.crew.simulation));
    expect([status, answer.text]).toEqual([200, await (await api(asApi)).text()]);
    expect(headers.get('content-disposition')).toContain(`attachment; filename="${name}"`);
    expect([headers.get('content-type'), headers.get('cache-control')]).toEqual([type, 'private, no-store']);
  });

  it('are for members with a session; a token does not open them', async () => {
    for (const rest of ['2/document', '2/conditions']) {
      expect((await download(rest, null)).status).toBe(401);
      expect((await download(rest, await addPerson(test.db, `stranger-${rest[2]}`, false))).status).toBe(404);
      const byToken = await fetch(`${web.url}/api/internal/programs/hopper/baselines/${rest}`, {
        headers: { Authorization: `Bearer ${tokens.simulation}` },
      });
      expect(byToken.status).toBe(401);
      expect((await download(rest.replace('2', '9'), test.crew.weights)).status).toBe(404);
    }
  });
});

async function fetched(response: Response) {
  return { status: response.status, headers: response.headers, text: await response.text() };
}

describe('HEAD', () => {
  it.each(['2', 'current?units=us', '2.csv', '2/conditions/ferry', '2/angular-momentum?point=cruise'])(
    '%s has the headers of GET and no body',
    async (rest) => {
      const [get, head] = [await api(rest), await api(rest, { method: 'HEAD' })];
      expect([head.status, await head.text()]).toEqual([200, '']);
      for (const name of ['etag', 'content-type', 'cache-control'])
        expect([name, head.headers.get(name)]).toEqual([name, get.headers.get(name)]);
      expect(get.headers.get('etag')).toMatch(/^"/);
    },
  );
});

describe('when the newest baseline is withdrawn', () => {
  it('the line for the current one fails, keeps the file there is, and is no longer offered', async () => {
    const [, line = ''] = await linesOn('/hand-off');
    expect(line).toContain('current');
    const kept = readFileSync(path.join(folder, 'hopper-design.json'), 'utf8');
    const { db, program, crew } = test;
    await withdrawBaseline(db, { person: crew.chief, program, number: 2, reason: 'radar weighed twice' });
    const failed = paste(withToken(tokens.simulation), line);
    await expect(failed).rejects.toMatchObject({ stderr: expect.stringContaining('410') as string });
    expect(readFileSync(path.join(folder, 'hopper-design.json'), 'utf8')).toBe(kept);
    expect((await linesOn('/hand-off')).filter((one) => one.includes('current'))).toEqual([]);
    const home = await openAs(crew.simulation, '');
    expect(await home.locator('main').innerText()).toContain('Do not use baseline 2 any longer');
    expect(await home.locator('[data-line]').count()).toBe(0);
    await home.context().close();
    const { headers } = await fetched(await download('2/document', crew.simulation));
    expect(headers.get('content-disposition')).toContain('hopper-baseline-2-withdrawn.json');
  });
});
