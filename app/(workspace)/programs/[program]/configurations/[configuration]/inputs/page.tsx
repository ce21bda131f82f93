import { type Metadata } from 'next';
import { notFound } from 'next/navigation';
import { findConfiguration, pinnedRevisions, rotorRevisionsOf } from '@/db/queries/configurations';
import { revisionsInFrame } from '@/db/queries/list-revisions';
import { PinsForm, type PinChoice } from '@/components/configurations/pins-form';
import { EmptyPlace } from '@/components/ui/empty-place';
import { PageHead } from '@/components/ui/section';
import { TextLink } from '@/components/ui/text-link';
import { serverDb } from '@/lib/server/database';
import { requireProgram } from '@/lib/server/http/page';
import { ProgramFrame } from '../../../frame';
import { pinRevisionsAction } from '../../actions';

export const metadata: Metadata = { title: 'Choose revisions' };

const day = (at: Date): string => at.toISOString().slice(0, 10);

/** Which lists are part of a configuration, and on which revision each of them stands. */
export default async function InputsPage({
  params,
}: PageProps<'/programs/[program]/configurations/[configuration]/inputs'>) {
  const { configuration: code, program: programCode } = await params;
  const access = await requireProgram(programCode, 'configurations.keep');
  const { program } = access;
  const db = serverDb();
  const configuration = await findConfiguration(db, program.id, code);
  if (configuration === undefined) notFound();
  const [pins, revisions, rotors] = await Promise.all([
    pinnedRevisions(db, configuration.id),
    revisionsInFrame(db, program.id, configuration.frame_issue_id),
    rotorRevisionsOf(db, program.id),
  ]);
  const home = `/programs/${program.code}/configurations/${configuration.code}`;
  const lists = [...new Map(revisions.map((one) => [one.list_code, one.list_title]))];
  const choices: PinChoice[] = lists.map(([list, title]) => ({
    name: `list:${list}`,
    label: title,
    pinned: String(pins.find((pin) => pin.list_code === list)?.number ?? ''),
    options: revisions
      .filter((one) => one.list_code === list)
      .map((one, index) => ({
        value: String(one.number),
        label: `Revision ${one.number}${index === 0 ? ', newest' : ''}: ${one.reason} (${one.rows} rows, ${day(one.created_at)})`,
      })),
  }));
  if (rotors.length > 0)
    choices.push({
      name: 'rotors',
      label: 'Rotating parts',
      pinned: String(configuration.rotor_revision_number ?? ''),
      options: rotors.map((one, index) => ({
        value: String(one.number),
        label: `Revision ${one.number}${index === 0 ? ', newest' : ''}: ${one.reason} (${one.rotors.length} rotors, ${day(one.created_at)})`,
      })),
    });
  return (
    <ProgramFrame access={access} current="configurations">
      <PageHead
        title="Choose revisions"
        above={<TextLink href={home}>{configuration.title}</TextLink>}
        lead={`Lists of frame issue ${configuration.frame_issue_number}. The configuration keeps what is chosen here until someone chooses again.`}
      />
      {choices.length === 0 ? (
        <EmptyPlace title="There is no list revision in this frame issue yet">
          <p>Upload a mass list first; then its revisions can be chosen here.</p>
        </EmptyPlace>
      ) : (
        <PinsForm
          key={configuration.version}
          action={pinRevisionsAction}
          fields={{
            program: program.code,
            configuration: configuration.code,
            version: String(configuration.version),
          }}
          choices={choices}
          backHref={home}
        />
      )}
    </ProgramFrame>
  );
}
