import { type Selectable } from 'kysely';
import { type Db } from '@/db/client';
import { type FrameIssuesTable } from '@/db/schema/programs';
import { type AirframeGeometry } from '@/lib/mass/geometry';

export type FrameIssue = Selectable<FrameIssuesTable>;

/** The frame issue in force: the newest of the program, or undefined before the first. */
export function currentFrameIssue(db: Db, programId: string): Promise<FrameIssue | undefined> {
  return db
    .selectFrom('frame_issues')
    .selectAll()
    .where('program_id', '=', programId)
    .orderBy('number', 'desc')
    .limit(1)
    .executeTakeFirst();
}

export function findFrameIssue(db: Db, id: string): Promise<FrameIssue> {
  return db.selectFrom('frame_issues').selectAll().where('id', '=', id).executeTakeFirstOrThrow();
}

/** What the algebra needs of a frame issue. */
export function geometryOf(issue: FrameIssue): AirframeGeometry {
  return {
    axes: [issue.axis_x, issue.axis_y, issue.axis_z],
    lateralPlane: issue.lateral_plane,
    incidence: issue.incidence,
    reference: vec(issue.reference),
    lemac: vec(issue.lemac),
    mac: issue.mac,
    span: issue.span,
    length: issue.length,
  };
}

function vec(numbers: readonly number[]): readonly [number, number, number] {
  const [x, y, z] = numbers;
  if (x === undefined || y === undefined || z === undefined || numbers.length !== 3)
    throw new RangeError(`a place has three coordinates, not ${numbers.length}`);
  return [x, y, z];
}
