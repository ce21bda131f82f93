import { type Metadata } from 'next';
import { listProgramsOf } from '@/db/queries/programs';
import { ButtonLink } from '@/components/ui/button';
import { EmptyPlace } from '@/components/ui/empty-place';
import { PageHead } from '@/components/ui/section';
import { Cell, ColumnHead, RowHead, Table } from '@/components/ui/table';
import { TextLink } from '@/components/ui/text-link';
import { may, ROLE_NAMES } from '@/lib/permissions';
import { serverDb } from '@/lib/server/database';
import { requireUser } from '@/lib/server/http/page';
import { WorkspaceFrame } from './frame';

export const metadata: Metadata = { title: 'Programs' };

export default async function ProgramsPage() {
  const { user } = await requireUser('programs.list');
  const programs = await listProgramsOf(serverDb(), user.id);
  const creates = may('programs.create', { admin: user.admin, role: null });
  return (
    <WorkspaceFrame user={user}>
      <PageHead title="Programs" lead="The aircraft designs that you work on." />
      {programs.length === 0 ? (
        <EmptyPlace
          title="You belong to no program yet"
          action={creates ? <ButtonLink href="/admin">Go to administration</ButtonLink> : null}
        >
          <p>
            {creates
              ? 'Administrators make programs and name their first chief engineer. To work in one, be added as a member.'
              : 'A chief engineer of a program adds you to it. Programs that you belong to are listed here.'}
          </p>
        </EmptyPlace>
      ) : (
        <Table caption="Your programs" captionHidden>
          <thead>
            <tr>
              <ColumnHead>Program</ColumnHead>
              <ColumnHead>Code</ColumnHead>
              <ColumnHead>Your role</ColumnHead>
            </tr>
          </thead>
          <tbody>
            {programs.map((program) => (
              <tr key={program.id}>
                <RowHead>
                  <TextLink href={`/programs/${program.code}`}>{program.title}</TextLink>
                </RowHead>
                <Cell className="font-mono">{program.code}</Cell>
                <Cell>{ROLE_NAMES[program.role]}</Cell>
              </tr>
            ))}
          </tbody>
        </Table>
      )}
    </WorkspaceFrame>
  );
}
