import { type Db } from '@/db/client';
import { listProgramsOf } from '@/db/queries/programs';
import { fieldError } from '@/lib/errors';
import { type Person } from '@/lib/server/actor';
import { recordEvent, SITE_SCOPE } from '@/lib/server/audit/record-event';
import { hashSecret, newSecret } from '@/lib/server/auth/secret';
import { newId } from '@/lib/server/ids';
import { RATE_POLICIES } from '@/lib/server/rate-limit/policies';
import { takeOrRefuse } from '@/lib/server/rate-limit/take';
import { SCOPE_NAMES, scopesWithin, type TokenScope } from '@/lib/token-scopes';

/** Marks a string as ours, so that one left in a repository or a log is recognised. */
const PREFIX = 'polhode_';
export const TOKEN_DAYS_AT_MOST = 365;

/**
 * Makes a token and returns it; nobody can read it again. `programs` are codes, null for all that the person belongs to, now and
 * later. Throws `invalid-input` for a program or a scope that the person's roles do not reach.
 */
export async function makeToken(
  db: Db,
  request: {
    person: Person;
    name: string;
    scopes: readonly TokenScope[];
    programs: readonly string[] | null;
    days: number;
  },
): Promise<string> {
  const { person, name, scopes, programs, days } = request;
  await takeOrRefuse(db, RATE_POLICIES.tokenMaking, person.userId);
  const own = await listProgramsOf(db, person.userId);
  for (const code of programs ?? []) {
    if (!own.some((program) => program.code === code))
      throw fieldError('programs', `You do not belong to a program ${code}.`);
  }
  const reached = own.filter(({ code }) => programs === null || programs.includes(code));
  const within = scopesWithin(reached);
  const missing = scopes.find((scope) => !within.includes(scope));
  if (missing !== undefined) {
    throw fieldError('scopes', `No role of yours in these programs carries "${SCOPE_NAMES[missing]}".`);
  }
  const token = PREFIX + newSecret();
  const id = newId();
  const expiresAt = new Date(Date.now() + days * 86_400_000);
  await db.transaction().execute(async (trx) => {
    await trx
      .insertInto('api_tokens')
      .values({
        id,
        user_id: person.userId,
        name,
        token_hash: hashSecret(token),
        hint: token.slice(-4),
        scopes: [...scopes],
        program_ids: programs === null ? null : reached.map((program) => program.id),
        expires_at: expiresAt,
        last_used_at: null,
        revoked_at: null,
      })
      .execute();
    const detail = { name, scopes, expiresAt: expiresAt.toISOString() };
    await recordEvent(trx, { scope: SITE_SCOPE, actor: person, kind: 'token.made', subject: id, detail });
  });
  return token;
}
