import { type Metadata } from 'next';
import { listMembers } from '@/db/queries/programs';
import { MemberForm } from '@/components/people/member-form';
import { MemberTable } from '@/components/people/member-table';
import { PageHead, Section } from '@/components/ui/section';
import { TextLink } from '@/components/ui/text-link';
import { serverDb } from '@/lib/server/database';
import { requireProgram, requireUser } from '@/lib/server/http/page';
import { WorkspaceFrame } from '../../../frame';
import {
  addMemberAction,
  changeMemberRoleAction,
  removeMemberAction,
} from '../../../programs/[program]/settings/members/actions';

export const metadata: Metadata = { title: 'Members' };

/** An administrator's way to a program's members; the program's own pages are for its members. */
export default async function ProgramPeoplePage({ params }: PageProps<'/admin/programs/[program]'>) {
  const { user } = await requireUser('people.keep');
  const { program } = await requireProgram((await params).program, 'members.keep');
  const members = await listMembers(serverDb(), program.id);
  return (
    <WorkspaceFrame user={user}>
      <PageHead
        title={program.title}
        above={<TextLink href="/admin">Administration</TextLink>}
        lead={program.code}
      />
      <Section title="Members" aside={String(members.length)}>
        <MemberTable
          members={members}
          program={program.code}
          actions={{ changeRole: changeMemberRoleAction, remove: removeMemberAction }}
        />
      </Section>
      <Section title="Add a member">
        <MemberForm action={addMemberAction} program={program.code} />
      </Section>
    </WorkspaceFrame>
  );
}
