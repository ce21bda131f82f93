import { type Db } from '@/db/client';
import { findBaseline, newestBaseline } from '@/db/queries/baselines';
import { AppError } from '@/lib/errors';

export type SignedBaseline = NonNullable<Awaited<ReturnType<typeof findBaseline>>>;

/**
 * The signed baseline that a path names: a number, or `current` of a build (the default build where none is named).
 * @throws AppError not-found, or gone where the newest baseline of the build is withdrawn.
 */
export async function reachBaseline(
  db: Db,
  programId: string,
  named: { readonly number: string; readonly build: string | undefined },
): Promise<SignedBaseline> {
  if (named.number === 'current') return currentBaseline(db, programId, named.build);
  const baseline = /^[1-9]\d{0,8}$/.test(named.number)
    ? await findBaseline(db, programId, Number(named.number))
    : undefined;
  if (baseline === undefined)
    throw new AppError('not-found', 'There is no such baseline. Name a number, or current.');
  if (named.build !== undefined && named.build !== baseline.build_code)
    throw new AppError(
      'not-found',
      `Baseline ${baseline.number} is of the build ${baseline.build_code}, not of ${named.build}.`,
    );
  return baseline;
}

async function currentBaseline(db: Db, programId: string, code: string | undefined): Promise<SignedBaseline> {
  const build = await db
    .selectFrom('builds')
    .select(['id', 'title'])
    .where('program_id', '=', programId)
    .where((eb) => (code === undefined ? eb('is_default', '=', true) : eb('code', '=', code)))
    .executeTakeFirst();
  if (build === undefined) throw new AppError('not-found', 'There is no such build.');
  const newest = await newestBaseline(db, build.id);
  if (newest === undefined)
    throw new AppError('not-found', `No baseline of the build ${build.title} is signed yet.`);
  if (newest.state === 'withdrawn')
    throw new AppError(
      'gone',
      `Baseline ${newest.number}, the newest of the build ${build.title}, was withdrawn: ${newest.withdrawal_reason ?? ''}`,
    );
  return newest;
}
