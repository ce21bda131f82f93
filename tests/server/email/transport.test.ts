import { expect, it } from 'vitest';
import { renderMail } from '@/lib/server/email/render';
import { sendMail } from '@/lib/server/email/transport';
import { linkIn, waitForMail } from '../../support/mailbox';

it('arrives at the relay with both parts, and its link leads to APP_URL', async () => {
  const to = 'reader.ü@mail-test.example';
  const parts = renderMail(
    [
      { kind: 'paragraph', text: 'Come in.' },
      { kind: 'link', label: 'Accept', path: '/invitations/abc_-1' },
    ],
    'http://polhode.example',
  );
  await sendMail({ to, subject: 'Invitation to “Dunlin 40”', ...parts });
  const mail = await waitForMail(to, 'Invitation');
  expect(mail.subject).toBe('Invitation to “Dunlin 40”');
  expect(mail.from).toContain('no-reply@polhode.example');
  expect(mail.html).toContain('Come in.');
  expect(linkIn(mail)).toBe('http://polhode.example/invitations/abc_-1');
});

it('goes to one address only, whatever the address contains', async () => {
  await expect(
    sendMail({ to: 'a@x.example, b@x.example', subject: 's', text: 't', html: 'h' }),
  ).rejects.toThrow(/recipient/i);
});

it('cannot be given further headers through its subject', async () => {
  const to = 'header@mail-test.example';
  await sendMail({ to, subject: 'One\r\nBcc: other@mail-test.example', text: 't', html: 'h' });
  const mail = await waitForMail(to);
  expect(mail.to).toEqual([to]);
  expect(mail.subject).toBe('One Bcc: other@mail-test.example');
});
