import nodemailer, { type Transporter } from 'nodemailer';
import { env } from '@/lib/server/env';

export interface OutgoingMail {
  readonly to: string;
  readonly subject: string;
  readonly text: string;
  readonly html: string;
}

const PATIENCE_MS = 10_000;

let transporter: Transporter | null = null;

function transport(): Transporter {
  transporter ??= nodemailer.createTransport({
    url: env().SMTP_URL,
    connectionTimeout: PATIENCE_MS,
    greetingTimeout: PATIENCE_MS,
    socketTimeout: PATIENCE_MS,
  });
  return transporter;
}

/**
 * Hands one message to the relay of SMTP_URL, from MAIL_FROM. Throws if the relay does not take it: the caller is a job
 * that is retried. Never call it inside a transaction.
 */
export async function sendMail({ to, subject, text, html }: OutgoingMail): Promise<void> {
  // As an object the address is data; as text it would be parsed and could name more than one person.
  await transport().sendMail({ from: env().MAIL_FROM, to: { name: '', address: to }, subject, text, html });
}
