import { sql } from 'kysely';
import { type Db } from '../client';

export interface TokenInList {
  readonly id: string;
  readonly name: string;
  readonly hint: string;
  readonly scopes: readonly string[];
  /** Codes of the programs that it is limited to; null: all that the person belongs to. */
  readonly programs: readonly string[] | null;
  readonly expiresAt: Date;
  readonly lastUsedAt: Date | null;
  readonly revokedAt: Date | null;
  readonly createdAt: Date;
}

/** A person's tokens, newest first. */
export function listTokens(db: Db, userId: string): Promise<TokenInList[]> {
  return db
    .selectFrom('api_tokens')
    .select([
      'id',
      'name',
      'hint',
      'scopes',
      sql<string[] | null>`case when program_ids is null then null else coalesce(
        (select array_agg(programs.code order by programs.code) from programs where programs.id = any(program_ids)), '{}') end`.as(
        'programs',
      ),
      'expires_at as expiresAt',
      'last_used_at as lastUsedAt',
      'revoked_at as revokedAt',
      'created_at as createdAt',
    ])
    .where('user_id', '=', userId)
    .orderBy('created_at', 'desc')
    .execute();
}

export interface TokenOwner {
  readonly tokenId: string;
  readonly userId: string;
  readonly name: string;
  readonly admin: boolean;
  readonly scopes: readonly string[];
  readonly programIds: readonly string[] | null;
}

/** Whose token this is, if it still works and the person has not been disabled. */
export function findTokenOwner(db: Db, tokenHash: string, now: Date): Promise<TokenOwner | undefined> {
  return db
    .selectFrom('api_tokens')
    .innerJoin('users', 'users.id', 'api_tokens.user_id')
    .select([
      'api_tokens.id as tokenId',
      'users.id as userId',
      'users.name',
      'users.is_admin as admin',
      'api_tokens.scopes',
      'api_tokens.program_ids as programIds',
    ])
    .where('token_hash', '=', tokenHash)
    .where('expires_at', '>', now)
    .where('revoked_at', 'is', null)
    .where('users.disabled_at', 'is', null)
    .executeTakeFirst();
}

/** Notes the use, at most once a minute. */
export async function noteTokenUse(db: Db, tokenId: string, now: Date): Promise<void> {
  await db
    .updateTable('api_tokens')
    .set({ last_used_at: now })
    .where('id', '=', tokenId)
    .where((eb) =>
      eb.or([eb('last_used_at', 'is', null), eb('last_used_at', '<', new Date(now.getTime() - 60_000))]),
    )
    .execute();
}
