import { type Db } from '@/db/client';
import { findFrameIssue, geometryOf } from '@/db/queries/frames';
import { rowsNamed } from '@/db/queries/named-rows';
import { type Finding } from '@/lib/findings/finding';
import { findingsOnRotors } from '@/lib/findings/look';
import { carrierTensor } from '@/lib/findings/rotors/carrier';
import { type AirframeGeometry } from '@/lib/mass/geometry';
import { Placement } from '@/lib/mass/place';
import { type Sym3 } from '@/lib/numerics/sym3';
import { type OperatingPoint, type Rotor } from '@/lib/rotors/rotor';

/** A list revision in which rotors may have their mass, by the code of its list. */
export interface CarrierList {
  readonly code: string;
  readonly revisionId: string;
}

/**
 * The findings on rotating parts with all that the rules can know: the airframe, and the rows that carry the rotors in these list
 * revisions. Reads the named rows and no other.
 */
export async function rotorFindings(
  db: Db,
  parts: { readonly rotors: readonly Rotor[]; readonly points: readonly OperatingPoint[] },
  geometry: AirframeGeometry,
  lists: readonly CarrierList[],
): Promise<Finding[]> {
  const carriers = await carriersOf(db, parts.rotors, geometry, lists);
  return findingsOnRotors({ rotors: parts.rotors, points: parts.points, geometry, carriers });
}

/** The same for a program as it stands: its newest frame issue and the newest revision of each list. */
export async function rotorFindingsInProgram(
  db: Db,
  programId: string,
  parts: { readonly rotors: readonly Rotor[]; readonly points: readonly OperatingPoint[] },
): Promise<Finding[]> {
  const issue = await db
    .selectFrom('frame_issues')
    .select('id')
    .where('program_id', '=', programId)
    .orderBy('number', 'desc')
    .limit(1)
    .executeTakeFirst();
  if (issue === undefined) return findingsOnRotors(parts);
  const lists = await db
    .selectFrom('lists')
    .innerJoin('list_revisions', (join) =>
      join
        .onRef('list_revisions.list_id', '=', 'lists.id')
        .onRef('list_revisions.number', '=', 'lists.last_revision'),
    )
    .select(['lists.code', 'list_revisions.id as revisionId'])
    .where('lists.program_id', '=', programId)
    .execute();
  return rotorFindings(db, parts, geometryOf(await findFrameIssue(db, issue.id)), lists);
}

/** `list/item` of the rows that rotors name and that exist; an item may hold a slash itself. */
async function carriersOf(
  db: Db,
  rotors: readonly Rotor[],
  geometry: AirframeGeometry,
  lists: readonly CarrierList[],
): Promise<Map<string, Sym3>> {
  const carriers = new Map<string, Sym3>();
  const names = rotors.flatMap(({ component }) => (component === null ? [] : [component]));
  for (const { code, revisionId } of lists) {
    const items = names.flatMap((name) => (name.startsWith(`${code}/`) ? [name.slice(code.length + 1)] : []));
    const rows = await rowsNamed(db, revisionId, items);
    if (rows.length === 0) continue;
    const { declarations } = await db
      .selectFrom('list_revisions')
      .select('declarations')
      .where('id', '=', revisionId)
      .executeTakeFirstOrThrow();
    const placement = new Placement(declarations, geometry);
    for (const row of rows) carriers.set(`${code}/${row.item}`, carrierTensor(row, placement));
  }
  return carriers;
}
