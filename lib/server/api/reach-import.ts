import { type Db } from '@/db/client';
import { findImport } from '@/db/queries/lists';
import { importEndpoint } from '@/lib/contracts/api/imports';
import { AppError } from '@/lib/errors';
import { reachProgram, type TokenCaller } from '@/lib/server/http/token-caller';

/** An import, if the token reaches its program. Throws `not-found` alike for one that does not exist and one out of reach. */
export async function reachImportOf(db: Db, caller: TokenCaller, id: string) {
  const missing = new AppError('not-found', 'There is no such import.');
  const found = await findImport(db, id);
  if (found === undefined) throw missing;
  try {
    const need = { scope: importEndpoint.scope, action: 'lists.read' } as const;
    await reachProgram(db, caller, { id: found.program_id }, need);
  } catch (error) {
    throw error instanceof AppError && error.code === 'not-found' ? missing : error;
  }
  return found;
}
