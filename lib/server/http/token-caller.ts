import { type Db } from '@/db/client';
import { listProgramsOf, type ProgramOfMember } from '@/db/queries/programs';
import { findTokenOwner, noteTokenUse } from '@/db/queries/tokens';
import { AppError } from '@/lib/errors';
import { type ProgramAction } from '@/lib/permissions';
import { type Person } from '@/lib/server/actor';
import { hashSecret } from '@/lib/server/auth/secret';
import { RATE_POLICIES } from '@/lib/server/rate-limit/policies';
import { peek, take, tooMany } from '@/lib/server/rate-limit/take';
import { carriesScope, SCOPE_NAMES, type TokenScope } from '@/lib/token-scopes';
import { type ProgramAccess, requireProgramAction } from './access';

/** Who a bearer token speaks for, asked anew at every call. */
export interface TokenCaller {
  readonly id: string;
  readonly admin: boolean;
  readonly person: Person;
  readonly scopes: readonly string[];
  readonly programIds: readonly string[] | null;
}

/** Looks a token up by its hash. Throws `invalid-token`, and `too-many-requests` to an address that keeps guessing. */
export async function callerOf(db: Db, headers: Headers, address: string): Promise<TokenCaller> {
  const guesses = await peek(db, RATE_POLICIES.badTokenAddress, address);
  if (!guesses.allowed) throw tooMany(guesses);
  const secret = /^Bearer ([A-Za-z0-9_-]{20,200})$/i.exec(headers.get('authorization') ?? '')?.[1];
  if (secret === undefined) {
    throw new AppError(
      'invalid-token',
      'Send a token as "Authorization: Bearer ...". Tokens are made on your account page.',
    );
  }
  const owner = await findTokenOwner(db, hashSecret(secret), new Date());
  if (!owner) {
    await take(db, RATE_POLICIES.badTokenAddress, address);
    throw new AppError(
      'invalid-token',
      'The token is unknown, expired or revoked. Make a new one on your account page.',
    );
  }
  await noteTokenUse(db, owner.tokenId, new Date());
  return {
    id: owner.userId,
    admin: owner.admin,
    person: { userId: owner.userId, address },
    scopes: owner.scopes,
    programIds: owner.programIds,
  };
}

/** Throws `insufficient-scope` unless the token was made for this. */
export function requireScope(caller: TokenCaller, scope: TokenScope): void {
  if (!caller.scopes.includes(scope)) {
    throw new AppError(
      'insufficient-scope',
      `The token lacks the scope ${scope} (${SCOPE_NAMES[scope].toLowerCase()}).`,
    );
  }
}

/**
 * The program, if the token reaches it and its owner may do this there today. Throws `not-found` for a program that is not theirs
 * or not the token's, `insufficient-scope`, or `forbidden` when the owner's role no longer carries the scope.
 */
export async function reachProgram(
  db: Db,
  caller: TokenCaller,
  program: { readonly code: string } | { readonly id: string },
  need: { readonly scope: TokenScope; readonly action: ProgramAction },
): Promise<ProgramAccess> {
  const access = await requireProgramAction(db, caller, program, 'program.read');
  if (caller.programIds !== null && !caller.programIds.includes(access.program.id)) {
    throw new AppError('not-found', 'There is no such program.');
  }
  requireScope(caller, need.scope);
  if (!carriesScope(need.scope, { admin: caller.admin, role: access.role }) || !access.can(need.action)) {
    throw new AppError(
      'forbidden',
      `The token's owner has no role in ${access.program.title} that allows this.`,
    );
  }
  return access;
}

/** The programs that both the owner and the token reach, by title. */
export async function programsInReach(db: Db, caller: TokenCaller): Promise<ProgramOfMember[]> {
  const programs = await listProgramsOf(db, caller.id);
  return programs.filter(({ id }) => caller.programIds === null || caller.programIds.includes(id));
}
