import { findConfiguration } from '@/db/queries/configurations';
import { findingKey } from '@/lib/baselines/finding-key';
import { type OperatingPoint, type Rotor } from '@/lib/rotors/rotor';
import { signSubmission } from '@/lib/server/baselines/sign-submission';
import { submitConfiguration } from '@/lib/server/baselines/submit-configuration';
import { createConfiguration } from '@/lib/server/configurations/create-configuration';
import { evaluate } from '@/lib/server/configurations/roll-up-configuration';
import { saveCondition } from '@/lib/server/configurations/save-condition';
import { newId } from '@/lib/server/ids';
import { reviseRotors } from '@/lib/server/rotors/revise-rotors';
import { radians, radiansPerSecond } from '@/lib/units/convert';
import { type ProgramUnderTest, reviseList } from './program';

/* An invented hopper with an asymmetric fit, so that no product of inertia is zero. */
const WING = `item,group,mass,x,y,z,ixx,iyy,izz,symmetry,maturity,growth_percent,mass_sigma,x_sigma
spar,Wing,120.3,6.41,2.53,1.21,90,8,95,pair,C,3,1.5,0.01
tank bay,Wing,60.7,6.83,3.02,1.24,20,5,24,pair,E,15,2,0.02
radar,Wing,31.9,6.12,-4.4,1.07,0.7,0.6,0.8,,C,5,0.4,0.01
`;
const BODY = `item,group,mass,x,y,z,ixx,iyy,izz,ixz,maturity
shell,Body,901.7,6.63,0.02,1.43,503,4207,4311,-123,C
`;

const angles = (yaw: number, pitch: number, sense: 'cw' | 'ccw') =>
  ({ kind: 'angles', yaw: radians(yaw), pitch: radians(pitch), sense }) as const;
const rest = { component: null, blades: null, group: null, note: null };

export const ROTORS: readonly Rotor[] = [
  {
    ...rest,
    rotor: 'left propeller',
    polarInertia: 5.3,
    axis: angles(-1, 2, 'cw'),
    gearRatio: 0.1,
    shaft: 'left engine',
    polarInertiaSigma: 0.2,
  },
  {
    ...rest,
    rotor: 'right propeller',
    polarInertia: 5.3,
    axis: angles(1, 2, 'cw'),
    gearRatio: 0.1,
    shaft: 'right engine',
    polarInertiaSigma: null,
  },
  {
    ...rest,
    rotor: 'left spool',
    polarInertia: 0.041,
    axis: angles(-1, 2, 'ccw'),
    gearRatio: 1,
    shaft: 'left engine',
    polarInertiaSigma: null,
  },
];

export const CRUISE_RPM = { 'left engine': 12_345.6, 'right engine': 12_001 } as const;
export const POINTS: readonly OperatingPoint[] = [
  {
    code: 'cruise',
    title: 'Cruise',
    speeds: Object.entries(CRUISE_RPM).map(([shaft, rpm]) => ({
      shaft,
      speed: radiansPerSecond(rpm),
      sigma: null,
    })),
  },
];

/** Two lists, one of them marked, rotating parts with one operating point, and two more builds than the design build. */
export async function fillProgram(test: ProgramUnderTest): Promise<void> {
  const { db, program, crew } = test;
  await reviseList(test, crew.weights, 'wing', WING, { uncertainty: '1sigma' });
  await reviseList(test, crew.weights2, 'body', BODY, { marking: 'Proprietary, "Skerry"' });
  await reviseRotors(db, {
    person: crew.weights,
    programId: program.id,
    reason: 'for the test',
    base: 0,
    rotors: ROTORS,
    points: POINTS,
  });
  await db
    .insertInto('reference_points')
    .values({
      frame_issue_id: test.frameIssueId,
      code: 'MRC',
      title: 'Moment reference',
      place: [6.5, 0, 1],
      created_by: crew.chief.userId,
    })
    .execute();
  for (const [code, title] of [
    ['as-built', 'As built'],
    ['ferry', 'Ferry'],
  ] as const)
    await db
      .insertInto('builds')
      .values({
        id: newId(),
        program_id: program.id,
        code,
        title,
        kind: 'as-built',
        is_default: false,
        created_by: crew.chief.userId,
      })
      .execute();
}

/** A configuration of the newest revisions with two conditions, submitted with every warning answered. */
export async function submitted(
  test: ProgramUnderTest,
  {
    code,
    title,
    build = 'design',
  }: { readonly code: string; readonly title: string; readonly build?: string },
) {
  const { db, program, crew } = test;
  const person = crew.weights;
  await createConfiguration(db, { person, programId: program.id, buildCode: build, code, title });
  const made = await reach(test, code);
  await saveCondition(db, {
    person,
    configuration: made,
    version: made.version,
    condition: {
      code: 'ferry',
      title: '=Ferry, with a spare engine',
      categories: ['empty'],
      items: [{ name: 'spare engine', category: 'payload', mass: 211.3, place: [5.2, -0.31, 1.1] }],
    },
  });
  const configuration = await reach(test, code);
  const { findings } = await evaluate(db, configuration);
  const submissionId = await submitConfiguration(db, {
    person,
    program,
    configuration,
    version: configuration.version,
    title,
    reason: 'for the test',
    answers: Object.fromEntries(findings.map((finding) => [findingKey(finding), 'Looked at, it is so.'])),
  });
  return { configuration, submissionId };
}

/** The same, and signed by the program's first chief engineer. */
export async function signed(test: ProgramUnderTest, what: Parameters<typeof submitted>[1]) {
  const { configuration, submissionId } = await submitted(test, what);
  const { program, crew } = test;
  return {
    configuration,
    submissionId,
    ...(await signSubmission(test.db, { person: crew.chief, program, submissionId })),
  };
}

async function reach(test: ProgramUnderTest, code: string) {
  const found = await findConfiguration(test.db, test.program.id, code);
  if (found === undefined) throw new Error(`there is no configuration ${code}`);
  return found;
}
