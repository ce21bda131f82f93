import { mkdtempSync, readdirSync, rmSync } from 'node:fs';
import os from 'node:os';
import path from 'node:path';
import nodemailer from 'nodemailer';
import { afterEach, beforeEach, expect, it } from 'vitest';
import { type Mail } from '@/lib/server/fakes/mail/mailbox';
import { type MailFake, startMailFake } from '@/lib/server/fakes/mail/server';

let folder: string;
let fake: MailFake;

beforeEach(async () => {
  folder = mkdtempSync(path.join(os.tmpdir(), 'polhode-mail-'));
  fake = await startMailFake({ smtpPort: 0, webPort: 0, folder });
});
afterEach(async () => {
  await fake.close();
  rmSync(folder, { recursive: true });
});

const send = (to: string, subject: string, html = '<p>Hello</p>') =>
  nodemailer.createTransport(fake.smtpUrl).sendMail({
    from: 'Polhode <no-reply@polhode.example>',
    to,
    subject,
    text: 'See http://a.example/x?y=1',
    html,
  });

const list = async (query = '') => (await (await fetch(`${fake.webUrl}/api/mails${query}`)).json()) as Mail[];

it('keeps what it is sent, newest first, and finds it by the address', async () => {
  await send('a@x.example', 'One');
  await send('b@x.example', 'Two, ü');
  expect((await list()).map(({ subject }) => subject)).toEqual(['Two, ü', 'One']);
  const [mail] = await list('?to=A@x.example');
  expect(mail).toMatchObject({ to: ['a@x.example'], subject: 'One', html: '<p>Hello</p>' });
  expect(mail?.text).toContain('http://a.example/x?y=1');
});

it('removes the mail of one address, or all', async () => {
  await send('a@x.example', 'One');
  await send('b@x.example', 'Two');
  await fetch(`${fake.webUrl}/api/mails?to=a@x.example`, { method: 'DELETE' });
  expect((await list()).map(({ subject }) => subject)).toEqual(['Two']);
  await fetch(`${fake.webUrl}/api/mails`, { method: 'DELETE' });
  expect(await list()).toEqual([]);
  expect(readdirSync(folder)).toEqual([]);
});

it('has after a restart what it had before', async () => {
  await send('a@x.example', 'One');
  const [before] = await list();
  await fake.close();
  fake = await startMailFake({ smtpPort: 0, webPort: 0, folder });
  expect(await list()).toEqual([before]);
});

it('shows a message without letting its HTML run, and its links live', async () => {
  await send('a@x.example', 'One <b>', '<script>parent.x = 1</script>');
  const [mail] = await list();
  const page = await (await fetch(`${fake.webUrl}/mails/${mail?.id}`)).text();
  expect(page).toContain('One &lt;b&gt;');
  expect(page).toContain('srcdoc="&lt;script&gt;');
  expect(page).not.toMatch(/sandbox="[^"]*allow-scripts/);
  expect(page).toContain('<a href="http://a.example/x?y=1">');
  expect(await (await fetch(fake.webUrl)).text()).toContain(`/mails/${mail?.id}`);
});
