import { type Db } from '@/db/client';
import { findConfiguration } from '@/db/queries/configurations';
import { AppError } from '@/lib/errors';

/** The configuration of a program by its code. @throws AppError not-found */
export async function reachConfiguration(db: Db, programId: string, code: string) {
  const configuration = await findConfiguration(db, programId, code);
  if (configuration === undefined)
    throw new AppError('not-found', 'There is no such configuration in this program.');
  return configuration;
}

export type ReachedConfiguration = Awaited<ReturnType<typeof reachConfiguration>>;
