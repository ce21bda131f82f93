import { type Db } from '@/db/client';
import { IssueChain } from '@/lib/frames/issue-chain';
import { type Pose } from '@/lib/frames/pose';
import { type AirframeGeometry } from '@/lib/mass/geometry';
import { IssueConversion, noConversion } from '@/lib/mass/issue-conversion';
import { type FrameIssue, geometryOf } from './frames';

/** A frame issue with how the one before lies in it; null where that was not stated, and for the first. */
export interface ChainedIssue extends FrameIssue {
  readonly former: Pose | null;
}

/** The frame issues of a program and how to get from one to another. */
export class ProgramFrames {
  readonly #chain: IssueChain;
  readonly #geometries = new Map<string, AirframeGeometry>();
  readonly #conversions = new Map<string, IssueConversion>();

  /** `issues` newest first. */
  constructor(readonly issues: readonly ChainedIssue[]) {
    this.#chain = new IssueChain(
      issues.map(({ number, axis_x, axis_y, axis_z, former }) => ({
        number,
        axes: [axis_x, axis_y, axis_z],
        former,
      })),
    );
  }

  /** @throws RangeError for an issue of another program. */
  issue(id: string): ChainedIssue {
    const found = this.issues.find((issue) => issue.id === id);
    if (found === undefined) throw new RangeError('this frame issue is not one of the program');
    return found;
  }

  /** One object for each issue. */
  geometry(id: string): AirframeGeometry {
    const known = this.#geometries.get(id);
    if (known !== undefined) return known;
    const geometry = geometryOf(this.issue(id));
    this.#geometries.set(id, geometry);
    return geometry;
  }

  /** From one issue to another; null where one of the issues between does not say how it lies against the one before. */
  between(fromId: string, toId: string): IssueConversion | null {
    const key = `${fromId} ${toId}`;
    const known = this.#conversions.get(key);
    if (known !== undefined) return known;
    const change = this.#chain.between(this.issue(fromId).number, this.issue(toId).number);
    if (change === null) return null;
    const to = this.geometry(toId);
    const conversion =
      fromId === toId ? noConversion(to) : new IssueConversion(change, this.geometry(fromId), to);
    this.#conversions.set(key, conversion);
    return conversion;
  }

  /** The same. @throws RangeError where it is not known: what would need it is refused before it is stored. */
  conversion(fromId: string, toId: string): IssueConversion {
    const found = this.between(fromId, toId);
    if (found === null)
      throw new RangeError(
        `frame issue ${this.gap(fromId, toId)} does not say how it lies against the one before it`,
      );
    return found;
  }

  /** Number of the issue that does not say how it lies, on the way from one to another; null where all do. */
  gap(fromId: string, toId: string): number | null {
    return this.#chain.gapBetween(this.issue(fromId).number, this.issue(toId).number);
  }
}

export async function programFrames(db: Db, programId: string): Promise<ProgramFrames> {
  const rows = await db
    .selectFrom('frame_issues')
    .leftJoin('frame_steps', 'frame_steps.frame_issue_id', 'frame_issues.id')
    .selectAll('frame_issues')
    .select(['frame_steps.origin', 'frame_steps.turn'])
    .where('program_id', '=', programId)
    .orderBy('number', 'desc')
    .execute();
  return new ProgramFrames(
    rows.map(({ origin, turn, ...issue }) => ({ ...issue, former: poseOf(origin, turn) })),
  );
}

/** The frames of the program that has this issue. */
export async function framesWithIssue(db: Db, frameIssueId: string): Promise<ProgramFrames> {
  const { program_id } = await db
    .selectFrom('frame_issues')
    .select('program_id')
    .where('id', '=', frameIssueId)
    .executeTakeFirstOrThrow();
  return programFrames(db, program_id);
}

function poseOf(origin: readonly number[] | null, turn: readonly number[] | null): Pose | null {
  if (origin === null || turn === null) return null;
  const [x = NaN, y = NaN, z = NaN] = origin;
  const [yaw = NaN, pitch = NaN, roll = NaN] = turn;
  return { origin: [x, y, z], yaw, pitch, roll };
}
