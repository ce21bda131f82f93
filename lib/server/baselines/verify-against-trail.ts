import canonicalize from 'canonicalize';
import { type Db } from '@/db/client';
import { type AuditDetails } from '@/lib/audit/events';
import { eventWords } from '@/lib/audit/words';

type DecisionKind = Extract<keyof AuditDetails, `baseline.${string}`>;

/** One step of a baseline, as the trail tells it or as the tables do. */
interface Step {
  readonly programId: string;
  readonly kind: string;
  readonly userId: string | null;
  readonly detail: unknown;
}

interface Told<K extends DecisionKind> extends Step {
  readonly kind: K;
  readonly detail: AuditDetails[K];
}

/**
 * Compares what is stored of submissions, decisions, baselines, supersessions and withdrawals with what the trail says was done, both
 * ways: whoever alters a document together with its digest, or takes a withdrawal away, has not altered the chain.
 */
export async function verifyAgainstTrail(db: Db): Promise<{ what: string; detail: string }[]> {
  const programs = await db.selectFrom('programs').select(['id', 'code']).execute();
  const codes = new Map(programs.map(({ id, code }) => [id, code]));
  const trail = await stepsOfTrail(db);
  const stored = await stepsStored(db);
  const what = (step: Step) => `baselines of ${codes.get(step.programId) ?? step.programId}`;
  const words = (step: Step) => eventWords(step.kind, step.detail);
  return [
    ...without(stored, trail).map((step) => ({
      what: what(step),
      detail: `stored is "${words(step)}", and the trail has no such event of that person`,
    })),
    ...without(trail, stored).map((step) => ({
      what: what(step),
      detail: `the trail says "${words(step)}", and that is not what is stored`,
    })),
  ];
}

/** Those of `steps` that are not among `others`. */
function without(steps: readonly Step[], others: readonly Step[]): Step[] {
  const known = new Set(others.map((step) => canonicalize(step)));
  return steps.filter((step) => !known.has(canonicalize(step)));
}

async function stepsOfTrail(db: Db): Promise<Step[]> {
  const events = await db
    .selectFrom('audit_events')
    .select(['scope', 'kind', 'user_id', 'detail'])
    .where('kind', 'like', 'baseline.%')
    .orderBy('scope')
    .orderBy('number')
    .execute();
  return events.map(({ scope, kind, user_id, detail }) => ({
    programId: scope,
    kind,
    userId: user_id,
    detail,
  }));
}

async function stepsStored(db: Db): Promise<Step[]> {
  return [
    ...(await submitted(db)),
    ...(await returned(db)),
    ...(await signed(db)),
    ...(await superseded(db)),
    ...(await withdrawn(db)),
  ];
}

async function submitted(db: Db): Promise<Told<'baseline.submitted'>[]> {
  const rows = await db
    .selectFrom('submissions')
    .innerJoin('configurations', 'configurations.id', 'submissions.configuration_id')
    .select(['submissions.id', 'submissions.program_id', 'submissions.title', 'submitted_by', 'code'])
    .select('configuration_version as version')
    .execute();
  return rows.map(({ id, program_id, title, submitted_by, code, version }) => ({
    programId: program_id,
    kind: 'baseline.submitted',
    userId: submitted_by,
    detail: { submission: id, title, configuration: code, version },
  }));
}

async function returned(db: Db): Promise<Told<'baseline.returned'>[]> {
  const rows = await db
    .selectFrom('decisions')
    .innerJoin('submissions', 'submissions.id', 'decisions.submission_id')
    .select(['submissions.id', 'program_id', 'title', 'decisions.reason', 'decided_by'])
    .where('decision', '=', 'returned')
    .execute();
  return rows.map(({ id, program_id, title, reason, decided_by }) => ({
    programId: program_id,
    kind: 'baseline.returned',
    userId: decided_by,
    detail: { submission: id, title, reason },
  }));
}

/** Signed by whoever decided; a baseline without its approval, or an approval without its baseline, is not signed. */
async function signed(db: Db): Promise<Told<'baseline.signed'>[]> {
  const rows = await db
    .selectFrom('baselines')
    .innerJoin('decisions', (join) =>
      join
        .onRef('decisions.submission_id', '=', 'baselines.submission_id')
        .onRef('decisions.decided_by', '=', 'baselines.signed_by')
        .on('decision', '=', 'approved'),
    )
    .select(['program_id', 'baselines.submission_id', 'title', 'number', 'digest', 'signed_by'])
    .execute();
  return rows.map(({ program_id, submission_id, title, number, digest, signed_by }) => ({
    programId: program_id,
    kind: 'baseline.signed',
    userId: signed_by,
    detail: { submission: submission_id, title, number, digest },
  }));
}

async function superseded(db: Db): Promise<Told<'baseline.superseded'>[]> {
  const rows = await db
    .selectFrom('supersessions')
    .innerJoin('baselines', (join) =>
      join
        .onRef('baselines.program_id', '=', 'supersessions.program_id')
        .onRef('baselines.number', '=', 'supersessions.superseded_by'),
    )
    .select(['supersessions.program_id', 'supersessions.number', 'superseded_by', 'signed_by'])
    .execute();
  return rows.map(({ program_id, number, superseded_by, signed_by }) => ({
    programId: program_id,
    kind: 'baseline.superseded',
    userId: signed_by,
    detail: { number, by: superseded_by },
  }));
}

async function withdrawn(db: Db): Promise<Told<'baseline.withdrawn'>[]> {
  const rows = await db.selectFrom('withdrawals').selectAll().execute();
  return rows.map(({ program_id, number, reason, withdrawn_by }) => ({
    programId: program_id,
    kind: 'baseline.withdrawn',
    userId: withdrawn_by,
    detail: { number, reason },
  }));
}
