import { type Metadata } from 'next';
import { currentFrameIssue } from '@/db/queries/frames';
import { listMembers } from '@/db/queries/programs';
import { ButtonLink } from '@/components/ui/button';
import { EmptyPlace } from '@/components/ui/empty-place';
import { PageHead, Section } from '@/components/ui/section';
import { TextLink } from '@/components/ui/text-link';
import { ROLE_NAMES } from '@/lib/permissions';
import { serverDb } from '@/lib/server/database';
import { requireProgram } from '@/lib/server/http/page';
import { ProgramFrame } from './frame';
import { HandOffHere } from './hand-off-here';
import { BaselinesHere, ConfigurationsHere, ListsHere, RotatingPartsHere } from './stations-here';

export async function generateMetadata({ params }: PageProps<'/programs/[program]'>): Promise<Metadata> {
  const { program } = await requireProgram((await params).program, 'program.read');
  return { title: program.title };
}

/** What waits where in a program, for each role what it works on. */
export default async function ProgramPage({ params }: PageProps<'/programs/[program]'>) {
  const access = await requireProgram((await params).program, 'program.read');
  const { program, role, can } = access;
  const home = `/programs/${program.code}`;
  const [frame, members] = await Promise.all([
    currentFrameIssue(serverDb(), program.id),
    listMembers(serverDb(), program.id),
  ]);
  const handOffFirst = can('baselines.read') && !can('lists.read');
  // Who decides sees what waits for a decision first, who only reads sees what to take, then which baselines there are.
  const baselinesFirst = (frame !== undefined && can('baselines.decide')) || !can('lists.read');
  const chiefs = members.filter((member) => member.role === 'chief').map((member) => member.name);
  return (
    <ProgramFrame access={access}>
      <PageHead
        title={program.title}
        lead={role === null ? null : `You are ${ROLE_NAMES[role].toLowerCase()} here.`}
      />
      {frame === undefined && can('settings.read') ? (
        <EmptyPlace
          title="The airframe frame is not set yet"
          action={
            can('frame.keep') ? (
              <ButtonLink kind="primary" href={`${home}/settings`}>
                Set the airframe frame
              </ButtonLink>
            ) : null
          }
        >
          <p>
            Every list and every result refers to the airframe frame: its axes, datum and mean chord.{' '}
            {can('frame.keep')
              ? 'It comes first; lists follow.'
              : `A chief engineer sets it first: ${chiefs.join(', ')}.`}
          </p>
        </EmptyPlace>
      ) : null}
      {handOffFirst ? <HandOffHere access={access} /> : null}
      {baselinesFirst ? <BaselinesHere access={access} /> : null}
      {frame !== undefined && can('lists.read') ? <ListsHere access={access} /> : null}
      {frame !== undefined && can('rotors.read') ? <RotatingPartsHere access={access} /> : null}
      {frame !== undefined && can('configurations.read') ? <ConfigurationsHere access={access} /> : null}
      {frame === undefined || baselinesFirst ? null : <BaselinesHere access={access} />}
      <Section
        title="People"
        aside={
          <TextLink href={`${home}/settings/members`}>
            {members.length === 1 ? 'Its only member' : `All ${members.length} members`}
          </TextLink>
        }
      >
        <p>
          {chiefs.length === 1 ? 'Chief engineer: ' : 'Chief engineers: '}
          {chiefs.join(', ')}
        </p>
      </Section>
    </ProgramFrame>
  );
}
