import { type Db } from '@/db/client';
import { findProgramFor, findProgramByIdFor, type ProgramRow } from '@/db/queries/programs';
import { AppError } from '@/lib/errors';
import { may, type MemberRole, type ProgramAction, refusal, type SiteAction } from '@/lib/permissions';

/** Someone who asks: a signed-in person or the owner of a token. */
export interface Asking {
  readonly id: string;
  readonly admin: boolean;
}

export interface ProgramAccess {
  readonly program: ProgramRow;
  /** Null for an administrator who is no member. */
  readonly role: MemberRole | null;
  /** Whether they may do this too, in this program. */
  readonly can: (action: ProgramAction) => boolean;
}

const NO_PROGRAM = 'There is no such program.';

/** Throws `forbidden` unless they may do this on the site. */
export function requireSiteAction(asking: Asking, action: SiteAction): void {
  if (refusal(action, { admin: asking.admin, role: null })) {
    throw new AppError('forbidden', 'Only an administrator may do this.');
  }
}

/** The program and their role in it. Throws `not-found` to those outside, `forbidden` to members whose role does not allow it. */
export async function requireProgramAction(
  db: Db,
  asking: Asking,
  program: { readonly code: string } | { readonly id: string },
  action: ProgramAction,
): Promise<ProgramAccess> {
  const found =
    'code' in program
      ? await findProgramFor(db, program.code, asking.id)
      : await findProgramByIdFor(db, program.id, asking.id);
  if (!found) throw new AppError('not-found', NO_PROGRAM);
  const standing = { admin: asking.admin, role: found.role };
  const refused = refusal(action, standing);
  if (refused === 'not-found') throw new AppError('not-found', NO_PROGRAM);
  if (refused === 'forbidden') {
    throw new AppError(
      'forbidden',
      `Your role in ${found.title} does not allow this. A chief engineer of it can change that.`,
    );
  }
  return {
    program: { id: found.id, code: found.code, title: found.title },
    role: found.role,
    can: (other) => may(other, standing),
  };
}
