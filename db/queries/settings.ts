import { type Db } from '@/db/client';

/** The frame issues of a program, newest first, with who made each. */
export function frameIssuesOf(db: Db, programId: string) {
  return db
    .selectFrom('frame_issues')
    .innerJoin('users', 'users.id', 'frame_issues.created_by')
    .selectAll('frame_issues')
    .select('users.name as author')
    .where('program_id', '=', programId)
    .orderBy('number', 'desc')
    .execute();
}

/** The named points of a frame issue in the order of their codes. */
export function referencePointsOf(db: Db, frameIssueId: string) {
  return db
    .selectFrom('reference_points')
    .selectAll()
    .where('frame_issue_id', '=', frameIssueId)
    .orderBy('code')
    .execute();
}

/** The builds of a program, the default one first. */
export function buildsOf(db: Db, programId: string) {
  return db
    .selectFrom('builds')
    .innerJoin('users', 'users.id', 'builds.created_by')
    .selectAll('builds')
    .select('users.name as author')
    .where('program_id', '=', programId)
    .orderBy('is_default', 'desc')
    .orderBy('builds.created_at')
    .execute();
}

export function limitsOf(db: Db, programId: string) {
  return db
    .selectFrom('limits')
    .innerJoin('users', 'users.id', 'limits.created_by')
    .selectAll('limits')
    .select('users.name as author')
    .where('program_id', '=', programId)
    .execute();
}

export function growthAllowancesOf(db: Db, programId: string) {
  return db.selectFrom('growth_allowances').selectAll().where('program_id', '=', programId).execute();
}
