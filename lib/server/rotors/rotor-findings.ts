import { type Db } from '@/db/client';
import { programFrames } from '@/db/queries/program-frames';
import { rowsNamed } from '@/db/queries/named-rows';
import { type Finding } from '@/lib/findings/finding';
import { findingsOnRotors } from '@/lib/findings/look';
import { carrierTensor } from '@/lib/findings/rotors/carrier';
import { type AirframeGeometry } from '@/lib/mass/geometry';
import { placementIn } from '@/lib/mass/converted-placement';
import { type IssueConversion } from '@/lib/mass/issue-conversion';
import { type Sym3 } from '@/lib/numerics/sym3';
import { type OperatingPoint, type Rotor } from '@/lib/rotors/rotor';

/** A list revision in which rotors may have their mass, by the code of its list. */
export interface CarrierList {
  readonly code: string;
  readonly revisionId: string;
  /** From the issue that the revision is stated in to that of the rotating parts. */
  readonly conversion: IssueConversion;
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
  const carriers = await carriersOf(db, parts.rotors, lists);
  return findingsOnRotors({ rotors: parts.rotors, points: parts.points, geometry, carriers });
}

/**
 * The same for a program as it stands: the newest revision of each list, in the frame issue that the rotating parts are stated in
 * (null before the first). A list whose issue nobody knows how to get from is left out.
 */
export async function rotorFindingsInProgram(
  db: Db,
  programId: string,
  parts: { readonly rotors: readonly Rotor[]; readonly points: readonly OperatingPoint[] },
  issueId: string | null,
): Promise<Finding[]> {
  if (issueId === null) return findingsOnRotors(parts);
  const frames = await programFrames(db, programId);
  const lists = await db
    .selectFrom('lists')
    .innerJoin('list_revisions', (join) =>
      join
        .onRef('list_revisions.list_id', '=', 'lists.id')
        .onRef('list_revisions.number', '=', 'lists.last_revision'),
    )
    .select(['lists.code', 'list_revisions.id as revisionId', 'list_revisions.frame_issue_id as statedIn'])
    .where('lists.program_id', '=', programId)
    .execute();
  const carriers = lists.flatMap(({ statedIn, ...list }): CarrierList[] => {
    const conversion = frames.between(statedIn, issueId);
    return conversion === null ? [] : [{ ...list, conversion }];
  });
  return rotorFindings(db, parts, frames.geometry(issueId), carriers);
}

/** `list/item` of the rows that rotors name and that exist; an item may hold a slash itself. */
async function carriersOf(
  db: Db,
  rotors: readonly Rotor[],
  lists: readonly CarrierList[],
): Promise<Map<string, Sym3>> {
  const carriers = new Map<string, Sym3>();
  const names = rotors.flatMap(({ component }) => (component === null ? [] : [component]));
  for (const { code, revisionId, conversion } of lists) {
    const items = names.flatMap((name) => (name.startsWith(`${code}/`) ? [name.slice(code.length + 1)] : []));
    const rows = await rowsNamed(db, revisionId, items);
    if (rows.length === 0) continue;
    const { declarations } = await db
      .selectFrom('list_revisions')
      .select('declarations')
      .where('id', '=', revisionId)
      .executeTakeFirstOrThrow();
    const placement = placementIn(declarations, conversion);
    for (const row of rows) carriers.set(`${code}/${row.item}`, carrierTensor(row, placement));
  }
  return carriers;
}
