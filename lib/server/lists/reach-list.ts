import { type Db } from '@/db/client';
import { findFrameIssue, geometryOf } from '@/db/queries/frames';
import { findImport, findList, findRevision, type List, type ListRevision } from '@/db/queries/lists';
import { AppError } from '@/lib/errors';
import { type AirframeGeometry } from '@/lib/mass/geometry';

/** The list of a program by its code. @throws AppError not-found */
export async function reachList(db: Db, programId: string, code: string): Promise<List> {
  const list = await findList(db, programId, code);
  if (list === undefined) throw new AppError('not-found', 'There is no such list in this program.');
  return list;
}

/** A revision of a list by the number as it stands in an address. @throws AppError not-found */
export async function reachRevision(db: Db, list: List, number: string): Promise<ListRevision> {
  const revision = /^[1-9]\d{0,8}$/.test(number)
    ? await findRevision(db, list.id, Number(number))
    : undefined;
  if (revision === undefined) throw new AppError('not-found', 'This list has no such revision.');
  return revision;
}

/** An import of a list. @throws AppError not-found */
export async function reachImport(db: Db, list: List, id: string) {
  const found = await findImport(db, id);
  if (found === undefined || found.list_id !== list.id)
    throw new AppError('not-found', 'This list has no such import.');
  return found;
}

/** The geometry of the frame issue that a revision is stated in. */
export async function geometryOfRevision(
  db: Db,
  revision: Pick<ListRevision, 'frame_issue_id'>,
): Promise<AirframeGeometry> {
  return geometryOf(await findFrameIssue(db, revision.frame_issue_id));
}

/** The marking that stands on everything made from a list: its present one, or the one that a revision was read with. */
export function markingOf(
  list: Pick<List, 'marking'>,
  revision: Pick<ListRevision, 'marking'> | null,
): string | null {
  return list.marking ?? revision?.marking ?? null;
}
