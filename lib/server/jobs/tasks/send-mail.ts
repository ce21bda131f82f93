import { type Task } from 'graphile-worker';
import { z } from 'zod';
import { env } from '@/lib/server/env';
import { renderMail } from '@/lib/server/email/render';
import { sendMail } from '@/lib/server/email/transport';

const text = z.string();
const payloadSchema = z.object({
  to: text,
  subject: text,
  blocks: z.array(
    z.discriminatedUnion('kind', [
      z.object({ kind: z.literal('heading'), text }),
      z.object({ kind: z.literal('paragraph'), text }),
      z.object({ kind: z.literal('link'), label: text, path: text }),
    ]),
  ),
});

/** Sends one queued message. A relay that does not answer makes the queue try again. */
export const sendMailTask: Task = async (payload) => {
  const { to, subject, blocks } = payloadSchema.parse(payload);
  await sendMail({ to, subject, ...renderMail(blocks, env().APP_URL) });
};
