import { type Db } from '@/db/client';
import { findBaseline, findSubmission, revisionsOfSubmission } from '@/db/queries/baselines';
import { conditionsOf, findConfiguration, pinnedRevisions, subtotalsOf } from '@/db/queries/configurations';
import { programFrames } from '@/db/queries/program-frames';
import { groupBreakdownOf, referencePointsOf } from '@/db/queries/settings';
import { readStoredDocument } from '@/lib/baselines/stored-document';
import { AppError } from '@/lib/errors';
import { type AirframeVec } from '@/lib/frames/tags';
import { type GroupBreakdown, groupReading, type GroupReading } from '@/lib/groups/breakdown';
import { type Category } from '@/lib/mass/component';
import { type ListDeclarations } from '@/lib/mass/declarations';
import { type AirframeGeometry } from '@/lib/mass/geometry';
import { type IssueConversion } from '@/lib/mass/issue-conversion';
import { type MassResult } from '@/lib/mass/result';
import { NO_GROWTH, rollUp } from '@/lib/mass/roll-up';
import { type Subtotal } from '@/lib/mass/subtotals';
import { type NamedPlace } from '@/lib/three-views/picture';

export interface SourceRevision {
  readonly id: string;
  readonly code: string;
  readonly title: string;
  readonly number: number;
  readonly declarations: ListDeclarations;
  /** From the frame issue that the revision is stated in to that of what it is part of. */
  readonly conversion: IssueConversion;
}

export interface SourceCondition {
  readonly code: string;
  readonly title: string;
  readonly categories: readonly Category[];
  readonly items: readonly {
    readonly name: string;
    readonly category: Category | null;
    readonly mass: number;
    readonly position: AirframeVec;
  }[];
  readonly basic: Pick<MassResult, 'mass' | 'properties'>;
}

/** What three views can be drawn of: the lists, frame and conditions of a configuration or of a signed baseline. */
export interface ViewsSource {
  readonly title: string;
  readonly geometry: AirframeGeometry;
  readonly frameIssue: number | string;
  readonly points: readonly NamedPlace[];
  readonly revisions: readonly SourceRevision[];
  /** Each in the group that its rows are in by the breakdown of today, or of the day of a baseline. */
  readonly subtotals: readonly Subtotal[];
  readonly groups: GroupReading;
  readonly conditions: readonly SourceCondition[];
}

/** A configuration as it is pinned now, rolled up or not. @throws AppError not-found */
export async function configurationSource(db: Db, programId: string, code: string): Promise<ViewsSource> {
  const configuration = await findConfiguration(db, programId, code);
  if (configuration === undefined)
    throw new AppError('not-found', 'There is no such configuration in this program.');
  const frames = await programFrames(db, programId);
  const issue = frames.issue(configuration.frame_issue_id);
  const geometry = frames.geometry(issue.id);
  const [pins, conditions, points] = await Promise.all([
    pinnedRevisions(db, configuration.id),
    conditionsOf(db, configuration.id),
    referencePointsOf(db, issue.id),
  ]);
  const ids = pins.map((pin) => pin.revision_id);
  const [stored, declarations, breakdown] = await Promise.all([
    subtotalsOf(db, ids, issue.id),
    declarationsOf(db, ids),
    groupBreakdownOf(db, programId),
  ]);
  const { groups, subtotals } = read(stored, breakdown);
  return {
    title: configuration.title,
    geometry,
    frameIssue: issue.number,
    points: points.map(({ code: name, title, place }) => ({ code: name, title, place: vec(place) })),
    revisions: pins.flatMap((pin) => {
      const declared = declarations.get(pin.revision_id);
      return declared === undefined
        ? []
        : [
            {
              id: pin.revision_id,
              code: pin.list_code,
              title: pin.list_title,
              number: pin.number,
              declarations: declared,
              conversion: frames.conversion(pin.frame_issue_id, issue.id),
            },
          ];
    }),
    subtotals,
    groups,
    conditions: conditions.map((condition) => {
      const items = condition.items.map(({ name, category, mass, place }) => ({
        name,
        category,
        mass,
        position: vec(place),
      }));
      const { categories } = condition;
      const { basic } = rollUp(subtotals, items, geometry, NO_GROWTH, { categories });
      return { code: condition.code, title: condition.title, categories, items, basic };
    }),
  };
}

/** A signed baseline as it was submitted: its geometry, items and results are the frozen ones. @throws AppError not-found */
export async function baselineSource(db: Db, programId: string, number: string): Promise<ViewsSource> {
  const baseline = /^[1-9]\d{0,8}$/.test(number)
    ? await findBaseline(db, programId, Number(number))
    : undefined;
  const submission = baseline && (await findSubmission(db, programId, baseline.submission_id));
  if (baseline === undefined || submission === undefined)
    throw new AppError('not-found', 'There is no such baseline in this program.');
  const revisions = await revisionsOfSubmission(db, submission.id);
  const document = readStoredDocument(baseline.document);
  const frames = await programFrames(db, programId);
  const stored = await subtotalsOf(
    db,
    revisions.map((revision) => revision.revision_id),
    submission.frame_issue_id,
  );
  const { groups, subtotals } = read(stored, await groupBreakdownOf(db, programId, submission.submitted_at));
  return {
    title: `Baseline ${baseline.number}, ${baseline.title}`,
    geometry: submission.result.geometry,
    frameIssue: document.conventions.frameIssue,
    points: document.referencePoints.map(({ code, airframe: { x, y, z } }) => ({
      code,
      title: null,
      place: [x, y, z],
    })),
    revisions: revisions.map((revision) => ({
      id: revision.revision_id,
      code: revision.list_code,
      title: revision.list_title,
      number: revision.number,
      declarations: revision.declarations,
      conversion: frames.conversion(revision.frame_issue_id, submission.frame_issue_id),
    })),
    subtotals,
    groups,
    conditions: submission.result.conditions.map((condition) => ({
      code: condition.code,
      title: condition.title,
      categories: condition.categories,
      items: condition.items.map(({ name, mass, position }) => ({ name, category: null, mass, position })),
      basic: condition.rollUp.basic,
    })),
  };
}

function read<T extends Subtotal>(
  stored: readonly T[],
  breakdown: GroupBreakdown,
): { readonly groups: GroupReading; readonly subtotals: readonly T[] } {
  return {
    groups: groupReading(
      breakdown,
      stored.map(({ group }) => group),
    ),
    subtotals: stored.map((part) => ({ ...part, group: breakdown.present(part.group) })),
  };
}

async function declarationsOf(
  db: Db,
  revisionIds: readonly string[],
): Promise<Map<string, ListDeclarations>> {
  if (revisionIds.length === 0) return new Map();
  const rows = await db
    .selectFrom('list_revisions')
    .select(['id', 'declarations'])
    .where('id', 'in', revisionIds)
    .execute();
  return new Map(rows.map(({ id, declarations }) => [id, declarations]));
}

function vec(numbers: readonly number[]): readonly [number, number, number] {
  const [x = NaN, y = NaN, z = NaN] = numbers;
  return [x, y, z];
}
