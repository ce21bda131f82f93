import { sql } from 'kysely';
import { type Db } from '@/db/client';
import { type Configuration, pinnedRevisions } from '@/db/queries/configurations';
import { CAUTION } from '@/lib/baselines/caution';
import { findingKey } from '@/lib/baselines/finding-key';
import { combinedMarking } from '@/lib/baselines/marking';
import { AppError, type InputError } from '@/lib/errors';
import { type PlacedFinding } from '@/lib/findings/finding';
import { type Person } from '@/lib/server/actor';
import { recordEvent } from '@/lib/server/audit/record-event';
import { evaluate } from '@/lib/server/configurations/roll-up-configuration';
import { newId } from '@/lib/server/ids';
import { mailPeople } from './mail-people';

export interface SubmitConfiguration {
  readonly person: Person;
  readonly program: { readonly id: string; readonly code: string; readonly title: string };
  readonly configuration: Configuration;
  /** The version that the person saw. */
  readonly version: number;
  readonly title: string;
  readonly reason: string;
  /** `findingKey` -> a sentence, for every warning. */
  readonly answers: Readonly<Record<string, string>>;
}

/**
 * Freezes what a configuration says now and puts it before the program's chief engineers. Approved adjustments only.
 * @throws AppError conflict when there are blockers, when it changed meanwhile or waits for a decision already; invalid-input for
 * a warning without an answer.
 */
export async function submitConfiguration(db: Db, input: SubmitConfiguration): Promise<string> {
  const { person, program, configuration } = input;
  return db.transaction().execute(async (trx) => {
    await sql`select pg_advisory_xact_lock(hashtextextended(${`configuration:${configuration.id}`}, 0))`.execute(
      trx,
    );
    const now = await trx
      .selectFrom('configurations')
      .selectAll()
      .where('id', '=', configuration.id)
      .forUpdate()
      .executeTakeFirstOrThrow();
    if (now.version !== input.version)
      throw new AppError(
        'conflict',
        'This configuration has changed since you looked at it. Look again, then submit.',
      );
    const waiting = await trx
      .selectFrom('submissions')
      .leftJoin('decisions', 'decisions.submission_id', 'submissions.id')
      .select('submissions.id')
      .where('submissions.configuration_id', '=', configuration.id)
      .where('decisions.submission_id', 'is', null)
      .executeTakeFirst();
    if (waiting)
      throw new AppError(
        'conflict',
        'This configuration waits for a decision already. Wait until it is signed or returned.',
      );
    const { result, findings, inputSha256 } = await evaluate(trx, now);
    assertSubmittable(findings, input.answers);
    const pins = await pinnedRevisions(trx, configuration.id);
    const id = newId();
    await trx
      .insertInto('submissions')
      .values({
        id,
        program_id: program.id,
        build_id: now.build_id,
        configuration_id: now.id,
        configuration_version: now.version,
        frame_issue_id: now.frame_issue_id,
        rotor_revision_id: now.rotor_revision_id,
        title: input.title,
        reason: input.reason,
        marking: combinedMarking(pins.map((pin) => pin.marking)),
        result: JSON.stringify(result),
        findings: JSON.stringify(findings),
        answers: JSON.stringify(answersFor(findings, input.answers)),
        input_sha256: inputSha256,
        submitted_by: person.userId,
      })
      .execute();
    await trx
      .insertInto('submission_revisions')
      .values(pins.map((pin) => ({ submission_id: id, list_id: pin.list_id, revision_id: pin.revision_id })))
      .execute();
    await recordEvent(trx, {
      scope: program.id,
      actor: person,
      kind: 'baseline.submitted',
      subject: input.title,
      detail: { submission: id, title: input.title, configuration: now.code, version: now.version },
    });
    await mailPeople(trx, {
      programId: program.id,
      roles: ['chief'],
      except: person.userId,
      isDecision: false,
      subject: `${program.title}: "${input.title}" waits for a decision`,
      blocks: [
        { kind: 'heading', text: `"${input.title}" was submitted for approval` },
        {
          kind: 'paragraph',
          text: `Program ${program.title}, configuration ${now.code}. Reason: ${input.reason}`,
        },
        {
          kind: 'link',
          label: 'Review the submission',
          path: `/programs/${program.code}/baselines/submissions/${id}`,
        },
        { kind: 'paragraph', text: CAUTION },
      ],
    });
    return id;
  });
}

function assertSubmittable(
  findings: readonly PlacedFinding[],
  answers: Readonly<Record<string, string>>,
): void {
  const blockers = findings.filter((finding) => finding.severity === 'blocker');
  if (blockers.length > 0)
    throw new AppError(
      'conflict',
      `${blockers.length === 1 ? 'A blocker stops' : `${blockers.length} blockers stop`} this submission: ` +
        blockers.map((finding) => finding.message).join(' '),
    );
  const errors: InputError[] = findings
    .filter((finding) => finding.severity === 'warning' && !answers[findingKey(finding)]?.trim())
    .map((finding) => ({
      pointer: `/answers/${findingKey(finding)}`,
      message: `Answer this warning with a sentence: ${finding.message}`,
    }));
  if (errors.length > 0)
    throw new AppError('invalid-input', 'Every warning needs an answer before this can be submitted.', {
      errors,
    });
}

/** Only answers to findings that are there are kept. */
function answersFor(
  findings: readonly PlacedFinding[],
  answers: Readonly<Record<string, string>>,
): Record<string, string> {
  const kept = findings.flatMap((finding) => {
    const answer = answers[findingKey(finding)]?.trim();
    return answer ? [[findingKey(finding), answer] as const] : [];
  });
  return Object.fromEntries(kept);
}
