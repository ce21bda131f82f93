import { type Task } from 'graphile-worker';
import { z } from 'zod';
import { serverDb } from '@/lib/server/database';
import { renderMail } from '@/lib/server/email/render';
import { sendMail } from '@/lib/server/email/transport';
import { env } from '@/lib/server/env';
import { prepareLinkMail } from '@/lib/server/people/link-mail';

const payloadSchema = z.object({ email: z.string(), purpose: z.enum(['invitation', 'password-reset']) });

/**
 * Makes a link and mails it. The secret is made here, so that it is neither in the queue nor anywhere else but in the message; a
 * second try makes another and the first one's no longer works.
 */
export const sendLinkMailTask: Task = async (payload) => {
  const mail = await prepareLinkMail(serverDb(), payloadSchema.parse(payload));
  if (mail) await sendMail({ to: mail.to, subject: mail.subject, ...renderMail(mail.blocks, env().APP_URL) });
};
