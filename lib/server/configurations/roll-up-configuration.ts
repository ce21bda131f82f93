import { createHash } from 'node:crypto';
import canonicalize from 'canonicalize';
import { type Db } from '@/db/client';
import {
  allowancesOf,
  conditionsOf,
  type Configuration,
  findRotorRevision,
  pinnedRevisions,
  type RotorRevision,
  subtotalsOf,
} from '@/db/queries/configurations';
import { type ProgramFrames, programFrames } from '@/db/queries/program-frames';
import { groupBreakdownOf, limitsInForce } from '@/db/queries/settings';
import { AppError } from '@/lib/errors';
import { type Finding, type PlacedFinding } from '@/lib/findings/finding';
import { findingsOnLimits } from '@/lib/findings/limits/look';
import { findingsOnWhole } from '@/lib/findings/look';
import {
  type Condition,
  type ConfigurationResult,
  evaluateConfiguration,
  standingsOf,
} from '@/lib/loading/configuration';
import { allowanceFor } from '@/lib/mass/allowances';
import { convertRotor } from '@/lib/rotors/convert';
import { type Rotor } from '@/lib/rotors/rotor';
import { type Person } from '@/lib/server/actor';
import { recordEvent } from '@/lib/server/audit/record-event';
import { newId } from '@/lib/server/ids';
import { rotorFindings } from '@/lib/server/rotors/rotor-findings';
import { removalFindings } from './removal-findings';
import { inPresentGroup, unknownGroups, withoutUnknownGroups } from './present-groups';

export interface Evaluation {
  readonly result: ConfigurationResult;
  readonly findings: readonly PlacedFinding[];
  readonly inputSha256: string;
}

/**
 * Evaluates a configuration from the stored subtotals of its pinned revisions. Rows are read only to judge: those that carry rotors,
 * removals, and those that removals may mean.
 * @throws AppError conflict when it has no condition or no list yet.
 */
export async function evaluate(db: Db, configuration: Configuration): Promise<Evaluation> {
  const frames = await programFrames(db, configuration.program_id);
  const issue = frames.issue(configuration.frame_issue_id);
  const pins = await pinnedRevisions(db, configuration.id);
  const conditions = await conditionsOf(db, configuration.id);
  const allowances = await allowancesOf(db, configuration.program_id);
  const limits = await limitsInForce(db, configuration.program_id);
  const groups = await groupBreakdownOf(db, configuration.program_id);
  if (pins.length === 0)
    throw new AppError('conflict', 'This configuration holds no list yet. Choose list revisions first.');
  if (conditions.length === 0)
    throw new AppError(
      'conflict',
      'This configuration has no condition yet. Add one, the empty aircraft for a start.',
    );
  const rotating =
    configuration.rotor_revision_id === null
      ? null
      : await findRotorRevision(db, configuration.rotor_revision_id);
  const geometry = frames.geometry(issue.id);
  const rotors = rotorsIn(frames, rotating, issue.id);
  const stored = await subtotalsOf(
    db,
    pins.map((pin) => pin.revision_id),
    issue.id,
  );
  const subtotals = stored.map((part) => inPresentGroup(part, groups));
  const loadings: Condition[] = conditions.map((condition) => ({
    code: condition.code,
    title: condition.title,
    categories: condition.categories,
    items: condition.items.map((item) => ({ name: item.name, mass: item.mass, position: vec(item.place) })),
  }));
  const result = evaluateConfiguration({
    geometry,
    allowances,
    subtotals,
    conditions: loadings,
    rotors,
    points: rotating?.points ?? [],
    limits,
    frameIssue: issue.number,
  });
  const inputs = {
    frameIssue: issue.id,
    allowances,
    ...(limits.length === 0 ? {} : { limits }),
    lists: pins.map((pin) => ({
      list: pin.list_code,
      revision: pin.number,
      sha256: pin.content_sha256,
      ...(pin.frame_issue_id === issue.id
        ? {}
        : { converted: frames.conversion(pin.frame_issue_id, issue.id).change }),
    })),
    rotors: rotating === null ? null : { revision: rotating.number, rotors, points: rotating.points },
    conditions: loadings,
  };
  return {
    result,
    findings: [
      ...result.conditions.flatMap(({ code, rollUp }) =>
        placed(findingsOnWhole(rollUp, geometry), { kind: 'condition', code }),
      ),
      ...findingsOnLimits(standingsOf(result)),
      ...unknownGroups(stored, pins, groups),
      ...(rotating === null
        ? []
        : placed(
            await rotorFindings(
              db,
              { rotors, points: rotating.points },
              geometry,
              pins.map((pin) => ({
                code: pin.list_code,
                revisionId: pin.revision_id,
                conversion: frames.conversion(pin.frame_issue_id, issue.id),
              })),
            ),
            { kind: 'rotors', code: '', revision: rotating.number },
          )),
      ...(await removalFindings(
        db,
        pins,
        (issueId) => frames.conversion(issueId, issue.id),
        (group, maturity) => allowanceFor(allowances, groups.present(group), maturity).fraction,
      )),
      ...pins.flatMap((pin) =>
        placed(withoutUnknownGroups(pin.findings), {
          kind: 'list',
          code: pin.list_code,
          revision: pin.number,
        }),
      ),
    ],
    inputSha256: createHash('sha256')
      .update(canonicalize(inputs) ?? '')
      .digest('hex'),
  };
}

/** Rotating parts as they stand in an issue; those of no issue, made before the first one, stand in any. */
function rotorsIn(
  frames: ProgramFrames,
  rotating: Pick<RotorRevision, 'rotors' | 'frame_issue_id'> | null,
  issueId: string,
): readonly Rotor[] {
  if (rotating === null) return [];
  const { rotors, frame_issue_id: statedIn } = rotating;
  if (statedIn === null || statedIn === issueId) return rotors;
  const { change, from, to } = frames.conversion(statedIn, issueId);
  return rotors.map((rotor) => convertRotor(rotor, change, from.axes, to.axes));
}

/** Rolls a configuration up and keeps the result, with who asked and what it was made from. */
export async function rollUpConfiguration(
  db: Db,
  input: { readonly person: Person; readonly configuration: Configuration },
): Promise<Evaluation> {
  const { person, configuration } = input;
  return db
    .transaction()
    .setIsolationLevel('repeatable read')
    .execute(async (trx) => {
      const evaluation = await evaluate(trx, configuration);
      await trx
        .insertInto('roll_ups')
        .values({
          id: newId(),
          configuration_id: configuration.id,
          configuration_version: configuration.version,
          input_sha256: evaluation.inputSha256,
          result: JSON.stringify(evaluation.result),
          findings: JSON.stringify(evaluation.findings),
          created_by: person.userId,
        })
        .execute();
      await recordEvent(trx, {
        scope: configuration.program_id,
        actor: person,
        kind: 'configuration.rolled-up',
        subject: configuration.code,
        detail: {
          code: configuration.code,
          version: configuration.version,
          inputSha256: evaluation.inputSha256,
        },
      });
      return evaluation;
    });
}

function placed(findings: readonly Finding[], where: PlacedFinding['where']): PlacedFinding[] {
  return findings.map((finding) => ({ ...finding, where }));
}

function vec(numbers: readonly number[]): readonly [number, number, number] {
  const [x = NaN, y = NaN, z = NaN] = numbers;
  return [x, y, z];
}
