import { type Metadata } from 'next';
import { listPeople } from '@/db/queries/people';
import { listAllPrograms } from '@/db/queries/programs';
import { InviteForm } from '@/components/people/invite-form';
import { PeopleTable } from '@/components/people/people-table';
import { ProgramForm } from '@/components/people/program-form';
import { Day } from '@/components/ui/day';
import { EmptyPlace } from '@/components/ui/empty-place';
import { PageHead, Section } from '@/components/ui/section';
import { Cell, ColumnHead, RowHead, Table } from '@/components/ui/table';
import { TextLink } from '@/components/ui/text-link';
import { serverDb } from '@/lib/server/database';
import { requireUser } from '@/lib/server/http/page';
import { WorkspaceFrame } from '../frame';
import {
  createProgramAction,
  disablePersonAction,
  enablePersonAction,
  invitePersonAction,
  resendInvitationAction,
} from './actions';

export const metadata: Metadata = { title: 'Administration' };

export default async function AdminPage() {
  const { user } = await requireUser('people.keep');
  const [people, programs] = await Promise.all([listPeople(serverDb()), listAllPrograms(serverDb())]);
  return (
    <WorkspaceFrame user={user}>
      <PageHead
        title="Administration"
        lead="Who is here, and which programs there are. What is in a program is seen by its members only."
      />
      <Section title="Programs" aside={String(programs.length)}>
        {programs.length === 0 ? (
          <EmptyPlace title="There is no program yet">
            <p>A program is one aircraft design and everyone who works on it. Make the first one below.</p>
          </EmptyPlace>
        ) : (
          <Table caption="Programs" captionHidden>
            <thead>
              <tr>
                <ColumnHead>Program</ColumnHead>
                <ColumnHead>Code</ColumnHead>
                <ColumnHead>Chief engineers</ColumnHead>
                <ColumnHead side="right">Members</ColumnHead>
                <ColumnHead>Made</ColumnHead>
              </tr>
            </thead>
            <tbody>
              {programs.map((program) => (
                <tr key={program.id}>
                  <RowHead>
                    <TextLink href={`/admin/programs/${program.code}`}>{program.title}</TextLink>
                  </RowHead>
                  <Cell className="font-mono">{program.code}</Cell>
                  <Cell>{program.chiefs.join(', ')}</Cell>
                  <Cell side="right" className="num">
                    {program.members}
                  </Cell>
                  <Cell>
                    <Day at={program.createdAt} />
                  </Cell>
                </tr>
              ))}
            </tbody>
          </Table>
        )}
      </Section>
      <Section title="Make a program">
        <ProgramForm action={createProgramAction} />
      </Section>
      <Section title="People" aside={String(people.length)}>
        <PeopleTable
          people={people}
          ownId={user.id}
          actions={{
            resend: resendInvitationAction,
            disable: disablePersonAction,
            enable: enablePersonAction,
          }}
        />
      </Section>
      <Section title="Invite a person">
        <InviteForm action={invitePersonAction} />
      </Section>
    </WorkspaceFrame>
  );
}
