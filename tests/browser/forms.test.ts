import { type Browser } from 'playwright-core';
import { afterAll, beforeAll, expect, it } from 'vitest';
import { sessionCookie } from '@/lib/server/auth/session';
import { openBrowser } from '../support/browser';
import { testWeb } from '../support/web';
import { type WebPeople, webPeople } from '../support/web-people';

const { url } = testWeb();
let people: WebPeople;
let browser: Browser;

beforeAll(async () => {
  people = await webPeople('forms-flow');
  browser = await openBrowser();
});
afterAll(async () => {
  await browser.close();
  await people.close();
});

it('keeps the axes of a frame that were chosen when the form comes back with an error', async () => {
  const context = await browser.newContext();
  const name = sessionCookie(url).name;
  await context.addCookies([{ name, value: people.cookies.chief.slice(name.length + 1), url }]);
  const page = await context.newPage();
  page.setDefaultTimeout(15_000);
  await page.goto(`${url}/programs/forms-flow/settings/frame-issue?length=m`);
  const words = { x: 'forward', y: 'up', z: 'left' };
  for (const [letter, word] of Object.entries(words)) {
    await page.getByLabel(`+${letter} points`).selectOption(word);
  }
  const figures = { 'LEMAC x': '6', 'LEMAC y': '0', 'LEMAC z': '1', MAC: '2,5', Span: '18', Length: '15' };
  const texts = { Title: 'Layout', 'Plane of symmetry at': '0', 'Incidence of body x': '0', Reason: 'First' };
  for (const [label, text] of Object.entries({ ...figures, ...texts, 'Valid from': '2026-01-05' })) {
    await page.getByLabel(label, { exact: true }).fill(text);
  }
  await page.getByRole('button', { name: 'Issue frame 1' }).click();
  await page.getByText('`2,5` is not a number.', { exact: false }).waitFor();
  for (const [letter, word] of Object.entries(words)) {
    expect(await page.getByLabel(`+${letter} points`).inputValue()).toBe(word);
  }
  await context.close();
});
