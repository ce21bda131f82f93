import { type Transaction } from 'kysely';
import { type LinkPurpose, replaceMailLink } from '@/db/queries/people';
import { type Database } from '@/db/schema/database';
import { hashSecret, newSecret } from '@/lib/server/auth/secret';

const LIFETIME_MS: Readonly<Record<LinkPurpose, number>> = {
  invitation: 7 * 86_400_000,
  'password-reset': 3_600_000,
};

/** A new link for a person, as a path of ours. The secret is in the path only: the table keeps its hash. */
export async function makeMailLink(
  trx: Transaction<Database>,
  { userId, purpose }: { readonly userId: string; readonly purpose: LinkPurpose },
): Promise<string> {
  const secret = newSecret();
  await replaceMailLink(trx, {
    tokenHash: hashSecret(secret),
    userId,
    purpose,
    expiresAt: new Date(Date.now() + LIFETIME_MS[purpose]),
  });
  return `/${purpose}/${secret}`;
}
