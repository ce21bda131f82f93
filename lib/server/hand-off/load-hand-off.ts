import { type Db } from '@/db/client';
import { baselinesOfProgram, findBaseline } from '@/db/queries/baselines';
import { buildsOf } from '@/db/queries/settings';
import { readStoredDocument } from '@/lib/baselines/stored-document';
import { AppError } from '@/lib/errors';

type Asked = string | readonly string[] | undefined;

/**
 * The signed baselines of a program by build, default build first and newest baseline first, and the one to hand off: that of the
 * number asked for, else the newest of the first build that has any. Null where nothing is signed.
 * @throws AppError not-found for a number that there is not.
 */
export async function loadHandOff(db: Db, programId: string, asked: Asked) {
  const [builds, signed] = await Promise.all([buildsOf(db, programId), baselinesOfProgram(db, programId)]);
  const byBuild = builds
    .map((build) => ({ build, baselines: signed.filter((one) => one.build_id === build.id) }))
    .filter(({ baselines }) => baselines.length > 0);
  const number = asked === undefined ? byBuild[0]?.baselines[0]?.number : numberOf(asked);
  if (number === undefined) return { byBuild, shown: null };
  const baseline = await findBaseline(db, programId, number);
  const build = byBuild.find((one) => one.build.id === baseline?.build_id);
  if (baseline === undefined || build === undefined)
    throw new AppError('not-found', 'There is no such baseline in this program.');
  const document = readStoredDocument(baseline.document);
  const isNewest = build.baselines[0]?.number === number;
  return { byBuild, shown: { baseline, build: build.build, document, isNewest } };
}

export type HandOff = NonNullable<Awaited<ReturnType<typeof loadHandOff>>['shown']>;

function numberOf(asked: string | readonly string[]): number {
  const text = typeof asked === 'string' ? asked : '';
  return /^[1-9]\d{0,8}$/.test(text) ? Number(text) : 0;
}
