import { type Db } from '@/db/client';
import { type DemoProgram } from '@/fixtures/demo/program';
import { recordEvent } from '@/lib/server/audit/record-event';
import { newId } from '@/lib/server/ids';
import { changeGroups } from '@/lib/server/programs/change-groups';
import { setAllowance } from '@/lib/server/programs/set-allowance';
import { stateLimit } from '@/lib/server/programs/set-limit';
import { type DemoServices } from './load-demo';
import { type DemoPeople, personOf } from './load-people';

export interface LoadedProgram {
  readonly id: string;
  readonly code: string;
  readonly title: string;
}

/** The program with its members, frame, reference points, builds, limits and growth allowances. */
export async function loadProgram(
  { db }: DemoServices,
  demo: DemoProgram,
  people: DemoPeople,
): Promise<LoadedProgram> {
  const admin = personOf(people, 'admin');
  const program = { id: newId(), ...demo.program };
  await db.transaction().execute(async (trx) => {
    await trx
      .insertInto('programs')
      .values({ ...program, created_by: admin.userId })
      .execute();
    await recordEvent(trx, {
      scope: program.id,
      actor: admin,
      kind: 'program.created',
      subject: program.code,
      detail: demo.program,
    });
    for (const { code, email, role } of demo.people) {
      if (role === 'admin') continue;
      await trx
        .insertInto('program_members')
        .values({
          program_id: program.id,
          user_id: personOf(people, code).userId,
          role,
          added_by: admin.userId,
        })
        .execute();
      await recordEvent(trx, {
        scope: program.id,
        actor: admin,
        kind: 'member.added',
        subject: email,
        detail: { email, role },
      });
    }
  });
  await loadGeometry(db, demo, program, people);
  return program;
}

async function loadGeometry(
  db: Db,
  { frameIssue, referencePoints, builds, groups, limits, growthAllowances }: DemoProgram,
  program: LoadedProgram,
  people: DemoPeople,
): Promise<void> {
  const chief = personOf(people, 'chief');
  const mine = { program_id: program.id, created_by: chief.userId };
  const { geometry } = frameIssue;
  const issueId = newId();
  await db.transaction().execute(async (trx) => {
    await trx
      .insertInto('frame_issues')
      .values({
        ...mine,
        id: issueId,
        number: frameIssue.number,
        title: frameIssue.title,
        axis_x: geometry.axes[0],
        axis_y: geometry.axes[1],
        axis_z: geometry.axes[2],
        lemac: [...geometry.lemac],
        mac: geometry.mac,
        span: geometry.span,
        length: geometry.length,
        lateral_plane: geometry.lateralPlane,
        incidence: geometry.incidence,
        reference: [...geometry.reference],
        valid_from: frameIssue.validFrom,
        reason: frameIssue.reason,
      })
      .execute();
    const record = { scope: program.id, actor: chief };
    await recordEvent(trx, {
      ...record,
      kind: 'frame.issued',
      subject: `frame issue ${frameIssue.number}`,
      detail: { number: frameIssue.number, title: frameIssue.title, reason: frameIssue.reason },
    });
    for (const { code, title, place } of referencePoints) {
      await trx
        .insertInto('reference_points')
        .values({ frame_issue_id: issueId, code, title, place: [...place], created_by: chief.userId })
        .execute();
      await recordEvent(trx, {
        ...record,
        kind: 'reference-point.added',
        subject: code,
        detail: { code, frameIssue: frameIssue.number },
      });
    }
    for (const { code, title, kind, serialFrom, serialTo, isDefault } of builds) {
      await trx
        .insertInto('builds')
        .values({
          ...mine,
          id: newId(),
          code,
          title,
          kind,
          serial_from: serialFrom,
          serial_to: serialTo,
          is_default: isDefault,
        })
        .execute();
      await recordEvent(trx, { ...record, kind: 'build.added', subject: code, detail: { code, kind } });
    }
  });
  const about = { person: chief, programId: program.id };
  await changeGroups(db, {
    ...about,
    changes: groups.map(({ path, code }) => ({ kind: 'added', path, to: null, code })),
  });
  for (const limit of limits) await stateLimit(db, { ...about, id: null, limit });
  for (const allowance of growthAllowances) await setAllowance(db, { ...about, ...allowance });
}
