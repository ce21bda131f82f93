import { sql } from 'kysely';
import { type Db } from '@/db/client';
import { baselineState } from '@/lib/baselines/states';
import { type ConfigurationResult } from '@/lib/loading/configuration';

/** The results that were submitted and signed, as stored. */
export async function resultOfSubmission(db: Db, submissionId: string): Promise<ConfigurationResult> {
  const { result } = await db
    .selectFrom('submissions')
    .select('result')
    .where('id', '=', submissionId)
    .executeTakeFirstOrThrow();
  return result;
}

/** The frame issue that a submission stands in. */
export async function issueOfSubmission(db: Db, submissionId: string): Promise<string> {
  const { frame_issue_id } = await db
    .selectFrom('submissions')
    .select('frame_issue_id')
    .where('id', '=', submissionId)
    .executeTakeFirstOrThrow();
  return frame_issue_id;
}

/**
 * What a submission is held against: the build's newest baseline that was signed before `decidedAt` (null: by now) and not
 * withdrawn then. `withdrawn` is set where the newest one was: then there was no current one.
 */
export async function baselineBefore(db: Db, buildId: string, decidedAt: Date | null) {
  const row = await db
    .selectFrom('baselines')
    .leftJoin('withdrawals', (join) =>
      join
        .onRef('withdrawals.program_id', '=', 'baselines.program_id')
        .onRef('withdrawals.number', '=', 'baselines.number'),
    )
    .select(['baselines.number', 'baselines.title', 'baselines.submission_id', 'withdrawals.withdrawn_at'])
    .where('baselines.build_id', '=', buildId)
    .$if(decidedAt !== null, (query) => query.where('baselines.signed_at', '<', decidedAt ?? new Date(0)))
    .orderBy('baselines.number', 'desc')
    .limit(1)
    .executeTakeFirst();
  if (row === undefined) return null;
  const { withdrawn_at: withdrawnAt, ...baseline } = row;
  return { ...baseline, withdrawn: withdrawnAt !== null && (decidedAt === null || withdrawnAt < decidedAt) };
}

/** The number that the next signature in a program gives. */
export async function nextBaselineNumber(db: Db, programId: string): Promise<number> {
  const { last } = await db
    .selectFrom('baselines')
    .select((eb) => eb.fn.max('number').as('last'))
    .where('program_id', '=', programId)
    .executeTakeFirstOrThrow();
  return (last ?? 0) + 1;
}

/** The rotating parts that a submission holds, or null. */
export async function rotorsOfSubmission(db: Db, submissionId: string) {
  const row = await db
    .selectFrom('submissions')
    .innerJoin('rotor_revisions', 'rotor_revisions.id', 'submissions.rotor_revision_id')
    .innerJoin('users', 'users.id', 'rotor_revisions.created_by')
    .select([
      'rotor_revisions.id',
      'rotor_revisions.number',
      'rotor_revisions.reason',
      'rotor_revisions.created_by',
      'rotor_revisions.created_at',
      'users.name as author',
    ])
    .where('submissions.id', '=', submissionId)
    .executeTakeFirst();
  return row ?? null;
}

/** The newest submission of a configuration, for what was said in it. */
export function lastSubmissionOf(db: Db, configurationId: string) {
  return db
    .selectFrom('submissions')
    .leftJoin('decisions', 'decisions.submission_id', 'submissions.id')
    .select([
      'submissions.id',
      'submissions.title',
      'submissions.answers',
      'submissions.submitted_at',
      'decisions.decision',
    ])
    .where('submissions.configuration_id', '=', configurationId)
    .orderBy('submissions.submitted_at', 'desc')
    .limit(1)
    .executeTakeFirst();
}

/** What a roll-up of these list revisions leaves out: adjustments that are not approved. */
export async function leftOutOf(db: Db, revisionIds: readonly string[]) {
  const { rows } = await sql<{ list: string; status: 'pending' | 'potential'; rows: number; mass: number }>`
    select l.code as list, s.status, sum(s.rows)::integer as rows, sum(s.basic[1])::float8 as mass
    from list_revisions r
      join lists l on l.id = r.list_id
      join revision_subtotals s on s.revision_id = r.id and s.frame_issue_id = r.frame_issue_id
    where r.id = any(${revisionIds}) and s.status <> 'approved'
    group by l.code, s.status order by l.code, s.status
  `.execute(db);
  return rows;
}

/** Mass (kg) and CG (% MAC) of one condition in every signed baseline of a program, by number, as stored. */
export async function massHistory(db: Db, programId: string, condition: string) {
  const { rows } = await sql<{
    number: number;
    title: string;
    build: string;
    buildTitle: string;
    signedAt: Date;
    supersededBy: number | null;
    withdrawnAt: Date | null;
    mass: number | null;
    predicted: number | null;
    percentMac: number | null;
  }>`
    select b.number, b.title, builds.code as build, builds.title as "buildTitle", b.signed_at as "signedAt",
      u.superseded_by as "supersededBy", w.withdrawn_at as "withdrawnAt",
      (c.one #>> '{rollUp,basic,mass}')::float8 as mass,
      (c.one #>> '{rollUp,predicted,mass}')::float8 as predicted,
      (c.one #>> '{rollUp,basic,properties,percentMac}')::float8 as "percentMac"
    from baselines b
      join builds on builds.id = b.build_id
      join submissions s on s.id = b.submission_id
      left join supersessions u on u.program_id = b.program_id and u.number = b.number
      left join withdrawals w on w.program_id = b.program_id and w.number = b.number
      left join lateral (
        select one from jsonb_array_elements(s.result -> 'conditions') one where one ->> 'code' = ${condition} limit 1
      ) c on true
    where b.program_id = ${programId}
    order by b.number
  `.execute(db);
  return rows.map(({ supersededBy, withdrawnAt, ...row }) => ({
    ...row,
    state: baselineState({ superseded: supersededBy !== null, withdrawn: withdrawnAt !== null }),
  }));
}

export type MassAtBaseline = Awaited<ReturnType<typeof massHistory>>[number];
