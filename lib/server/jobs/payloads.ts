import { type LinkPurpose } from '@/db/queries/people';
import { type MailBlock } from '@/lib/server/email/blocks';

/** What each task of the queue takes. */
export interface JobPayloads {
  'send-mail': { readonly to: string; readonly subject: string; readonly blocks: readonly MailBlock[] };
  'send-link-mail': { readonly email: string; readonly purpose: LinkPurpose };
  'import-list': { readonly importId: string };
}
