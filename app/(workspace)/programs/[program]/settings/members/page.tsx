import { type Metadata } from 'next';
import { listMembers } from '@/db/queries/programs';
import { MemberForm } from '@/components/people/member-form';
import { MemberTable } from '@/components/people/member-table';
import { SettingsNav } from '@/components/settings/settings-nav';
import { PageHead, Section } from '@/components/ui/section';
import { TextLink } from '@/components/ui/text-link';
import { serverDb } from '@/lib/server/database';
import { requireProgram } from '@/lib/server/http/page';
import { ProgramFrame } from '../../frame';
import { addMemberAction, changeMemberRoleAction, removeMemberAction } from './actions';

export const metadata: Metadata = { title: 'Members' };

export default async function MembersPage({ params }: PageProps<'/programs/[program]/settings/members'>) {
  const access = await requireProgram((await params).program, 'members.read');
  const { program, can } = access;
  const members = await listMembers(serverDb(), program.id);
  const keeps = can('members.keep');
  return (
    <ProgramFrame access={access}>
      <PageHead
        title="Members"
        above={<TextLink href={`/programs/${program.code}`}>{program.title}</TextLink>}
        lead="Chief engineers keep members, geometry and limits. Weights engineers keep lists, rotating parts and configurations. Simulation engineers see what has been signed."
      />
      {can('settings.read') ? <SettingsNav program={program.code} current="/members" /> : null}
      <MemberTable
        members={members}
        program={program.code}
        actions={keeps ? { changeRole: changeMemberRoleAction, remove: removeMemberAction } : null}
      />
      {keeps ? (
        <Section title="Add a member">
          <MemberForm action={addMemberAction} program={program.code} />
        </Section>
      ) : null}
    </ProgramFrame>
  );
}
