import { type Configuration, findConfiguration } from '@/db/queries/configurations';
import { type DemoConfiguration, type DemoProgram } from '@/fixtures/demo/program';
import { findingKey } from '@/lib/baselines/finding-key';
import { signSubmission } from '@/lib/server/baselines/sign-submission';
import { submitConfiguration } from '@/lib/server/baselines/submit-configuration';
import { createConfiguration } from '@/lib/server/configurations/create-configuration';
import { pinRevisions } from '@/lib/server/configurations/pin-revisions';
import { rollUpConfiguration } from '@/lib/server/configurations/roll-up-configuration';
import { saveCondition } from '@/lib/server/configurations/save-condition';
import { type DemoServices } from './load-demo';
import { type DemoPeople, personOf } from './load-people';
import { type LoadedProgram } from './load-program';

/** The design build's configurations in their order: all but the last are signed, the last one waits for a decision. */
const REASONS: Readonly<Record<string, string>> = {
  preliminary: 'First complete account of the design build, for the simulator of the flight control team.',
  'wing-radar': 'Wing after the spar cap revision, weather radar moved to the left wing.',
  'flight-release':
    'Account for the release of the flight simulator: weighed equipment, power plant as delivered.',
};

/** Configurations with their conditions; two signed baselines of the design build and one submission that waits. */
export async function loadBaselines(
  services: DemoServices,
  demo: DemoProgram,
  program: LoadedProgram,
  people: DemoPeople,
): Promise<void> {
  const ofDesign = demo.configurations.filter((configuration) => configuration.build === 'design');
  const waiting = ofDesign.at(-1);
  for (const configuration of demo.configurations) {
    const made = await loadConfiguration(services, configuration, program, people);
    if (!ofDesign.includes(configuration)) continue;
    const submission = await submit(services, made, configuration, program, people);
    if (configuration === waiting) continue;
    await signSubmission(services.db, {
      person: personOf(people, 'chief'),
      program,
      submissionId: submission,
    });
  }
}

async function loadConfiguration(
  { db }: DemoServices,
  demo: DemoConfiguration,
  program: LoadedProgram,
  people: DemoPeople,
): Promise<Configuration> {
  const person = personOf(people, demo.by);
  await createConfiguration(db, {
    person,
    programId: program.id,
    buildCode: demo.build,
    code: demo.code,
    title: demo.title,
  });
  const find = async (): Promise<Configuration> => {
    const found = await findConfiguration(db, program.id, demo.code);
    if (found === undefined) throw new Error(`the demo has no configuration ${demo.code}`);
    return found;
  };
  const configuration = await find();
  let version = await pinRevisions(db, {
    person,
    configuration,
    version: configuration.version,
    revisions: Object.fromEntries(demo.lists.map(({ list, revision }) => [list, revision])),
    rotors: 1,
  });
  for (const { code, title, items } of demo.conditions) {
    version = await saveCondition(db, {
      person,
      configuration,
      version,
      condition: { code, title, categories: ['empty'], items },
    });
  }
  const final = await find();
  await rollUpConfiguration(db, { person, configuration: final });
  return final;
}

async function submit(
  { db }: DemoServices,
  configuration: Configuration,
  demo: DemoConfiguration,
  program: LoadedProgram,
  people: DemoPeople,
): Promise<string> {
  const rolledUp = await db
    .selectFrom('roll_ups')
    .select('findings')
    .where('configuration_id', '=', configuration.id)
    .executeTakeFirstOrThrow();
  const warnings = rolledUp.findings.filter((finding) => finding.severity === 'warning');
  return submitConfiguration(db, {
    person: personOf(people, demo.by),
    program,
    configuration,
    version: configuration.version,
    title: demo.title,
    reason: REASONS[demo.code] ?? demo.title,
    answers: Object.fromEntries(
      warnings.map((warning) => [
        findingKey(warning),
        'Known: the supplier gives no inertia for this unit yet; its own is small beside its transfer term.',
      ]),
    ),
  });
}
