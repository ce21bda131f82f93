import { type Selectable } from 'kysely';
import { type Db } from '@/db/client';
import {
  type ConfigurationsTable,
  type RotorRevisionsTable,
  type RollUpsTable,
} from '@/db/schema/configurations';
import { groupBreakdownOf, growthAllowancesOf } from '@/db/queries/settings';
import { type GrowthAllowances, NO_GROWTH } from '@/lib/mass/roll-up';
import { framesWithIssue } from './program-frames';
import { type StoredSubtotal, storedSubtotals } from './subtotals';

export type Configuration = Selectable<ConfigurationsTable>;
export type RotorRevision = Selectable<RotorRevisionsTable>;
export type StoredRollUp = Selectable<RollUpsTable>;

export function findConfiguration(db: Db, programId: string, code: string) {
  return db
    .selectFrom('configurations')
    .innerJoin('builds', 'builds.id', 'configurations.build_id')
    .innerJoin('frame_issues', 'frame_issues.id', 'configurations.frame_issue_id')
    .leftJoin('rotor_revisions', 'rotor_revisions.id', 'configurations.rotor_revision_id')
    .selectAll('configurations')
    .select([
      'builds.code as build_code',
      'builds.title as build_title',
      'frame_issues.number as frame_issue_number',
      'rotor_revisions.number as rotor_revision_number',
    ])
    .where('configurations.program_id', '=', programId)
    .where('configurations.code', '=', code)
    .executeTakeFirst();
}

/** The configurations of a program, each with its newest roll-up's time and version. */
export function configurationsOfProgram(db: Db, programId: string) {
  return db
    .selectFrom('configurations')
    .innerJoin('builds', 'builds.id', 'configurations.build_id')
    .leftJoinLateral(
      (eb) =>
        eb
          .selectFrom('roll_ups')
          .select(['roll_ups.created_at as at', 'roll_ups.configuration_version as version'])
          .whereRef('roll_ups.configuration_id', '=', 'configurations.id')
          .orderBy('roll_ups.created_at', 'desc')
          .limit(1)
          .as('latest'),
      (join) => join.onTrue(),
    )
    .select([
      'configurations.id',
      'configurations.code',
      'configurations.title',
      'configurations.version',
      'configurations.created_at',
      'builds.code as build_code',
      'builds.title as build_title',
      'latest.at as rolled_up_at',
      'latest.version as rolled_up_version',
    ])
    .where('configurations.program_id', '=', programId)
    .orderBy('configurations.created_at', 'desc')
    .execute();
}

/** The list revisions that a configuration pins, in the order of their lists' codes. */
export function pinnedRevisions(db: Db, configurationId: string) {
  return db
    .selectFrom('configuration_lists')
    .innerJoin('lists', 'lists.id', 'configuration_lists.list_id')
    .innerJoin('list_revisions', 'list_revisions.id', 'configuration_lists.revision_id')
    .select([
      'lists.id as list_id',
      'lists.code as list_code',
      'lists.title as list_title',
      'list_revisions.frame_issue_id',
      'lists.last_revision as newest',
      'list_revisions.id as revision_id',
      'list_revisions.number',
      'list_revisions.rows',
      'list_revisions.marking',
      'list_revisions.findings',
      'list_revisions.content_sha256',
      'list_revisions.file_sha256',
      'list_revisions.created_by',
      'list_revisions.created_at',
    ])
    .where('configuration_lists.configuration_id', '=', configurationId)
    .orderBy('lists.code')
    .execute();
}

/**
 * The subtotals of some list revisions about the reference point of a frame issue. Each is stored in the issue that its revision is
 * stated in, and converted where that is another.
 * @throws RangeError where it is not known how the issues lie against each other.
 */
export async function subtotalsOf(
  db: Db,
  revisionIds: readonly string[],
  frameIssueId: string,
): Promise<StoredSubtotal[]> {
  if (revisionIds.length === 0) return [];
  const stored = await storedSubtotals(db, revisionIds);
  const statedIn = await db
    .selectFrom('list_revisions')
    .select(['id', 'frame_issue_id'])
    .where('id', 'in', revisionIds)
    .execute();
  const isElsewhere = statedIn.some((revision) => revision.frame_issue_id !== frameIssueId);
  const frames = isElsewhere ? await framesWithIssue(db, frameIssueId) : null;
  const issueOf = new Map(statedIn.map((revision) => [revision.id, revision.frame_issue_id]));
  return [...revisionIds].sort().flatMap((id) => {
    const parts = stored.get(id) ?? [];
    const issueId = issueOf.get(id);
    if (frames === null || issueId === undefined || issueId === frameIssueId) return parts;
    const conversion = frames.conversion(issueId, frameIssueId);
    return parts.map((part) => ({
      ...conversion.subtotal(part),
      uncertainty: conversion.uncertaintySubtotal(part.uncertainty),
    }));
  });
}

/** The conditions of a configuration in their order, each with its items. */
export async function conditionsOf(db: Db, configurationId: string) {
  const conditions = await db
    .selectFrom('conditions')
    .selectAll()
    .where('configuration_id', '=', configurationId)
    .orderBy('position')
    .execute();
  const items = await db
    .selectFrom('condition_items')
    .innerJoin('conditions', 'conditions.id', 'condition_items.condition_id')
    .selectAll('condition_items')
    .where('conditions.configuration_id', '=', configurationId)
    .orderBy('condition_items.position')
    .execute();
  return conditions.map((condition) => ({
    ...condition,
    items: items.filter((item) => item.condition_id === condition.id),
  }));
}

/** The growth allowances of a program, those of groups by the names that the groups have today. */
export async function allowancesOf(db: Db, programId: string): Promise<GrowthAllowances> {
  const [rows, breakdown] = await Promise.all([
    growthAllowancesOf(db, programId),
    groupBreakdownOf(db, programId),
  ]);
  const own = rows.filter((row) => row.group_path === '');
  const groups = rows
    .filter((row) => row.group_path !== '')
    .map(({ group_path: path, maturity, fraction }) => ({
      group: breakdown.present(path),
      maturity,
      fraction,
    }));
  return {
    ...NO_GROWTH,
    ...Object.fromEntries(own.map((row) => [row.maturity, row.fraction])),
    ...(groups.length === 0 ? {} : { groups }),
  };
}

export function latestRollUp(db: Db, configurationId: string) {
  return db
    .selectFrom('roll_ups')
    .innerJoin('users', 'users.id', 'roll_ups.created_by')
    .selectAll('roll_ups')
    .select('users.name as author')
    .where('configuration_id', '=', configurationId)
    .orderBy('roll_ups.created_at', 'desc')
    .limit(1)
    .executeTakeFirst();
}

export function rotorRevisionsOf(db: Db, programId: string) {
  return db
    .selectFrom('rotor_revisions')
    .innerJoin('users', 'users.id', 'rotor_revisions.created_by')
    .selectAll('rotor_revisions')
    .select('users.name as author')
    .where('program_id', '=', programId)
    .orderBy('number', 'desc')
    .execute();
}

export function findRotorRevision(db: Db, id: string): Promise<RotorRevision> {
  return db.selectFrom('rotor_revisions').selectAll().where('id', '=', id).executeTakeFirstOrThrow();
}
