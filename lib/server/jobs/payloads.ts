import { type MailBlock } from '@/lib/server/email/blocks';

/** What each task of the queue takes. */
export interface JobPayloads {
  'send-mail': { readonly to: string; readonly subject: string; readonly blocks: readonly MailBlock[] };
  'import-list': { readonly importId: string };
}
